/** A notebook with a long history: paragraphs typed letter by letter, at many places. */
import * as Y from "yjs";
import { FRAGMENT } from "../../client/contract/collab.ts";
import type { Database } from "../../server/data/database.ts";
import { seededRandom } from "../server/collab/seeded-random.ts";

const BURST = 25;
const ROWS_AT_ONCE = 5_000;
const LETTERS_PER_PARAGRAPH = 500;

/** So many edits by four people; one in ten takes a letter away. */
export function longHistory(edits: number): readonly Uint8Array[] {
  const random = seededRandom(7);
  const document = new Y.Doc();
  // One document in the place of four that tell each other everything: what is stored is the same.
  const people = [11, 12, 13, 14];
  const updates: Uint8Array[] = [];
  document.on("update", (update: Uint8Array) => updates.push(update));
  const fragment = document.getXmlFragment(FRAGMENT);
  while (updates.length < edits) {
    document.clientID = people[Math.floor(random() * people.length)] ?? 11;
    if (fragment.length * LETTERS_PER_PARAGRAPH <= updates.length) {
      const paragraph = new Y.XmlElement("paragraph");
      paragraph.insert(0, [new Y.XmlText()]);
      fragment.insert(Math.floor(random() * (fragment.length + 1)), [paragraph]);
      continue;
    }
    const paragraph = fragment.get(Math.floor(random() * fragment.length));
    const text = paragraph instanceof Y.XmlElement ? paragraph.get(0) : null;
    if (!(text instanceof Y.XmlText)) throw new Error("a paragraph without text");
    const place = Math.floor(random() * (text.length + 1));
    for (let letter = 0; letter < BURST && updates.length < edits; letter += 1)
      if (letter % 10 === 9) text.delete(place, 1);
      else text.insert(place + letter - Math.floor(letter / 10) * 2, "x");
  }
  return updates;
}

/** Into the log as they are, or folded into a state as compaction leaves them, with the last rows behind it. */
export async function store(
  database: Database,
  notebookId: string,
  updates: readonly Uint8Array[],
  rowsLeft: number,
): Promise<Uint8Array> {
  const document = new Y.Doc();
  const folded = updates.slice(0, Math.max(0, updates.length - rowsLeft));
  const rest = updates.slice(folded.length);
  document.transact(() => folded.forEach((update) => Y.applyUpdate(document, update)));
  if (folded.length > 0)
    await database.raw("insert into document_states (notebook_id, seq, state) values (?, ?, ?)", [
      notebookId,
      folded.length,
      Buffer.from(Y.encodeStateAsUpdate(document)),
    ]);
  for (let start = 0; start < rest.length; start += ROWS_AT_ONCE)
    await database.raw(
      `insert into document_updates (notebook_id, seq, update)
       select ?, ?::bigint + line.number, line.update from unnest(?::bytea[]) with ordinality as line (update, number)`,
      [
        notebookId,
        folded.length + start,
        rest.slice(start, start + ROWS_AT_ONCE).map((update) => Buffer.from(update)),
      ],
    );
  await database.raw("update notebooks set last_seq = ? where id = ?", [updates.length, notebookId]);
  document.transact(() => rest.forEach((update) => Y.applyUpdate(document, update)));
  return Y.encodeStateAsUpdate(document);
}
