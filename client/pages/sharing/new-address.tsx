import type { RefereeLinkCreated } from "#contract/api.ts";
import { useEffect, useRef, useState } from "react";
import { Button } from "../../ui/button.tsx";
import { Field } from "../../ui/field.tsx";

interface Props {
  readonly made: RefereeLinkCreated;
  readonly onPutAway: () => void;
}

/** The one time the address can be read: the server keeps only a digest of it. */
export function NewAddress({ made, onPutAway }: Props) {
  const field = useRef<HTMLInputElement>(null);
  const [copied, setCopied] = useState<"no" | "yes" | "by-hand">("no");
  const address = `${window.location.origin}/r/${made.token}`;
  useEffect(() => {
    field.current?.focus();
    field.current?.select();
  }, []);
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(address);
      setCopied("yes");
    } catch {
      // Refused by the browser, or absent without TLS: the address is selected for the person's own hand.
      field.current?.focus();
      field.current?.select();
      setCopied("by-hand");
    }
  };
  return (
    <div className="mt-6 border-l-2 border-ink pl-4">
      <Field
        label={`Address of “${made.link.name}”`}
        hint="Shown this once. Copy it now; a lost address cannot be read again."
      >
        {(wiring) => (
          <div className="flex flex-wrap gap-2">
            <input
              {...wiring}
              ref={field}
              readOnly
              value={address}
              className="control min-w-48 flex-1 font-notation text-small"
            />
            <Button onClick={() => void copy()}>Copy</Button>
            <Button look="quiet" onClick={onPutAway}>
              Hide the address
            </Button>
          </div>
        )}
      </Field>
      <p role="status" className="mt-1 min-h-5 text-small text-ink-2">
        {copied === "yes" && "Copied."}
        {copied === "by-hand" &&
          "The browser does not let the page copy; the address is selected, copy it with your keyboard."}
      </p>
    </div>
  );
}
