/** What stands between and behind operands: signs, joins, marks of conjugation. Looks at tokens, writes nothing. */
import { Cursor } from "./cursor.ts";
import type { Join } from "./explicit.ts";
import { canonicalName } from "./names.ts";
import type { Token } from "./tokens.ts";
import type { Tree } from "./tree.ts";
import { unitNamed } from "./units.ts";

export class OperatorCursor extends Cursor {
  /** Between | and |, where the next | closes. */
  protected insideBars = false;

  protected takeSign(): (Join & { readonly kind: "term" }) | null {
    const token = this.peek();
    if (token.type !== "sign" || (token.sign !== "+" && token.sign !== "-" && token.sign !== "±"))
      return null;
    this.take();
    return { kind: "term", sign: token.sign, at: token.at };
  }

  /** The operator before the next operand; null where none follows. */
  protected takeJoin(): Join | null {
    const token = this.peek();
    if (token.type === "sign" && (token.sign === "*" || token.sign === "/" || token.sign === ".")) {
      this.take();
      return { kind: "factor", join: token.sign, at: token.at };
    }
    if (this.startsOperand(token)) return { kind: "factor", join: "juxtaposed", at: token.at };
    return this.takeSign();
  }

  private startsOperand(token: Token): boolean {
    if (token.type === "sign") return token.sign === "|" && !this.insideBars;
    return (
      token.type !== "close" && token.type !== "end" && token.type !== "subscript" && token.type !== "dagger"
    );
  }

  /** Whether the next operand begins with the name of a unit, upright or not. */
  protected unitFollows(): boolean {
    const token = this.peek();
    const styled = token.type === "accent" && token.accent === "plain" && this.peek(1).type === "open";
    const word = styled ? this.peek(2) : token;
    return word.type === "name" && unitNamed(canonicalName(word.name)) !== null;
  }

  /** "phi* chi" conjugates, "phi*chi" and "phi * chi" multiply. */
  protected starConjugates(type: Tree["type"]): boolean {
    const star = this.peek();
    if (!this.isSign(star, "*") || this.text.charAt(star.at) !== "*") return false;
    const after = this.peek(1);
    return (
      (type === "name" || type === "group" || type === "accent") &&
      this.peek(-1).to === star.at &&
      (after.at > star.to || after.type === "end" || after.type === "close" || this.isSign(after, "^"))
    );
  }

  /** Takes the mark of conjugation behind "^", bracketed or not; false when it is something else. */
  protected takeConjugation(): boolean {
    const bracketed = this.peek().type === "open";
    const mark = this.peek(bracketed ? 1 : 0);
    const conjugates =
      mark.type === "dagger" ||
      this.isSign(mark, "*") ||
      (mark.type === "name" && /^dag(ger)?$/.test(mark.name.base));
    if (!conjugates || (bracketed && this.peek(2).type !== "close")) return false;
    for (let passed = 0; passed < (bracketed ? 3 : 1); passed++) this.take();
    return true;
  }
}
