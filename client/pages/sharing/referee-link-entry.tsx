import type { RefereeLink } from "#contract/api.ts";
import { useState } from "react";
import { sentenceOf } from "../../api/problem.ts";
import { useRevokeRefereeLink } from "../../api/referee-links.ts";
import { Button } from "../../ui/button.tsx";
import { ConfirmDialog } from "../../ui/confirm-dialog.tsx";
import { Moment } from "../../ui/moment.tsx";
import { say } from "../../ui/notices.ts";

interface Props {
  readonly notebookId: string;
  readonly link: RefereeLink;
  readonly onRevoked: () => void;
}

export function RefereeLinkEntry({ notebookId, link, onRevoked }: Props) {
  const [asking, setAsking] = useState(false);
  const revoke = useRevokeRefereeLink(notebookId);
  const state = stateOf(link, new Date());
  return (
    <li className="grid grid-cols-[1fr_auto] items-center gap-x-4 gap-y-1 border-b border-line py-3">
      <div className="min-w-0">
        <p className="font-medium wrap-anywhere">{link.name}</p>
        <p className="text-small text-ink-2">
          {state === "open" && !link.expiresAt && "open until revoked"}
          {state === "open" && link.expiresAt && (
            <>
              open until <Moment at={link.expiresAt} />
            </>
          )}
          {state === "expired" && link.expiresAt && (
            <>
              expired <Moment at={link.expiresAt} />
            </>
          )}
          {state === "revoked" && link.revokedAt && (
            <>
              revoked <Moment at={link.revokedAt} />
            </>
          )}
          {link.hideAuthors ? "; authors hidden" : "; authors shown"};{" "}
          {link.lastOpenedAt ? (
            <>
              last opened <Moment at={link.lastOpenedAt} />
            </>
          ) : (
            "never opened"
          )}
        </p>
      </div>
      {state === "open" && (
        <Button
          look="quiet"
          className="text-small"
          aria-label={`Revoke the link “${link.name}”`}
          onClick={() => {
            setAsking(true);
          }}
        >
          Revoke
        </Button>
      )}
      <ConfirmDialog
        open={asking}
        onClose={() => {
          setAsking(false);
        }}
        title={`Revoke “${link.name}”?`}
        action="Revoke the link"
        busy={revoke.isPending}
        problem={revoke.isError ? sentenceOf(revoke.error) : null}
        onConfirm={() => {
          revoke.mutate(link.id, {
            onSuccess: () => {
              say(`“${link.name}” no longer opens anything.`);
              setAsking(false);
              onRevoked();
            },
          });
        }}
      >
        <p>
          Pages that were opened with it close, and its address never works again. A new link is made in a
          moment.
        </p>
      </ConfirmDialog>
    </li>
  );
}

export function stateOf(
  link: Pick<RefereeLink, "expiresAt" | "revokedAt">,
  now: Date,
): "open" | "expired" | "revoked" {
  if (link.revokedAt) return "revoked";
  return link.expiresAt && new Date(link.expiresAt) <= now ? "expired" : "open";
}
