import { describe, expect, it } from "vitest";
import { readConfiguration } from "../../server/configuration.ts";

const enough = {
  DATABASE_URL: "postgres://user@127.0.0.1/subleading",
  PUBLIC_URL: "https://notebooks.example.org/",
  SESSION_SECRET: "0123456789abcdef0123456789abcdef",
  GITHUB_CLIENT_ID: "id",
  GITHUB_CLIENT_SECRET: "secret",
};
function read(changes: Record<string, string | undefined> = {}) {
  const outcome = readConfiguration({ ...enough, ...changes });
  if (!outcome.ok) throw new Error(outcome.problems.map(({ words }) => words).join(" "));
  return outcome.configuration;
}
function problems(environment: Record<string, string | undefined>) {
  const outcome = readConfiguration(environment);
  return outcome.ok ? [] : outcome.problems;
}

describe("the configuration", () => {
  it("points at GitHub with three variables beside the database and the secret", () => {
    expect(read().github).toEqual({
      clientId: "id",
      clientSecret: "secret",
      authorizeUrl: "https://github.com/login/oauth/authorize",
      tokenUrl: "https://github.com/login/oauth/access_token",
      userUrl: "https://api.github.com/user",
      emailsUrl: "https://api.github.com/user/emails",
    });
    expect(read().publicUrl).toBe("https://notebooks.example.org");
    expect(read().demonstration).toBeNull();
  });

  it("believes one proxy when the address is https, and none on plain HTTP", () => {
    expect(read().trustedProxies).toBe(1);
    expect(read({ PUBLIC_URL: "http://localhost:4317" }).trustedProxies).toBe(0);
    expect(read({ TRUSTED_PROXIES: "2" }).trustedProxies).toBe(2);
  });

  it("says everything that is missing at once, each by its variable", () => {
    expect(problems({}).map(({ variable }) => variable)).toEqual([
      "DATABASE_URL",
      "SESSION_SECRET",
      "GITHUB_CLIENT_ID",
      "GITHUB_CLIENT_SECRET",
    ]);
    expect(problems({ ...enough, PUBLIC_URL: undefined })).toEqual([
      {
        variable: "PUBLIC_URL",
        words: "Set PUBLIC_URL to the address that people type: sign-in returns to it.",
      },
    ]);
  });

  it("takes an empty variable for one that is not set", () => {
    expect(read({ SMTP_URL: "" }).smtpUrl).toBeNull();
    expect(problems({ ...enough, DATABASE_URL: "" })).toHaveLength(1);
  });

  it.each([
    ["DATABASE_URL", "mysql://x"],
    ["PORT", "70000"],
    ["PORT", "http"],
    ["PUBLIC_URL", "notebooks.example.org"],
    ["PUBLIC_URL", "https://example.org/notebooks"],
    ["PUBLIC_URL", "javascript:alert(1)"],
    ["SESSION_SECRET", "short"],
    ["SMTP_URL", "mail.example.org"],
    ["MAIL_FROM", "a@example.org\r\nBcc: b@example.org"],
    ["RATE_LIMIT_FACTOR", "0"],
    ["NODE_ENV", "staging"],
    ["DEMONSTRATION", "true"],
    ["WELCOME_NOTEBOOKS", "1"],
    ["TRUSTED_PROXIES", "-1"],
  ])("refuses %s=%j and names it", (variable, value) => {
    const found = problems({ ...enough, [variable]: value });
    expect(found.map((problem) => problem.variable)).toEqual([variable]);
    expect(found[0]?.words).toMatch(new RegExp(`${variable}.*\\.$`));
  });
});
