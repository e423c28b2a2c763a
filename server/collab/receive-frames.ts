/** What becomes of a frame: the one place where a role is looked at before anything is done for it. */
import { closeCode } from "#contract/collab.ts";
import { Budget } from "./budget.ts";
import type { CommittedDocument } from "./committed-document.ts";
import type { Connection } from "./connection.ts";
import { readFrame, writeStep2, writeUpdate, type IncomingFrame } from "./frames.ts";
import { LARGEST_FRAME_BYTES, PRESENCE_FRAMES_PER_SECOND, STEP_1_PER_TEN_SECONDS } from "./limits.ts";
import type { Guests } from "./guests.ts";
import type { Room } from "./room.ts";
import { assessUpdate, isDeletedIn } from "./update-check.ts";

/** Someone who may only read sends none from an honest page; a few may be under way when rights change. */
const REFUSED_PER_MINUTE = 20;

export function receiveFrames(room: Room, connection: Connection, guests: Guests): void {
  const joins = new Budget(STEP_1_PER_TEN_SECONDS, 10_000);
  const presence = new Budget(PRESENCE_FRAMES_PER_SECOND, 1_000);
  const refused = new Budget(REFUSED_PER_MINUTE, 60_000);

  connection.onFrame((frame) => {
    const start = performance.now();
    take(frame);
    guests.spend(connection, performance.now() - start);
  });

  function take(frame: Uint8Array): void {
    if (frame.length > LARGEST_FRAME_BYTES)
      return connection.close(closeCode.tooLarge, "a change may have at most 4 MB");
    const message = readFrame(frame);
    if (message.about === "nothing known")
      return connection.close(closeCode.malformed, message.reason.slice(0, 100));
    // While the server stops, frames are left alone: never acknowledged, so their authors keep them.
    const { taking } = room;
    if (taking === null) return;
    switch (message.about) {
      case "step 1":
        if (!joins.spend()) return connection.close(closeCode.tooFast, "too many requests for the document");
        return answerStep1(taking.document, connection, message);
      case "presence query": {
        const present = presence.spend() ? room.presence.snapshotFor(connection) : null;
        return present === null ? undefined : connection.send(present);
      }
      case "presence":
        if (!presence.spend() || room.presence.receive(connection, message.states)) return;
        return connection.close(closeCode.malformed, "presence could not be read");
      case "content": {
        const { visitor, rights } = connection;
        if (visitor.as === "member" && rights.mayWrite)
          return taking.writer.offer(connection, visitor.personId, message.update);
        if (!refused.spend()) return connection.close(closeCode.forbidden, "you may only read this notebook");
        return refuseContent(taking.document, connection, message.update);
      }
    }
  }
}

function answerStep1(
  document: CommittedDocument,
  connection: Connection,
  { stateVector, encoded }: Extract<IncomingFrame, { about: "step 1" }>,
): void {
  // A referee's bytes never come from updates, which may still hold sentences deleted since.
  const isNewReferee = connection.visitor.as === "referee" && stateVector.size === 0;
  const [whole, since] = isNewReferee ? [document.encoded()] : document.missingFor(stateVector, encoded);
  connection.sendWhole(writeStep2(whole));
  if (since !== undefined) connection.sendWhole(writeUpdate(since));
  connection.joined = true;
}

/** The copy of someone whose change is not taken differs from the notebook: they must load it afresh. */
function refuseContent(document: CommittedDocument, connection: Connection, update: Uint8Array): void {
  const { verdict } = assessUpdate(update, {
    clockOf: (client) => document.clockOf(client),
    isDeleted: (client, clock, length) => isDeletedIn(document.document, client, clock, length),
  });
  if (verdict === "malformed") return connection.close(closeCode.malformed, "a change could not be read");
  if (verdict !== "known")
    connection.notify({ about: "rejected", reason: "you may only read this notebook" });
}
