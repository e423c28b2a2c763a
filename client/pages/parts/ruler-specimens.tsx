import { useRef, useState } from "react";
import "../../ruler/ruler.css";
import { ProbeRail } from "../../ruler/probe-rail.tsx";
import { readAt } from "../../ruler/reading.ts";
import { rulerAxis } from "../../ruler/ruler-axis.ts";
import type { RulerMark, RulerModel } from "../../ruler/ruler-model.ts";
import { EDGE, RulerScale } from "../../ruler/ruler-scale.tsx";
import { Family, Specimen } from "./specimen.tsx";

function mark(label: string, size: number, power: number): RulerMark {
  return {
    id: label,
    label,
    latex: label,
    spoken: label,
    rowIds: [label],
    insertions: 1,
    order: Math.max(0, power),
    size,
    power,
    scalingClass: power < 0 ? "relevant" : power === 0 ? "marginal" : "irrelevant",
    assigned: power < 0,
  };
}

/** Invented: a crowd of equal sizes at the left, one term of each order to the right. */
const model: RulerModel = {
  marks: [
    mark("m²", 1, -2),
    mark("κ", 0.94, -1),
    mark("λ", 1, 0),
    mark("g", 1, 0),
    mark("a", 0.1, 1),
    mark("c₆", 0.01, 2),
    mark("c₇", 0.001, 3),
    mark("c₈", 0.0001, 4),
  ],
  probe: { name: "p", value: 100, sigma: 0, unit: "GeV" },
  heavy: { name: "Λ", value: 1000, sigma: 0, unit: "GeV" },
  Q: { value: 0.1, sigma: 0 },
  target: 0.02,
  orders: [0, 1, 2, 3].map((order) => ({
    text: String(order),
    order,
    leftOut: 0.1 ** (order + 1),
    curve: [10, 100, 970].map((p) => [p, (p / 1000) ** (order + 1)] as const),
  })),
};
const WIDTH = 880;

/** The order ruler with its hands, and without a target. */
export function RulerSpecimens() {
  const [values, setValues] = useState({ probe: model.probe.value, target: model.target });
  const [moving, setMoving] = useState(false);
  return (
    <Family title="Order ruler">
      <Specimen name="with a target and an estimate">
        <Drawn values={values} moving={moving} onMoving={setMoving} onValues={setValues} />
      </Specimen>
      <Specimen name="without a target">
        <Drawn
          values={{ probe: values.probe, target: null }}
          moving={moving}
          onMoving={setMoving}
          onValues={(next) => setValues({ ...values, probe: next.probe })}
        />
      </Specimen>
    </Family>
  );
}

interface Values {
  readonly probe: number;
  readonly target: number | null;
}
interface DrawnProps {
  readonly values: Values;
  readonly moving: boolean;
  readonly onMoving: (moving: boolean) => void;
  readonly onValues: (values: Values) => void;
}

function Drawn({ values, moving, onMoving, onValues }: DrawnProps) {
  const drawing = useRef<SVGSVGElement>(null);
  const reading = readAt(model, values.probe, values.target);
  const axis = rulerAxis([1, 1e-4], model.target, [EDGE, WIDTH - EDGE]);
  return (
    <div className="min-w-0 grow">
      <RulerScale
        drawing={drawing}
        axis={axis}
        width={WIDTH}
        levels={4}
        reading={reading}
        marks={reading.marks.filter(({ size }) => size >= 10 ** axis.low && size <= 10 ** axis.high)}
        keptTarget={model.target}
        estimate={values.target === null ? null : { low: 2e-4, high: 9e-4, words: "truncation error, 68 %" }}
        moving={moving}
        opened={null}
        onOpen={() => undefined}
        onTarget={(target) => onValues({ ...values, target })}
        onHold={onMoving}
        onKey={() => undefined}
      />
      <ProbeRail
        model={model}
        reading={reading}
        width={300}
        moving={moving}
        onProbe={(probe) => onValues({ ...values, probe })}
        onHold={onMoving}
        onKey={() => undefined}
      />
    </div>
  );
}
