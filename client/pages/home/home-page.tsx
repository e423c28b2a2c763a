import { useSearchParams } from "react-router-dom";
import { signInAddress, useMe } from "../../api/me.ts";
import { sentenceOf } from "../../api/problem.ts";
import { buttonClasses } from "../../ui/button.tsx";
import { DemonstrationNote } from "../../ui/demonstration-note.tsx";
import { PageFrame } from "../../ui/page-frame.tsx";
import { Refusal } from "../../ui/refusal.tsx";
import { Excerpt } from "./excerpt.tsx";
import { Scale } from "./scale.tsx";

/** The server comes back here when signing in did not end well. */
const failures: ReadonlyMap<string, string> = new Map([
  ["refused", "You did not allow the sign-in, so you are not signed in. Nothing was read from your account."],
  [
    "failed",
    "Signing in did not work this time. Try again; if it keeps failing, tell whoever looks after this server.",
  ],
]);

/** What this is, for someone who has never seen it. */
export function HomePage() {
  const me = useMe();
  const [parameters] = useSearchParams();
  const failure = failures.get(parameters.get("sign-in") ?? "");
  const place = parameters.get("next") ?? "/shelf";
  return (
    <PageFrame title="" width="window">
      <Scale />
      <div className="mx-auto max-w-(--page) px-4 pt-12 pb-24 sm:px-8">
        <div className="grid gap-x-16 lg:grid-cols-[minmax(0,40rem)_minmax(0,1fr)]">
          <div>
            <h1 className="font-prose text-title leading-tight">
              Write the power counting together; keep its error honest
            </h1>
            <div className="mt-6 space-y-4 font-prose text-prose leading-prose">
              <p>
                Subleading is a notebook for people who work with effective theories. Two or three of you
                write one argument: prose, equations, and blocks that compute what the counting implies.
              </p>
              <p>
                You state the premises once: dimension, fields, symmetries, scales, terms. From them the
                notebook works out which terms are relevant, which graphs diverge and what they demand, where
                to stop for the accuracy you need, and how large the part left out may be. The working stands
                open under every result.
              </p>
              <p>
                A number in a sentence is pinned to the block it came from. When a premise changes, every pin
                that no longer agrees says so, with both values, before a referee does.
              </p>
            </div>
          </div>
          <div className="lg:border-l lg:border-line lg:pl-8">
            <Refusal sentence={failure ?? (me.isError ? sentenceOf(me.error) : null)} />
            <p className="mt-8 flex flex-wrap items-center gap-4 lg:mt-2">
              <a className={buttonClasses("main")} href={signInAddress(place)}>
                Sign in with GitHub
              </a>
              <span className="text-small text-ink-2">
                Your name, account name and e-mail address are read, nothing else.
              </span>
            </p>
            {me.data?.demonstration && (
              <DemonstrationNote mailboxUrl={me.data.demonstration.mailboxUrl} className="mt-8" />
            )}
          </div>
        </div>
        <Excerpt />
      </div>
    </PageFrame>
  );
}
