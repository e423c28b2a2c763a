/** LaTeX commands that completion offers, in groups. Spelling is LaTeX's own; each is one KaTeX draws (a test draws all). */

export interface LatexSymbol {
  /** Without the backslash: what one types to find it. */
  readonly name: string;
  readonly group: string;
  /** What is inserted; `▯` is where the caret goes, and it is not inserted. */
  readonly insert: string;
  /** What is drawn in the list. */
  readonly example: string;
}

const plain: Readonly<Record<string, string>> = {
  Greek:
    "alpha beta gamma delta epsilon varepsilon zeta eta theta vartheta iota kappa varkappa lambda mu nu xi pi varpi " +
    "rho varrho sigma varsigma tau upsilon phi varphi chi psi omega",
  "Greek capitals": "Gamma Delta Theta Lambda Xi Pi Sigma Upsilon Phi Psi Omega",
  "Letter-like":
    "ell hbar imath jmath Re Im partial nabla infty emptyset varnothing wp aleph beth dagger ddagger prime",
  Operators:
    "pm mp times div cdot ast star circ bullet oplus ominus otimes oslash odot wedge vee cap cup setminus wr amalg " +
    "bigcirc boxtimes boxplus ltimes rtimes",
  Relations:
    "leq geq ll gg neq equiv sim simeq approx cong propto doteq asymp prec succ preceq succeq lesssim gtrsim " +
    "lessapprox gtrapprox subset supset subseteq supseteq in ni notin perp parallel mid vdash models bowtie triangleq",
  Arrows:
    "to gets rightarrow leftarrow leftrightarrow Rightarrow Leftarrow Leftrightarrow longrightarrow longleftarrow " +
    "Longrightarrow mapsto longmapsto hookrightarrow hookleftarrow uparrow downarrow updownarrow nearrow searrow " +
    "swarrow nwarrow rightleftharpoons iff implies leadsto",
  Large: "sum prod coprod int oint iint iiint bigcap bigcup bigoplus bigotimes bigwedge bigvee biguplus",
  Functions:
    "sin cos tan cot sec csc sinh cosh tanh coth arcsin arccos arctan exp ln log lg det dim ker deg gcd lim limsup " +
    "liminf max min sup inf arg Pr hom",
  Dots: "ldots cdots vdots ddots dots",
  Spaces: "quad qquad",
  Brackets: "langle rangle lfloor rfloor lceil rceil lvert rvert lVert rVert lbrace rbrace",
  Logic: "forall exists nexists neg land lor top bot therefore because",
  Marks:
    "checkmark diamond Diamond Box square blacksquare triangle triangledown bigstar angle sphericalangle surd flat natural sharp clubsuit heartsuit",
};

