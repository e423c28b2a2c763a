/** Where the vertices, lines and legs of a graph go: pure, and the same for the same graph. */
import type { Graph } from "#engine/graphs/graph.ts";

export interface Point {
  readonly x: number;
  readonly y: number;
}
/** A cubic curve through four control points. */
export type Curve = readonly [Point, Point, Point, Point];

export interface DrawnLine {
  readonly field: number;
  readonly curve: Curve;
  /** An external leg points at its vertex when the particle comes in, and away when it goes out. */
  readonly external: boolean;
}
export interface GraphLayout {
  readonly vertices: readonly Point[];
  readonly lines: readonly DrawnLine[];
  /** Where the number of each vertex, and the name of each line, is read without touching a line. */
  readonly numbers: readonly Point[];
  readonly names: readonly Point[];
  readonly width: number;
  readonly height: number;
}

/** Distance of neighbours, length of a leg, size of a closed line, margin: in the units of the picture. */
export const SPACING = 62;
const LEG = 30;
const LOOP = 44;
const MARGIN = 10;
const NUMBER = 10;

const at = (from: Point, angle: number, length: number): Point => ({
  x: from.x + length * Math.cos(angle),
  y: from.y + length * Math.sin(angle),
});

/** Lines between two vertices, with the fields they are of; a directed one keeps its ends. */
function joins(graph: Graph): { from: number; to: number; field: number }[] {
  return graph.edges.flatMap(({ from, to, field, count }) =>
    Array.from({ length: count }, () => ({ from, to, field })),
  );
}

/** Vertices one after the other when the graph is a chain; null when it is none. */
function chainOf(graph: Graph): number[] | null {
  const neighbours = graph.vertices.map((_, v) => [
    ...new Set(
      graph.edges.flatMap(({ from, to }) => (from === to ? [] : from === v ? [to] : to === v ? [from] : [])),
    ),
  ]);
  const ends = neighbours.flatMap(({ length }, v) => (length === 1 ? [v] : []));
  if (graph.vertices.length > 2 && (ends.length !== 2 || neighbours.some(({ length }) => length > 2)))
    return null;
  const chain = [ends[0] ?? 0];
  for (;;) {
    const next = neighbours[chain.at(-1) ?? 0]?.find((v) => !chain.includes(v));
    if (next === undefined) return chain.length === graph.vertices.length ? chain : null;
    chain.push(next);
  }
}

/** Crossings of chords, weighed far above their length, when vertices stand around a circle in this order. */
function costOf(order: readonly number[], pairs: readonly (readonly [number, number, number])[]): number {
  const place = new Map(order.map((vertex, n) => [vertex, n]));
  const size = order.length;
  const chords = pairs.map(([u, v, count]) => {
    const a = place.get(u) ?? 0;
    const b = place.get(v) ?? 0;
    return { low: Math.min(a, b), high: Math.max(a, b), count };
  });
  let cost = 0;
  chords.forEach((one, n) => {
    const steps = Math.min(one.high - one.low, size - one.high + one.low);
    // Many parallel lines want to be neighbours: a bundle through the middle hides what it crosses.
    cost += (steps - 1) * one.count;
    for (const other of chords.slice(n + 1)) {
      const inside = (end: number) => end > one.low && end < one.high;
      const outside = (end: number) => end < one.low || end > one.high;
      const crosses =
        (inside(other.low) && outside(other.high)) || (inside(other.high) && outside(other.low));
      if (crosses) cost += 20 * one.count * other.count;
    }
  });
  return cost;
}

/** Swaps vertices around the circle as long as that helps; on a circle no line runs through a third vertex. */
function circleOf(graph: Graph): number[] {
  const counts = new Map<string, readonly [number, number, number]>();
  for (const { from, to, count } of graph.edges) {
    if (from === to) continue;
    const [u, v] = [Math.min(from, to), Math.max(from, to)];
    counts.set(`${u} ${v}`, [u, v, count + (counts.get(`${u} ${v}`)?.[2] ?? 0)]);
  }
  const pairs = [...counts.values()];
  let order = graph.vertices.map((_, v) => v);
  let cost = costOf(order, pairs);
  for (let improved = true; improved;) {
    improved = false;
    for (let a = 0; a < order.length; a += 1) {
      for (let b = a + 1; b < order.length; b += 1) {
        const swapped = order.map((v, n) => (n === a ? (order[b] ?? v) : n === b ? (order[a] ?? v) : v));
        const moved = [...order.slice(0, a), ...order.slice(a + 1)];
        moved.splice(b, 0, order[a] ?? 0);
        for (const candidate of [swapped, moved]) {
          const next = costOf(candidate, pairs);
          if (next >= cost) continue;
          [order, cost, improved] = [candidate, next, true];
        }
      }
    }
  }
  return order;
}

