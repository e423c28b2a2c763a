import type { ReactNode } from "react";
import { useMe } from "../api/me.ts";
import { sentenceOf } from "../api/problem.ts";
import { Loading } from "../ui/loading.tsx";
import { SignInPage } from "../pages/sign-in/sign-in-page.tsx";

/** Shows the page to a person, the way to sign in to anybody else. A session that lapses later leaves the page be. */
export function SignedInOnly({ page }: { readonly page: ReactNode }) {
  const me = useMe();
  if (me.isPending) {
    return (
      <main id="main" tabIndex={-1} className="px-4">
        <Loading what="Opening the page" />
      </main>
    );
  }
  if (!me.data) return <SignInPage problem={sentenceOf(me.error)} />;
  return me.data.person ? page : <SignInPage />;
}
