import { usePresentPeople } from "../../editor/notebook-context.ts";
import { useNotebookTools } from "../../editor/notebook-tools.ts";
import type { PresentPerson } from "../../editor/presence.ts";
import { say } from "../../ui/notices.ts";

/** Who has this notebook open now, each in the colour of their caret. */
export function PeopleHere() {
  const people = usePresentPeople();
  if (people.length === 0) return null;
  return (
    <ul aria-label="Here now" className="flex flex-wrap gap-1">
      {people.map((person) => (
        <li
          key={person.id}
          title={person.isSelf ? `${person.name} (you)` : undefined}
          className="grid h-6 min-w-6 place-items-center border px-1 text-fine font-semibold"
          style={{ color: person.color, borderColor: person.color }}
        >
          <Initials person={person} />
        </li>
      ))}
    </ul>
  );
}

/** A colleague's initials lead to where they are at work. */
function Initials({ person }: { readonly person: PresentPerson }) {
  const tools = useNotebookTools();
  const initials = <span aria-hidden="true">{person.initials}</span>;
  if (person.isSelf || !tools) {
    return (
      <>
        {initials}
        <span className="sr-only">{person.isSelf ? `${person.name} (you)` : person.name}</span>
      </>
    );
  }
  return (
    <button
      type="button"
      title={`Go to where ${person.name} is`}
      onClick={() => {
        void import("../../editor/going/go-to-colleague.ts").then(({ goToColleague }) => {
          if (!goToColleague(tools, person.id)) say(`${person.name} is not at work in the text just now.`);
        });
      }}
    >
      {initials}
      <span className="sr-only">{person.name}: go to where they are</span>
    </button>
  );
}
