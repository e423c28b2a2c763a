/** So many per stretch of time; what is above is told so. */
export class Budget {
  #spent = 0;
  #since = 0;

  constructor(
    private readonly most: number,
    private readonly perMs: number,
  ) {}

  /** False when there is nothing left for now. */
  spend(now = Date.now()): boolean {
    if (now - this.#since >= this.perMs) {
      this.#since = now;
      this.#spent = 0;
    }
    this.#spent += 1;
    return this.#spent <= this.most;
  }
}
