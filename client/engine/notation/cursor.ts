/** A place in a list of tokens, and the first failure met there. */
import { FirstFailure, type NotationFailure } from "./failure.ts";
import type { Token } from "./tokens.ts";

export class Cursor {
  private readonly trouble = new FirstFailure();
  private readonly tokens: Token[];
  private next = 0;

  constructor(
    protected readonly text: string,
    tokens: readonly Token[],
  ) {
    // A copy of its own: "\\frac12" splits a literal in place.
    this.tokens = [...tokens];
  }

  protected get failure(): NotationFailure | null {
    return this.trouble.failure;
  }
  /** Notes the failure and jumps to the end, so that every caller finishes without reading on. */
  protected fail(code: string, token: Token): void {
    this.trouble.note(code, { text: this.text.slice(token.at, token.to), offset: token.at });
    this.next = this.tokens.length - 1;
  }
  protected peek(ahead = 0): Token {
    // The list always ends with an `end` token, so one of the two is there.
    return (this.tokens[this.next + ahead] ?? this.tokens[this.tokens.length - 1]) as Token;
  }
  protected take(): Token {
    const token = this.peek();
    if (token.type !== "end") this.next += 1;
    return token;
  }
  /** Puts another token in place of the one to be read next. */
  protected replace(token: Token): void {
    this.tokens[this.next] = token;
  }
  protected isSign(token: Token, ...signs: readonly string[]): boolean {
    return token.type === "sign" && signs.includes(token.sign);
  }
}
