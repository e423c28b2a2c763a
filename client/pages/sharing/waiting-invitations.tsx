import type { Invitation } from "#contract/api.ts";
import { Moment } from "../../ui/moment.tsx";
import { roleNames } from "./role-words.ts";
import { Section } from "./section.tsx";

/** Those who were asked and have not signed in yet. */
export function WaitingInvitations({ invitations }: { readonly invitations: readonly Invitation[] }) {
  if (invitations.length === 0) return null;
  return (
    <Section title="Waiting" note="Invited, and not signed in yet. They join by themselves when they do.">
      <ul className="mt-3">
        {invitations.map((invitation) => (
          <li
            key={invitation.id}
            className="flex flex-wrap items-baseline justify-between gap-x-4 border-b border-line py-3"
          >
            <span className="font-medium wrap-anywhere">{invitation.to}</span>
            <span className="text-small text-ink-2">
              {roleNames[invitation.role].toLowerCase()}, invited <Moment at={invitation.invitedAt} />
            </span>
          </li>
        ))}
      </ul>
    </Section>
  );
}
