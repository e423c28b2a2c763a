import { useState } from "react";
import { Button, type ButtonLook } from "../../ui/button.tsx";
import { ConfirmDialog } from "../../ui/confirm-dialog.tsx";
import { Choice, SelectField, TextField } from "../../ui/field.tsx";
import { Menu } from "../../ui/menu.tsx";
import { say } from "../../ui/notices.ts";
import { TextLink } from "../../ui/text-link.tsx";
import { Family, Specimen } from "./specimen.tsx";

const looks: readonly ButtonLook[] = ["main", "plain", "quiet", "danger"];

/** What is pressed, chosen and typed in. */
export function ControlSpecimens() {
  const [text, setText] = useState("Lantern");
  const [order, setOrder] = useState<"changed" | "title">("changed");
  const [isOn, setOn] = useState(true);
  const [asking, setAsking] = useState(false);
  return (
    <Family title="Controls">
      {looks.map((look) => (
        <Specimen key={look} name={`button, ${look}`}>
          <Button look={look}>At rest</Button>
          <Button look={look} busy>
            Under way
          </Button>
          <Button look={look} disabled>
            Not now
          </Button>
        </Specimen>
      ))}
      <Specimen name="link">
        <TextLink to="/parts">In a sentence</TextLink>
        <TextLink look="plain" to="/parts">
          As a button
        </TextLink>
        <TextLink look="quiet" to="/parts">
          Quiet
        </TextLink>
      </Specimen>
      <Specimen name="field">
        <TextField label="At rest" hint="What it is for." value={text} onValue={setText} />
        <TextField label="Empty" placeholder="an example" value="" onValue={setText} />
        <TextField label="In error" error="A notebook needs a title." value="" onValue={setText} />
        <TextField label="Not now" disabled value={text} onValue={setText} />
      </Specimen>
      <Specimen name="choice">
        <SelectField
          label="Sort by"
          value={order}
          options={[
            ["changed", "Last change"],
            ["title", "Title"],
          ]}
          onValue={setOrder}
        />
        <Choice type="checkbox" label="One of several" hint="With a hint." checked={isOn} onChecked={setOn} />
        <Choice
          type="radio"
          name="specimen"
          label="One of two"
          checked={isOn}
          onChecked={() => setOn(true)}
        />
        <Choice
          type="radio"
          name="specimen"
          label="The other"
          checked={!isOn}
          onChecked={() => setOn(false)}
        />
      </Specimen>
      <Specimen name="menu, dialog, notices">
        <Menu
          label="Menu of the specimen"
          items={[
            { name: "Rename", onSelect: () => say("The specimen keeps its name.") },
            { name: "Delete", tone: "danger", onSelect: () => setAsking(true) },
          ]}
        >
          Menu
        </Menu>
        <Button onClick={() => setAsking(true)}>A question</Button>
        <Button onClick={() => say("It is done.")}>A notice</Button>
        <Button onClick={() => say("It was not possible, and why.", "refused")}>A refusal</Button>
        <ConfirmDialog
          open={asking}
          title="Delete the specimen"
          action="Delete"
          busy={false}
          problem={null}
          onClose={() => setAsking(false)}
          onConfirm={() => setAsking(false)}
        >
          It can be brought back for 30 days.
        </ConfirmDialog>
      </Specimen>
    </Family>
  );
}
