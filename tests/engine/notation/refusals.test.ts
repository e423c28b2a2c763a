import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { LinearForm } from "#engine/exact/linear-form.ts";
import { readLinearForm } from "#engine/notation/read-linear-form.ts";
import { readQuantity } from "#engine/notation/read-quantity.ts";
import { readSymbol } from "#engine/notation/read-symbol.ts";
import { readTerm } from "#engine/notation/read-term.ts";
import { anisotropic, readAs, vocabulary } from "./reading.ts";

describe("what is no term is refused with its place", () => {
  it.each([
    ["phi + chi", "sum-in-term at 4"],
    ["(phi - chi)^2", "sum-in-term at 5"],
    ["phi^4 lambda", "unknown-symbol at 6: lambda (Lambda?)"],
    ["phi^4 psy", "unknown-symbol at 6: psy (psi?)"],
    ["d_mu q phi", "unknown-symbol at 5: q"],
    ["chy^4", "no-field at 0: chy (chi?)"],
    ["phi2 ", "no-field at 0: phi_2 (phi?)"],
    ["Lambda^4", "no-field at 0: "],
    ["F2", "no-field at 0: F_2 (F?)"],
    ["omega^2 phi", "field-in-error at 0: omega"],
    ["phi^-1", "negative-field-power at 0: phi"],
    ["g/chi", "negative-field-power at 2: chi"],
    ["1/box phi", "negative-field-power at 2: ∂"],
    ["phi^(1/2)", "fractional-field-power at 0: phi"],
    ["sqrt(phi)", "fractional-field-power at 0: phi"],
    ["phi^2.5", "fractional-field-power at 0: phi"],
    ["phi^1001", "field-power-too-large at 0: phi"],
    ["(phi^500)^3", "field-power-too-large at 0: phi"],
    ["phi^99999999999999999999", "field-power-too-large at 0: phi"],
    ["g^1001 phi", "power-too-large at 0: g"],
    ["2^1001 phi", "number-too-large at 0"],
    ["301! phi", "number-too-large at 0"],
    ["1e999 phi", "number-too-large at 0"],
    ["phi^n", "exponent-not-a-number at 4"],
    ["g^x phi", "exponent-not-a-number at 2"],
    ["phi^{d-2}", "exponent-not-a-number at 4"],
    ["phi^2^3", "double-power at 5"],
    ["(phi", "unbalanced-bracket at 0"],
    ["phi)", "unbalanced-bracket at 3"],
    ["(phi]", "unbalanced-bracket at 0"],
    ["|phi", "unbalanced-bracket at 0"],
    ["\\frac{1}{2 phi", "unbalanced-bracket at 8"],
    ["", "empty-term at 0"],
    ["   ", "empty-term at 0"],
    ["+ h.c.", "empty-term at 0"],
    ["phi *", "missing-operand at 5"],
    ["phi^", "missing-operand at 4"],
    ["* phi", "missing-operand at 0"],
    ["()", "missing-operand at 1"],
    ["phi!", "misplaced-mark at 3"],
    ["3.5! phi", "misplaced-mark at 3"],
    ["phi, chi", "misplaced-mark at 3"],
    ["|Phi|", "odd-modulus-power at 0"],
    ["|Phi|^3", "odd-modulus-power at 0"],
    ["phi @", "unexpected-character at 4"],
    ["phi = 2", "unexpected-character at 4"],
    ["\\unknown phi", "unknown-command at 0"],
    ["c_ phi", "no-field at 0: c_phi"],
    ["chx_i^2", "no-field at 0: chx_i"],
    ["c_{} phi", "bad-subscript at 3"],
    ["c_{a phi", "bad-subscript at 8"],
    ["\\bar{\\psi\\phi}", "misplaced-accent at 0"],
    ["max(1, 2) phi", "function-in-term at 0"],
    ["0 phi", "zero-term at 0"],
    ["phi/0", "division-by-zero at 4"],
    ["sqrt(-2) phi", "root-of-negative at 0"],
    ["d_w phi", "bad-index at 0"],
    ["(".repeat(60) + "phi" + ")".repeat(60), "nested-too-deep at 40"],
    ["x".repeat(1001), "text-too-long at 1000"],
  ])("%s", (text, expected) => expect(readAs(text)).toBe(expected));
});

