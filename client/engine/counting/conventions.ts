/** What each published counting assumes. Papers differ in signs; the ones meant here are written out. */
import { presetNamed } from "./presets.ts";
import type { PresetName } from "./preset-names.ts";

const conventions: Readonly<Record<PresetName, string>> = {
  dimension:
    "Everything counts its dimension, so a term counts $\\Delta$ minus the dimension of the measure, and a graph its degree in powers of the probe scale.",
  "chiral, mesons":
    "Weinberg 1979: $\\mathcal{L} = \\frac{f^2}{4}\\,\\mathrm{Tr}(\\partial_\\mu U\\,\\partial^\\mu U^\\dagger) + \\frac{f^2}{4} m_\\pi^2\\,\\mathrm{Tr}(U + U^\\dagger) + \\dots$ with metric $(+,-,-,-)$ and $D_\\mu U = \\partial_\\mu U - i r_\\mu U + i U l_\\mu$. Light masses count like momenta. A vertex with $n$ derivatives or masses counts $n - 2$, a graph $\\nu = 2 + (d-2) L + \\sum V_n (n - 2)$.",
  "chiral, with nucleons":
    "Weinberg 1990 and 1991: $\\mathcal{L} = N^\\dagger (i\\partial_0 + \\nabla^2/2m_N) N - \\frac12 C_S (N^\\dagger N)^2 - \\dots$, metric $(+,-,-,-)$, $D_\\mu = \\partial_\\mu + \\Gamma_\\mu$. A vertex counts $\\Delta_i = d_i + n_i/2 - 2$, and a connected graph of $A$ nucleons $\\nu = 2 - A + 2L + \\sum V_i \\Delta_i$ (of $C$ separately connected pieces $4 - A - 2C + 2L + \\sum V_i\\Delta_i$). This holds for irreducible graphs only: a state of nothing but nucleons is enhanced by $m_N/Q$ and is iterated. To count $\\nu = -2 + 2A - 2C + \\dots$ instead, add $3A - 6$ to every graph.",
  "heavy quark":
    "Powers of $1/m_Q$: $\\mathcal{L} = \\bar h_v\\, i v\\cdot D\\, h_v + \\bar h_v \\frac{(iD_\\perp)^2}{2m_Q} h_v + \\frac{g}{4 m_Q} \\bar h_v \\sigma_{\\mu\\nu} G^{\\mu\\nu} h_v + \\dots$ with $D_\\mu = \\partial_\\mu - i g A_\\mu$ and metric $(+,-,-,-)$ (Neubert 1994); with $D_\\mu = \\partial_\\mu + i g A_\\mu$ the magnetic term has the other sign (Manohar and Wise 2000). Everything light counts its dimension, $m_Q$ counts nothing.",
  "nonrelativistic velocity":
    "Lepage, Magnea, Nakhleh, Magnea and Hornbostel 1992: $\\mathcal{L} = \\psi^\\dagger (iD_t + \\mathbf{D}^2/2M)\\psi + \\psi^\\dagger \\mathbf{D}^4\\psi/8M^3 + \\dots$ with $D_t = \\partial_t + i g A_0$, $\\mathbf{D} = \\nabla - i g \\mathbf{A}$ in Coulomb gauge. $\\psi \\sim (Mv)^{3/2}$, $D_t \\sim Mv^2$, $\\mathbf{D} \\sim Mv$, $gA_0 \\sim Mv^2$, $g\\mathbf{A} \\sim Mv^3$, $g\\mathbf{E} \\sim M^2v^3$, $g\\mathbf{B} \\sim M^2v^4$. The charge counts with its field; a potential is taken as $A_0$ and a field strength as $\\mathbf{E}$, so give $\\mathbf{A}$ and $\\mathbf{B}$ rules of their own. Where the premises do not tell time from space, add 1 for every $D_t$ among the exceptions.",
  "soft-collinear":
    "Bauer, Fleming, Pirjol and Stewart 2001: collinear momenta $p \\sim (\\lambda^2, 1, \\lambda)$, $\\xi \\sim \\lambda$, $A_n \\sim (\\lambda^2, 1, \\lambda)$, ultrasoft quarks $\\lambda^3$ and gluons $\\lambda^2$, $iD_\\mu = i\\partial_\\mu + g A_\\mu$. The rules here are those of collinear fields with transverse gluons and of $n\\cdot\\partial$; other components, and terms of ultrasoft fields only, whose measure counts $-8$, are corrected among the exceptions. With its external legs a graph counts $\\delta = 4 + 4u + \\sum (k-4) V_k^C + \\sum (k-8) V_k^U$; for $u = 1$ add 4.",
  "large scattering length":
    "Kaplan, Savage and Wise 1998, power divergences subtracted: $\\mathcal{L} = N^\\dagger(i\\partial_t + \\nabla^2/2M)N - C_0 (N^T P_i N)^\\dagger (N^T P_i N) - \\dots$ with $P_i$ projecting on a partial wave, in $D = 3$. The couplings of 2n derivatives scale as $C_{2n} \\sim 4\\pi/(M\\Lambda^n Q^{n+1})$ and a loop as $MQ/4\\pi$, so $C_0$ counts nothing and is iterated; all others are insertions. Signs and factors of contact couplings differ between papers.",
  "post-Newtonian":
    "Goldberger and Rothstein 2006: $S = -\\sum m\\int d\\tau - 2 m_{Pl}^2\\int d^4x\\,\\sqrt{g}\\,R$ with metric $(+,-,-,-)$, potential gravitons, $v$ the relative velocity and $\\epsilon = 1/L$ the inverse of the angular momentum $L = m v r$. At fixed $r$: $\\partial_t \\sim v$, $H \\sim v^{1/2}$, $m \\sim L/v$, $m_{Pl} \\sim (L/v^3)^{1/2}$, so a source counts $L^{1/2}$ and the cubic vertex $v^2/L^{1/2}$. A graph counts as a Lagrangian, one power of $v$ above the action, in which Newton's potential counts $L$. A heavy scale is taken as $m_{Pl}$, any other without the role of a probe as a mass.",
  "gravity at low energy":
    "Donoghue 1994: $\\mathcal{L} = \\sqrt{g}\\,(2R/\\kappa^2 + c_1 R^2 + c_2 R_{\\mu\\nu}R^{\\mu\\nu} + \\dots)$ with $\\kappa^2 = 32\\pi G$ and metric $(+,-,-,-)$. A vertex with $n$ derivatives counts $n - 2$ and a graph $2 + 2L + \\sum V_n(n-2)$, so loops come with $(E/M_{Pl})^{2L}$. In pure gravity $R^2$ and $R_{\\mu\\nu}R^{\\mu\\nu}$ are removed by the equations of motion, and the first divergence that is not stands at two loops, cubic in the curvature (Goroff and Sagnotti 1986).",
  "Fermi surface":
    "Polchinski 1992, Shankar 1994: momenta scale toward the Fermi surface, $S = \\int dt\\,d\\ell\\,[\\psi^\\dagger i\\partial_t\\psi - v\\,\\ell\\,\\psi^\\dagger\\psi]$; the distance $\\ell$ from the surface and $\\partial_t$ count 1, $\\psi$ counts $-\\frac12$ and 1 for its $d\\ell$, and the measure $-1$ for $dt$ and $-1$ for the momentum delta function that constrains a distance. It does so for two legs, for forward scattering and for pairs of opposite momenta, which are marginal; a generic term of four legs has no such constraint, so add 1 to it among the exceptions.",
};

/** Prose that may hold $…$. */
export function conventionsOf(preset: string): string {
  return conventions[presetNamed(preset)];
}
