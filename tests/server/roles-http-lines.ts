/** What may be done over HTTP. */
import { EVALUATE_FORMAT } from "#contract/evaluate-file.ts";
import { ATTACHMENT_CONTENT_TYPE } from "#contract/attachment-type.ts";
import type { Answer, Browser } from "./http-browser.ts";
import { verdictOf, verdicts, type Actor, type Line, type Scene } from "./roles-scene.ts";

type Ask = (browser: Browser, path: string, actor: Actor, scene: Scene) => Promise<Answer>;

/** One line about a notebook. Whoever holds a token sends it along in every way one could try. */
function line(action: string, changes: boolean, expected: Line["verdicts"], ask: Ask): Line {
  const attempt = async (actor: Actor, scene: Scene) =>
    verdictOf(await ask(actor.browser, `/api/notebooks/${scene.notebookId}`, actor, scene));
  return { action, changes, verdicts: expected, attempt };
}

const everyMember = verdicts(["done", "done", "done", "done"]);
const ownerOnly = verdicts(["done", "forbidden", "forbidden", "forbidden"]);
const writers = verdicts(["done", "done", "forbidden", "forbidden"]);
const withToken = ({ token }: Actor) => ({ headers: { authorization: `Bearer ${token}` } });

const otherLines: readonly Line[] = [
  line("read the notebook", false, everyMember, (browser, path, actor) =>
    browser.get(`${path}?referee=${actor.token}`, withToken(actor)),
  ),
  line("read its results", false, everyMember, (browser, path, actor) =>
    browser.get(`${path}/results?referee=${actor.token}`, withToken(actor)),
  ),
  line("read who takes part", false, everyMember, (browser, path, actor) =>
    browser.get(`${path}/people?referee=${actor.token}`, withToken(actor)),
  ),
  line("rename it", true, writers, (browser, path, actor) =>
    browser.patch(`${path}?referee=${actor.token}`, { title: "Renamed" }, withToken(actor)),
  ),
  line("archive it", true, ownerOnly, (browser, path) => browser.patch(path, { archived: true })),
  line("archive and rename it", true, ownerOnly, (browser, path) =>
    browser.patch(path, { archived: false, title: "Renamed" }),
  ),
  line("delete it", true, ownerOnly, (browser, path, actor) =>
    browser.delete(`${path}?referee=${actor.token}`, withToken(actor)),
  ),
  line("copy it", false, everyMember, (browser, path, actor) =>
    browser.post(`${path}/copies?referee=${actor.token}`, {}, withToken(actor)),
  ),
  {
    ...line(
      "bring it back once deleted",
      true,
      verdicts(["done", "not-found", "not-found", "not-found"]),
      (browser, path) => browser.post(`${path}/restoration`, {}),
    ),
    prepare: ({ world, notebookId }) =>
      world.database.raw("update notebooks set deleted_at = now() where id = ?", [notebookId]),
  },
  line("change someone's role", true, ownerOnly, (browser, path, _actor, { bystanderId }) =>
    browser.put(`${path}/people/${bystanderId}`, { role: "author" }),
  ),
  line("remove someone", true, ownerOnly, (browser, path, _actor, { bystanderId }) =>
    browser.delete(`${path}/people/${bystanderId}`),
  ),
  line("invite someone", true, ownerOnly, (browser, path) =>
    browser.post(`${path}/invitations`, { to: "someone@example.com", role: "owner" }),
  ),
  line("withdraw an invitation", true, ownerOnly, (browser, path, _actor, { invitationId }) =>
    browser.delete(`${path}/invitations/${invitationId}`),
  ),
  line("list referee links", false, ownerOnly, (browser, path) => browser.get(`${path}/referee-links`)),
  line("create a referee link", true, ownerOnly, (browser, path, actor) =>
    browser.post(`${path}/referee-links?referee=${actor.token}`, { name: "Another" }, withToken(actor)),
  ),
  line("revoke a referee link", true, ownerOnly, (browser, path, _actor, { linkId }) =>
    browser.delete(`${path}/referee-links/${linkId}`),
  ),
  {
    action: "open a referee's view",
    changes: false,
    // It asks for a token and for nothing else: members without one meet what everyone meets.
    verdicts: verdicts(["not-found", "not-found", "not-found", "not-found"], {
      stranger: "not-found",
      "signed out": "not-found",
      "referee link": "done",
      "revoked link": "gone",
    }),
    attempt: async ({ browser, token }) => verdictOf(await browser.get(`/api/referee/${token}`)),
  },
  {
    action: "compute blocks that are sent along",
    changes: false,
    verdicts: verdicts(["done", "done", "done", "done"], {
      stranger: "done",
      "signed out": "done",
      "referee link": "done",
      "revoked link": "done",
    }),
    attempt: async ({ browser }) =>
      verdictOf(
        await browser.post("/api/evaluate", {
          format: EVALUATE_FORMAT,
          blocks: [{ id: "p", kind: "premises", inputs: {} }],
        }),
      ),
  },
  {
    action: "make a notebook",
    changes: false,
    verdicts: verdicts(["done", "done", "done", "done"], { stranger: "done" }),
    attempt: async ({ browser }) => verdictOf(await browser.post("/api/notebooks", { title: "Own" })),
  },
  {
    action: "see the shelf",
    changes: false,
    verdicts: verdicts(["done", "done", "done", "done"], { stranger: "done" }),
    attempt: async ({ browser }) => verdictOf(await browser.get("/api/notebooks")),
  },
  {
    action: "find the notebook on the shelf",
    changes: false,
    verdicts: everyMember,
    attempt: async ({ browser }, { notebookId }) => {
      const answer = await browser.get("/api/notebooks?search=Roles");
      if (answer.status !== 200) return verdictOf(answer);
      const isThere = answer.body.notebooks.some(({ id }: { id: string }) => id === notebookId);
      return isThere ? "done" : "not-found";
    },
  },
];