/** Positions, and the direction in which each vertex has room. */
function placeVertices(graph: Graph): { points: Point[]; outward: number[]; width: number[] } {
  const n = graph.vertices.length;
  const points = graph.vertices.map(() => ({ x: 0, y: 0 }));
  const outward = graph.vertices.map(() => 0);
  // How wide an angle the legs of each vertex may take.
  const width = graph.vertices.map(() => Math.PI);
  const chain = chainOf(graph);
  if (chain) {
    chain.forEach((vertex, k) => {
      points[vertex] = { x: k * SPACING, y: 0 };
      const isEnd = k === 0 || k === n - 1;
      outward[vertex] = k === 0 ? Math.PI : isEnd ? 0 : k % 2 === 1 ? Math.PI / 2 : -Math.PI / 2;
      width[vertex] = isEnd ? 0.6 * Math.PI : 0.4 * Math.PI;
    });
    return { points, outward, width };
  }
  const order = circleOf(graph);
  const radius = SPACING / (2 * Math.sin(Math.PI / n));
  order.forEach((vertex, k) => {
    // The first vertex stands left: what comes in is read from there.
    const angle = Math.PI + (2 * Math.PI * k) / n;
    points[vertex] = at({ x: 0, y: 0 }, angle, radius);
    outward[vertex] = angle;
    width[vertex] = 0.5 * Math.PI + Math.PI / n;
  });
  return { points, outward, width };
}

/** Equal lines as arcs beside each other, further ones bending more. */
function arcs(graph: Graph, points: readonly Point[]): DrawnLine[] {
  const bundles = new Map<string, { from: number; to: number; field: number }[]>();
  for (const join of joins(graph)) {
    if (join.from === join.to) continue;
    const key = `${Math.min(join.from, join.to)} ${Math.max(join.from, join.to)}`;
    bundles.set(key, [...(bundles.get(key) ?? []), join]);
  }
  return [...bundles.values()].flatMap((bundle) =>
    bundle.map(({ from, to, field }, k) => {
      const a = points[from] ?? { x: 0, y: 0 };
      const b = points[to] ?? { x: 0, y: 0 };
      const length = Math.hypot(b.x - a.x, b.y - a.y);
      // Measured from the lower vertex, so that lines of opposite direction do not fall on each other.
      const side = from < to ? 1 : -1;
      const most =
        Math.min(graph.vertices.length > 2 ? 0.36 : 0.62, 0.3 * (bundle.length - 1)) *
        Math.min(length, 1.3 * SPACING);
      const bend = bundle.length === 1 ? 0 : side * most * ((2 * k) / (bundle.length - 1) - 1);
      const normal = { x: -(b.y - a.y) / length, y: (b.x - a.x) / length };
      const control = (t: number): Point => ({
        x: a.x + t * (b.x - a.x) + 1.33 * bend * normal.x,
        y: a.y + t * (b.y - a.y) + 1.33 * bend * normal.y,
      });
      return { field, external: false, curve: [a, control(0.25), control(0.75), b] as const };
    }),
  );
}

