/** A browser as far as HTTP goes: keeps cookies per host and port, follows nothing by itself, knows its token. */
import type { Me } from "#contract/api.ts";

/** Each test knows the shape of what it asked for, and fails where it errs. */
type Loose = any; // eslint-disable-line @typescript-eslint/no-explicit-any -- see above

export interface Answer<Body = Loose> {
  readonly status: number;
  readonly headers: Headers;
  readonly body: Body;
  readonly text: string;
}
export interface RequestOptions {
  readonly headers?: Readonly<Record<string, string>>;
  /** Without it, the token of the session goes along. */
  readonly withoutToken?: boolean;
  readonly rawBody?: string;
}

export class Browser {
  readonly home: string;
  readonly #cookies = new Map<string, Map<string, string>>();
  me: Me | null = null;

  constructor(home: string) {
    this.home = home;
  }

  get id(): string {
    const id = this.me?.person?.id;
    if (id === undefined) throw new Error("This browser is not signed in.");
    return id;
  }

  cookieHeader(address: string = this.home): string {
    const jar = this.#cookies.get(new URL(address).host) ?? new Map<string, string>();
    return [...jar].map(([name, value]) => `${name}=${value}`).join("; ");
  }

  setCookie(name: string, value: string, address: string = this.home): void {
    const host = new URL(address).host;
    const jar = this.#cookies.get(host) ?? new Map<string, string>();
    jar.set(name, value);
    this.#cookies.set(host, jar);
  }

  async request<Body = Loose>(
    method: string,
    path: string,
    body?: unknown,
    { headers = {}, withoutToken = false, rawBody }: RequestOptions = {},
  ): Promise<Answer<Body>> {
    const address = new URL(path, this.home).href;
    const isForm = body instanceof URLSearchParams;
    const content =
      rawBody ?? (isForm ? body.toString() : body === undefined ? undefined : JSON.stringify(body));
    const cookies = this.cookieHeader(address);
    const token = this.me?.csrfToken ?? "";
    const response = await fetch(address, {
      method,
      redirect: "manual",
      headers: {
        ...(cookies === "" ? {} : { cookie: cookies }),
        ...(content === undefined
          ? {}
          : { "content-type": isForm ? "application/x-www-form-urlencoded" : "application/json" }),
        ...(withoutToken || token === "" ? {} : { "x-csrf-token": token }),
        ...headers,
      },
      ...(content === undefined ? {} : { body: content }),
    });
    for (const line of response.headers.getSetCookie()) {
      const [, name, value] = /^([^=]+)=([^;]*)/.exec(line) ?? [];
      if (name !== undefined && value !== undefined) this.setCookie(name, value, address);
    }
    const text = await response.text();
    const isJson = /json/.test(response.headers.get("content-type") ?? "");
    return {
      status: response.status,
      headers: response.headers,
      text,
      body: isJson ? JSON.parse(text) : null,
    };
  }

  get<Body = Loose>(path: string, options?: RequestOptions) {
    return this.request<Body>("GET", path, undefined, options);
  }
  post<Body = Loose>(path: string, body?: unknown, options?: RequestOptions) {
    return this.request<Body>("POST", path, body, options);
  }
  put<Body = Loose>(path: string, body?: unknown, options?: RequestOptions) {
    return this.request<Body>("PUT", path, body, options);
  }
  patch<Body = Loose>(path: string, body?: unknown, options?: RequestOptions) {
    return this.request<Body>("PATCH", path, body, options);
  }
  delete<Body = Loose>(path: string, options?: RequestOptions) {
    return this.request<Body>("DELETE", path, undefined, options);
  }

  async lookAtMe(): Promise<Me> {
    this.me = (await this.get<Me>("/api/me")).body;
    return this.me;
  }
}

function location(answer: Answer): string {
  const address = answer.headers.get("location");
  if (address === null) throw new Error(`No redirect but ${answer.status}: ${answer.text}`);
  return address;
}

/** From /auth/github to the stand-in's answer: the address it sends the browser back to. */
export async function askConsent(browser: Browser, account: string, next?: string): Promise<string> {
  const query = next === undefined ? "" : `?${new URLSearchParams({ next }).toString()}`;
  const consentAddress = location(await browser.get(`/auth/github${query}`));
  const page = await browser.get(consentAddress);
  if (page.status !== 200) throw new Error(`The consent page answered ${page.status}.`);
  const form = new URLSearchParams({ account });
  for (const [, name = "", value = ""] of page.text.matchAll(
    /<input type="hidden" name="([^"]*)" value="([^"]*)">/g,
  ))
    form.set(name, value.replaceAll("&amp;", "&"));
  return location(await browser.post(new URL("/login/oauth/authorize", consentAddress).href, form));
}

/** Where the browser is in the end, as a path. */
export async function signIn(browser: Browser, account: string, next?: string): Promise<string> {
  const back = await askConsent(browser, account, next);
  const arrived = location(await browser.get(back));
  await browser.lookAtMe();
  return arrived;
}
