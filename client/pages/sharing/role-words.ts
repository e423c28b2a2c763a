import type { Role } from "#contract/roles.ts";

export const roleNames: Readonly<Record<Role, string>> = {
  owner: "Owner",
  author: "Author",
  reviewer: "Reviewer",
  reader: "Reader",
};

export const roleWords: Readonly<Record<Role, string>> = {
  owner: "edits, and decides who takes part; makes referee links; archives and deletes",
  author: "edits prose and blocks, places and accepts pins",
  reviewer: "reads everything, as the one who checks the argument; changes nothing",
  reader: "reads everything; changes nothing",
};
