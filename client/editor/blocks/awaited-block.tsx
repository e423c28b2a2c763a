import { kindDescriptions } from "#engine/descriptions.ts";
import { useBlock } from "../../blocks/block-handle.ts";
import "./awaited-block.css";

/** Holds a block's place until the code that draws blocks is there: about as high, and with its heading. */
export function AwaitedBlock() {
  const { kind, fields } = useBlock();
  const { title } = kindDescriptions[kind];
  return (
    <section className="block block-awaited" aria-label={title} aria-busy="true" data-kind={kind}>
      <header className="block-head">
        <h3 className="block-kind engraved">{title}</h3>
        <span className="block-title">{fields["name"] ?? fields["title"] ?? ""}</span>
      </header>
    </section>
  );
}