/** Closed lines and external legs, spread over the side of each vertex where there is room. */
function fans(
  graph: Graph,
  points: readonly Point[],
  outward: readonly number[],
  width: readonly number[],
): DrawnLine[] {
  return graph.vertices.flatMap((_, v) => {
    const legs = graph.legs.flatMap(({ vertex, field, conjugate, count }) =>
      vertex === v ? Array.from({ length: count }, () => ({ field, conjugate })) : [],
    );
    const closed = joins(graph).filter(({ from, to }) => from === v && to === v);
    const centre = points[v] ?? { x: 0, y: 0 };
    const isAlone = graph.vertices.length === 1;
    const inMiddle = !isAlone && (width[v] ?? 0) < 0.45 * Math.PI;
    const spread = (count: number, k: number, middle: number, angle: number) =>
      count === 1 ? middle : middle + angle * (k / (count - 1) - 0.5);
    const drawn: DrawnLine[] = [];
    // A vertex alone has its legs below and its closed lines above; one amid a chain likewise on both sides of it.
    const apart = isAlone || inMiddle;
    const all = closed.length + (apart ? 0 : legs.length);
    const loopMiddle = isAlone ? -Math.PI / 2 : (outward[v] ?? 0) + (inMiddle ? Math.PI : 0);
    closed.forEach(({ field }, k) => {
      const place = apart ? k : k + Math.ceil(legs.length / 2);
      const angle =
        isAlone && legs.length === 0
          ? (2 * Math.PI * k) / closed.length
          : spread(all, place, loopMiddle, isAlone ? Math.PI * (1 - 1 / all) : (width[v] ?? 0));
      const half = Math.min(0.55, 1.4 / Math.max(1, all));
      drawn.push({
        field,
        external: false,
        curve: [centre, at(centre, angle - half, 1.5 * LOOP), at(centre, angle + half, 1.5 * LOOP), centre],
      });
    });
    legs.forEach(({ field, conjugate }, k) => {
      const place = apart || k < Math.ceil(legs.length / 2) ? k : k + closed.length;
      const angle = isAlone
        ? legs.length === 1
          ? Math.PI / 2
          : closed.length === 0
            ? Math.PI + (2 * Math.PI * k) / legs.length + Math.PI / 4
            : Math.PI - (Math.PI * k) / (legs.length - 1)
        : spread(apart ? legs.length : all, place, outward[v] ?? 0, width[v] ?? 0);
      const end = at(centre, angle, LEG);
      const [from, to] = conjugate ? [centre, end] : [end, centre];
      const between = (t: number): Point => ({
        x: from.x + t * (to.x - from.x),
        y: from.y + t * (to.y - from.y),
      });
      drawn.push({ field, external: true, curve: [from, between(1 / 3), between(2 / 3), to] });
    });
    return drawn;
  });
}

export function pointOn([a, b, c, d]: Curve, t: number): Point {
  const s = 1 - t;
  const blend = (p: number, q: number, r: number, u: number) =>
    s * s * s * p + 3 * s * s * t * q + 3 * s * t * t * r + t * t * t * u;
  return { x: blend(a.x, b.x, c.x, d.x), y: blend(a.y, b.y, c.y, d.y) };
}

/** Around a point, the place at a distance that is farthest from everything drawn. */
function clearOf(centre: Point, distance: number, drawn: readonly Point[]): Point {
  let best = centre;
  let most = -1;
  for (let k = 0; k < 24; k += 1) {
    const place = at(centre, (2 * Math.PI * k) / 24, distance);
    const nearest = drawn.reduce(
      (least, { x, y }) => Math.min(least, Math.hypot(x - place.x, y - place.y)),
      1e9,
    );
    if (nearest > most + 1e-9) [best, most] = [place, nearest];
  }
  return best;
}

export function layOut(graph: Graph): GraphLayout {
  const { points, outward, width } = placeVertices(graph);
  const lines = [...arcs(graph, points), ...fans(graph, points, outward, width)];
  const drawn = [
    ...points,
    ...lines.flatMap(({ curve }) => Array.from({ length: 25 }, (_, k) => pointOn(curve, k / 24))),
  ];
  const numbers = points.map((point) => clearOf(point, NUMBER, drawn));
  const taken = [...drawn, ...numbers];
  const names = lines.map(({ curve }) => {
    const place = clearOf(pointOn(curve, 0.5), NUMBER, taken);
    // Names of later lines keep off those of earlier ones.
    taken.push(place);
    return place;
  });
  const touched = [...drawn, ...numbers, ...names];
  const left = Math.min(...touched.map(({ x }) => x)) - MARGIN;
  const top = Math.min(...touched.map(({ y }) => y)) - MARGIN;
  const shift = ({ x, y }: Point): Point => ({ x: x - left, y: y - top });
  return {
    vertices: points.map(shift),
    lines: lines.map(({ curve: [a, b, c, d], ...rest }) => ({
      ...rest,
      curve: [shift(a), shift(b), shift(c), shift(d)] as const,
    })),
    numbers: numbers.map(shift),
    names: names.map(shift),
    width: Math.max(...touched.map(({ x }) => x)) + MARGIN - left,
    height: Math.max(...touched.map(({ y }) => y)) + MARGIN - top,
  };
}
