/** What the stand-in has handed out: codes that work once and briefly, tokens that work until it stops. */
import { randomBytes } from "node:crypto";
import type { InventedAccount } from "./accounts.ts";

interface Grant {
  readonly account: InventedAccount;
  readonly redirectUri: string;
  readonly scope: string;
  readonly expiresAt: number;
}
export interface Access {
  readonly account: InventedAccount;
  readonly scope: string;
}

const newSecret = () => randomBytes(20).toString("hex");

export class Codes {
  readonly #grants = new Map<string, Grant>();
  readonly #accesses = new Map<string, Access>();
  readonly #lifetimeMs: number;

  constructor(lifetimeMs: number) {
    this.#lifetimeMs = lifetimeMs;
  }

  grant(account: InventedAccount, redirectUri: string, scope: string): string {
    const code = newSecret();
    this.#grants.set(code, { account, redirectUri, scope, expiresAt: Date.now() + this.#lifetimeMs });
    return code;
  }

  /** A token for the code, or null: unknown, used before, too old, or asked for another address. */
  redeem(
    code: string,
    redirectUri: string | null,
  ): { readonly token: string; readonly scope: string } | null {
    const grant = this.#grants.get(code);
    this.#grants.delete(code);
    if (grant === undefined || grant.expiresAt < Date.now()) return null;
    if (redirectUri !== null && redirectUri !== grant.redirectUri) return null;
    const token = `local_${newSecret()}`;
    this.#accesses.set(token, { account: grant.account, scope: grant.scope });
    return { token, scope: grant.scope };
  }

  access(token: string): Access | null {
    return this.#accesses.get(token) ?? null;
  }
}
