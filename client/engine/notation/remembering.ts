/** A bounded memory of a pure function of text: the same answers, sooner. */

/**
 * Keeps the answers for the last `most` different texts of at most `longest` characters; the oldest goes first.
 * Answers are shared, so they must be immutable.
 * @example const size = remembering((text) => text.length, { most: 100, longest: 80 });
 */
export function remembering<T>(
  answer: (text: string) => T,
  { most, longest }: { readonly most: number; readonly longest: number },
): (text: string) => T {
  const known = new Map<string, { readonly answer: T }>();
  return (text) => {
    if (text.length > longest) return answer(text);
    const earlier = known.get(text);
    if (earlier) return earlier.answer;
    const fresh = { answer: answer(text) };
    for (const oldest of known.keys()) {
      if (known.size < most) break;
      known.delete(oldest);
    }
    known.set(text, fresh);
    return fresh.answer;
  };
}
