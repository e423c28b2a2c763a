/** How long closures take: three fields to 1/Λ⁴ and two loops, with few and with many terms. */
import { performance } from "node:perf_hooks";
import { closureOf } from "../engine/closure/ask.ts";
import { theoryOf } from "../engine/theory-builder.ts";
import { columns, milliseconds } from "./figures.ts";

const scalars = theoryOf({
  symmetries: [2, 2],
  fields: {
    phi: { kind: "real scalar", charges: [1] },
    chi: { kind: "real scalar", charges: [0, 1] },
    s: "complex scalar",
  },
  terms: {
    a: "phi2",
    b: "chi2",
    m: "s~ s",
    l: "phi4",
    k: "phi2 chi2",
    h: "chi4",
    q: "s~2 s2",
    r: "phi2 s~ s",
    c: "phi6",
    e: "phi2 chi4",
  },
});
const mixed = theoryOf({
  symmetries: [2],
  fields: { phi: { kind: "real scalar", charges: [1] }, chi: "real scalar", psi: "Dirac spinor" },
  terms: {
    a: "phi2",
    b: "chi2",
    m: "psi~ psi",
    l: "phi4",
    k: "phi2 chi2",
    h: "chi4",
    y: "psi~ psi chi",
    c: "phi6",
    e: "phi2 psi~ psi",
  },
});
const free = theoryOf({
  fields: { phi: "real scalar", chi: "real scalar", psi: "Dirac spinor" },
  terms: { g: "phi3", l: "phi4", k: "phi chi3", y: "psi~ psi chi", z: "psi~ psi phi", c: "phi6", e: "chi5" },
});

export function printClosureTimes(): void {
  console.log("closures to 1/Λ⁴ and two loops, eight legs, with their graphs; first runs\n");
  const timed = (name: string, theory: typeof free): string[] => {
    const start = performance.now();
    const { operators, missing } = closureOf(theory, { maxOrder: "4", maxLoops: "2" });
    return [name, String(operators.length), String(missing), milliseconds(performance.now() - start), "2 s"];
  };
  columns([
    ["theory", "operators", "missing", "time", "wanted"],
    timed("three scalars, two parities and a charge", scalars),
    timed("two scalars and a Dirac spinor, one parity", mixed),
    timed("two scalars and a Dirac spinor, no symmetry", free),
  ]);
}
