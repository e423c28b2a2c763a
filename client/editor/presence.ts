/** Who is here. Presence states are data from strangers: read narrowly, shown as words only. */
import type { Awareness } from "y-protocols/awareness";
import { initials, personColor } from "./person-color.ts";

export interface PresentPerson {
  readonly id: string;
  readonly name: string;
  readonly initials: string;
  /** A CSS colour that is safe in both themes. */
  readonly color: string;
  readonly isSelf: boolean;
}

export interface PresenceUser {
  readonly id: string;
  readonly name: string;
}

/** The person a presence state names, or null. */
export function userOf(state: unknown): PresenceUser | null {
  if (typeof state !== "object" || state === null || !("user" in state)) return null;
  const { user } = state;
  if (typeof user !== "object" || user === null || !("id" in user) || !("name" in user)) return null;
  if (typeof user.id !== "string" || typeof user.name !== "string" || user.id === "") return null;
  return { id: user.id.slice(0, 100), name: user.name.slice(0, 80) || "someone" };
}

/** One entry per person, whatever the number of tabs: oneself first, then by name. */
export function presentPeople(awareness: Awareness): readonly PresentPerson[] {
  const people = new Map<string, PresentPerson>();
  const self = userOf(awareness.getLocalState())?.id ?? null;
  for (const state of awareness.getStates().values()) {
    const user = userOf(state);
    if (!user || people.has(user.id)) continue;
    people.set(user.id, {
      ...user,
      initials: initials(user.name),
      color: personColor(user.id),
      isSelf: user.id === self,
    });
  }
  return [...people.values()].sort(
    (a, b) => Number(b.isSelf) - Number(a.isSelf) || a.name.localeCompare(b.name),
  );
}
