/** The pages of the sign-in stand-in. */
import type { InventedAccount } from "./accounts.ts";
import { escapeHtml, standInPage } from "./local-server.ts";

function hiddenFields(asked: Readonly<Record<string, string>>): string {
  return Object.entries(asked)
    .map(([name, value]) => `<input type="hidden" name="${escapeHtml(name)}" value="${escapeHtml(value)}">`)
    .join("");
}

function accountLine({ login, name, remark }: InventedAccount): string {
  return `<li><button name="account" value="${escapeHtml(login)}">Continue as ${escapeHtml(login)}</button>
    ${escapeHtml(name)}: ${escapeHtml(remark)}</li>`;
}

export function consentPage(
  accounts: readonly InventedAccount[],
  asked: Readonly<Record<string, string>>,
): string {
  return standInPage(
    "Local sign-in stand-in",
    `<h1>Who are you today?</h1>
    <p class="notice">This is a local stand-in for a sign-in service. It runs on this machine only; every account
    is invented and needs no password.</p>
    <p>The application asks for your name and e-mail address.</p>
    <form method="post" action="/login/oauth/authorize">${hiddenFields(asked)}
      <ul>${accounts.map(accountLine).join("")}</ul>
      <p><button name="account" value="">Refuse</button></p>
    </form>`,
  );
}

export function refusalPage(words: string): string {
  return standInPage(
    "Local sign-in stand-in",
    `<h1>This request cannot be followed</h1><p>${escapeHtml(words)}</p>`,
  );
}