/** Commands that take something: where the caret goes, and an example with letters in it. */
const taking: readonly (readonly [group: string, insert: string, example: string])[] = [
  ["Structure", "\\frac{▯}{}", "\\frac{a}{b}"],
  ["Structure", "\\dfrac{▯}{}", "\\dfrac{a}{b}"],
  ["Structure", "\\tfrac{▯}{}", "\\tfrac{a}{b}"],
  ["Structure", "\\sqrt{▯}", "\\sqrt{x}"],
  ["Structure", "\\sqrt[▯]{}", "\\sqrt[n]{x}"],
  ["Structure", "\\binom{▯}{}", "\\binom{n}{k}"],
  ["Structure", "\\left( ▯ \\right)", "\\left( x \\right)"],
  ["Structure", "\\left[ ▯ \\right]", "\\left[ x \\right]"],
  ["Structure", "\\left| ▯ \\right|", "\\left| x \\right|"],
  ["Structure", "\\left\\langle ▯ \\right\\rangle", "\\left\\langle x \\right\\rangle"],
  ["Structure", "\\overbrace{▯}^{}", "\\overbrace{x}^{n}"],
  ["Structure", "\\underbrace{▯}_{}", "\\underbrace{x}_{n}"],
  ["Structure", "\\overset{▯}{}", "\\overset{a}{=}"],
  ["Structure", "\\underset{▯}{}", "\\underset{a}{=}"],
  ["Structure", "\\stackrel{▯}{}", "\\stackrel{a}{=}"],
  ["Structure", "\\cancel{▯}", "\\cancel{x}"],
  ["Structure", "\\boxed{▯}", "\\boxed{x}"],
  ["Structure", "\\tag{▯}", "\\text{(tag)}"],
  ["Structure", "\\mathcal{O}(▯)", "\\mathcal{O}(p^n)"],
  ["Structure", "\\not{▯}", "\\not{p}"],
  ["Accents", "\\hat{▯}", "\\hat{a}"],
  ["Accents", "\\widehat{▯}", "\\widehat{ab}"],
  ["Accents", "\\tilde{▯}", "\\tilde{a}"],
  ["Accents", "\\widetilde{▯}", "\\widetilde{ab}"],
  ["Accents", "\\bar{▯}", "\\bar{a}"],
  ["Accents", "\\overline{▯}", "\\overline{ab}"],
  ["Accents", "\\underline{▯}", "\\underline{ab}"],
  ["Accents", "\\vec{▯}", "\\vec{a}"],
  ["Accents", "\\overrightarrow{▯}", "\\overrightarrow{ab}"],
  ["Accents", "\\overleftrightarrow{▯}", "\\overleftrightarrow{ab}"],
  ["Accents", "\\dot{▯}", "\\dot{a}"],
  ["Accents", "\\ddot{▯}", "\\ddot{a}"],
  ["Accents", "\\check{▯}", "\\check{a}"],
  ["Accents", "\\breve{▯}", "\\breve{a}"],
  ["Accents", "\\acute{▯}", "\\acute{a}"],
  ["Accents", "\\grave{▯}", "\\grave{a}"],
  ["Alphabets", "\\mathcal{▯}", "\\mathcal{A}"],
  ["Alphabets", "\\mathscr{▯}", "\\mathscr{A}"],
  ["Alphabets", "\\mathbb{▯}", "\\mathbb{R}"],
  ["Alphabets", "\\mathfrak{▯}", "\\mathfrak{g}"],
  ["Alphabets", "\\mathbf{▯}", "\\mathbf{p}"],
  ["Alphabets", "\\boldsymbol{▯}", "\\boldsymbol{\\sigma}"],
  ["Alphabets", "\\mathrm{▯}", "\\mathrm{d}"],
  ["Alphabets", "\\mathsf{▯}", "\\mathsf{T}"],
  ["Alphabets", "\\mathtt{▯}", "\\mathtt{x}"],
  ["Alphabets", "\\operatorname{▯}", "\\operatorname{tr}"],
  ["Alphabets", "\\text{▯}", "\\text{text}"],
  ["Environments", "\\begin{aligned} ▯ \\end{aligned}", "\\text{aligned}"],
  ["Environments", "\\begin{cases} ▯ \\end{cases}", "\\begin{cases} a \\\\ b \\end{cases}"],
  ["Environments", "\\begin{pmatrix} ▯ \\end{pmatrix}", "\\begin{pmatrix} a & b \\end{pmatrix}"],
  ["Environments", "\\begin{bmatrix} ▯ \\end{bmatrix}", "\\begin{bmatrix} a & b \\end{bmatrix}"],
  ["Environments", "\\begin{vmatrix} ▯ \\end{vmatrix}", "\\begin{vmatrix} a & b \\end{vmatrix}"],
  ["Environments", "\\begin{matrix} ▯ \\end{matrix}", "\\begin{matrix} a & b \\end{matrix}"],
  ["Environments", "\\begin{gathered} ▯ \\end{gathered}", "\\text{gathered}"],
];

export const latexSymbols: readonly LatexSymbol[] = [
  ...Object.entries(plain).flatMap(([group, names]) =>
    names.split(" ").map((name) => ({ name, group, insert: `\\${name}`, example: exampleOf(name) })),
  ),
  ...taking.map(([group, insert, example]) => ({ name: nameOf(insert), group, insert, example })),
];

function nameOf(insert: string): string {
  const environment = /^\\begin\{(\w+)\}/.exec(insert)?.[1];
  return (
    environment ??
    insert
      .replace("▯", "")
      .replace(/[^A-Za-z]+/g, " ")
      .trim()
      .replaceAll(" ", "")
  );
}

function exampleOf(name: string): string {
  return name === "quad" || name === "qquad" ? `a\\${name} b` : `\\${name}`;
}

/**
 * Symbols for what has been typed after a backslash: those that begin with it first (a name typed out whole first of
 * all), then those that contain it. Case counts only to put the nearer spelling first.
 */
export function findSymbols(
  typed: string,
  symbols: readonly LatexSymbol[] = latexSymbols,
  limit = 40,
): readonly LatexSymbol[] {
  const wanted = typed.toLowerCase();
  const rank = ({ name }: LatexSymbol) => {
    if (name === typed) return 0;
    if (name.startsWith(typed)) return 1;
    const lower = name.toLowerCase();
    if (lower.startsWith(wanted)) return 2;
    return lower.includes(wanted) ? 3 : 4;
  };
  return symbols
    .map((symbol, index) => ({ symbol, index, rank: rank(symbol) }))
    .filter((found) => found.rank < 4)
    .sort(
      (a, b) =>
        a.rank - b.rank ||
        (a.rank === 0 ? 0 : a.symbol.name.length - b.symbol.name.length) ||
        a.index - b.index,
    )
    .slice(0, limit)
    .map((found) => found.symbol);
}
