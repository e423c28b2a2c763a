/** Counts the frames of a connection that are committed, without a gap: frame 3 does not count before frame 2. */
export class SavedPrefix {
  #taken = 0;
  #count = 0;
  readonly #early = new Set<number>();

  /** The number of the next frame, from 1. */
  take(): number {
    this.#taken += 1;
    return this.#taken;
  }

  commit(frame: number): void {
    if (frame <= this.#count) return;
    this.#early.add(frame);
    while (this.#early.delete(this.#count + 1)) this.#count += 1;
  }

  /** How many frames, from the first on, are committed. */
  get count(): number {
    return this.#count;
  }
}
