/**
 * Where the marks' labels stand: on levels above the scale, never on each other and never across another mark's stem.
 * From the right to the left, each at the lowest level that is free: so a stem is always left of the labels that were
 * placed before it, and a crowd of equal sizes becomes a staircase instead of a heap.
 */
export interface Labelled {
  readonly id: string;
  readonly x: number;
  readonly width: number;
  /** What it may shrink to where there is no room. */
  readonly least?: number;
}

export interface PlacedLabel {
  readonly id: string;
  readonly x: number;
  readonly level: number;
  /** Which side of its mark the label stands on; null when there is no room for it at any level. */
  readonly side: "right" | "left" | null;
  /** Whether only its least width found room. */
  readonly isCut: boolean;
}

/** Half of a mark, and from a mark's middle to its label. */
export const MARK_REACH = 7;
export const LABEL_GAP = 10;
/** Between a label and the next mark. */
const APART = 4;

interface Span {
  readonly from: number;
  readonly to: number;
}
interface Room extends Span {
  readonly level: number;
  readonly x: number;
}

export interface LabelRoom {
  readonly levels: number;
  readonly left: number;
  readonly right: number;
  /** Where a line goes from top to bottom: no label lies across it. */
  readonly line?: number | null;
}

export function placeLabels(labels: readonly Labelled[], room: LabelRoom): readonly PlacedLabel[] {
  const taken: Room[] = [];
  const placed = new Map<string, PlacedLabel>();
  // Equal positions keep their order: the first stands lowest.
  const inTurn = labels
    .map((label, index) => ({ label, index }))
    .sort((a, b) => b.label.x - a.label.x || a.index - b.index);
  for (const { label } of inTurn) {
    const { least = label.width } = label;
    const whole = firstRoom(label, taken, room);
    const found =
      whole ?? firstRoom({ ...label, width: least }, taken, room) ?? roomOfMark(label, taken, room.levels);
    taken.push(found.room);
    placed.set(label.id, {
      id: label.id,
      x: label.x,
      level: found.room.level,
      side: found.side,
      isCut: whole === null,
    });
  }
  return labels.flatMap(({ id }) => placed.get(id) ?? []);
}

function firstRoom(label: Labelled, taken: readonly Room[], { levels, left, right, line = null }: LabelRoom) {
  const rising = Array.from({ length: levels }, (_, level) => level);
  for (const side of ["right", "left"] as const) {
    const span = spanOf(label, side);
    if (span.from < left || span.to > right) continue;
    if (line !== null && isCrossed(label.x, span, line)) continue;
    // To the left of its mark a label lies where others are still to come: it goes high, and their stems end below it.
    for (const level of side === "right" ? rising : rising.toReversed()) {
      const room = { ...span, level, x: label.x };
      if (!taken.some((other) => meet(room, other))) return { side, room };
    }
  }
  return null;
}

/** The mark alone, when there is no room for its label: it still stands on nobody's words where that can be. */
function roomOfMark({ x }: Labelled, taken: readonly Room[], levels: number) {
  const rooms = Array.from({ length: levels }, (_, level) => ({
    from: x - MARK_REACH,
    to: x + MARK_REACH,
    level,
    x,
  }));
  const free = rooms.find((room) => !taken.some((other) => meet(room, other)));
  return { side: null, room: free ?? { from: x, to: x, level: 0, x } };
}

function isCrossed(x: number, { from, to }: Span, line: number): boolean {
  return line > from && line < to && Math.abs(line - x) > MARK_REACH;
}

/** What a mark and its label cover. */
export function spanOf({ x, width }: Labelled, side: "right" | "left"): Span {
  const reach = LABEL_GAP + width + APART;
  return side === "right" ? { from: x - MARK_REACH, to: x + reach } : { from: x - reach, to: x + MARK_REACH };
}

function meet(one: Room, other: Room): boolean {
  if (one.level === other.level) return one.from < other.to && other.from < one.to;
  const [upper, lower] = one.level > other.level ? [one, other] : [other, one];
  // The stem of the upper one comes down through the lower one's label; marks themselves may stand on one stem.
  const beside = Math.abs(upper.x - lower.x) <= MARK_REACH;
  return !beside && upper.x > lower.from && upper.x < lower.to;
}
