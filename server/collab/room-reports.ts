/** What a room does about what its writer reports. */
import { closeCode } from "#contract/collab.ts";
import type { CommittedDocument } from "./committed-document.ts";
import { RoomNotFound } from "./room-state.ts";
import type { Room } from "./room.ts";
import type { WriterReports } from "./writer-reports.ts";

export function reportsTo(
  room: Room,
  document: CommittedDocument,
  committed: WriterReports["committed"],
): WriterReports {
  return {
    committed,
    refused: ({ connection }, reason) => connection.notify({ about: "rejected", reason }),
    malformed: (connection, reason) => connection.close(closeCode.malformed, reason.slice(0, 100)),
    lostRight: (people) => {
      for (const member of room.members) {
        const { visitor, rights } = member;
        if (visitor.as !== "member" || !rights.mayWrite) continue;
        if (people !== "everyone" && !people.includes(visitor.personId)) continue;
        member.rights = { ...rights, mayWrite: false };
        room.rightsChanged(member, rights);
      }
    },
    schemaRaised: () => {
      for (const member of room.members)
        if (member.schemaVersion < document.schemaVersion)
          member.close(closeCode.schemaTooOld, "the notebook needs a newer page");
    },
    storeUnreachable: () => room.notify({ about: "store-unreachable" }),
    storeBack: () => room.notify({ about: "store-back" }),
    notebookGone: () =>
      room.fail(new RoomNotFound("deleted"), closeCode.notFound, "the notebook was deleted"),
    broken: (error) => room.fail(error),
  };
}
