/** Who may do what. One table for server, client and tests. */

export const roles = ["owner", "author", "reviewer", "reader"] as const;
export type Role = (typeof roles)[number];

export const actions = [
  "notebook.read",
  "notebook.write",
  "notebook.rename",
  "notebook.archive",
  "notebook.delete",
  "people.read",
  "people.manage",
  "people.leave",
  "invitation.manage",
  "refereeLink.manage",
  "presence.send",
] as const;
export type Action = (typeof actions)[number];

const reading: readonly Action[] = ["notebook.read", "people.read"];

const allowed: Readonly<Record<Role, readonly Action[]>> = {
  owner: actions.filter((action) => action !== "people.leave"),
  author: [...reading, "notebook.write", "notebook.rename", "people.leave", "presence.send"],
  reviewer: [...reading, "people.leave"],
  reader: [...reading, "people.leave"],
};

export function roleMay(role: Role, action: Action): boolean {
  return allowed[role].includes(action);
}
