/** Short sentences about what has just happened, shown and read aloud without taking the focus. */
export interface Notice {
  readonly id: number;
  readonly sentence: string;
  /** A refusal stays until it is put away; a confirmation goes by itself. */
  readonly tone: "done" | "refused";
}

type Listener = () => void;
const listeners = new Set<Listener>();
let notices: readonly Notice[] = [];
let lastId = 0;

export function currentNotices(): readonly Notice[] {
  return notices;
}

export function onNoticesChange(listener: Listener): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** At most three at a time: older ones give way. */
export function say(sentence: string, tone: Notice["tone"] = "done"): void {
  lastId += 1;
  notices = [
    ...notices.filter((notice) => notice.sentence !== sentence),
    { id: lastId, sentence, tone },
  ].slice(-3);
  tell();
}

export function putAway(id: number): void {
  notices = notices.filter((notice) => notice.id !== id);
  tell();
}

function tell(): void {
  for (const listener of listeners) listener();
}
