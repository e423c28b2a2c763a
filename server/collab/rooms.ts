/** The rooms of this process: at most one per notebook, made when first entered. */
import type { Lease, RoomOptions } from "./room-parts.ts";
import { Room } from "./room.ts";

export type RoomsOptions = Omit<RoomOptions, "notebookId">;

export class Rooms {
  readonly #rooms = new Map<string, Room>();

  constructor(private readonly options: RoomsOptions) {}

  enter(notebookId: string): Promise<Lease> {
    let room = this.#rooms.get(notebookId);
    if (room === undefined || room.state === "closed" || room.state === "failed") {
      const made = new Room({
        ...this.options,
        notebookId,
        log: this.options.log.child({ notebookId }),
      });
      room = made;
      this.#rooms.set(notebookId, made);
      void made.ended.then(() => {
        if (this.#rooms.get(notebookId) === made) this.#rooms.delete(notebookId);
      });
    }
    return room.enter();
  }

  find(notebookId: string): Room | undefined {
    return this.#rooms.get(notebookId);
  }

  all(): readonly Room[] {
    return [...this.#rooms.values()];
  }

  async stop(patienceMs: number): Promise<void> {
    await Promise.all(this.all().map((room) => room.stop(patienceMs)));
  }
}
