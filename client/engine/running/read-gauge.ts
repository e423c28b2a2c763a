/** Reads gauge groups and field content. */
import { readRepresentation } from "../basis/representations.ts";
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { readQuantity, type Declared } from "../notation/read-quantity.ts";
import { readSymbol } from "../notation/read-symbol.ts";
import { givenAs, type RunningInputs } from "./inputs.ts";
import type { GaugeGroup, Matter } from "./gauge.ts";

export interface GaugeReading {
  readonly groups: readonly GaugeGroup[];
  readonly matter: readonly Matter[];
}

const LARGEST_N = 8;
const MOST_ROWS = 60;
const MOST_COPIES = 1000;

/**
 * Problems: `group-not-known`, `group-size`, `representation-not-known`, `charge-not-a-number`,
 * `counted-charges-too-many`, `running-copies-unreadable`, `running-value-unreadable`, `running-value-has-unit`,
 * `unit-of-charge-unreadable`, `real-scalar-charged`, `running-too-many`.
 */
export function readGauge(inputs: RunningInputs, declared: Declared, problems: Problem[]): GaugeReading {
  const groups = inputs.groups
    .filter((row) => row.group.trim() !== "")
    .slice(0, MOST_ROWS)
    .map((row, index) => ({ row, ...readGroup(row, index, declared, problems) }));
  if (groups.some(({ group }) => group === null)) return { groups: [], matter: [] };
  const known = groups.flatMap(({ group, unit }) => (group ? [{ group, unit }] : []));
  const rows = inputs.content.filter(
    (row) => row.name.trim() !== "" || row.charges.trim() !== "" || row.mass.trim() !== "",
  );
  if (rows.length > MOST_ROWS)
    problems.push({ code: "running-too-many", path: ["content"], facts: { most: MOST_ROWS } });
  const matter = rows.slice(0, MOST_ROWS).flatMap((row) => readMatter(row, known, declared, problems) ?? []);
  return { groups: known.map(({ group }) => group), matter };
}

interface Known {
  readonly group: GaugeGroup;
  /** What g² is divided by to go with the charges as typed. */
  readonly unit: Rational;
}

function readGroup(
  row: RunningInputs["groups"][number],
  index: number,
  declared: Declared,
  problems: Problem[],
): { readonly group: GaugeGroup | null; readonly unit: Rational } {
  const refuse = (column: string, code: string, facts: Problem["facts"]) => {
    problems.push({ code, path: ["groups", row.id, column], facts });
    return { group: null, unit: Rational.one };
  };
  const text = row.group.replace(/\s+/g, "");
  const special = /^SU\(?(\d+)\)?$/i.exec(text);
  if (!special && !/^U\(?1\)?$/i.test(text))
    return refuse("group", "running-group-not-known", { text: row.group });
  const n = special ? Number(special[1]) : 1;
  if (special && (n < 2 || n > LARGEST_N))
    return refuse("group", "group-size", { text: row.group, least: 2, most: LARGEST_N });
  const unit = row.unit.trim() === "" || n !== 1 ? Rational.one : Rational.parse(row.unit.trim());
  if (unit?.sign() !== 1) return refuse("unit", "unit-of-charge-unreadable", { text: row.unit });
  const symbol = row.symbol.trim() === "" ? null : readSymbol(row.symbol);
  if (symbol && !symbol.ok) return refuse("symbol", symbol.failure.code, symbol.failure.facts);
  const given = row.given === givenAs[1] ? "alpha" : "g";
  const usual = `${given === "g" ? "g" : "\\alpha"}_{${index + 1}}`;
  const value = readNumber(row.value, declared, ["groups", row.id, "value"], problems);
  const group: GaugeGroup = {
    rowId: row.id,
    n,
    name: n === 1 ? "U(1)" : `SU(${n})`,
    symbol: symbol?.value.symbol ?? `${given}_${index + 1}`,
    latex: symbol?.value.latex ?? usual,
    given,
    alpha: value === null ? null : given === "g" ? value ** 2 / (4 * Math.PI) : value,
  };
  if (value !== null && value <= 0) return refuse("value", "gauge-value-not-positive", { text: row.value });
  return { group, unit };
}

/** A pure number, or null with a problem unless the text is empty. */
export function readNumber(
  text: string,
  declared: Declared,
  path: Problem["path"],
  problems: Problem[],
): number | null {
  if (text.trim() === "") return null;
  const reading = readQuantity(text, declared, path.join("/"));
  if (!reading.ok) {
    problems.push({ code: reading.failure.code, path, facts: reading.failure.facts });
    return null;
  }
  if (reading.value.quantity.energy.sign() !== 0) {
    problems.push({ code: "running-value-has-unit", path, facts: { text } });
    return null;
  }
  return reading.value.quantity.value;
}

function readMatter(
  row: RunningInputs["content"][number],
  groups: readonly Known[],
  declared: Declared,
  problems: Problem[],
): Matter | null {
  const before = problems.length;
  const refuse = (column: string, code: string, facts: Problem["facts"]) =>
    problems.push({ code, path: ["content", row.id, column], facts });
  const parts = row.charges.split(/,(?![^(]*\))/).map((part) => part.trim());
  if (parts.length > groups.length && row.charges.trim() !== "")
    refuse("charges", "counted-charges-too-many", { count: parts.length, groups: groups.length });
  const charges = groups.flatMap(({ group, unit }, index) => {
    const text = parts[index] ?? "";
    if (group.n === 1) {
      const charge = text === "" ? Rational.zero : Rational.parse(text.replace("−", "-"));
      if (!charge) {
        refuse("charges", "charge-not-a-number", { text, name: group.name });
        return [];
      }
      const squared = charge.times(charge).over(unit);
      return [{ dimension: Rational.one, index: squared, casimir: squared }];
    }
    const found = readRepresentation(text, group.n);
    if (!found) {
      refuse("charges", "representation-not-known", { text, group: group.name });
      return [];
    }
    const dimension = Rational.of(found.dimension);
    // Indices are whole multiples of 1/2.
    const index2 = Rational.of(Math.round(2 * found.index), 2);
    return [
      {
        dimension,
        index: index2,
        casimir: index2.times(Rational.of(group.n ** 2 - 1)).over(dimension),
      },
    ];
  });
  const copies = Number(row.copies.trim() === "" ? "1" : row.copies.trim());
  if (!Number.isInteger(copies) || copies < 0 || copies > MOST_COPIES)
    refuse("copies", "running-copies-unreadable", { text: row.copies, most: MOST_COPIES });
  const mass = readMass(row, declared, problems);
  const kind = row.kind as Matter["kind"]; // one of the choices of the shape
  if (problems.length > before) return null;
  if (
    kind === "real scalar" &&
    groups.some(({ group }, index) => group.n === 1 && charges[index]?.index.sign() !== 0)
  ) {
    refuse("charges", "real-scalar-charged", {});
    return null;
  }
  return { rowId: row.id, name: row.name.trim(), kind, copies: Rational.of(copies), charges, mass };
}

function readMass(
  row: RunningInputs["content"][number],
  declared: Declared,
  problems: Problem[],
): number | null {
  if (row.mass.trim() === "") return null;
  const path = ["content", row.id, "mass"];
  const reading = readQuantity(row.mass, declared, path.join("/"));
  if (!reading.ok) {
    problems.push({ code: reading.failure.code, path, facts: reading.failure.facts });
    return null;
  }
  const { value } = reading.value.quantity;
  if (value > 0) return value;
  problems.push({ code: "scale-not-positive", path, facts: { symbol: row.mass.trim() } });
  return null;
}
