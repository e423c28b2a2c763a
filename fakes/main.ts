/**
 * The stand-ins as a process, for the start command. Only what the environment does not provide is stood in for:
 * the variables that point the server here go back to the parent.
 */
import { startOAuthFake } from "./oauth.ts";
import { startSmtpFake } from "./smtp.ts";

const given = process.env;
const publicUrl = given["PUBLIC_URL"] ?? "http://localhost";

const signIn = given["GITHUB_CLIENT_ID"]
  ? null
  : await startOAuthFake({
      port: Number(given["FAKE_SIGN_IN_PORT"] ?? 0),
      callbackUrl: new URL("/auth/github/callback", publicUrl).href,
    });
const mail = given["SMTP_URL"]
  ? null
  : await startSmtpFake({ port: Number(given["FAKE_MAILBOX_PORT"] ?? 0) });

const env = {
  DEMONSTRATION: "yes",
  // On one machine everybody comes from one address.
  RATE_LIMIT_FACTOR: "50",
  ...(signIn && {
    GITHUB_CLIENT_ID: signIn.clientId,
    GITHUB_CLIENT_SECRET: signIn.clientSecret,
    GITHUB_OAUTH_URL: signIn.oauthUrl,
    GITHUB_API_URL: signIn.apiUrl,
  }),
  ...(mail && { SMTP_URL: mail.smtpUrl, MAILBOX_URL: mail.url }),
};
process.send?.({ ready: { env, mailboxUrl: mail?.url ?? null, signInUrl: signIn?.url ?? null } });
if (process.send === undefined) {
  process.stdout.write(
    `${Object.entries(env)
      .map(([name, value]) => `${name}=${value}`)
      .join("\n")}\n`,
  );
}

let stopping = false;
function stop(): void {
  if (stopping) return;
  stopping = true;
  void Promise.all([signIn?.stop(), mail?.stop()]).then(() => process.exit(0));
}
for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"] as const) process.on(signal, stop);
process.on("disconnect", stop);
