/** What a room does about what another process says of its notebook. */
import type { NeighbourMessage } from "./neighbour-messages.ts";
import type { Neighbours } from "./neighbours.ts";
import type { Room } from "./room.ts";

export function hearNeighbour(
  room: Room,
  message: NeighbourMessage,
  from: string,
  neighbours: Pick<Neighbours, "say">,
): void {
  const { notebookId, presence } = room;
  switch (message.about) {
    case "hello":
      for (const state of presence.statesFromHere()) neighbours.say({ about: "presence", notebookId, state });
      return;
    case "goodbye":
      return presence.leaveAllOf(from);
    case "presence":
      return presence.receiveFrom(from, message.state);
    case "results":
      return room.notify({ about: "results" });
  }
}
