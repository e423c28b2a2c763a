/**
 * Keys that put rows in order when compared as text. Moving a row writes its key and touches nothing else, so two
 * people may move, add and edit rows of one table at once.
 *
 * A key is read as the digits of a fraction between 0 and 1 in base 62. It never ends in the digit 0, so there is
 * room before it and after it. Two random digits at the end keep two people who insert at the same place from making
 * the same key.
 */
const digits = "0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz";
const base = digits.length;

function isKey(text: string): boolean {
  return /^[0-9A-Za-z]*[1-9A-Za-z]$/.test(text);
}

function digitAt(key: string, place: number): number {
  return place < key.length ? digits.indexOf(key.charAt(place)) : 0;
}

/** Two digits, the last not 0, from two random numbers of [0, 1). */
function tail(random: () => number): string {
  return digits.charAt(Math.floor(random() * base)) + digits.charAt(1 + Math.floor(random() * (base - 1)));
}

/**
 * A key after `before` and before `after`; null stands for the open end. The answer is null when there is no room:
 * the neighbours are equal, in the wrong order, or not keys of ours. Then the whole table is given `evenOrderKeys`.
 * @example orderKeyBetween("A", "B", () => 0) // "AV01"
 */
export function orderKeyBetween(
  before: string | null,
  after: string | null,
  random: () => number = Math.random,
): string | null {
  if ((before !== null && !isKey(before)) || (after !== null && !isKey(after))) return null;
  if (before !== null && after !== null && before >= after) return null;
  const lower = before ?? "";
  let upper = after;
  let key = "";
  for (let place = 0; ; place++) {
    const low = digitAt(lower, place);
    const high = upper === null ? base : digitAt(upper, place);
    if (high - low > 1) return key + digits.charAt(pick(low, high, lower, upper, place)) + tail(random);
    key += digits.charAt(low);
    // One apart: whatever follows stays below `after`.
    if (high - low === 1) upper = null;
  }
}

/** Rows are mostly added at one end: a step of one there keeps keys short; elsewhere the middle does. */
function pick(low: number, high: number, lower: string, upper: string | null, place: number): number {
  const openBelow = place >= lower.length;
  if (upper === null && !openBelow) return low + 1;
  if (upper !== null && openBelow) return high - 1;
  return Math.floor((low + high) / 2);
}

/** `count` keys in rising order, evenly spread. */
export function evenOrderKeys(count: number): string[] {
  const width = Math.max(2, Math.ceil(Math.log(count + 2) / Math.log(base)) + 1);
  const room = base ** width;
  return Array.from({ length: count }, (_, index) => {
    let rest = Math.floor(((index + 1) * room) / (count + 1));
    let key = "";
    for (let place = 0; place < width; place++) {
      key = digits.charAt(rest % base) + key;
      rest = Math.floor(rest / base);
    }
    // A trailing 0 would leave no room before the key.
    return key.replace(/0+$/, "") || digits.charAt(1);
  });
}
