import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import type { NotebookPeople } from "#contract/api.ts";
import { rows } from "../../server/data/database.ts";
import type { AccessChange } from "../../server/policies/access-changes.ts";
import type { Browser } from "./http-browser.ts";
import { createWorld, eventually, type World } from "./http-world.ts";

let world: World;
let wren: Browser;
let otto: Browser;
let ines: Browser;
let notebookId: string;
const at = (path: string) => `/api/notebooks/${notebookId}${path}`;

beforeAll(async () => {
  world = await createWorld();
  wren = await world.signIn("wren-lantern");
  otto = await world.signIn("otto-lantern");
  ines = await world.signIn("ines-tern");
});
afterAll(() => world.stop());
beforeEach(async () => {
  notebookId = (await wren.post("/api/notebooks", { title: "Lantern" })).body.id;
});

const invite = (to: string, role = "author", by = wren) => by.post(at("/invitations"), { to, role });
const people = async (browser = wren) => (await browser.get<NotebookPeople>(at("/people"))).body;
const roleTable = async () =>
  Object.fromEntries((await people()).people.map(({ login, role }) => [login, role]));
/** Forgets someone, so that they sign in for the first time again. */
async function forget(login: string): Promise<void> {
  await rows(world.database, "delete from people where login = ?", [login]);
}

describe("inviting someone known", () => {
  it.each([
    ["by account name", "otto-lantern"],
    ["by account name in capitals", "OTTO-Lantern"],
    ["by account name as people write it", "@otto-lantern"],
    ["by verified address", "Otto-Lantern@Example.org"],
  ])("adds them at once %s", async (_how, to) => {
    const answer = await invite(to);
    expect(answer.status).toBe(201);
    expect(answer.body).toEqual({
      outcome: "added",
      person: { id: otto.id, login: "otto-lantern", name: "Otto Lantern" },
    });
    expect((await otto.get(at(""))).body.role).toBe("author");
  });

  it("tells them by letter, once", async () => {
    await invite("otto-lantern");
    await invite("otto-lantern");
    const [letter] = await eventually(() => {
      const found = world.mailbox.letters().filter(({ text }) => text.includes(notebookId));
      return found.length > 0 ? found : null;
    });
    expect(letter).toMatchObject({
      to: "otto-lantern@example.org",
      subject: "Wren Lantern invites you to “Lantern”",
    });
    expect(letter?.text).toContain(`${world.server.address}/notebooks/${notebookId}`);
    const queued = await rows(world.database, "select 1 from mail_queue where body like ?", [
      `%${notebookId}%`,
    ]);
    expect(queued).toHaveLength(1);
  });

  it("does not take an address for someone's that they have not verified", async () => {
    const mika = await world.signIn("mika-unverified");
    expect((await invite("mika-unverified@example.org")).body.outcome).toBe("invited");
    await world.signIn("mika-unverified");
    expect((await mika.get(at(""))).status).toBe(404);
  });

  it("changes nothing for who takes part already", async () => {
    await invite("otto-lantern", "reader");
    const same = await invite("otto-lantern", "reader");
    expect(same.body.outcome).toBe("added");
    const other = await invite("otto-lantern", "owner");
    expect([other.status, other.body.type]).toEqual([409, "urn:subleading:already-there"]);
    expect(other.body.detail).toContain("Otto Lantern takes part already, as reader");
    expect((await invite("wren-lantern", "reader")).status).toBe(409);
    expect(await roleTable()).toEqual({ "wren-lantern": "owner", "otto-lantern": "reader" });
  });
});

