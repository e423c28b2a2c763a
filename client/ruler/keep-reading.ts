/** Writes what was tried on the ruler into the premises and the plan: one step of the person's history. */
import type { BlockWorld } from "../editor/blocks/block-world.ts";
import { writeCell, writeField } from "../editor/blocks/block-writes.ts";
import { FIELD_ORIGIN } from "../editor/history.ts";
import { probeText, targetText } from "./kept-text.ts";
import type { RulerSource } from "./ruler-source.ts";

export function keepReading(
  { directory, session }: BlockWorld,
  source: RulerSource,
  { probe, target }: { readonly probe: number; readonly target: number | null },
): void {
  // A demoted person's ruler may still be in their hand.
  if (session.state().readOnly) return;
  const { model, probeAt } = source;
  const premises = directory.element(source.premisesId);
  const block = directory.element(source.blockId);
  session.history.startNewStep();
  session.ydoc.transact(() => {
    if (probe !== model.probe.value && probeAt !== null) {
      const text = probeText(probe, model.probe.sigma, model.probe.unit);
      if (probeAt === "plan") {
        if (block) writeField(block, "probe", text);
      } else if (premises) writeCell(premises, "scales", probeAt.rowId, "value", text);
    }
    if (source.isPlan && target !== null && target !== model.target && block)
      writeField(block, "target", targetText(target));
  }, FIELD_ORIGIN);
  session.history.startNewStep();
}
