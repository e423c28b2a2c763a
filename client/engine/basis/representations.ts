/** Representations of SU(N) by their weights, in the basis of N entries where the highest weight is a Young diagram. */

export interface Weight {
  /** N non-negative entries; only their differences matter. */
  readonly entries: readonly number[];
  readonly multiplicity: number;
}
export interface Representation {
  /** As one writes it: "3", "3bar", "8", "(1,1)". */
  readonly name: string;
  readonly latex: string;
  /** Rows of the Young diagram, N of them, the last 0. */
  readonly diagram: readonly number[];
  readonly dimension: number;
  readonly weights: readonly Weight[];
  /** Boxes modulo N: 0 for what the centre leaves alone. */
  readonly nality: number;
  /** Index T normalised to 1/2 for the fundamental, and the cubic anomaly to 1 for it. */
  readonly index: number;
  readonly anomaly: number;
}

/** More boxes than this in one diagram is a slip of the pen. */
const MOST_BOXES = 12;
const LARGEST_DIMENSION = 400;

/** Dimension by the hook-content formula. */
function dimensionOf(diagram: readonly number[]): number {
  let above = 1;
  let below = 1;
  const n = diagram.length;
  for (let i = 0; i < n; i++)
    for (let j = i + 1; j < n; j++) {
      above *= (diagram[i] ?? 0) - (diagram[j] ?? 0) + j - i;
      below *= j - i;
    }
  return above / below;
}

/** Weights from semistandard fillings: one row of entries k interlaces the diagram below it (Gelfand, Tsetlin 1950). */
function weightsOf(diagram: readonly number[]): readonly Weight[] {
  const counts = new Map<string, Weight>();
  const note = (entries: readonly number[]) => {
    const text = entries.join(",");
    counts.set(text, { entries, multiplicity: (counts.get(text)?.multiplicity ?? 0) + 1 });
  };
  const descend = (row: readonly number[], above: readonly number[]) => {
    const sum = row.reduce((a, b) => a + b, 0);
    if (row.length === 1) return note([sum, ...above]);
    const choose = (next: readonly number[]) => {
      if (next.length === row.length - 1) {
        descend(next, [sum - next.reduce((a, b) => a + b, 0), ...above]);
        return;
      }
      const at = next.length;
      for (let value = row[at + 1] ?? 0; value <= (row[at] ?? 0); value++) choose([...next, value]);
    };
    choose([]);
  };
  descend(diagram, []);
  return [...counts.values()];
}

function build(name: string, latex: string, diagram: readonly number[]): Representation {
  const n = diagram.length;
  const weights = weightsOf(diagram);
  const boxes = diagram.reduce((a, b) => a + b, 0);
  // Σ over weights of (first entry − mean)², and its cube, against those of the fundamental.
  const moment = (power: number) =>
    weights.reduce(
      (sum, { entries, multiplicity }) => sum + multiplicity * ((entries[0] ?? 0) - boxes / n) ** power,
      0,
    );
  const fundamental = (power: number) => (1 - 1 / n) ** power + (n - 1) * (-1 / n) ** power;
  return {
    name,
    latex,
    diagram,
    dimension: dimensionOf(diagram),
    weights,
    nality: boxes % n,
    index: moment(2) / fundamental(2) / 2,
    anomaly: n < 3 ? 0 : Math.round(moment(3) / fundamental(3)),
  };
}

/** The conjugate representation: rows taken from the first. */
export function conjugate(representation: Representation): Representation {
  const { diagram, name, latex } = representation;
  const first = diagram[0] ?? 0;
  const flipped = diagram.map((row) => first - row).reverse();
  if (flipped.every((row, index) => row === diagram[index])) return representation;
  const barred = name.endsWith("bar");
  return build(
    barred ? name.slice(0, -3) : /^\d+$/.test(name) ? `${name}bar` : `(${labelsOf(flipped).join(",")})`,
    barred || !/^\d+$/.test(name)
      ? barred
        ? name.slice(0, -3)
        : `(${labelsOf(flipped).join(",")})`
      : `\\overline{${latex}}`,
    flipped,
  );
}

/** Dynkin labels of a Young diagram. */
export function labelsOf(diagram: readonly number[]): readonly number[] {
  return diagram.slice(0, -1).map((row, index) => row - (diagram[index + 1] ?? 0));
}

const remembered = new Map<string, Representation | null>();

/**
 * Reads "1", "3", "3bar", "3*", "8", "adj", "fund" or Dynkin labels "(1,1)" of SU(N); null when there is no such
 * representation, or none that is meant by its dimension alone.
 *
 * @example readRepresentation("8", 3)?.nality // 0
 * @example readRepresentation("3bar", 3)?.anomaly // -1
 */
