/** Says where a text stops being JSON (RFC 8259), since the runtime's own message does not always. */

export interface JsonPlace {
  /** Both counted from 1; the column in UTF-16 units. */
  readonly line: number;
  readonly column: number;
}

/** Nested deeper than this is refused before it is parsed. */
const DEEPEST = 500;

const spaces = /[ \t\n\r]*/y;
// RFC 8259 forbids control characters in strings, so the pattern must name them.
// eslint-disable-next-line no-control-regex
const text = /"(?:[^"\\\u0000-\u001f]|\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4}))*"/y;
const plain = /(?:-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?|true|false|null)(?![A-Za-z0-9_.+-])/y;

/** Null when the text is JSON; else the place of the first character that cannot stand there. */
export function locateJsonError(source: string): JsonPlace | null {
  let at = 0;
  const skip = (pattern: RegExp): boolean => {
    pattern.lastIndex = at;
    const found = pattern.exec(source);
    if (found) at += found[0].length;
    return found !== null;
  };
  const mark = (character: string): boolean => {
    skip(spaces);
    if (source[at] !== character) return false;
    at += 1;
    return true;
  };
  const isValue = (depth: number): boolean => {
    skip(spaces);
    if (depth > DEEPEST) return false;
    if (mark("[")) return isList("]", () => isValue(depth + 1));
    if (mark("{")) return isList("}", () => isMember(depth));
    return skip(text) || skip(plain);
  };
  const isMember = (depth: number): boolean => {
    skip(spaces);
    return skip(text) && mark(":") && isValue(depth + 1);
  };
  const isList = (end: string, isEntry: () => boolean): boolean => {
    if (mark(end)) return true;
    do if (!isEntry()) return false;
    while (mark(","));
    return mark(end);
  };
  const isWhole = isValue(0);
  skip(spaces);
  if (isWhole && at === source.length) return null;
  const before = source.slice(0, at).split("\n");
  return { line: before.length, column: (before.at(-1)?.length ?? 0) + 1 };
}
