import { invitationWords } from "#contract/invitation-words.ts";
import { Family, Specimen } from "./specimen.tsx";

const { subject, body } = invitationWords({
  recipient: "someone-invented@example.org",
  inviter: { name: "Wren Lantern", login: "wren-lantern" },
  notebookTitle: "Lantern amplitude to one per mille",
  notebookId: "an-invented-notebook",
  role: "author",
  publicUrl: "https://notebooks.example.org",
  isMember: false,
});

/** What goes out by mail, as plain text. */
export function LetterSpecimens() {
  return (
    <Family title="Letters">
      <Specimen name="invitation">
        <div className="min-w-0 grow">
          <p className="font-semibold">{subject}</p>
          <pre className="mt-2 max-w-(--measure) font-notation text-small whitespace-pre-wrap wrap-anywhere">
            {body}
          </pre>
        </div>
      </Specimen>
    </Family>
  );
}
