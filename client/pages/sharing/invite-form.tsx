import { roles, type Role } from "#contract/roles.ts";
import { useState } from "react";
import { useInvite } from "../../api/invitations.ts";
import { sentenceOf } from "../../api/problem.ts";
import { Button } from "../../ui/button.tsx";
import { SelectField, TextField } from "../../ui/field.tsx";
import { say } from "../../ui/notices.ts";
import { roleNames, roleWords } from "./role-words.ts";
import { Section } from "./section.tsx";

export function InviteForm({ notebookId }: { readonly notebookId: string }) {
  const [to, setTo] = useState("");
  const [role, setRole] = useState<Role>("author");
  const [problem, setProblem] = useState<string | null>(null);
  const invite = useInvite(notebookId);
  const send = () => {
    const wanted = to.trim();
    if (wanted === "") {
      setProblem("Type the account name or the e-mail address of the person to invite.");
      return;
    }
    setProblem(null);
    invite.mutate(
      { to: wanted, role },
      {
        onSuccess: (result) => {
          say(
            result.outcome === "added"
              ? `${result.person.name} takes part from now on, as ${roleNames[role].toLowerCase()}.`
              : `${result.invitation.to} is invited, and joins on signing in.`,
          );
          setTo("");
        },
        onError: (error) => {
          setProblem(sentenceOf(error));
        },
      },
    );
  };
  return (
    <Section title="Invite">
      <form
        className="mt-3 grid gap-4 sm:grid-cols-[1fr_10rem_auto] sm:items-start"
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          if (!invite.isPending) send();
        }}
      >
        <TextField
          label="Account name or e-mail address"
          maxLength={254}
          autoCapitalize="none"
          spellCheck={false}
          value={to}
          error={problem}
          onValue={(value) => {
            setTo(value);
            setProblem(null);
          }}
        />
        <SelectField
          label="Role"
          value={role}
          options={roles.map((known) => [known, roleNames[known]] as const)}
          onValue={setRole}
        />
        <Button
          look="main"
          type="submit"
          className="sm:mt-[1.4375rem]"
          busy={invite.isPending}
          busyLabel="Inviting"
        >
          Invite
        </Button>
      </form>
      <p className="mt-2 text-small text-ink-2">
        {roleNames[role]}: {roleWords[role]}.
      </p>
    </Section>
  );
}
