import type { Amplitude, TheoryDivergence, TheoryVerdict } from "#engine/divergence/value.ts";
import { Formula } from "../../ui/math.tsx";
import { Figure } from "../parts/figure.tsx";
import { ResultTable } from "../parts/result-table.tsx";
import { Counterterms } from "./counterterms.tsx";

const verdictWords: Readonly<Record<TheoryVerdict, string>> = {
  free: "free: nothing diverges",
  "super-renormalisable": "super-renormalisable: finitely many divergent graphs",
  renormalisable: "renormalisable: finitely many divergent amplitudes",
  "infinitely many divergent amplitudes": "infinitely many divergent amplitudes",
  "new terms at every order": "new terms at every order, finitely many at each",
};

/** Which amplitudes of the theory diverge, and which terms nobody wrote down. */
export function TheoryResult({ value }: { readonly value: TheoryDivergence }) {
  const { verdict, ranges, amplitudes, missing, caps } = value;
  return (
    <>
      <p className="block-line block-verdict">
        {verdict ? (
          <>
            By power counting <Figure scalar="verdict">{verdictWords[verdict]}</Figure>.
          </>
        ) : (
          "By power counting it depends on the dimension:"
        )}
      </p>
      {!verdict && (
        <ul className="block-plain-list">
          {ranges.map(({ symbol, from, to, verdict: here }) => (
            <li key={`${from?.text ?? ""} ${to?.text ?? ""}`}>
              <Formula latex={rangeLatex(symbol, from?.latex, to?.latex)} />: {verdictWords[here]}
            </li>
          ))}
        </ul>
      )}
      {amplitudes.length > 0 && (
        <ResultTable<Amplitude>
          caption={`Superficially divergent amplitudes with up to ${caps.legs} legs, ${caps.loops} loops and order ${caps.order.text} in 1/Λ`}
          showCaption
          rows={amplitudes}
          keyOf={({ legs }) => legs.key}
          toneOf={({ status }) => (status === "divergent" ? null : "left-out")}
          columns={[
            {
              heading: "legs",
              show: ({ legs }) => (legs.total === 0 ? "vacuum" : <Formula latex={legs.latex} />),
            },
            {
              heading: "largest ω",
              show: ({ legs, omega }) => (
                <Figure scalar={`${legs.key}/omega`}>
                  <Formula latex={omega.latex} />
                </Figure>
              ),
            },
            {
              heading: "verdict",
              show: ({ status, verdict: kind, forbiddenBy }) =>
                status === "divergent" ? kind : forbiddenBy ? `forbidden by ${forbiddenBy}` : status,
            },
            {
              heading: "at orders in 1/Λ",
              show: ({ atOrders }) =>
                atOrders
                  .map(
                    ({ order, omega, loops }) =>
                      `${order.text}: ω = ${omega.text} from ${loops} ${loops === 1 ? "loop" : "loops"}`,
                  )
                  .join("; "),
            },
          ]}
        />
      )}
      {missing.length > 0 ? (
        <Counterterms caption="Counterterms the premises lack" counterterms={missing} />
      ) : (
        amplitudes.length > 0 && (
          <p className="block-line">Every counterterm within these caps is among the premises.</p>
        )
      )}
    </>
  );
}

function rangeLatex(symbol: string, from: string | undefined, to: string | undefined): string {
  if (from !== undefined && from === to) return `${symbol} = ${from}`;
  if (from === undefined) return to === undefined ? `\\text{any } ${symbol}` : `${symbol} < ${to}`;
  return to === undefined ? `${symbol} > ${from}` : `${from} < ${symbol} < ${to}`;
}
