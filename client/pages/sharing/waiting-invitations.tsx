import type { Invitation } from "#contract/api.ts";
import { useWithdrawInvitation } from "../../api/invitations.ts";
import { sentenceOf } from "../../api/problem.ts";
import { Button } from "../../ui/button.tsx";
import { Moment } from "../../ui/moment.tsx";
import { say } from "../../ui/notices.ts";
import { roleNames } from "./role-words.ts";
import { Section } from "./section.tsx";

interface Props {
  readonly notebookId: string;
  readonly invitations: readonly Invitation[];
}

/** Those who were asked and have not signed in yet. */
export function WaitingInvitations({ notebookId, invitations }: Props) {
  if (invitations.length === 0) return null;
  return (
    <Section title="Waiting" note="Invited, and not signed in yet. They join by themselves when they do.">
      <ul className="mt-3">
        {invitations.map((invitation) => (
          <WaitingInvitation key={invitation.id} notebookId={notebookId} invitation={invitation} />
        ))}
      </ul>
    </Section>
  );
}

/** Withdrawing asks nothing first: it hurts nobody, and inviting again is one step. */
function WaitingInvitation(props: { readonly notebookId: string; readonly invitation: Invitation }) {
  const { notebookId, invitation } = props;
  const withdraw = useWithdrawInvitation(notebookId);
  return (
    <li className="grid grid-cols-[1fr_auto] items-center gap-x-4 border-b border-line py-3">
      <div className="min-w-0">
        <p className="font-medium wrap-anywhere">{invitation.to}</p>
        <p className="text-small text-ink-2">
          {roleNames[invitation.role].toLowerCase()}, invited <Moment at={invitation.invitedAt} />
        </p>
      </div>
      <Button
        look="quiet"
        className="text-small"
        aria-label={`Withdraw the invitation of ${invitation.to}`}
        busy={withdraw.isPending}
        onClick={() => {
          withdraw.mutate(invitation.id, {
            onSuccess: () => {
              say(`The invitation of ${invitation.to} is withdrawn.`);
            },
            onError: (error) => {
              say(sentenceOf(error), "refused");
            },
          });
        }}
      >
        Withdraw
      </Button>
    </li>
  );
}
