import { fetchFile } from "../../api/attachments.ts";
import { download } from "../../ui/download.ts";
import { say } from "../../ui/notices.ts";
import { useBlock } from "../block-handle.ts";

/** What the field says: the id under which the notebook keeps the file, and its name. */
export function readOriginal(text: string): { readonly id: string; readonly name: string } | null {
  const [, id, name] = /^([0-9a-f-]{36}) (.+)$/.exec(text) ?? [];
  return id !== undefined && name !== undefined ? { id, name } : null;
}

/** Where the table came from: the file as it was, to be saved again, and what reading it in changed. */
export function OriginalFile() {
  const { fields, files } = useBlock();
  const original = readOriginal(fields["original"] ?? "");
  const changed = fields["lastImport"] ?? "";
  if (!original && changed === "") return null;
  async function save() {
    if (!original || files === null) return;
    const answer = await fetchFile(files, original.id);
    if (answer.ok) download(original.name, answer.value.type, answer.value);
    else say(`“${original.name}” could not be fetched. ${answer.problem.sentence}`);
  }
  return (
    <p className="block-line data-original">
      {original && (
        <>
          Read in from{" "}
          {files === null ? (
            <>“{original.name}”</>
          ) : (
            <button type="button" className="block-link" onClick={() => void save()}>
              {original.name}
              <span className="sr-only">, save the file as it was</span>
            </button>
          )}
          .{" "}
        </>
      )}
      {changed}
    </p>
  );
}
