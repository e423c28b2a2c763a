/** GET /api/notebooks/:id/results and POST /api/evaluate over HTTP. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { EVALUATE_FORMAT, RESULTS_FORMAT } from "../../../client/contract/evaluate-file.ts";
import { createWorld, type World } from "../http-world.ts";

let world: World;
beforeAll(async () => {
  world = await createWorld();
});
afterAll(() => world.stop());

const file = (inputs: unknown = { d: 4 }) => ({
  format: EVALUATE_FORMAT,
  blocks: [{ id: "p", kind: "premises", inputs }],
});

describe("POST /api/evaluate", () => {
  test("computes for someone signed out", async () => {
    const answer = await world.stranger().post("/api/evaluate", file());
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject({
      format: RESULTS_FORMAT,
      results: [{ id: "p", kind: "premises", evaluation: { problems: [] } }],
    });
  });

  test("asks no token of someone signed in, for it changes nothing", async () => {
    const browser = await world.signIn("wren-lantern");
    expect(browser.id).not.toBe("");
    expect((await browser.post("/api/evaluate", file(), { withoutToken: true })).status).toBe(200);
  });

  test.each([
    ["what is no file", { blocks: [] }, 422, /“?format/],
    ["inputs that the kind does not know", file({ nonsense: 1 }), 422, /blocks\[0\]\.inputs.*nonsense/],
    [
      "more blocks than allowed",
      { format: EVALUATE_FORMAT, blocks: Array(501).fill(file().blocks[0]) },
      422,
      /500/,
    ],
    ["more bytes than allowed", file({ note: "x".repeat(600_000) }), 413, /larger/],
  ])("refuses %s", async (_what, body, status, words) => {
    const answer = await world.stranger().post("/api/evaluate", body);
    expect([answer.status, answer.headers.get("content-type")]).toEqual([
      status,
      expect.stringContaining("application/problem+json"),
    ]);
    expect(answer.body.detail).toMatch(words);
  });

  test.each([
    ["brackets", `${"[".repeat(200_000)}${"]".repeat(200_000)}`],
    [
      "inputs",
      `{"format":"${EVALUATE_FORMAT}","blocks":[{"id":"p","kind":"premises","inputs":{"d":${'{"a":'.repeat(50_000)}1${"}".repeat(50_000)}}}]}`,
    ],
  ])("refuses %s nested deeper than any call stack", async (_name, rawBody) => {
    const answer = await world.stranger().post("/api/evaluate", {}, { rawBody });
    expect(answer.status).toBe(422);
    expect(answer.body.detail).toMatch(/deep/);
  });

  test("refuses a small file whose answer would be enormous", async () => {
    const terms = Array.from({ length: 40 }, (_, index) => ({
      term: `c${index}/Lambda^${index % 9} phi^${4 + (index % 9)}`,
    }));
    const premises = {
      fields: [{ symbol: "phi", kind: "real scalar" }],
      scales: [
        { symbol: "Lambda", value: "3 TeV", role: "heavy" },
        { symbol: "p", value: "350 GeV", role: "probe" },
      ],
      terms,
    };
    const plans = Array.from({ length: 400 }, (_, index) => ({
      id: `plan${index}`,
      kind: "orderPlan",
      inputs: { target: "1e-9" },
    }));
    const blocks = [{ id: "p", kind: "premises", inputs: premises }, ...plans];
    const answer = await world.stranger().post("/api/evaluate", { format: EVALUATE_FORMAT, blocks });
    expect(answer.status).toBe(422);
    expect(answer.body.detail).toMatch(/fewer blocks/);
  });

  test("says that a file asks for too much when it takes all memory of its thread, and goes on", async () => {
    const terms = Array.from({ length: 2000 }, (_, index) => ({
      term: `c${index}/Lambda^${index % 9} phi^${4 + (index % 9)}`,
    }));
    const fields = [{ symbol: "phi", kind: "real scalar" }];
    const premises = { id: "p", kind: "premises", inputs: { fields, terms } };
    const scalings = Array.from({ length: 499 }, (_, index) => ({ id: `s${index}`, kind: "scaling" }));
    const blocks = [premises, ...scalings];
    const answer = await world.stranger().post("/api/evaluate", { format: EVALUATE_FORMAT, blocks });
    expect(answer.status).toBe(413);
    expect(answer.body.detail).toMatch(/fewer or smaller blocks/);
    expect((await world.stranger().post("/api/evaluate", file())).status).toBe(200);
  }, 40_000);

  test("refuses what is not JSON", async () => {
    const answer = await world.stranger().post("/api/evaluate", undefined, { rawBody: "{" });
    expect(answer.status).toBe(400);
  });

  test("says wait to someone who asks too often", async () => {
    const slow = await createWorld({ environment: { RATE_LIMIT_FACTOR: "0.0125" } }); // 3 a minute
    try {
      const statuses: number[] = [];
      for (let count = 0; count < 5; count += 1)
        statuses.push((await slow.stranger().post("/api/evaluate", file())).status);
      expect(statuses).toEqual([200, 200, 200, 429, 429]);
    } finally {
      await slow.stop();
    }
  });
});

describe("GET /api/notebooks/:id/results", () => {
  test("gives the results of a template at once, and of a blank notebook none", async () => {
    const browser = await world.signIn("wren-lantern");
    const made = await browser.post("/api/notebooks", { title: "Lantern", template: "lantern" });
    const { body } = await browser.get(`/api/notebooks/${made.body.id}/results`);
    expect(body.results.length).toBeGreaterThan(3);
    for (const result of body.results) {
      expect(result).toMatchObject({ changedBy: null, evaluation: { problems: [] } });
      expect(result.key).toMatch(/^[0-9a-f]{64}$/);
    }
    const blank = await browser.post("/api/notebooks", { title: "Blank" });
    expect((await browser.get(`/api/notebooks/${blank.body.id}/results`)).body).toEqual({ results: [] });
  });
});
