/** Values of couplings between two scales: integrates, tabulates, plots. */
import { roundFloat, type Problem, type Scalar } from "../evaluation.ts";
import { measuredText } from "../notation/measured.ts";
import { symbolLatex } from "../notation/symbol-latex.ts";
import type { RunningContext, RunningPart } from "./evaluate.ts";
import { relativeSlopes, run, runnable, type RunningResult, type RunningSystem } from "./flow.ts";
import { readScales, readStarts, type RunningScales } from "./read-scales.ts";
import type { CouplingRow, RunningPlot, ScaleColumn } from "./value.ts";
import { driftsOf } from "./drifts.ts";
import { runningWorking } from "./working.ts";

const SAMPLES = 61;
const DIGITS = 6;

/** A row of the state: a parameter or a gauge coupling, as it is shown. */
interface Shown {
  readonly id: string;
  readonly latex: string;
  readonly plain: string;
  readonly energy: number;
  readonly show: (value: number) => number;
}

/**
 * Problems: those of scales and values, `start-nonperturbative`. Notices: `running-scales-missing`, `start-missing`,
 * `gauge-values-missing`, `running-pole`.
 */
export function betweenScales(context: RunningContext): RunningPart {
  const { inputs, theory, declared, model, betas, gauge } = context;
  const problems: Problem[] = [];
  const notices: Problem[] = [];
  const scales = readScales(inputs, theory, declared, problems);
  const without = (): RunningPart => ({
    scales: [],
    couplings: [],
    pole: null,
    plot: null,
    epsilon: null,
    fixedPoints: [],
    drifts: driftsOf(context, new Map()),
    problems,
    notices,
    scalars: [],
    working: runningWorking(context, null),
  });
  if (!scales) {
    if (problems.length === 0) notices.push({ code: "running-scales-missing", path: ["from"], facts: {} });
    return without();
  }
  const starts = readStarts(inputs, theory, model.parameters, declared, scales.energies, problems);
  if (problems.length > 0) return without();
  const own = runnable(model.parameters, betas?.slopes ?? [], starts, theory);
  const dropped = model.parameters.filter(
    (one) => !own.parameters.some(({ parameter }) => parameter === one),
  );
  if (dropped.length > 0)
    notices.push({
      code: "start-missing",
      path: ["values"],
      facts: { symbols: dropped.map(({ latex }) => latex).join(",\\; ") },
    });
  const groups = gauge.groups.flatMap((group) =>
    group.alpha === null ? [] : [{ ...group, alpha: group.alpha }],
  );
  const allGiven = groups.length === gauge.groups.length;
  if (!allGiven) notices.push({ code: "gauge-values-missing", path: ["groups"], facts: {} });
  const system: RunningSystem = {
    ...own,
    groups: allGiven ? groups : [],
    matter: allGiven ? gauge.matter : [],
    gaugeLoops: inputs.gaugeLoops === "2" ? 2 : 1,
  };
  if (system.parameters.length + system.groups.length === 0) return without();
  const strong = relativeSlopes(system, scales).filter(({ size }) => size >= 1);
  if (strong.length > 0) {
    const symbols = strong.map(({ latex }) => latex).join(",\\; ");
    problems.push({ code: "start-nonperturbative", path: ["values"], facts: { symbols } });
    return without();
  }
  const columns = columnsOf(scales, system);
  const samples = samplesOf(scales);
  const wanted = inOrder([...columns.map(({ scale }) => scale), ...samples], scales);
  const result = run(system, scales, wanted);
  const stateAt = (scale: number) => result.states[wanted.indexOf(scale)] ?? null;
  const rows = shownRows(system);
  const pole = presentPole(result, rows, scales);
  if (pole)
    notices.push({ code: "running-pole", path: [], facts: { coupling: pole.latex, scale: pole.text } });
  const couplings = rows.map((row, index) => presentRow(row, index, columns, stateAt, scales));
  return {
    scales: columns.map(({ id, text, scale }) => ({ id, text, ratio: roundFloat(scale / scales.from) })),
    couplings,
    pole,
    plot: plotOf(rows, result, samples, stateAt, scales, pole),
    epsilon: null,
    fixedPoints: [],
    drifts: driftsOf(context, starts),
    problems,
    notices,
    scalars: scalarsOf(couplings, columns, pole),
    working: runningWorking(context, { system, scales, result, columns, couplings }),
  };
}

export interface Column extends Omit<ScaleColumn, "ratio"> {
  readonly scale: number;
}

function inOrder(values: readonly number[], { from, to }: RunningScales): number[] {
  return [...new Set(values)].sort((a, b) => (from < to ? a - b : b - a));
}

