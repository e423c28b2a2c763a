/** How a graph hangs together: sets of vertices as bits of a number, at most 30 of them. */

/** For each vertex its neighbours; `lineCount` gives the lines between two. */
export function neighboursOf(size: number, lineCount: (u: number, v: number) => number): number[] {
  return Array.from({ length: size }, (_, u) => {
    let neighbours = 0;
    for (let v = 0; v < size; v += 1) if (v !== u && lineCount(u, v) > 0) neighbours |= 1 << v;
    return neighbours;
  });
}

/** The vertices of `within` that can be reached from one of them, without the direct step between `cut` vertices. */
export function reachable(
  from: number,
  neighbours: readonly number[],
  within: number,
  cut: readonly [number, number] | null = null,
): number {
  let reached = 1 << from;
  let fresh = reached;
  while (fresh !== 0) {
    let next = 0;
    for (let v = 0; v < neighbours.length; v += 1) {
      if ((fresh & (1 << v)) === 0) continue;
      let steps = neighbours[v] ?? 0;
      if (cut?.[0] === v) steps &= ~(1 << cut[1]);
      if (cut?.[1] === v) steps &= ~(1 << cut[0]);
      next |= steps;
    }
    fresh = next & within & ~reached;
    reached |= fresh;
  }
  return reached;
}

/** Sides of every bridge: the vertices that cutting a single line leaves on one side. */
export function bridgeSides(
  neighbours: readonly number[],
  within: number,
  isSingle: (u: number, v: number) => boolean,
): number[] {
  const sides: number[] = [];
  for (let u = 0; u < neighbours.length; u += 1) {
    if ((within & (1 << u)) === 0) continue;
    for (let v = u + 1; v < neighbours.length; v += 1) {
      if (((neighbours[u] ?? 0) & within & (1 << v)) === 0 || !isSingle(u, v)) continue;
      const side = reachable(u, neighbours, within, [u, v]);
      if ((side & (1 << v)) === 0) sides.push(side);
    }
  }
  return sides;
}

export function allVertices(size: number): number {
  return size >= 31 ? -1 >>> 1 : (1 << size) - 1;
}
