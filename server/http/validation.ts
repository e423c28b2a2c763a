/** Checks what was sent against the contract's schemas and says in words what does not fit. */
import { safeParse, type $ZodIssue, type $ZodType, type output } from "zod/v4/core";
import { refuse, succeed, type Outcome } from "../commands/outcome.ts";

/** The contract is written with zod/mini, which carries no messages; these are ours. */
function wordsOf(issue: $ZodIssue): string {
  switch (issue.code) {
    case "too_big":
      return issue.origin === "string"
        ? `may have at most ${issue.maximum} characters`
        : `may be at most ${issue.maximum}`;
    case "too_small":
      if (issue.origin === "string" && issue.minimum === 1) return "may not be empty";
      return issue.origin === "string"
        ? `needs at least ${issue.minimum} characters`
        : `must be at least ${issue.minimum}`;
    case "invalid_value":
      return `must be one of ${issue.values.map(String).join(", ")}`;
    case "invalid_format":
      return `is not a valid ${issue.format}`;
    case "invalid_type":
      return `must be given as ${issue.expected}`;
    case "unrecognized_keys":
      return `has fields that are not known: ${issue.keys.join(", ")}`;
    default:
      return "is not valid";
  }
}

function sentenceOf(issue: $ZodIssue): string {
  const where = issue.path.length === 0 ? "The request" : `“${issue.path.map(String).join(".")}”`;
  return `${where} ${wordsOf(issue)}.`;
}

/** The deepest body of ours has seven levels. */
const DEEPEST = 40;

/**
 * What no schema should have to look at. PostgreSQL stores no NUL, and nobody types one. Without recursion:
 * a few hundred kilobytes of brackets nest deeper than any call stack.
 */
function faultOf(value: unknown): string | null {
  const waiting: (readonly [part: unknown, depth: number])[] = [[value, 0]];
  for (let next = waiting.pop(); next !== undefined; next = waiting.pop()) {
    const [part, depth] = next;
    if (typeof part === "string" && part.includes("\0"))
      return "The request holds a character that cannot be stored (U+0000).";
    if (typeof part !== "object" || part === null) continue;
    if (depth >= DEEPEST) return "The request nests too deeply.";
    for (const inner of Object.values(part)) waiting.push([inner, depth + 1]);
  }
  return null;
}

export function check<Schema extends $ZodType>(schema: Schema, value: unknown): Outcome<output<Schema>> {
  const fault = faultOf(value);
  if (fault !== null) return refuse("invalid", fault);
  const parsed = safeParse(schema, value);
  if (parsed.success) return succeed(parsed.data);
  return refuse("invalid", parsed.error.issues.slice(0, 5).map(sentenceOf).join(" "));
}
