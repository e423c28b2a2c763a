/** What someone who was invited reads. Plain text: nothing in it can be made to look like something else. */
import type { Role } from "./roles.ts";

export interface Occasion {
  readonly recipient: string;
  readonly inviter: { readonly name: string; readonly login: string };
  readonly notebookTitle: string;
  readonly notebookId: string;
  readonly role: Role;
  readonly publicUrl: string;
  /** Someone known is in at once; someone else gets in by signing in. */
  readonly isMember: boolean;
}

const whatRolesDo: Readonly<Record<Role, string>> = {
  owner: "an owner: you can edit it and decide who takes part",
  author: "an author: you can edit it",
  reviewer: "a reviewer: you can read it and what it computes",
  reader: "a reader: you can read it and what it computes",
};

export function invitationWords(occasion: Occasion): { readonly subject: string; readonly body: string } {
  const { recipient, inviter, notebookTitle, notebookId, role, publicUrl, isMember } = occasion;
  const address = `${publicUrl}/notebooks/${notebookId}`;
  const way = isMember
    ? "It is on your shelf now:"
    : `To accept, sign in with the account whose verified e-mail address is ${recipient}:`;
  return {
    subject: `${inviter.name} invites you to “${notebookTitle}”`,
    body: [
      "Hello,",
      "",
      `${inviter.name} (${inviter.login}) invites you to the notebook “${notebookTitle}” as ${whatRolesDo[role]}.`,
      "",
      way,
      "",
      `  ${address}`,
      "",
      "If you did not expect this, you need do nothing.",
      "",
      "Subleading, a notebook for power counting",
      publicUrl,
      "",
    ].join("\n"),
  };
}