const aFile = "p;X0\n1;2\n";
/** Under the id of the scene's link, which stands for nothing else here. */
const keepAFile = ({ world, notebookId, linkId }: Scene) =>
  world.database.raw(
    `insert into attachments (notebook_id, id, sha256, name, media_type, bytes, size)
     values (?, ?, sha256(?), 'table.csv', 'text/csv', ?, ?)`,
    [notebookId, linkId, Buffer.from(aFile), Buffer.from(aFile), aFile.length],
  );

const attachmentLines: readonly Line[] = [
  line("keep the file of a table", true, writers, (browser, path, actor) =>
    browser.post(`${path}/attachments?name=table.csv&referee=${actor.token}`, undefined, {
      rawBody: aFile,
      headers: { "content-type": ATTACHMENT_CONTENT_TYPE, ...withToken(actor).headers },
    }),
  ),
  {
    ...line("fetch the file of a table", false, everyMember, (browser, path, actor, { linkId }) =>
      browser.get(`${path}/attachments/${linkId}?referee=${actor.token}`, withToken(actor)),
    ),
    prepare: keepAFile,
  },
  {
    action: "fetch the file of a table by a referee's link",
    changes: false,
    verdicts: verdicts(["not-found", "not-found", "not-found", "not-found"], {
      stranger: "not-found",
      "signed out": "not-found",
      "referee link": "done",
      "revoked link": "gone",
    }),
    prepare: keepAFile,
    attempt: async ({ browser, token }, { linkId }) =>
      verdictOf(await browser.get(`/api/referee/${token}/attachments/${linkId}`)),
  },
];

/** An owner may go only when another stays. */
const leavingLine: Line = {
  ...line("leave it", true, everyMember, (browser, path, _actor, { bystanderId }) =>
    // Someone without an account tries it in another's name.
    browser.delete(`${path}/people/${browser.me?.person?.id ?? bystanderId}`),
  ),
  prepare: ({ world, notebookId, bystanderId }) =>
    world
      .database("notebook_people")
      .where({ notebook_id: notebookId, person_id: bystanderId })
      .update({ role: "owner" }),
};

export const httpLines: readonly Line[] = [...otherLines, ...attachmentLines, leavingLine];
