import type { CSSProperties } from "react";
import { useColleaguesIn, type FieldPlace } from "../block-handle.ts";

/** Who else is in this field: a name in that person's colour on its upper edge. */
export function ColleagueMarks({ place }: { readonly place: FieldPlace }) {
  const colleagues = useColleaguesIn(place);
  const [first] = colleagues;
  if (!first) return null;
  const names = colleagues.map(({ name }) => name).join(", ");
  // A custom property is no member of React's type for styles.
  const style = { "--person": first.color } as CSSProperties;
  return (
    <span className="block-colleague" style={style}>
      {names}
      <span className="sr-only">{colleagues.length > 1 ? " are in this field" : " is in this field"}</span>
    </span>
  );
}
