/** Who may open a socket, what they may do on it, and how soon a change of that is felt. */
import { randomUUID } from "node:crypto";
import { describe, expect, test } from "vitest";
import * as Y from "yjs";
import { closeCode, FRAGMENT } from "../../../client/contract/collab.ts";
import { firstRow } from "../../../server/data/database.ts";
import { digestOfSession } from "../../../server/http/sessions.ts";
import { announceAccessChange, type AnnouncedChange } from "../../../server/policies/access-changes.ts";
import { addPerson, addRefereeLink, signIn, type CastPerson } from "./cast.ts";
import {
  openRaw,
  presence,
  presenceIn,
  step1,
  step2,
  update,
  upgradeStatus,
  type RawSocket,
} from "./raw-socket.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";
import { openWriter, paragraphOf, textOf } from "./writer.ts";

const stage = setStage();
const WITHIN_A_SECOND = 1_000;

async function change(sql: string, bindings: string[], announced: AnnouncedChange): Promise<void> {
  await stage.server.database.transaction(async (transaction) => {
    await transaction.raw(sql, bindings);
    await announceAccessChange(transaction, announced);
  });
}
const setRole = (notebookId: string, person: CastPerson, role: string) =>
  change(
    "update notebook_people set role = ? where notebook_id = ? and person_id = ?",
    [role, notebookId, person.id],
    { about: "person", notebookId, personId: person.id },
  );
const remove = (notebookId: string, person: CastPerson) =>
  change("delete from notebook_people where notebook_id = ? and person_id = ?", [notebookId, person.id], {
    about: "person",
    notebookId,
    personId: person.id,
  });
const storedRows = async (notebookId: string, by?: CastPerson) =>
  Number(
    (await firstRow<{ count: string }>(
      stage.server.database,
      "select count(*) from document_updates where notebook_id = ? and person_id is not distinct from coalesce(?, person_id)",
      [notebookId, by?.id ?? null],
    ))!.count,
  );
/** One paragraph with this text, by a client of its own. */
function typed(text: string): Uint8Array {
  const document = new Y.Doc();
  paragraphOf(document).insert(0, text);
  return Y.encodeStateAsUpdate(document);
}
const closedWithin = async (socket: RawSocket, patienceMs: number) => {
  await until("the socket is closed", () => socket.closed() !== null, patienceMs);
  return socket.closed()!.code;
};

describe("opening a socket", () => {
  const cases: readonly (readonly [string, () => Promise<Parameters<typeof upgradeStatus>[0]>, number])[] = [
    ["its owner", async () => ({ ...at(await stage.notebook()), cookie: stage.ada.cookie }), 101],
    ["a reader", async () => ({ ...at(await stage.notebook()), cookie: stage.cleo.cookie }), 101],
    [
      "a page that names no origin",
      async () => ({ ...at(await stage.notebook()), cookie: stage.ada.cookie, origin: null }),
      101,
    ],
    ["someone signed out", async () => at(await stage.notebook()), 401],
    [
      "a made-up session",
      async () => ({ ...at(await stage.notebook()), cookie: "subleading=s%3Anobody.nothing" }),
      401,
    ],
    ["a stranger", async () => ({ ...at(await stage.notebook()), cookie: stage.dora.cookie }), 404],
    [
      "a page of another site",
      async () => ({
        ...at(await stage.notebook()),
        cookie: stage.ada.cookie,
        origin: "http://elsewhere.test",
      }),
      403,
    ],
    ["a notebook that does not exist", async () => ({ ...at(randomUUID()), cookie: stage.ada.cookie }), 404],
    ["no notebook at all", async () => ({ ...at("x"), path: "/collab/../x", cookie: stage.ada.cookie }), 404],
    ["another address", async () => ({ ...at("x"), path: "/elsewhere", cookie: stage.ada.cookie }), 404],
    [
      "a schema that is no number",
      async () => ({ ...at(await stage.notebook()), cookie: stage.ada.cookie, schema: "one" }),
      400,
    ],
    ["a referee", async () => withToken(await stage.notebook()), 101],
    [
      "a referee with a link of another notebook",
      async () => ({ ...(await withToken(await stage.notebook())), notebookId: await stage.notebook() }),
      404,
    ],
    ["a guessed token", async () => ({ ...at(await stage.notebook()), token: "x".repeat(43) }), 404],
    ["an expired link", async () => withToken(await stage.notebook(), new Date(Date.now() - 1_000)), 403],
    [
      "a member with a bad token",
      async () => ({ ...at(await stage.notebook()), cookie: stage.ada.cookie, token: "bad" }),
      404,
    ],
  ];
  const at = (notebookId: string) => ({ port: stage.server.port, notebookId });
  const withToken = async (notebookId: string, expiresAt?: Date) => ({
    ...at(notebookId),
    token: (await addRefereeLink(stage.server.database, notebookId, expiresAt ? { expiresAt } : {})).token,
  });

  test.each(cases)("%s", async (_who, wish, status) => {
    const options = await wish();
    expect(await upgradeStatus(options)).toBe(status);
    // Who is refused has made no room.
    if (status !== 101) expect(stage.server.collab.rooms.find(options.notebookId)).toBeUndefined();
  });

  test("a revoked link, a deleted notebook, a removed person", async () => {
    const notebookId = await stage.notebook();
    const { token, id } = await addRefereeLink(stage.server.database, notebookId);
    await stage.server.database.raw("update referee_links set revoked_at = now() where id = ?", [id]);
    expect(await upgradeStatus({ ...at(notebookId), token })).toBe(403);
    await remove(notebookId, stage.ben);
    expect(await upgradeStatus({ ...at(notebookId), cookie: stage.ben.cookie })).toBe(404);
    await stage.server.database.raw("update notebooks set deleted_at = now() where id = ?", [notebookId]);
    expect(await upgradeStatus({ ...at(notebookId), cookie: stage.ada.cookie })).toBe(404);
  });
});