describe("inviting someone unknown", () => {
  it.each([
    ["account name", "lena-newcomer"],
    ["address", "LENA-newcomer@example.org"],
  ])("waits for them by %s and lets them in when they sign in", async (_how, to) => {
    await forget("lena-newcomer");
    const answer = await invite(to, "reviewer");
    expect(answer.body).toMatchObject({ outcome: "invited", invitation: { to, role: "reviewer" } });
    expect((await people()).invitations).toEqual([answer.body.invitation]);
    const lena = await world.signIn("lena-newcomer");
    expect((await lena.get(at(""))).body).toMatchObject({ role: "reviewer", title: "Lantern" });
    expect((await people()).invitations).toEqual([]);
  });

  it("keeps one invitation however often it is made, and writes one letter", async () => {
    const first = await invite("someone@example.com", "reader");
    const second = await invite("SomeOne@example.com", "author");
    expect(second.body.invitation.id).toBe(first.body.invitation.id);
    expect((await people()).invitations).toMatchObject([{ to: "someone@example.com", role: "author" }]);
    const letters = await rows(world.database, "select 1 from mail_queue where body like ?", [
      `%${notebookId}%`,
    ]);
    expect(letters).toHaveLength(1);
  });

  it("gives the stronger of two invitations, by name and by address", async () => {
    await forget("lena-newcomer");
    await invite("lena-newcomer", "reader");
    await invite("lena-newcomer@example.org", "author");
    await world.signIn("lena-newcomer");
    expect(await roleTable()).toEqual({ "wren-lantern": "owner", "lena-newcomer": "author" });
    expect((await people()).invitations).toEqual([]);
  });

  it("lets in who signs in at the very moment of the invitation", async () => {
    for (let round = 0; round < 8; round += 1) {
      await forget("lena-newcomer");
      notebookId = (await wren.post("/api/notebooks", { title: `Round ${round}` })).body.id;
      const [lena] = await Promise.all([world.signIn("lena-newcomer"), invite("lena-newcomer", "reader")]);
      expect((await lena.get(at(""))).status).toBe(200);
    }
  });

  it("keeps no door open once withdrawn", async () => {
    await forget("lena-newcomer");
    const { id } = (await invite("lena-newcomer")).body.invitation;
    expect((await wren.delete(at(`/invitations/${id}`))).status).toBe(204);
    expect((await wren.delete(at(`/invitations/${id}`))).status).toBe(404);
    const lena = await world.signIn("lena-newcomer");
    expect((await lena.get(at(""))).status).toBe(404);
  });

  it("does not withdraw another notebook's invitation", async () => {
    const { id } = (await invite("someone@example.com")).body.invitation;
    const hers = (await otto.post("/api/notebooks", { title: "Otto's" })).body.id;
    expect((await otto.delete(`/api/notebooks/${hers}/invitations/${id}`)).status).toBe(404);
    expect((await people()).invitations).toHaveLength(1);
  });

  it.each([
    "two words",
    "someone@example.com\r\nBcc: everyone@example.com",
    "a@b",
    "<someone@example.com>",
    "someone@example.com, other@example.com",
    "-leading",
    "name\u202Eevil",
    "",
  ])("refuses %j, which is neither", async (to) => {
    const answer = await invite(to);
    expect([answer.status, answer.body.type]).toEqual([422, "urn:subleading:invalid"]);
  });

  it("lets no title add a header or a line to a letter", async () => {
    await wren.patch(at(""), { title: "Fine\r\nBcc: everyone@example.com\r\n\r\nOther body" });
    await invite("quiet@example.com");
    const letter = await eventually(
      () => world.mailbox.letters().find(({ to }) => to === "quiet@example.com") ?? null,
    );
    expect(letter.headerNames).not.toContain("bcc");
    expect(letter.subject).toBe("Wren Lantern invites you to “Fine Bcc: everyone@example.com Other body”");
  });

  it("shows addresses only to those who may invite", async () => {
    await invite("someone@example.com");
    await invite("otto-lantern", "author");
    expect((await people(otto)).invitations).toEqual([]);
    expect((await people(otto)).people.map(({ login }) => login)).toEqual(["wren-lantern", "otto-lantern"]);
    expect(JSON.stringify(await people(otto))).not.toContain("@");
  });
});

