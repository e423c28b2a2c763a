/** Slows writers down before the queue grows: their frames wait in the network, and none is dropped. */
import type { Connection } from "./connection.ts";
import { QUEUED_PER_CONNECTION, QUEUED_PER_ROOM } from "./limits.ts";

interface Amount {
  frames: number;
  bytes: number;
}
const isAbove = (amount: Amount, most: Readonly<Amount>) =>
  amount.frames > most.frames || amount.bytes > most.bytes;
const isBelowHalf = (amount: Amount, most: Readonly<Amount>) =>
  amount.frames <= most.frames / 2 && amount.bytes <= most.bytes / 2;

export class BackPressure {
  readonly #total: Amount = { frames: 0, bytes: 0 };
  readonly #amounts = new Map<Connection, Amount>();
  readonly #holding = new Set<Connection>();

  add(connection: Connection, bytes: number): void {
    const amount = this.#amounts.get(connection) ?? { frames: 0, bytes: 0 };
    this.#amounts.set(connection, amount);
    for (const each of [amount, this.#total]) {
      each.frames += 1;
      each.bytes += bytes;
    }
    if (!isAbove(amount, QUEUED_PER_CONNECTION) && !isAbove(this.#total, QUEUED_PER_ROOM)) return;
    this.#holding.add(connection);
    connection.hold();
  }

  remove(connection: Connection, bytes: number): void {
    const amount = this.#amounts.get(connection);
    if (amount === undefined) return;
    for (const each of [amount, this.#total]) {
      each.frames -= 1;
      each.bytes -= bytes;
    }
    if (amount.frames === 0) this.#amounts.delete(connection);
    this.#releaseSome();
  }

  releaseAll(): void {
    for (const connection of this.#holding) connection.release();
    this.#holding.clear();
    this.#amounts.clear();
    Object.assign(this.#total, { frames: 0, bytes: 0 });
  }

  #releaseSome(): void {
    if (this.#holding.size === 0 || !isBelowHalf(this.#total, QUEUED_PER_ROOM)) return;
    for (const connection of this.#holding) {
      const amount = this.#amounts.get(connection) ?? { frames: 0, bytes: 0 };
      if (!isBelowHalf(amount, QUEUED_PER_CONNECTION)) continue;
      this.#holding.delete(connection);
      connection.release();
    }
  }
}
