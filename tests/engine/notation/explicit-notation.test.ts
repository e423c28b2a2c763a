/**
 * What reaches mathjs, watched at its door. Whatever somebody types, only operators and placeholders of our own may
 * arrive there, and it always parses.
 */
import fc from "fast-check";
import type * as Mathjs from "mathjs/number";
import { afterEach, describe, expect, it, vi } from "vitest";
import { parse } from "#engine/notation/parse.ts";
import { group } from "#engine/notation/mathjs-parser.ts";

const arrived = vi.hoisted((): { texts: string[] } => ({ texts: [] }));
vi.mock("mathjs/number", async (importOriginal) => {
  const original = await importOriginal<typeof Mathjs>();
  const createParse: typeof original.createParse = (scope) => {
    const real = original.createParse(scope);
    return (text) => {
      arrived.texts.push(text);
      return real(text);
    };
  };
  return { ...original, createParse };
});
afterEach(() => {
  arrived.texts = [];
});

/** One placeholder between any two operators; a placeholder before a bracket is always a wrapped one. */
const explicit = /^(?:x\d+|f\d+(?=\()|o(?=[-+])|[()+\-*/^!,])+$/;

function arrivals(text: string, quantities: boolean): readonly string[] {
  arrived.texts = [];
  parse(text, { quantities });
  return arrived.texts;
}

describe("operands are placeholders, operators are written out", () => {
  it.each([
    ["lambda/4! phi^4", "x0/x1!*x2^x3"],
    ["y (psibar psi)", "x0*f3(x1*x2)"],
    ["12345678901234567890123 phi", "x0*x1"],
    ["-a b + c", "o-x0*x1+x2"],
    ["+a b", "x0*x1"],
    ["v.D*h", "x0*x1*x2"],
    ["\\frac{c}{\\Lambda^2} \\phi", "f3(x0,x1^x2)*x4"],
    ["\\bar{\\tilde\\psi}_L", "f2(f1(x0))"],
    ["phi^-2", "x0^(o-x1)"],
    ["phi^mu^2", "f3(x0,x1)^x2"],
    ["|Phi|^2", "f2(x0)^x1"],
    ["max(1, sqrt(2))", "f3(x0,f2(x1))"],
    ["end in mod to not", "x0*x1*x2*x3*x4"],
  ])("%s becomes %s", (text, expected) => expect(arrivals(text, false)).toEqual([expected]));

  it("and a number keeps its unit", () => {
    expect(arrivals("350 GeV / 3.2(4) TeV", true)).toEqual(["x0*x1/(x2*x3)"]);
    expect(arrivals("1/2 GeV", true)).toEqual(["x0/x1*x2"]);
  });
});

describe("nothing of mathjs's own language arrives", () => {
  const hostile = [
    "f(x) = x^2",
    "f(x)=",
    "import({ pi: 3 }, { override: true })",
    'evaluate("1")',
    "createUnit(foo)",
    "[1, 2]",
    "[1, 2; 3, 4]",
    '"text"',
    "'text'",
    "a ? b : c",
    "x.y",
    "x?.y",
    'x["constructor"]',
    "cos.constructor",
    "phi.constructor(phi)",
    "__proto__ phi",
    "toString phi",
    "1:10",
    "a; b",
    "a\nb",
    "phi # comment",
    "5 cm to inch",
    "2 inch",
    "3 in 4",
    "a mod b",
    "a % b",
    "end",
    "true and false",
    "not phi",
    "null undefined NaN Infinity",
    "x0 f1(x2) o",
    "0x1F 0b11",
    "a == b",
    "a -> b",
    "~a | b & c",
    "a .* b .^ c",
    "phi'",
    "5!!",
    "{a: 1}",
    "a = 3",
    "１２ ϕ ⁿ",
  ];
  it.each(hostile)("%s", (text) => {
    for (const quantities of [true, false])
      for (const line of arrivals(text, quantities)) expect(line).toMatch(explicit);
  });

  const pieces = [
    ..."phi psi x.y f(x)= import( end mod in to [1,2] [ ] ( ) { } | ; : ? # \" ' % & = , . ! ^ * / + - ± \\bar \\frac \\sqrt max( sqrt( 1 12 0x1 1e3 3.2(4) GeV cm † _L ^2 ^\\mu \\mu".split(
      " ",
    ),
    " ",
    "\n",
  ];
  const typed = fc.oneof(
    fc.array(fc.constantFrom(...pieces), { maxLength: 12 }).map((words) => words.join("")),
    fc.string({ maxLength: 30 }),
    fc.string({ unit: "binary", maxLength: 12 }),
  );
  it("of whatever is typed; and what is refused does not arrive at all", () => {
    let read = 0;
    fc.assert(
      fc.property(typed, fc.boolean(), (text, quantities) => {
        const fresh = `${text} `;
        arrived.texts = [];
        const reading = parse(fresh, { quantities });
        if (reading.ok) read += 1;
        expect(arrived.texts.every((line) => explicit.test(line))).toBe(true);
        if (!reading.ok) expect(arrived.texts).toEqual([]);
      }),
      { numRuns: 4000 },
    );
    expect(read).toBeGreaterThan(100);
  });
});

describe("the door itself", () => {
  it.each(["1", "phi", "x0=x1", "x0 x1", "x0;x1", "x0.x1", '"x0"', "[x0]", "x0?x1", "x0'", "", "f0\n"])(
    "refuses %j before mathjs sees it",
    (text) => {
      expect(() => group(text)).toThrow("explicit notation");
      expect(arrived.texts).toEqual([]);
    },
  );
  it.each([",x0", "x0^", "(x0", "x0**x1", "x0)"])("and mathjs itself refuses %j", (text) =>
    expect(() => group(text)).toThrow(),
  );
});

describe("what is deep or long", () => {
  it.each([
    ["names", "φ".repeat(1000)],
    ["marks", `φ${"^a†".repeat(333)}`],
    ["accents", `${"\\bar".repeat(249)}φ`],
    ["roots", `${"\\sqrt".repeat(199)} φ`],
    ["sums", "-φ".repeat(500)],
    ["brackets", `${"\\bar{".repeat(39)}φ${"}^a^b".repeat(39)}`],
    ["fractions", `${"\\frac1".repeat(40)}2`],
  ])("%s arrive no deeper than brackets are", (_name, text) => {
    expect(parse(text, { quantities: false }).ok).toBe(true);
    const [line = ""] = arrived.texts;
    let depth = 0;
    let deepest = 0;
    for (const character of line) {
      depth += character === "(" ? 1 : character === ")" ? -1 : 0;
      deepest = Math.max(deepest, depth);
    }
    expect(deepest).toBeLessThanOrEqual(80);
  });
  it("fractions in fractions without braces are refused where they go too deep", () => {
    const reading = parse(`${"\\frac1".repeat(41)}2`, { quantities: false });
    expect(reading).toMatchObject({
      ok: false,
      failure: { code: "nested-too-deep", facts: { offset: 240 } },
    });
  });
});
