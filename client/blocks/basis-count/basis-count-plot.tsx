import type { BasisValue } from "#engine/basis/value.ts";
import type { ResultProps } from "../block-parts.ts";
import { Plot } from "../parts/plot.tsx";

/** How the number of operators grows with the mass dimension, on a logarithmic axis. */
export function BasisCountPlot({ value }: ResultProps<BasisValue>) {
  const points = value.totals.flatMap(({ dimension, total }) => {
    const number = Number(total.at);
    return number > 0 ? [[fraction(dimension), number] as const] : [];
  });
  if (points.length < 2) return null;
  const dimensions = points.map(([dimension]) => dimension);
  const numbers = points.map(([, number]) => number);
  return (
    <Plot
      name="Number of operators against the mass dimension"
      x={{
        kind: "linear",
        label: "mass dimension",
        domain: [Math.min(...dimensions), Math.max(...dimensions)],
      }}
      y={{ kind: "log", label: "operators", domain: [1, Math.max(10, ...numbers)] }}
      curves={[
        {
          key: "operators",
          label: value.symbolic ? `n_f = ${value.flavours}` : "",
          points,
          style: 0,
          color: "ink",
        },
      ]}
      table={{ x: "mass dimension" }}
    />
  );
}

function fraction(text: string): number {
  const [above = 0, below = 1] = text.split("/").map(Number);
  return above / below;
}
