/**
 * Counts what it costs Yjs to take an update in, and stops in the middle of one that costs too much. Honest changes
 * are cheap, but an update of a hundred kilobytes can be written so that Yjs works on it for minutes:
 *
 * - An item is placed by walking over everything between its two neighbours of old (YATA; Nicolaescu, Jahns, Derntl
 *   and Klamma 2016). Whoever names neighbours far apart, again and again, makes that quadratic.
 * - Splitting a run of text moves all later structs of its writer in one array.
 * - Every change is told to every ancestor, so depth multiplies.
 *
 * The counts are exact and the same on every machine: time would depend on what else is going on.
 */
import * as Y from "yjs";

/** Steps that one row may take: a third of a second at most. Hundreds of people at one place take some thousands. */
export const STEPS_PER_ROW = 1_000_000;
/** All rows of a notebook together, as far as reading it again would cost them again: a bound on the time of a load. */
export const STEPS_PER_DOCUMENT = 5_000_000;
/** What a row may take beyond that; honest typing stays far below. */
export const STEPS_PER_ROW_THEN = 500;
/** Applied in one go, before other notebooks get their turn. */
export const STEPS_PER_TURN = 100_000;
/** Lists in lists in lists come to twenty or so. */
export const DEEPEST_NESTING = 100;
/** One step is about the time in which so many structs are moved. */
const STRUCTS_MOVED_PER_STEP = 200;

export class TooCostly extends Error {}

/** What was done in taking something in, in steps. */
export interface Effort {
  /** Structs passed by while looking for the place of an item. */
  walked: number;
  /** Structs moved while runs of text were split. */
  moved: number;
}
export interface Limits extends Readonly<Effort> {
  readonly depth: number;
}
export const rowLimits: Limits = { walked: STEPS_PER_ROW, moved: STEPS_PER_ROW, depth: DEEPEST_NESTING };
/** For what was let in before: it is only counted. */
export const noLimits: Limits = { walked: Infinity, moved: Infinity, depth: Infinity };

interface Meter {
  readonly document: Y.Doc;
  readonly effort: Effort;
  readonly limits: Limits;
  /** Of the writer with the most structs; found when first needed. */
  longest: number | null;
}

let running: Meter | null = null;

/** Runs `work`, which applies updates to `document`, and says what it cost. Throws `TooCostly` in the midst of it. */
export function metered(document: Y.Doc, limits: Limits, work: () => void): Effort {
  const outer = running;
  const effort = { walked: 0, moved: 0 };
  running = { document, effort, limits, longest: null };
  try {
    work();
    return effort;
  } finally {
    running = outer;
  }
}

function walk(meter: Meter, from: Y.Item | null, until: Y.Item | null, direction: "left" | "right"): void {
  for (let at = from; at !== null && at !== until; at = at[direction]) {
    meter.effort.walked += 1;
    if (meter.effort.walked > meter.limits.walked)
      throw new TooCostly("it names neighbours that are too far apart");
  }
}

/** The walks that `integrate` is about to make, by the same conditions. */
function chargePlacing(meter: Meter, item: Y.Item): void {
  const { left, right, parent, parentSub } = item;
  if (!(parent instanceof Y.AbstractType)) return;
  const isFree = left === null ? right !== null && right.left === null : left.right === right;
  if (left === null && parentSub !== null) walk(meter, parent._map.get(parentSub) ?? null, null, "left");
  if (isFree) return;
  walk(meter, left === null ? firstOf(parent, parentSub) : left.right, right, "right");
}

/** Of a list, or of the values that an attribute has had. */
function firstOf(parent: Y.AbstractType<unknown>, attribute: string | null): Y.Item | null {
  if (attribute === null) return parent._start;
  let first = parent._map.get(attribute) ?? null;
  while (first !== null && first.left !== null) first = first.left;
  return first;
}

function checkDepth({ limits }: Meter, item: Y.Item): void {
  if (limits.depth === Infinity || !(item.content instanceof Y.ContentType)) return;
  let depth = 0;
  for (let at: unknown = item.parent; at instanceof Y.AbstractType; at = at._item?.parent) {
    depth += 1;
    if (depth > limits.depth) throw new TooCostly("it nests too deeply");
  }
}

function chargeSplitting(meter: Meter, copied: number): void {
  meter.longest ??= [...meter.document.store.clients.values()].reduce(
    (most, structs) => Math.max(most, structs.length),
    0,
  );
  meter.effort.moved += 1 + (meter.longest + copied) / STRUCTS_MOVED_PER_STEP;
  if (meter.effort.moved > meter.limits.moved) throw new TooCostly("it tears too much apart");
}

// Yjs offers no place to count at, so its own methods count; without a meter they do what they always did.
const { integrate } = Y.Item.prototype;
Y.Item.prototype.integrate = function (this: Y.Item, transaction: Y.Transaction, offset: number): void {
  if (running !== null) {
    checkDepth(running, this);
    // With an offset, part of the item is known: it follows its own beginning, which is in place.
    if (offset === 0) chargePlacing(running, this);
    else chargeFollowing(running, this, offset);
  }
  integrate.call(this, transaction, offset);
};

function chargeFollowing(meter: Meter, item: Y.Item, offset: number): void {
  const { client, clock } = item.id;
  const before = Y.getItem(meter.document.store, Y.createID(client, clock + offset - 1));
  if (before instanceof Y.Item) walk(meter, before.right, item.right, "right");
}

for (const content of [Y.ContentString, Y.ContentAny, Y.ContentJSON, Y.ContentDeleted] as const) {
  // Each of them takes and gives its own kind, which a type for all four cannot say.
  const prototype = content.prototype as { splice(offset: number): unknown };
  const { splice } = prototype;
  prototype.splice = function (this: { getLength(): number }, offset: number) {
    // Letters are not copied, other values are.
    const copied = this instanceof Y.ContentAny || this instanceof Y.ContentJSON ? this.getLength() : 0;
    if (running !== null) chargeSplitting(running, copied);
    return splice.call(this, offset);
  };
}
