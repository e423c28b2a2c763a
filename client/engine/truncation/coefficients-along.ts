/** Coefficients c_n(x) from predictions along x, and which points give them. */
import type { CurveData } from "./curve-data.ts";
import type { Settings } from "./read-settings.ts";
import { LARGEST_COEFFICIENT } from "./series.ts";
import type { TruncationInputs } from "./shape.ts";

/** The coefficients of the points that have every order, at one expansion parameter. */
export interface CoefficientsAlong {
  /** Shape N, rising. */
  readonly x: readonly number[];
  readonly q: readonly number[];
  /** X_ref at each point. */
  readonly reference: readonly number[];
  /** Those used, rising by order. */
  readonly orders: readonly {
    readonly order: number;
    /** The power of Q that c_n is divided by: n, less the lowest order when X_ref is made from that. */
    readonly power: number;
    /** Shape N. */
    readonly values: Float64Array;
  }[];
  readonly left: Left;
}

/** How many points could not be used, and why. */
interface Left {
  readonly incomplete: number;
  readonly zeroReference: number;
  readonly beyondOne: number;
  readonly outOfRange: number;
}

/**
 * @param q Q at each x of the data
 * @param isUsed whether c_n counts
 */
export function coefficientsAlong(
  data: CurveData,
  q: readonly number[],
  fixedReference: number | null,
  isUsed: (order: number) => boolean,
): CoefficientsAlong {
  const lowest = data.orders[0]?.order ?? 0;
  const fromLowest = fixedReference === null && data.reference === null;
  const left = { incomplete: 0, zeroReference: 0, beyondOne: 0, outOfRange: 0 };
  const places: number[] = [];
  const references: number[] = [];
  const coefficient = (index: number, place: number, reference: number) => {
    const { order, values } = data.orders[index] ?? { order: 0, values: [] };
    const shift = (values[place] ?? NaN) - (index === 0 ? 0 : (data.orders[index - 1]?.values[place] ?? NaN));
    return shift / (reference * (q[place] ?? NaN) ** (fromLowest ? order - lowest : order));
  };
  const used = data.orders.flatMap(({ order }, index) => (isUsed(order) ? [index] : []));
  data.x.forEach((_, place) => {
    const parameter = q[place] ?? NaN;
    const first = data.orders[0]?.values[place] ?? null;
    const reference = fixedReference ?? (data.reference ? (data.reference[place] ?? null) : first);
    if (data.orders.some(({ values }) => (values[place] ?? null) === null) || reference === null)
      left.incomplete += 1;
    else if (reference === 0) left.zeroReference += 1;
    else if (!(parameter < 1)) left.beyondOne += 1;
    else if (!used.every((index) => Math.abs(coefficient(index, place, reference)) <= LARGEST_COEFFICIENT))
      left.outOfRange += 1;
    else {
      places.push(place);
      references.push(reference);
    }
  });
  const orders = used.map((index) => {
    const { order } = data.orders[index] ?? { order: 0 };
    const list = places.map((place, point) => coefficient(index, place, references[point] ?? NaN));
    return { order, power: fromLowest ? order - lowest : order, values: Float64Array.from(list) };
  });
  const pick = (values: readonly number[]) => places.map((place) => values[place] ?? NaN);
  return { x: pick(data.x), q: pick(q), reference: references, orders, left };
}

/** The same at some of the points only. */
export function coefficientsAt(all: CoefficientsAlong, places: readonly number[]): CoefficientsAlong {
  const pick = (values: ArrayLike<number>) => places.map((place) => values[place] ?? NaN);
  return {
    ...all,
    x: pick(all.x),
    q: pick(all.q),
    reference: pick(all.reference),
    orders: all.orders.map((one) => ({ ...one, values: Float64Array.from(pick(one.values)) })),
  };
}

/** Whether c_n counts: c_0 on request, and never the coefficient that X_ref is made from. */
export function isUsedIn(
  inputs: TruncationInputs,
  settings: Settings,
  data: CurveData,
): (order: number) => boolean {
  const lowest = data.orders[0]?.order;
  const fromLowest = settings.reference === null && data.reference === null;
  return (order) => (order > 0 || inputs.first === "from c_0") && !(fromLowest && order === lowest);
}
