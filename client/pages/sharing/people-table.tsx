import type { NotebookPeople } from "#contract/api.ts";
import { roles, type Role } from "#contract/roles.ts";
import { useState } from "react";
import { useChangeRole, useRemovePerson } from "../../api/people.ts";
import { sentenceOf } from "../../api/problem.ts";
import { Button } from "../../ui/button.tsx";
import { ConfirmDialog } from "../../ui/confirm-dialog.tsx";
import { Moment } from "../../ui/moment.tsx";
import { say } from "../../ui/notices.ts";
import { roleNames, roleWords } from "./role-words.ts";
import { Section } from "./section.tsx";

type Member = NotebookPeople["people"][number];
interface Props {
  readonly notebookId: string;
  readonly people: readonly Member[];
  /** Id of the person who looks. */
  readonly self: string;
  readonly mayManage: boolean;
}

export function PeopleTable({ notebookId, people, self, mayManage }: Props) {
  return (
    <Section title="People">
      <ul className="mt-3">
        {people.map((member) => (
          <PersonEntry
            key={member.id}
            notebookId={notebookId}
            member={member}
            isSelf={member.id === self}
            mayManage={mayManage}
          />
        ))}
      </ul>
    </Section>
  );
}

interface EntryProps {
  readonly notebookId: string;
  readonly member: Member;
  readonly isSelf: boolean;
  readonly mayManage: boolean;
}

function PersonEntry({ notebookId, member, isSelf, mayManage }: EntryProps) {
  return (
    <li className="grid grid-cols-[1fr_auto] items-center gap-x-4 gap-y-1 border-b border-line py-3">
      <div>
        <p>
          <span className="font-medium">{member.name}</span>{" "}
          <span className="text-ink-2">{member.login}</span>
          {isSelf && <span className="text-ink-2"> (you)</span>}
        </p>
        <p className="text-small text-ink-2">
          {mayManage ? roleWords[member.role] : `${roleNames[member.role]}: ${roleWords[member.role]}`}; since{" "}
          <Moment at={member.since} />
        </p>
      </div>
      {mayManage && <ManagePerson notebookId={notebookId} member={member} isSelf={isSelf} />}
    </li>
  );
}

function ManagePerson({ notebookId, member, isSelf }: Omit<EntryProps, "mayManage">) {
  const [asking, setAsking] = useState<"remove" | Role | null>(null);
  const changeRole = useChangeRole(notebookId);
  const remove = useRemovePerson(notebookId);
  const close = () => {
    setAsking(null);
    changeRole.reset();
    remove.reset();
  };
  const give = (role: Role) => {
    changeRole.mutate(
      { personId: member.id, role },
      {
        onSuccess: () => {
          say(`${member.name} is now ${roleNames[role].toLowerCase()}.`);
          close();
        },
        // Of oneself the question is still open and shows the refusal.
        onError: (error) => {
          if (!isSelf) say(sentenceOf(error), "refused");
        },
      },
    );
  };
  return (
    <div className="flex flex-col items-end gap-2 sm:flex-row sm:items-center sm:gap-4">
      <select
        aria-label={`Role of ${member.name}`}
        className="control w-auto"
        value={changeRole.isPending ? changeRole.variables.role : member.role}
        onChange={(event) => {
          const role = roles.find((known) => known === event.target.value);
          if (!role) return;
          if (isSelf) setAsking(role);
          else give(role);
        }}
      >
        {roles.map((role) => (
          <option key={role} value={role}>
            {roleNames[role]}
          </option>
        ))}
      </select>
      {!isSelf && (
        <Button
          look="quiet"
          className="text-small"
          aria-label={`Remove ${member.name}`}
          onClick={() => {
            setAsking("remove");
          }}
        >
          Remove
        </Button>
      )}
      <ConfirmDialog
        open={asking === "remove"}
        onClose={close}
        title={`Remove ${member.name}?`}
        action="Remove"
        busy={remove.isPending}
        problem={remove.isError ? sentenceOf(remove.error) : null}
        onConfirm={() => {
          remove.mutate(member.id, {
            onSuccess: () => {
              say(`${member.name} no longer takes part.`);
            },
          });
        }}
      >
        <p>
          Their open pages of this notebook close at once. What they wrote stays. You can invite them again.
        </p>
      </ConfirmDialog>
      <ConfirmDialog
        open={asking !== null && asking !== "remove"}
        onClose={close}
        title="Change your own role?"
        action="Change my role"
        busy={changeRole.isPending}
        problem={changeRole.isError ? sentenceOf(changeRole.error) : null}
        onConfirm={() => {
          if (asking && asking !== "remove") give(asking);
        }}
      >
        <p>You will no longer decide who takes part, and only an owner can give this back to you.</p>
      </ConfirmDialog>
    </div>
  );
}
