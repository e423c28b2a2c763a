/** LaTeX as plain letters, where only text can stand. */
import { superscript } from "#engine/notation/float-text.ts";

const letters: Readonly<Record<string, string>> = {
  alpha: "α",
  beta: "β",
  gamma: "γ",
  delta: "δ",
  epsilon: "ε",
  varepsilon: "ε",
  zeta: "ζ",
  eta: "η",
  theta: "θ",
  kappa: "κ",
  lambda: "λ",
  mu: "μ",
  nu: "ν",
  xi: "ξ",
  pi: "π",
  rho: "ρ",
  sigma: "σ",
  tau: "τ",
  phi: "φ",
  varphi: "φ",
  chi: "χ",
  psi: "ψ",
  omega: "ω",
  Gamma: "Γ",
  Delta: "Δ",
  Theta: "Θ",
  Lambda: "Λ",
  Xi: "Ξ",
  Pi: "Π",
  Sigma: "Σ",
  Phi: "Φ",
  Psi: "Ψ",
  Omega: "Ω",
  partial: "∂",
  dagger: "†",
};

/** For native lists, spoken names and searches: "c₆/(6! Λ²) χ⁶". */
export function plainLatex(latex: string): string {
  return latex
    .replace(/\\frac\{([^{}]*(?:\{[^{}]*\}[^{}]*)*)\}\{([^{}]*(?:\{[^{}]*\}[^{}]*)*)\}/g, "$1/($2)")
    .replace(/\\bar\{([^{}]*)\}/g, "$1̄")
    .replace(/\\([A-Za-z]+)/g, (_, name: string) => letters[name] ?? "")
    .replace(/\^\{?†\}?/g, "†")
    .replace(/_\{?i\}?/g, "ᵢ")
    .replace(/_\{?t\}?/g, "ₜ")
    .replace(/\^\{?(\d+)\}?/g, (_, digits: string) => superscript(digits))
    .replace(/_\{?(\d+)\}?/g, (_, digits: string) =>
      digits.replace(/\d/g, (digit) => "₀₁₂₃₄₅₆₇₈₉".charAt(Number(digit))),
    )
    .replace(/\\[,;!: ]|~/g, " ")
    .replace(/[{}]/g, "")
    .replace(/\s+/g, " ")
    .trim();
}