describe("reading only lets nothing through", () => {
  const readers: readonly (readonly [string, (notebookId: string) => Promise<RawSocket>])[] = [
    ["a reader", (notebookId) => stage.raw(stage.cleo, notebookId)],
    [
      "a reviewer",
      async (notebookId) => {
        await setRole(notebookId, stage.cleo, "reviewer");
        return stage.raw(stage.cleo, notebookId);
      },
    ],
    [
      "a referee",
      async (notebookId) =>
        stage.raw(null, notebookId, {
          token: (await addRefereeLink(stage.server.database, notebookId)).token,
        }),
    ],
    [
      "the owner of an archived notebook",
      async (notebookId) => {
        await stage.server.database.raw("update notebooks set archived_at = now() where id = ?", [
          notebookId,
        ]);
        return stage.raw(stage.ada, notebookId);
      },
    ],
  ];
  test.each(readers)("%s: not by an update, nor by a step 2", async (_who, open) => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    writer.type("kept");
    await writer.allSaved();
    const before = await storedRows(notebookId);
    const socket = await open(notebookId);
    socket.send(step1());
    await until("the document is there", () => textOf(socket.document) === "kept");
    for (const frame of [update(typed("smuggled")), step2(typed("smuggled too"))]) {
      const said = socket.notices().length;
      socket.send(frame);
      await until("it is refused", () => socket.notices().length > said);
      expect(socket.notices().at(-1)).toMatchObject({ about: "rejected" });
    }
    expect(socket.saved()).toBe(0);
    expect(await storedRows(notebookId)).toBe(before);
    expect(writer.text()).toBe("kept");
  });

  test.each(readers.slice(0, 3))("%s: not by presence", async (_who, open) => {
    const notebookId = await stage.notebook();
    const watcher = await stage.raw(stage.ada, notebookId);
    const socket = await open(notebookId);
    socket.send(presence([77, 1, { user: { name: "Someone" } }]));
    const ben = await stage.raw(stage.ben, notebookId);
    ben.send(presence([78, 1, {}]));
    await until("a writer's presence is seen", () => presenceIn(watcher).has(78));
    expect(presenceIn(watcher).has(77)).toBe(false);
  });

  test("one who keeps trying is closed", async () => {
    const socket = await stage.raw(stage.cleo, await stage.notebook());
    for (let attempt = 0; attempt < 40; attempt += 1) socket.send(update(typed(`attempt ${attempt}`)));
    expect(await socket.closedWith()).toBe(closeCode.forbidden);
  });

  test("what a reader has already may be sent back", async () => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    writer.type("kept");
    await writer.allSaved();
    const socket = await stage.raw(stage.cleo, notebookId);
    socket.send(step2(Y.encodeStateAsUpdate(writer.document)));
    socket.send(step1());
    await until("the document is there", () => textOf(socket.document) === "kept");
    expect(socket.notices()).toEqual([]);
  });
});

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

