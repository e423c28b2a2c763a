/** Who is on a socket, and what their role lets them do over it. */
import { roleMay, type Role } from "#contract/roles.ts";

export interface Member {
  readonly as: "member";
  readonly personId: string;
  readonly name: string;
  /** A digest that names the sign-in session. */
  readonly sessionId: string;
}
export interface Referee {
  readonly as: "referee";
  readonly refereeLinkId: string;
  readonly hideAuthors: boolean;
}
export type Visitor = Member | Referee;

export interface Rights {
  readonly mayWrite: boolean;
  readonly maySendPresence: boolean;
  readonly maySeePresence: boolean;
}

export function rightsOfMember(role: Role, archived: boolean): Rights {
  return {
    mayWrite: roleMay(role, "notebook.write") && !archived,
    maySendPresence: roleMay(role, "presence.send"),
    maySeePresence: roleMay(role, "notebook.read"),
  };
}

export function rightsOfReferee(hideAuthors: boolean): Rights {
  return { mayWrite: false, maySendPresence: false, maySeePresence: !hideAuthors };
}
