import { useState } from "react";
import type { WorkingStep } from "#engine/evaluation.ts";
import { Formula, TextWithMath } from "../../ui/math.tsx";

/** The derivation of a result, openable under every block. Drawn only while it is open. */
export function Working({ steps }: { readonly steps: readonly WorkingStep[] }) {
  const [open, setOpen] = useState(false);
  const [copied, setCopied] = useState<"no" | "yes" | "refused">("no");
  if (steps.length === 0) return null;
  async function copy() {
    try {
      await navigator.clipboard.writeText(workingAsLatex(steps));
      setCopied("yes");
    } catch {
      // The browser or its user does not let pages write to the clipboard.
      setCopied("refused");
    }
  }
  return (
    <details className="block-working" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>working</summary>
      {open && (
        <div className="block-working-steps">
          {steps.map((step, index) => (
            // Steps have no identity but their place.
            <Step key={index} step={step} />
          ))}
          <p className="block-working-tools">
            <button type="button" className="block-link" onClick={() => void copy()}>
              copy as LaTeX
            </button>
            <span role="status">
              {copied === "yes" && " copied"}
              {copied === "refused" && " the browser did not allow it"}
            </span>
          </p>
        </div>
      )}
    </details>
  );
}

function Step({ step }: { readonly step: WorkingStep }) {
  if (step.step === "heading") {
    return (
      <p className="block-working-heading">
        <TextWithMath text={step.text} />
      </p>
    );
  }
  if (step.step === "prose") {
    return (
      <p>
        <TextWithMath text={step.text} />
      </p>
    );
  }
  return (
    <div className="block-working-formula">
      <Formula latex={step.latex} display />
    </div>
  );
}

/** The working as it would stand in a paper: headings as comments, prose as paragraphs, formulas displayed. */
export function workingAsLatex(steps: readonly WorkingStep[]): string {
  return steps
    .map((step) => {
      if (step.step === "heading") return `% ${step.text}`;
      return step.step === "prose" ? step.text : `\\[\n  ${step.latex}\n\\]`;
    })
    .join("\n\n");
}