describe("an editor with an older schema", () => {
  const setSchema = (notebookId: string, version: number) =>
    stage.server.database.raw("update notebooks set schema_version = ? where id = ?", [version, notebookId]);

  test.each([
    ["older", 1],
    ["not said", null],
  ])("%s: is told to reload and sees no document", async (_name, schema) => {
    const notebookId = await stage.notebook();
    await setSchema(notebookId, 2);
    const socket = await stage.raw(stage.ada, notebookId, { schema });
    expect(await socket.closedWith()).toBe(closeCode.schemaTooOld);
    expect(socket.frames).toEqual([]);
    expect(stage.server.collab.rooms.find(notebookId)).toBeUndefined();
  });

  test("a newer editor raises the schema with its first change, and older ones are cut", async () => {
    const notebookId = await stage.notebook();
    const older = await stage.raw(stage.ben, notebookId, { schema: 1 });
    const newer = await stage.write(stage.ada, notebookId, { schema: 3 });
    const version = async () =>
      (await firstRow<{ schema_version: number }>(
        stage.server.database,
        "select schema_version from notebooks where id = ?",
        [notebookId],
      ))!.schema_version;
    expect(await version()).toBe(1);
    expect(older.closed()).toBeNull();
    newer.document.getXmlFragment(FRAGMENT).insert(0, [new Y.XmlElement("novelty")]);
    expect(await older.closedWith()).toBe(closeCode.schemaTooOld);
    expect(await version()).toBe(3);
    expect(newer.closes).toEqual([]);
  });

  test("raised by another process: what an older editor sends is not stored, and it is cut", async () => {
    const notebookId = await stage.notebook();
    const older = await stage.write(stage.ada, notebookId);
    await setSchema(notebookId, 2);
    older.type("by an older page");
    await until("it is cut", () => older.closes.some(({ code }) => code === closeCode.schemaTooOld));
    expect(await storedRows(notebookId)).toBe(0);
  });
});

test("a referee who may not know the authors receives no presence", async () => {
  const notebookId = await stage.notebook();
  const hidden = await addRefereeLink(stage.server.database, notebookId, { hideAuthors: true });
  const shown = await addRefereeLink(stage.server.database, notebookId);
  const blind = await stage.raw(null, notebookId, { token: hidden.token });
  const seeing = await stage.raw(null, notebookId, { token: shown.token });
  const ada = await stage.write(stage.ada, notebookId);
  ada.awareness.setLocalState({ user: {} });
  ada.type("text");
  await until("the other referee sees her", () => presenceIn(seeing).size > 0);
  blind.send(Uint8Array.of(3)); // asks for presence
  blind.send(step1());
  await until("the document is there", () => textOf(blind.document) === "text");
  expect(presenceIn(blind).size).toBe(0);
});

test("a referee's document holds no deleted sentence", async () => {
  const notebookId = await stage.notebook();
  const ada = await stage.write(stage.ada, notebookId);
  const { token } = await addRefereeLink(stage.server.database, notebookId);
  // Large, so that people who join get a kept encoding; whole, so that there is one.
  ada.type("x".repeat(50_000));
  await ada.allSaved();
  await stage.write(stage.cleo, notebookId);
  ada.type("UNFORTUNATE");
  await ada.allSaved();
  await stage.write(stage.ben, notebookId);
  const text = paragraphOf(ada.document);
  text.delete(50_000, "UNFORTUNATE".length);
  await ada.allSaved();
  const referee = await openRaw({ port: stage.server.port, notebookId, token });
  referee.send(step1());
  await until("the document is there", () => textOf(referee.document).length === 50_000);
  for (const { bytes } of referee.frames) expect(Buffer.from(bytes).includes("UNFORTUNATE")).toBe(false);
  referee.stop();
});

test("someone who is refused never gets further by trying again", async () => {
  const notebookId = await stage.notebook();
  const dora = openWriter({ port: stage.server.port, notebookId, cookie: stage.dora.cookie });
  await until("she has tried several times", () => dora.sockets() >= 3);
  expect(dora.provider.synced).toBe(false);
  dora.stop();
});
