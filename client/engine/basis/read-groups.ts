/** Reads the table of groups. */
import type { Problem } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { BasisInputs } from "./inputs.ts";

export type Group =
  | { readonly type: "SU"; readonly name: string; readonly n: number }
  | { readonly type: "O"; readonly name: string; readonly n: number }
  /** U(1), or Z_n with its order; `kept` null keeps every charge. */
  | {
      readonly type: "charge";
      readonly name: string;
      readonly modulo: number | null;
      readonly kept: readonly Rational[] | null;
    };

/** Larger groups are counted no differently, but nobody has asked for them and their tables grow. */
const LARGEST_N = 8;
const LARGEST_VECTOR = 1000;

/** In order; a row that cannot be read is a problem and is left out by giving null, so that charges keep their places. */
export function readGroups(rows: BasisInputs["groups"], problems: Problem[]): readonly (Group | null)[] {
  return rows.map((row) => readGroup(row, problems));
}

function readGroup(row: BasisInputs["groups"][number], problems: Problem[]): Group | null {
  const text = row.group.replace(/\s+/g, "");
  const name = row.name.trim() === "" ? row.group.trim() : row.name.trim();
  const refuse = (code: string, facts: Problem["facts"]) => {
    problems.push({ code, path: ["groups", row.id, "group"], facts });
    return null;
  };
  const special = /^(SU|O)\(?(\d+)\)?$/i.exec(text);
  if (special) {
    const n = Number(special[2]);
    const type = special[1]?.toUpperCase() === "SU" ? "SU" : "O";
    const most = type === "SU" ? LARGEST_N : LARGEST_VECTOR;
    if (n < 2 || n > most) return refuse("group-size", { text: row.group, least: 2, most });
    return { type, name, n };
  }
  const cyclic = /^Z_?\{?(\d+)\}?$/i.exec(text);
  const modulo = cyclic ? Number(cyclic[1]) : null;
  if (modulo === null && !/^U\(?1\)?$/i.test(text)) return refuse("group-not-known", { text: row.group });
  if (modulo !== null && modulo < 2) return refuse("group-size", { text: row.group, least: 2, most: 1000 });
  const kept = readKept(row.keep);
  if (kept === "unreadable") {
    problems.push({ code: "kept-unreadable", path: ["groups", row.id, "keep"], facts: { text: row.keep } });
    return { type: "charge", name, modulo, kept: [Rational.zero] };
  }
  return { type: "charge", name, modulo, kept };
}

function readKept(text: string): readonly Rational[] | null | "unreadable" {
  if (text.trim() === "") return [Rational.zero];
  if (text.trim().toLowerCase() === "all") return null;
  const values = text.split(",").map((part) => Rational.parse(part.trim().replace("−", "-")));
  const found = values.flatMap((value) => (value === null ? [] : [value]));
  return found.length === values.length ? found : "unreadable";
}
