/** How soon a change of access is felt on an open socket. */
import { describe, expect, test } from "vitest";
import { closeCode } from "../../../client/contract/collab.ts";
import { digestOfSession } from "../../../server/http/sessions.ts";
import { accessScene, closedWithin, WITHIN_A_SECOND } from "./access-scene.ts";
import { addPerson, addRefereeLink, signIn } from "./cast.ts";
import { step1 } from "./raw-socket.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";

const stage = setStage();
const { change, setRole, remove, storedRows } = accessScene(stage);

describe("a change of access is felt within a second", () => {
  test("a removed person is cut, and refused when they come back", async () => {
    const notebookId = await stage.notebook();
    const socket = await stage.raw(stage.ben, notebookId);
    await remove(notebookId, stage.ben);
    expect(await closedWithin(socket, WITHIN_A_SECOND)).toBe(closeCode.forbidden);
    await expect(stage.raw(stage.ben, notebookId)).rejects.toThrow("404");
  });

  test("a demoted person reads on, and what they type is not taken; promoted again, it is", async () => {
    const notebookId = await stage.notebook();
    const ben = await stage.write(stage.ben, notebookId);
    const ada = await stage.write(stage.ada, notebookId);
    await setRole(notebookId, stage.ben, "reader");
    await until("he is told", () => ben.notices.some(({ about }) => about === "read-only"), WITHIN_A_SECOND);
    ben.type("not allowed");
    await until("it is refused", () => ben.notices.some(({ about }) => about === "rejected"));
    ada.type("Ada goes on");
    await until("he still reads", () => ben.text().includes("Ada goes on"));
    expect(await storedRows(notebookId, stage.ben)).toBe(0);
    await setRole(notebookId, stage.ben, "author");
    await until("he is told", () => ben.notices.at(-1)?.about === "writable", WITHIN_A_SECOND);
    // The server asks for what it lacks, and now takes it.
    await until("it has arrived", () => ada.text().includes("not allowed"));
  });

  test("the commit itself looks at the role, announced or not", async () => {
    const notebookId = await stage.notebook();
    const ben = await stage.write(stage.ben, notebookId);
    await stage.server.database.raw(
      "update notebook_people set role = 'reader' where notebook_id = ? and person_id = ?",
      [notebookId, stage.ben.id],
    );
    ben.type("too late");
    await until("he is told", () => ben.notices.some(({ about }) => about === "read-only"));
    await until("it is refused", () => ben.notices.some(({ about }) => about === "rejected"));
    expect(await storedRows(notebookId)).toBe(0);
  });

  test("an archived notebook turns read-only for everyone, and back", async () => {
    const notebookId = await stage.notebook();
    const ada = await stage.write(stage.ada, notebookId);
    await change("update notebooks set archived_at = now() where id = ?", [notebookId], {
      about: "notebook",
      notebookId,
    });
    await until("she is told", () => ada.notices.some(({ about }) => about === "read-only"), WITHIN_A_SECOND);
    expect(ada.notices).toContainEqual({ about: "notebook" });
    await change("update notebooks set archived_at = null where id = ?", [notebookId], {
      about: "notebook",
      notebookId,
    });
    await until("she is told", () => ada.notices.some(({ about }) => about === "writable"), WITHIN_A_SECOND);
    ada.type("again");
    await until("it is stored", async () => (await storedRows(notebookId)) > 0);
  });

  test("a deleted notebook closes for everyone", async () => {
    const notebookId = await stage.notebook();
    const socket = await stage.raw(stage.ada, notebookId);
    await change("update notebooks set deleted_at = now() where id = ?", [notebookId], {
      about: "notebook",
      notebookId,
    });
    expect(await closedWithin(socket, WITHIN_A_SECOND)).toBe(closeCode.notFound);
  });

  test("a person who signs out is cut in every notebook of that session, and not in another session", async () => {
    const eve = await addPerson(stage.server.database, "Eve");
    const other = await signIn(stage.server.database, eve.id);
    const notebookId = await stage.notebook([[eve, "owner"]]);
    const here = await stage.raw(eve, notebookId);
    const elsewhere = await stage.raw({ ...eve, ...other }, notebookId);
    await change("delete from sessions where sid = ?", [eve.sessionName], {
      about: "session",
      sessionId: digestOfSession(eve.sessionName),
    });
    expect(await closedWithin(here, WITHIN_A_SECOND)).toBe(closeCode.signedOut);
    elsewhere.send(step1());
    await until("the other is answered", () => elsewhere.frames.some(({ step }) => step === 1));
  });

  test("a session that runs out is cut when it does", async () => {
    // The session store counts in whole seconds.
    const endsAt = new Date(Date.now() + 1_600);
    const { cookie } = await signIn(stage.server.database, stage.ada.id, endsAt);
    const socket = await stage.raw({ ...stage.ada, cookie }, await stage.notebook());
    expect(await closedWithin(socket, 1_600 + WITHIN_A_SECOND)).toBe(closeCode.signedOut);
    expect(Date.now()).toBeGreaterThanOrEqual(endsAt.getTime());
  });

  test("a revoked link and one that runs out are cut", async () => {
    const notebookId = await stage.notebook();
    const revoked = await addRefereeLink(stage.server.database, notebookId);
    const endsAt = new Date(Date.now() + 700);
    const ending = await addRefereeLink(stage.server.database, notebookId, { expiresAt: endsAt });
    const first = await stage.raw(null, notebookId, { token: revoked.token });
    const second = await stage.raw(null, notebookId, { token: ending.token });
    await change("update referee_links set revoked_at = now() where id = ?", [revoked.id], {
      about: "referee-link",
      notebookId,
      refereeLinkId: revoked.id,
    });
    expect(await closedWithin(first, WITHIN_A_SECOND)).toBe(closeCode.forbidden);
    expect(first.closed()!.reason).toBe("this link was revoked");
    expect(await closedWithin(second, 700 + WITHIN_A_SECOND)).toBe(closeCode.forbidden);
    expect(second.closed()!.reason).toBe("this link has expired");
    expect(Date.now()).toBeGreaterThanOrEqual(endsAt.getTime());
  });
});