describe("exact numbers stay within bounds", () => {
  it.each(["300! ".repeat(100), "d " + "300! ".repeat(100), "(9!)^500", "9".repeat(900) + "^2"])(
    "%.20s…",
    (text) => {
      const began = performance.now();
      const readings = [
        readTerm(`${text} phi`, vocabulary),
        readLinearForm(text, new Map([["d", LinearForm.symbol("d")]])),
      ];
      expect(readings.map((reading) => (reading.ok ? "read" : reading.failure.code))).toContain(
        "number-too-large",
      );
      expect(performance.now() - began).toBeLessThan(1000);
    },
  );
});

describe("symbols", () => {
  it.each([
    ["chi", "chi", "\\chi"],
    ["\\chi", "chi", "\\chi"],
    ["χ", "chi", "\\chi"],
    ["Lambda_b", "Lambda_b", "\\Lambda_b"],
    ["\\Lambda_{b}", "Lambda_b", "\\Lambda_b"],
    ["M_{\\mathrm{Pl}}", "M_Pl", "M_{\\mathrm{Pl}}"],
    ["m_\\chi", "m_chi", "m_{\\chi}"],
    ["phi'", "phi'", "\\phi'"],
    ["c6", "c_6", "c_6"],
    ["\\tilde{F}", "Ftilde", "\\tilde{F}"],
    ["\\mathbf{E}", "E", "E"],
    ["\\hat s", "shat", "\\hat{s}"],
  ])("%s is %s", (text, symbol, latex) =>
    expect(readSymbol(text)).toEqual({ ok: true, value: { symbol, latex } }),
  );
  it.each([
    ["i", "symbol-reserved"],
    ["e", "symbol-reserved"],
    ["\\pi", "symbol-reserved"],
    ["d", "symbol-reserved"],
    ["D", "symbol-reserved"],
    ["GeV", "symbol-reserved"],
    ["phi chi", "symbol-unreadable"],
    ["phi^2", "symbol-unreadable"],
    ["2", "symbol-unreadable"],
    ["\\bar\\psi", "symbol-unreadable"],
    ["", "empty-text"],
  ])("%s is refused", (text, code) => {
    const reading = readSymbol(text);
    expect(reading.ok ? "read" : reading.failure.code).toBe(code);
  });
});

describe("no text makes a reader throw", () => {
  const pieces = [
    ..."phi chi Phi psi psibar \\bar \\psi \\phi Lambda λ φ ⁴ ₂ d d_t \\partial \\partial_ \\mu ^ _ { } ( ) [ ] | + - ± * / . ! , † ' ~ \\ \\frac \\sqrt sqrt( max( 1 2 0 1e400 3.2(4) GeV fm i e pi D box \\dagger \\left \\right. h.c. \\, {} ⟨ ⟩".split(
      " ",
    ),
    " ",
  ];
  const text = fc.oneof(
    fc.array(fc.constantFrom(...pieces), { maxLength: 14 }).map((words) => words.join("")),
    fc.string({ maxLength: 40 }),
    fc.string({ unit: "binary", maxLength: 20 }),
  );
  const nothing = { lookUp: () => null, symbols: ["p"] };
  it("neither of terms, nor of values, dimensions or symbols", () => {
    fc.assert(
      fc.property(text, (typed) => {
        const failures = [
          readTerm(typed, vocabulary),
          readTerm(typed, anisotropic),
          readQuantity(typed, nothing, "r"),
          readLinearForm(typed, new Map()),
          readSymbol(typed),
        ].flatMap((reading) => (reading.ok ? [] : [reading.failure]));
        // Every refusal has a code and a place within the text.
        return failures.every(
          ({ code, facts }) =>
            code !== "" &&
            typeof facts["offset"] === "number" &&
            facts["offset"] >= 0 &&
            facts["offset"] <= typed.length,
        );
      }),
      { numRuns: 3000 },
    );
  });
  it("and reading is fast on long repetitive text", () => {
    const began = performance.now();
    for (const piece of ["phi ", "(", "|", "^", "d", "\\frac", "{", "_", "1/"])
      readTerm(piece.repeat(1000 / piece.length), vocabulary);
    expect(performance.now() - began).toBeLessThan(500);
  });
});
