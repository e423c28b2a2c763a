import { usePresentPeople } from "../../editor/notebook-context.ts";

/** Who has this notebook open now, each in the colour of their caret. */
export function PeopleHere() {
  const people = usePresentPeople();
  if (people.length === 0) return null;
  return (
    <ul aria-label="Here now" className="flex flex-wrap gap-1">
      {people.map((person) => (
        <li
          key={person.id}
          title={person.isSelf ? `${person.name} (you)` : person.name}
          className="grid h-6 min-w-6 place-items-center border px-1 text-fine font-semibold"
          style={{ color: person.color, borderColor: person.color }}
        >
          <span aria-hidden="true">{person.initials}</span>
          <span className="sr-only">{person.isSelf ? `${person.name} (you)` : person.name}</span>
        </li>
      ))}
    </ul>
  );
}
