/** What server processes say to each other by announcements of PostgreSQL. Ids and small states, never content. */
import * as z from "zod";

/** New rows of a notebook were committed; written by the statement that commits them. */
export const ROWS_CHANNEL = "rows";
/** Everything else, gathered. */
export const NEIGHBOURS_CHANNEL = "neighbours";

const uuid = z.uuid();
const count = z.int().min(0);
const personId = uuid;

export const rowsSchema = z.strictObject({ from: uuid, notebookId: uuid, seq: count });

const stateSchema = z.strictObject({
  client: count,
  personId,
  /** As shown to people; null once the person has left. */
  json: z.string().nullable(),
});
export type NeighbourState = z.infer<typeof stateSchema>;

const messageSchema = z.discriminatedUnion("about", [
  /** "hello": I hold it from now on, show me who is there. */
  z.strictObject({ about: z.enum(["hello", "goodbye", "results"]), notebookId: uuid }),
  z.strictObject({ about: z.literal("presence"), notebookId: uuid, state: stateSchema }),
]);
export type NeighbourMessage = z.infer<typeof messageSchema>;

export const lineSchema = z.strictObject({ from: uuid, messages: z.array(messageSchema) });

/** PostgreSQL takes under 8,000 bytes. */
const LONGEST_LINE_BYTES = 7_900;

/** One line per announcement; a message that fits in none (there is no honest one) is left out. */
export function linesOf(from: string, messages: readonly NeighbourMessage[]): readonly string[] {
  const frame = Buffer.byteLength(JSON.stringify({ from, messages: [] }));
  const lines: string[] = [];
  let parts: string[] = [];
  let bytes = frame;
  const close = () => {
    if (parts.length > 0) lines.push(`{"from":${JSON.stringify(from)},"messages":[${parts.join(",")}]}`);
    parts = [];
    bytes = frame;
  };
  for (const message of messages) {
    const part = JSON.stringify(message);
    const length = Buffer.byteLength(part) + 1;
    if (frame + length > LONGEST_LINE_BYTES) continue;
    if (bytes + length > LONGEST_LINE_BYTES) close();
    parts.push(part);
    bytes += length;
  }
  close();
  return lines;
}

/** Null for what cannot be read, perhaps from a newer server. */
export function readLine<Schema extends z.ZodType>(schema: Schema, text: string): z.infer<Schema> | null {
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch (error) {
    if (error instanceof SyntaxError) return null;
    throw error;
  }
  const parsed = schema.safeParse(json);
  return parsed.success ? parsed.data : null;
}
