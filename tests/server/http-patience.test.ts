/** Those who open connections and never finish asking. */
import { once } from "node:events";
import { connect, type AddressInfo, type Socket } from "node:net";
import { createServer } from "node:http";
import { pino } from "pino";
import { afterEach, describe, expect, it } from "vitest";
import { githubStrategy } from "../../server/http/github-account.ts";
import { openHttpServer } from "../../server/http/http-server.ts";
import { eventually } from "./http-world.ts";

const ends: (() => void)[] = [];
afterEach(() => {
  for (const end of ends.splice(0)) end();
});

describe("a server with little patience", () => {
  async function start() {
    const server = openHttpServer(pino({ level: "silent" }), {
      headersMs: 200,
      requestMs: 400,
      checkEveryMs: 50,
    });
    server.on("request", (_request, response) => response.end("here"));
    server.listen(0, "127.0.0.1");
    await once(server, "listening");
    ends.push(() => {
      server.close();
      server.closeAllConnections();
    });
    return (server.address() as AddressInfo).port; // it listens on a port
  }
  function say(port: number, words: string) {
    const socket: Socket = connect(port, "127.0.0.1", () => socket.write(words));
    let heard = "";
    let isClosed = false;
    socket.on("data", (chunk: Buffer) => (heard += chunk.toString()));
    socket.on("error", () => (isClosed = true)).on("close", () => (isClosed = true));
    ends.push(() => socket.destroy());
    return { heard: () => heard, isClosed: () => isClosed };
  }

  it.each([
    ["a head that never ends", "GET / HTTP/1.1\r\nHost: a\r\nX-Slow: "],
    [
      "an upgrade that never ends",
      "GET /collab/x HTTP/1.1\r\nHost: a\r\nUpgrade: websocket\r\nConnection: Upg",
    ],
    ["a body that never comes", "POST / HTTP/1.1\r\nHost: a\r\nContent-Length: 50\r\n\r\nx"],
  ])("closes %s, and answers others meanwhile", async (_what, words) => {
    const port = await start();
    const slow = Array.from({ length: 100 }, () => say(port, words));
    expect(await (await fetch(`http://127.0.0.1:${port}/`)).text()).toBe("here");
    await eventually(() => (slow.every(({ isClosed }) => isClosed()) ? true : null));
  });

  it("answers what is no HTTP at all with words", async () => {
    const port = await start();
    const strange = say(port, "\0\0\0\0\r\n\r\n");
    await eventually(() => (strange.isClosed() ? true : null));
    expect(strange.heard()).toContain("400 Bad Request");
  });
});

describe("a sign-in service that hangs", () => {
  it.each(["before its answer", "in the middle of it"])("%s is given up on", async (when) => {
    const service = createServer((_request, response) => {
      if (when !== "before its answer") response.writeHead(200).write("{");
    });
    service.listen(0, "127.0.0.1");
    await once(service, "listening");
    ends.push(() => {
      service.close();
      service.closeAllConnections();
    });
    const url = `http://127.0.0.1:${(service.address() as AddressInfo).port}`; // it listens on a port
    const strategy = githubStrategy(
      {
        ...{ clientId: "id", clientSecret: "secret", authorizeUrl: url, tokenUrl: url },
        ...{ userUrl: url, emailsUrl: url },
      },
      "http://localhost/auth/github/callback",
      200,
    );
    const outcome = await new Promise<unknown>((resolve) => {
      strategy.userProfile("token", (error: unknown) => resolve(error));
    });
    expect(String((outcome as { oauthError?: unknown }).oauthError ?? outcome)).toContain(
      "did not answer in time",
    );
  });
});
