import type { ReactNode } from "react";
import "../../blocks/blocks.css";
import { BlockHandleContext, type BlockHandle } from "../../blocks/block-handle.ts";
import { ReplacedNotice } from "../../blocks/parts/replaced-notice.tsx";
import { TextField } from "../../blocks/parts/text-field.tsx";
import { Formula } from "../../ui/math.tsx";
import { Family, Specimen } from "./specimen.tsx";
import { specimenHandle } from "./specimen-handle.ts";

const nothing = () => undefined;
const place = { field: "d" };
const fields = { d: "lambda/4! phi^4" };

const atRest = specimenHandle({ fields });
const empty = specimenHandle({ fields: { d: "" } });
const forReading = specimenHandle({ fields, readOnly: true });
const withColleague = specimenHandle({
  fields,
  colleagues: { d: [{ name: "Otto Lantern", color: "var(--relevant)" }] },
});
const inError = specimenHandle({
  fields: { d: "lambda/4! fi^4" },
  evaluation: {
    value: null,
    problems: [
      {
        code: "unknown-symbol",
        path: ["d"],
        facts: { symbol: "fi", offset: 10, length: 2, suggestion: "phi" },
      },
    ],
    notices: [],
    scalars: [],
    working: [],
  },
});

/** The fields of forms, in every state that people meet. */
export function FieldSpecimens() {
  return (
    <Family title="Fields of blocks">
      <Drawn name="empty" handle={empty} />
      <Drawn name="typed" handle={atRest} />
      <Drawn
        name="typed, and read as"
        handle={atRest}
        reading={<Formula latex={"\\frac{\\lambda}{4!}\\,\\phi^{4}"} />}
      />
      <Drawn name="not understood" handle={inError} />
      <Drawn name="a colleague is in it" handle={withColleague} />
      <Drawn name="for reading" handle={forReading} />
      <Specimen name="replaced while one typed">
        <div className="block-view block pt-4 [content-visibility:visible]">
          <ReplacedNotice
            draft={{
              text: "g/4! phi^4",
              replaced: {
                by: "Otto Lantern",
                from: "lambda/4! phi^4",
                to: "lambda/4 phi^4",
                mine: "g/4! phi^4",
                typing: true,
              },
              type: nothing,
              enter: nothing,
              leave: nothing,
              commit: nothing,
              restore: () => false,
              putBackMine: nothing,
              takeTheirs: nothing,
              undo: nothing,
              redo: nothing,
            }}
            onChosen={nothing}
          />
        </div>
      </Specimen>
    </Family>
  );
}

interface DrawnProps {
  readonly name: string;
  readonly handle: BlockHandle;
  readonly reading?: ReactNode;
}
function Drawn({ name, handle, reading }: DrawnProps) {
  return (
    <Specimen name={name}>
      <div className="block-view block pt-4 [content-visibility:visible]">
        <BlockHandleContext value={handle}>
          <TextField
            place={place}
            label={`term, ${name}`}
            placeholder="lambda/4! phi^4"
            size={18}
            {...(reading === undefined ? {} : { reading })}
          />
        </BlockHandleContext>
      </div>
    </Specimen>
  );
}