export function readRepresentation(text: string, n: number): Representation | null {
  const key = `${n} ${text.trim()}`;
  const known = remembered.get(key);
  if (known !== undefined) return known;
  const found = read(text.trim().replace(/\s+/g, ""), n);
  if (remembered.size > 500) remembered.clear();
  remembered.set(key, found);
  return found;
}

function read(text: string, n: number): Representation | null {
  const zeros: number[] = Array.from({ length: n }, () => 0);
  if (text === "" || text === "1" || text === "singlet") return build("1", "1", zeros);
  const fundamental = zeros.map((_, index) => (index === 0 ? 1 : 0));
  if (text === "fund" || text === "N") return build(String(n), `${n}`, fundamental);
  if (text === "antifund" || text === "Nbar") return conjugate(build(String(n), `${n}`, fundamental));
  if (text === "adj") return fromLabels(adjoint(n));
  const labels = /^\((\d+(?:,\d+)*)\)$/.exec(text)?.[1]?.split(",").map(Number);
  if (labels) return labels.length === n - 1 ? fromLabels(labels) : null;
  const written = /^(\d+)(bar|\*|̄)?$/.exec(text) ?? /^\\(?:bar|overline)\{?(\d+)\}?$/.exec(text);
  if (!written) return null;
  const barred = written[2] !== undefined || text.startsWith("\\");
  const plain = byDimension(Number(written[1]), n);
  if (!plain) return null;
  return barred ? conjugate(plain) : plain;
}

function adjoint(n: number): number[] {
  if (n === 2) return [2];
  return Array.from({ length: n - 1 }, (_, index) => (index === 0 || index === n - 2 ? 1 : 0));
}

function fromLabels(labels: readonly number[]): Representation | null {
  const diagram = [...labels, 0].map((_, row) => labels.slice(row).reduce((a, b) => a + b, 0));
  if (diagram.reduce((a, b) => a + b, 0) > MOST_BOXES * 2 || dimensionOf(diagram) > LARGEST_DIMENSION)
    return null;
  const dimension = dimensionOf(diagram);
  const isUsual = byDimension(dimension, diagram.length)?.diagram.join() === diagram.join();
  return isUsual
    ? build(String(dimension), String(dimension), diagram)
    : build(`(${labels.join(",")})`, `(${labels.join(",")})`, diagram);
}

/** The diagram with fewest boxes of this dimension; of a conjugate pair the one with fewer. */
function byDimension(dimension: number, n: number): Representation | null {
  if (dimension < 1 || dimension > LARGEST_DIMENSION || !Number.isInteger(dimension)) return null;
  for (let boxes = 0; boxes <= MOST_BOXES; boxes++)
    for (const diagram of diagrams(boxes, n - 1, boxes))
      if (dimensionOf([...diagram, 0]) === dimension)
        return build(String(dimension), String(dimension), [...diagram, 0]);
  return null;
}

function diagrams(boxes: number, rows: number, widest: number): number[][] {
  if (rows === 0) return boxes === 0 ? [[]] : [];
  const found: number[][] = [];
  for (let first = Math.min(boxes, widest); first * rows >= boxes; first--) {
    for (const rest of diagrams(boxes - first, rows - 1, first)) found.push([first, ...rest]);
    if (first === 0) break;
  }
  return found;
}

const MOST_BOXES_OFFERED = 6;
const LARGEST_OFFERED = 64;
const tables = new Map<number, readonly Representation[]>();

/**
 * The representations of SU(N) of up to six boxes and 64 components, each with its conjugate, by rising dimension.
 * @example representationTable(3).map(({ name }) => name).slice(0, 4) // ["1", "3", "3bar", "6"]
 */
export function representationTable(n: number): readonly Representation[] {
  const known = tables.get(n);
  if (known) return known;
  const found = new Map<string, Representation>();
  for (let boxes = 0; boxes <= MOST_BOXES_OFFERED; boxes++)
    for (const diagram of diagrams(boxes, n - 1, boxes)) {
      if (dimensionOf([...diagram, 0]) > LARGEST_OFFERED) continue;
      const representation = fromLabels(labelsOf([...diagram, 0]));
      if (!representation || found.has(representation.diagram.join())) continue;
      found.set(representation.diagram.join(), representation);
      const other = conjugate(representation);
      if (!found.has(other.diagram.join())) found.set(other.diagram.join(), other);
    }
  const adj = fromLabels(adjoint(n));
  if (adj) found.set(adj.diagram.join(), found.get(adj.diagram.join()) ?? adj);
  const table = [...found.values()].sort((a, b) => a.dimension - b.dimension);
  tables.set(n, table);
  return table;
}