/** Both ends, thresholds between them and what was asked for; each named by the row it is from. */
function columnsOf(scales: RunningScales, { matter }: RunningSystem): readonly Column[] {
  const [low, high] = [Math.min(scales.from, scales.to), Math.max(scales.from, scales.to)];
  const masses = matter.flatMap(({ mass, rowId }) =>
    mass !== null && mass > low && mass < high ? [{ id: rowId, value: mass }] : [],
  );
  const all = [{ id: "from", value: scales.from }, { id: "to", value: scales.to }, ...scales.at, ...masses];
  return inOrder(
    all.map(({ value }) => value),
    scales,
  ).map((scale) => ({
    id: all.find(({ value }) => value === scale)?.id ?? "",
    text: measuredText(scale / scales.unit.size, 0, scales.unit.name, 5),
    scale,
  }));
}

function samplesOf({ from, to }: RunningScales): readonly number[] {
  return Array.from({ length: SAMPLES }, (_, index) =>
    index === 0 ? from : index === SAMPLES - 1 ? to : from * (to / from) ** (index / (SAMPLES - 1)),
  );
}

function shownRows({ parameters, groups }: RunningSystem): readonly Shown[] {
  return [
    ...parameters.map(({ parameter }) => ({
      id: parameter.id,
      latex: parameter.latex,
      plain: parameter.id,
      energy: parameter.energy.toFloat(),
      show: (value: number) => value,
    })),
    ...groups.map(({ rowId, latex, symbol, given }) => ({
      id: rowId,
      latex: latex === "" ? symbolLatex(symbol) : latex,
      plain: symbol,
      energy: 0,
      show: given === "alpha" ? (value: number) => value : (value: number) => Math.sqrt(4 * Math.PI * value),
    })),
  ];
}

function presentRow(
  row: Shown,
  index: number,
  columns: readonly Column[],
  stateAt: (scale: number) => readonly number[] | null,
  scales: RunningScales,
): CouplingRow {
  const energy = scales.energies ? row.energy : 0;
  const unit = energy === 0 ? "" : energy === 1 ? scales.unit.name : `${scales.unit.name}^${energy}`;
  return {
    id: row.id,
    latex: row.latex,
    plain: row.plain,
    unit,
    values: columns.map(({ scale }) => {
      const state = stateAt(scale);
      if (!state) return null;
      const value = row.show(state[index] ?? NaN) / scales.unit.size ** energy;
      return { value: roundFloat(value), text: measuredText(value, 0, unit, DIGITS) };
    }),
  };
}

export interface PresentedPole {
  readonly text: string;
  readonly latex: string;
  readonly value: number;
  readonly unit: string;
}

function presentPole(
  { pole }: RunningResult,
  rows: readonly Shown[],
  { unit }: RunningScales,
): PresentedPole | null {
  if (!pole) return null;
  const value = pole.scale / unit.size;
  return {
    latex: rows[pole.component]?.latex ?? "",
    text: measuredText(value, 0, unit.name, DIGITS),
    value: roundFloat(Number(value.toPrecision(8))),
    unit: unit.name,
  };
}

/** Dimensionless couplings as they are; masses and the like against their first value. */
function plotOf(
  rows: readonly Shown[],
  result: RunningResult,
  samples: readonly number[],
  stateAt: (scale: number) => readonly number[] | null,
  { unit, from }: RunningScales,
  pole: PresentedPole | null,
): RunningPlot {
  const curves = rows.flatMap(({ id, plain, energy, show }, index) => {
    const first = stateAt(from)?.[index] ?? NaN;
    const isRelative = energy !== 0;
    const points = samples.flatMap((scale) => {
      const state = stateAt(scale);
      const value = state ? show(state[index] ?? NaN) / (isRelative ? first : 1) : NaN;
      return Number.isFinite(value) ? [[roundFloat(scale / unit.size), roundFloat(value)] as const] : [];
    });
    return points.length < 2 ? [] : [{ id, label: isRelative ? `${plain} / start` : plain, points }];
  });
  return {
    unit: unit.name,
    curves,
    thresholds: result.thresholds.map(({ scale, names }) => ({
      at: roundFloat(scale / unit.size),
      label: names.filter((name) => name !== "").join(", "),
    })),
    pole: pole && { at: pole.value, label: "pole" },
  };
}

/** Ids: "<coupling>/<column>" with the columns "from", "to" and rows of scales and thresholds; "pole". */
function scalarsOf(
  couplings: readonly CouplingRow[],
  columns: readonly Column[],
  pole: PresentedPole | null,
): Scalar[] {
  const values = couplings.flatMap(({ id, latex, unit, values: row }) =>
    columns.flatMap((column, index): Scalar[] => {
      const found = row[index];
      if (!found) return [];
      return [
        {
          id: `${id}/${column.id}`,
          label: `$${latex}$ at ${column.text}`,
          value: { type: "number", value: found.value, ...(unit === "" ? {} : { unit }) },
        },
      ];
    }),
  );
  if (!pole) return values;
  const unit = pole.unit === "" ? {} : { unit: pole.unit };
  return [
    ...values,
    {
      id: "pole",
      label: `scale of the pole of $${pole.latex}$`,
      value: { type: "number", value: pole.value, ...unit },
    },
  ];
}
