/** Reads fields into quanta: each with its conjugate, its representations and its charges. */
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { nameLatex } from "../notation/names.ts";
import { readPlainName } from "../notation/rename.ts";
import { splitCharges } from "./charge-text.ts";
import type { Content, Flavours, Quantum } from "./content.ts";
import type { BasisInputs, CountedKind } from "./inputs.ts";
import type { Spin } from "./lorentz-integral.ts";
import { readGroups, type Group } from "./read-groups.ts";
import { conjugate, readRepresentation, type Representation } from "./representations.ts";

type FieldRow = BasisInputs["fields"][number];
interface Charged {
  readonly representations: readonly Representation[];
  readonly vectors: readonly boolean[];
  readonly charges: readonly Rational[];
}
const spinOf: Readonly<Record<CountedKind, Spin | "scalar">> = {
  "real scalar": "scalar",
  "complex scalar": "scalar",
  pseudoscalar: "scalar",
  "left-handed spinor": "left spinor",
  "right-handed spinor": "right spinor",
  "field strength": "left field strength",
};
const MOST_FIELDS = 40;
const MOST_FLAVOURS = 1000;

/** Rows with problems are left out of what is returned, which then is no content to count. `d` has been read. */
export function readContent(inputs: BasisInputs, d: number, problems: Problem[]): Content {
  const groups = readGroups(inputs.groups, problems);
  const known = groups.filter((group): group is Group => group !== null);
  const quanta: Quantum[] = [];
  for (const row of inputs.fields.slice(0, MOST_FIELDS)) addField(row, groups, d, quanta, problems);
  if (inputs.fields.length > MOST_FIELDS)
    problems.push({ code: "fields-too-many", path: ["fields"], facts: { most: MOST_FIELDS } });
  return {
    d,
    withParity: inputs.parity === "with parity",
    quanta,
    gauge: known.flatMap((group) => (group.type === "SU" ? [group] : [])),
    orthogonal: known.flatMap((group) => (group.type === "O" ? [group] : [])),
    charges: known.flatMap((group) => (group.type === "charge" ? [group] : [])),
  };
}

function addField(
  row: FieldRow,
  groups: readonly (Group | null)[],
  d: number,
  quanta: Quantum[],
  problems: Problem[],
): void {
  if (row.symbol.trim() === "" && row.charges.trim() === "") return;
  const refuse = (column: string, code: string, facts: Problem["facts"]) => {
    problems.push({ code, path: ["fields", row.id, column], facts });
  };
  const name = readPlainName(row.symbol);
  if (!name) return refuse("symbol", "counted-symbol-unreadable", { text: row.symbol });
  const latex = nameLatex(name);
  if (quanta.some((quantum) => quantum.latex === latex))
    return refuse("symbol", "counted-symbol-twice", { text: row.symbol });
  // Choices of a shape are checked before a kind sees them.
  const kind = row.kind as CountedKind;
  const spin = spinOf[kind];
  if (spin !== "scalar" && d !== 4) return refuse("kind", "spin-needs-four-dimensions", { kind, d });
  const flavours = readFlavours(row.flavours);
  if (flavours === null)
    return refuse("flavours", "flavours-unreadable", { text: row.flavours, most: MOST_FLAVOURS });
  const charged = readCharged(row, groups, problems);
  if (!charged) return;
  const isReal = kind === "real scalar" || kind === "pseudoscalar";
  if ((isReal || kind === "field strength") && !isSelfConjugate(charged, groups))
    return refuse("charges", "real-field-in-complex-representation", { symbol: row.symbol, kind });
  const own: Quantum = {
    rowId: row.id,
    latex,
    spin,
    pseudoscalar: kind === "pseudoscalar",
    isFermion: spin.endsWith("spinor"),
    flavours,
    ...charged,
    conjugate: isReal ? quanta.length : quanta.length + 1,
  };
  // The two halves of a field strength are conjugates of each other.
  const left = kind === "field strength" ? { ...own, latex: `${latex}_L` } : own;
  quanta.push(left);
  if (isReal) return;
  quanta.push({
    ...own,
    latex: kind === "field strength" ? `${latex}_R` : `${latex}^\\dagger`,
    spin: opposite(spin),
    representations: charged.representations.map(conjugate),
    charges: charged.charges.map((charge) => charge.negated()),
    conjugate: quanta.length - 1,
  });
}

function opposite(spin: Spin | "scalar"): Spin | "scalar" {
  if (spin === "scalar") return spin;
  return (spin.startsWith("left") ? spin.replace("left", "right") : spin.replace("right", "left")) as Spin; // of the four, the other
}

function readFlavours(text: string): Flavours | null {
  const typed = text.trim();
  if (/^\\?n_?\{?f\}?$/.test(typed)) return "symbolic";
  const count = typed === "" ? 1 : Number(typed);
  return Number.isInteger(count) && count >= 1 && count <= MOST_FLAVOURS ? count : null;
}

/** What is left out counts as neutral. */
function readCharged(row: FieldRow, groups: readonly (Group | null)[], problems: Problem[]): Charged | null {
  const parts = splitCharges(row.charges);
  const representations: Representation[] = [];
  const vectors: boolean[] = [];
  const charges: Rational[] = [];
  const before = problems.length;
  const refuse = (code: string, facts: Problem["facts"]) =>
    problems.push({ code, path: ["fields", row.id, "charges"], facts });
  if (parts.length > groups.length && row.charges.trim() !== "")
    refuse("counted-charges-too-many", { count: parts.length, groups: groups.length });
  groups.forEach((group, index) => {
    const text = parts[index] ?? "";
    if (group === null) return;
    if (group.type === "SU") {
      const representation = readRepresentation(text, group.n);
      if (representation) representations.push(representation);
      else refuse("representation-not-known", { text, group: `SU(${group.n})` });
    } else if (group.type === "O") {
      const isVector = /^(vector|v|N)$/i.test(text) || (text === String(group.n) && group.n > 1);
      if (isVector || text === "" || text === "1") vectors.push(isVector);
      else refuse("representation-not-known", { text, group: `O(${group.n})` });
    } else {
      const charge = readCharge(text, group.modulo);
      if (charge) charges.push(charge);
      else refuse("charge-not-a-number", { text, name: group.name });
    }
  });
  return problems.length === before ? { representations, vectors, charges } : null;
}

function readCharge(text: string, modulo: number | null): Rational | null {
  if (text === "" || text === "even") return Rational.zero;
  if (text === "odd" && modulo === 2) return Rational.one;
  const charge = Rational.parse(text.replace("−", "-"));
  return charge && (modulo === null || charge.isInteger()) ? charge : null;
}

function isSelfConjugate({ representations, charges }: Charged, groups: readonly (Group | null)[]): boolean {
  const moduli = groups.flatMap((group) => (group?.type === "charge" ? [group.modulo] : []));
  return (
    representations.every((representation) => conjugate(representation).name === representation.name) &&
    charges.every((charge, index) => {
      const modulo = moduli[index] ?? null;
      const twice = charge.plus(charge);
      return modulo === null ? charge.sign() === 0 : twice.over(Rational.of(modulo)).isInteger();
    })
  );
}
