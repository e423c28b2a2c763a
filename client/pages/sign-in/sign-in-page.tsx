import { useLocation } from "react-router-dom";
import { signInAddress, useMe } from "../../api/me.ts";
import { buttonClasses } from "../../ui/button.tsx";
import { DemonstrationNote } from "../../ui/demonstration-note.tsx";
import { PageFrame } from "../../ui/page-frame.tsx";

/** Stands in for a page that needs a person, at that page's own address, and comes back to it. */
export function SignInPage({ problem }: { readonly problem?: string }) {
  const place = useLocation();
  const demonstration = useMe().data?.demonstration;
  return (
    <PageFrame title="Sign in" width="measure">
      <h1 className="font-prose text-title leading-tight">Sign in to open this page</h1>
      {problem ? (
        <p role="alert" className="mt-6 border-l-2 border-hairline pl-3">
          {problem}
        </p>
      ) : (
        <p className="mt-4 max-w-(--measure) text-lead">
          Notebooks belong to the people who write them. Sign in with your GitHub account; you come back here.
        </p>
      )}
      <p className="mt-6">
        <a className={buttonClasses("main")} href={signInAddress(place.pathname + place.search)}>
          Sign in with GitHub
        </a>
      </p>
      {demonstration && <DemonstrationNote mailboxUrl={demonstration.mailboxUrl} className="mt-8" />}
    </PageFrame>
  );
}
