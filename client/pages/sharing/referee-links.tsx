import type { RefereeLinkCreated } from "#contract/api.ts";
import { useState } from "react";
import { sentenceOf } from "../../api/problem.ts";
import { useRefereeLinks } from "../../api/referee-links.ts";
import { Loading } from "../../ui/loading.tsx";
import { Refusal } from "../../ui/refusal.tsx";
import { NewAddress } from "./new-address.tsx";
import { RefereeLinkEntry } from "./referee-link-entry.tsx";
import { RefereeLinkForm } from "./referee-link-form.tsx";
import { Section } from "./section.tsx";

export function RefereeLinks({ notebookId }: { readonly notebookId: string }) {
  const links = useRefereeLinks(notebookId, true);
  const [made, setMade] = useState<RefereeLinkCreated | null>(null);
  return (
    <Section
      title="Referee links"
      note="An address that opens this notebook as it stands, read-only, without an account. Whoever has the address can read."
    >
      {links.isPending && <Loading what="Reading the links" />}
      <Refusal sentence={links.isError ? sentenceOf(links.error) : null} />
      {links.data && links.data.length === 0 && (
        <p className="mt-3 text-body text-ink-2">There is no referee link yet.</p>
      )}
      {links.data && links.data.length > 0 && (
        <ul className="mt-3">
          {links.data.map((link) => (
            <RefereeLinkEntry
              key={link.id}
              notebookId={notebookId}
              link={link}
              onRevoked={() => {
                if (made?.link.id === link.id) setMade(null);
              }}
            />
          ))}
        </ul>
      )}
      {made && (
        <NewAddress
          key={made.link.id}
          made={made}
          onPutAway={() => {
            setMade(null);
          }}
        />
      )}
      <RefereeLinkForm notebookId={notebookId} onMade={setMade} />
    </Section>
  );
}
