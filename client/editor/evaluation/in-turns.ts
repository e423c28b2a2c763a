/** Work in short turns, so that a hundred results do not hold up the keystroke between them. */

export interface Turns<Item> {
  /** Queues items by key; a newer one of the same key takes the place of the older. */
  add(items: readonly (readonly [key: string, item: Item])[]): void;
  destroy(): void;
}

/** `turn` is called with one item per task of the event loop; `done` when none is left. */
export function inTurns<Item>(turn: (item: Item) => void, done: () => void): Turns<Item> {
  const waiting = new Map<string, Item>();
  // A message comes back at once, where a timer of 0 would soon be held to 4 ms.
  const channel = new MessageChannel();
  let running = false;
  channel.port1.onmessage = () => {
    const [next] = waiting;
    if (next) {
      waiting.delete(next[0]);
      turn(next[1]);
    }
    if (waiting.size > 0) channel.port2.postMessage(null);
    else {
      running = false;
      done();
    }
  };
  return {
    add(items) {
      for (const [key, item] of items) {
        waiting.delete(key);
        waiting.set(key, item);
      }
      if (running) return;
      running = true;
      channel.port2.postMessage(null);
    },
    destroy() {
      waiting.clear();
      channel.port1.close();
    },
  };
}