describe("roles", () => {
  beforeEach(async () => {
    await invite("otto-lantern", "author");
  });

  it("change at the owner's word", async () => {
    expect((await wren.put(at(`/people/${otto.id}`), { role: "reviewer" })).status).toBe(204);
    expect((await otto.get(at(""))).body.role).toBe("reviewer");
  });

  it("are not changed for who does not take part", async () => {
    const answer = await wren.put(at(`/people/${ines.id}`), { role: "owner" });
    expect([answer.status, answer.body.detail]).toEqual([
      404,
      "This person does not take part in the notebook.",
    ]);
    expect((await ines.get(at(""))).status).toBe(404);
  });

  it("are not raised by oneself", async () => {
    expect((await otto.put(at(`/people/${otto.id}`), { role: "owner" })).status).toBe(403);
  });

  it("end when one leaves or is removed", async () => {
    await invite("ines-tern", "reader");
    expect((await ines.delete(at(`/people/${otto.id}`))).status).toBe(403);
    expect((await ines.delete(at(`/people/${ines.id}`))).status).toBe(204);
    expect((await ines.get(at(""))).status).toBe(404);
    expect((await wren.delete(at(`/people/${otto.id}`))).status).toBe(204);
    expect((await otto.get(at(""))).status).toBe(404);
    expect(await roleTable()).toEqual({ "wren-lantern": "owner" });
  });

  it("leave the last owner in place, and say why", async () => {
    const demoted = await wren.put(at(`/people/${wren.id}`), { role: "author" });
    expect([demoted.status, demoted.body.type]).toEqual([409, "urn:subleading:last-owner"]);
    expect(demoted.body.detail).toBe("You are the only owner. Make someone else owner first.");
    expect((await wren.delete(at(`/people/${wren.id}`))).status).toBe(409);
    expect(await roleTable()).toMatchObject({ "wren-lantern": "owner" });
  });

  it("let an owner go when there is another", async () => {
    await wren.put(at(`/people/${otto.id}`), { role: "owner" });
    expect((await wren.delete(at(`/people/${wren.id}`))).status).toBe(204);
    expect((await otto.put(at(`/people/${otto.id}`), { role: "reader" })).status).toBe(409);
  });

  it("never end with no owner, when two step down or remove each other at once", async () => {
    for (let round = 0; round < 10; round += 1) {
      notebookId = (await wren.post("/api/notebooks", { title: `Round ${round}` })).body.id;
      await invite("otto-lantern", "owner");
      const attempts =
        round % 2 === 0
          ? [
              wren.put(at(`/people/${wren.id}`), { role: "reader" }),
              otto.put(at(`/people/${otto.id}`), { role: "reader" }),
            ]
          : [wren.delete(at(`/people/${otto.id}`)), otto.delete(at(`/people/${wren.id}`))];
      const statuses = (await Promise.all(attempts)).map(({ status }) => status).sort();
      expect(statuses[0], `round ${round}`).toBe(204);
      expect([403, 404, 409], `round ${round}`).toContain(statuses[1]);
      const owners = await rows(
        world.database,
        "select 1 from notebook_people where notebook_id = ? and role = 'owner'",
        [notebookId],
      );
      expect(owners).toHaveLength(1);
    }
  });

  it.each([{ role: "king" }, {}, { role: "reader", since: "2020-01-01" }, { role: ["owner"] }])(
    "are not %j",
    async (body) => {
      expect((await wren.put(at(`/people/${otto.id}`), body)).status).toBe(422);
    },
  );
});

describe("a change of access", () => {
  /** What is announced of this test's notebook from here on; others may still be on their way. */
  function listen<Heard>(hear: (change: AccessChange) => Promise<Heard> | Heard) {
    const heard: Heard[] = [];
    const here = notebookId;
    const forgetListener = world.server.services.accessChanges.onAccessChange((change) => {
      if (change.about !== "person" || change.notebookId !== here) return;
      void Promise.resolve(hear(change)).then((what) => heard.push(what));
    });
    return { heard, forgetListener };
  }

  it("is heard within a second, after it was committed", async () => {
    const { heard, forgetListener } = listen(async (change) => {
      const [row] = await rows<{ role: string }>(
        world.database,
        "select role from notebook_people where notebook_id = ? and person_id = ?",
        [notebookId, otto.id],
      );
      return { change, role: row?.role ?? null };
    });
    const steps = [
      () => invite("otto-lantern", "author"),
      () => wren.put(at(`/people/${otto.id}`), { role: "reader" }),
      () => wren.delete(at(`/people/${otto.id}`)),
    ];
    for (const [index, step] of steps.entries()) {
      await step();
      const begun = performance.now();
      await eventually(() => (heard.length === index + 1 ? true : null));
      expect(performance.now() - begun).toBeLessThan(1000);
    }
    forgetListener();
    const change = { about: "person", notebookId, personId: otto.id };
    expect(heard).toEqual([
      { change, role: "author" },
      { change, role: "reader" },
      { change, role: null },
    ]);
  });

  it("is not announced when it was refused", async () => {
    const { heard, forgetListener } = listen((change) => change);
    expect((await wren.delete(at(`/people/${wren.id}`))).status).toBe(409);
    await invite("otto-lantern", "reader");
    await eventually(() => (heard.length > 0 ? true : null));
    forgetListener();
    expect(heard).toEqual([{ about: "person", notebookId, personId: otto.id }]);
  });

  it("tells listeners to check everything after the connection was lost", async () => {
    const heard: AccessChange[] = [];
    const forgetListener = world.server.services.accessChanges.onAccessChange((change) => heard.push(change));
    await rows(
      world.database,
      `select pg_terminate_backend(pid) from pg_stat_activity
        where datname = current_database() and application_name = 'subleading listens to access'`,
    );
    await eventually(() => (heard.some(({ about }) => about === "everything") ? true : null));
    heard.length = 0;
    await invite("otto-lantern", "reader");
    await eventually(() => (heard.some(({ about }) => about === "person") ? true : null));
    forgetListener();
  });
});
