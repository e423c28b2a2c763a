import { roleMay } from "#contract/roles.ts";
import { useParams } from "react-router-dom";
import { useMe } from "../../api/me.ts";
import { useNotebook } from "../../api/notebooks.ts";
import { useNotebookPeople } from "../../api/people.ts";
import { isNotFound, sentenceOf } from "../../api/problem.ts";
import { Button } from "../../ui/button.tsx";
import { DemonstrationNote } from "../../ui/demonstration-note.tsx";
import { Loading } from "../../ui/loading.tsx";
import { PageFrame } from "../../ui/page-frame.tsx";
import { Refusal } from "../../ui/refusal.tsx";
import { TextLink } from "../../ui/text-link.tsx";
import { InviteForm } from "./invite-form.tsx";
import { LeaveNotebook } from "./leave-notebook.tsx";
import { PeopleTable } from "./people-table.tsx";
import { RefereeLinks } from "./referee-links.tsx";
import { WaitingInvitations } from "./waiting-invitations.tsx";

/** Who takes part in a notebook, and which addresses open it without an account. */
export function SharingPage() {
  const { id = "" } = useParams();
  const notebook = useNotebook(id);
  const people = useNotebookPeople(id);
  const me = useMe().data;

  if (notebook.isPending || people.isPending) {
    return (
      <PageFrame title="Sharing" width="measure">
        <Loading what="Reading who takes part" />
      </PageFrame>
    );
  }
  const failure = notebook.error ?? people.error;
  if (!notebook.data || !people.data || !me?.person) {
    return (
      <PageFrame title="Sharing" width="measure">
        <h1 className="font-prose text-title leading-tight">
          {isNotFound(failure) ? "This notebook is not open to you" : "Sharing could not be read"}
        </h1>
        <Refusal sentence={sentenceOf(failure)} />
        <p className="mt-6 flex flex-wrap gap-4">
          {!isNotFound(failure) && (
            <Button
              onClick={() => {
                void notebook.refetch();
                void people.refetch();
              }}
            >
              Try again
            </Button>
          )}
          <TextLink look="plain" to="/shelf">
            To the shelf
          </TextLink>
        </p>
      </PageFrame>
    );
  }

  const { role, title, archivedAt } = notebook.data;
  const { person, demonstration } = me;
  return (
    <PageFrame title={`Sharing “${title}”`} width="measure">
      <p className="text-small text-ink-2">
        <TextLink to={`/notebooks/${id}`}>{title}</TextLink>
        {archivedAt && " · archived"}
      </p>
      <h1 className="mt-1 font-prose text-title leading-tight">Sharing</h1>

      <PeopleTable
        notebookId={id}
        people={people.data.people}
        self={person.id}
        mayManage={roleMay(role, "people.manage")}
      />
      {roleMay(role, "invitation.manage") && (
        <>
          <WaitingInvitations notebookId={id} invitations={people.data.invitations} />
          <InviteForm notebookId={id} />
          {demonstration && <DemonstrationNote mailboxUrl={demonstration.mailboxUrl} className="mt-4" />}
        </>
      )}
      {roleMay(role, "refereeLink.manage") && <RefereeLinks notebookId={id} />}
      {roleMay(role, "people.leave") && <LeaveNotebook notebookId={id} title={title} personId={person.id} />}
    </PageFrame>
  );
}
