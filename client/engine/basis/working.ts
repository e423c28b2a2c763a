/** How the numbers come about, in the symbols of this count. */
import type { WorkingStep } from "../evaluation.ts";
import type { Content } from "./content.ts";
import type { BasisValue } from "./value.ts";

const heading = (text: string): WorkingStep => ({ step: "heading", text });
const prose = (text: string): WorkingStep => ({ step: "prose", text });
const formula = (latex: string): WorkingStep => ({ step: "formula", latex });

export function basisWorking(content: Content, value: BasisValue): WorkingStep[] {
  return [
    heading("The Hilbert series"),
    prose(
      "An operator is a monomial in the fields and their derivatives that is invariant under Lorentz transformations and every group below. Equations of motion take the descendants $\\partial^2\\phi$, $\\bar\\sigma\\cdot\\partial\\psi$, $\\partial\\cdot F$ out of each field; dividing by the momentum generating function $P$ takes total derivatives out (Henning, Lu, Melia, Murayama 2015, 2017):",
    ),
    formula(
      `H(q) = \\int \\mathrm{d}\\mu_{${content.withParity ? "O" : "SO"}(${content.d})}\\;${measures(content)}\\frac{1}{P(q;x)}\\prod_i \\mathrm{PE}\\bigl[\\phi_i\\,\\chi_i(q;x,g)\\bigr],\\qquad P(q;x) = \\frac{1}{\\det(1 - q\\,x)}`,
    ),
    prose(
      `This holds above dimension ${content.d}: at and below it conserved currents and total derivatives of other kinds need corrections, and nothing is counted there.`,
    ),
    ...characters(content),
    ...groups(content),
    heading("One field content at a time"),
    prose(
      "A power $\\phi^n$ is a sum over the cycle types of $n$ exchanged quanta. A cycle of length $k$ is a single character at the $k$-th powers of $q$, $x$ and $g$; a fermion brings $(-1)^{k-1}$, and a field in $n_f$ copies brings $n_f$ for each cycle:",
    ),
    formula(
      "[\\phi^n] = \\sum_{\\lambda\\vdash n} \\frac{1}{z_\\lambda}\\prod_{k\\in\\lambda} (\\mp1)^{k-1}\\,n_f\\,\\chi(q^k;x^k,g^k),\\qquad z_\\lambda = \\prod_k k^{m_k}\\,m_k!",
    ),
    prose(
      "Each term then is one Lorentz integral times one integral for each group, all whole numbers; their sum is divided by the number of arrangements once, and must be a whole number that is not negative, for every $n_f$. A content and its Hermitian conjugate have the same number and are given together.",
    ),
    heading("Result"),
    ...value.totals.map(({ dimension, total }) =>
      formula(
        `N_{${dimension}} = ${total.latex}${value.symbolic ? `\\;\\to\\;${total.at}\\quad(n_f = ${value.flavours})` : ""}`,
      ),
    ),
    prose(
      "These are numbers of real parameters: an operator that is not Hermitian counts twice, with its conjugate.",
    ),
  ];
}

function measures({ gauge, orthogonal, charges }: Content): string {
  const names = [
    ...gauge.map(({ n }) => `SU(${n})`),
    ...orthogonal.map(({ n }) => `O(${n})`),
    ...charges.map(({ modulo }) => (modulo === null ? "U(1)" : `Z_{${modulo}}`)),
  ];
  return names.map((name) => `\\mathrm{d}\\mu_{${name}}\\,`).join("");
}

/** Characters of the kinds that occur, each times P. */
function characters({ quanta, d }: Content): WorkingStep[] {
  const spins = new Set(quanta.map(({ spin }) => spin));
  const lines: string[] = [];
  if (spins.has("scalar"))
    lines.push(
      `\\chi_{\\text{scalar}} = q^{${d === 4 ? "" : "\\frac{" + String(d - 2) + "}{2}"}}(1 - q^2)\\,P`,
    );
  if (spins.has("left spinor"))
    lines.push(
      "\\chi_{\\text{left spinor}} = q^{3/2}\\bigl(\\chi_{\\frac12,0} - q\\,\\chi_{0,\\frac12}\\bigr)P",
    );
  if (spins.has("left field strength"))
    lines.push("\\chi_{F_L} = q^{2}\\bigl(\\chi_{1,0} - q\\,\\chi_{\\frac12,\\frac12} + q^2\\bigr)P");
  return [
    heading("Characters"),
    ...lines.map((latex) => formula(latex.replace("q^{}", "q"))),
    ...(spins.size > (spins.has("scalar") ? 1 : 0)
      ? [prose("Right-handed fields have the two spins exchanged.")]
      : []),
    ...quanta.map((quantum) =>
      formula(
        `${quantum.latex}:\\quad \\text{${quantum.pseudoscalar ? "pseudoscalar" : quantum.spin}}${quantum.flavours === 1 ? "" : `,\\quad ${quantum.flavours === "symbolic" ? "n_f" : String(quantum.flavours)}\\text{ copies}`}`,
      ),
    ),
  ];
}

function groups({ gauge, orthogonal, charges }: Content): WorkingStep[] {
  const steps: WorkingStep[] = [];
  if (gauge.length > 0)
    steps.push(
      prose(
        "For $SU(N)$ the measure and each character are kept on strictly dominant weights, where multiplying by a character adds $k$ times its weights and sorts with the sign of the permutation; the singlets are what is left at $\\rho$.",
      ),
    );
  if (orthogonal.length > 0)
    steps.push(
      prose(
        "For $O(N)$ a product of traces $\\prod_j \\mathrm{tr}\\,g^{\\mu_j}$ has $\\sum_\\lambda \\chi_\\lambda(\\mu)$ singlets, summed over diagrams $\\lambda$ with at most $N$ rows, all even (Rains 1998).",
      ),
    );
  if (charges.length > 0)
    steps.push(
      prose(
        charges
          .map(({ name, kept, modulo }) => {
            const which =
              kept === null
                ? "every charge is kept"
                : `kept are charges ${kept.map((value) => `$${value.toLatex()}$`).join(", ")}`;
            return `${name}: ${which}${modulo === null ? "" : ` modulo ${modulo}`}.`;
          })
          .join(" "),
      ),
    );
  return steps.length === 0 ? [] : [heading("Groups"), ...steps];
}
