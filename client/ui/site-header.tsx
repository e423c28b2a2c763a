import type { ReactNode } from "react";
import { Link } from "react-router-dom";
import { useMe, useSessionLapsed } from "../api/me.ts";
import { Mark } from "./mark.tsx";
import { SignOutButton } from "./sign-out-button.tsx";
import { ThemeSwitch } from "./theme-switch.tsx";

/** The mark and the name, what the page adds, who is here, and the light. */
export function SiteHeader({
  heading,
  instruments,
}: {
  readonly heading?: ReactNode;
  readonly instruments?: ReactNode;
}) {
  return (
    <header className="border-b border-line">
      <div className="flex min-h-12 flex-wrap items-center gap-x-5 gap-y-1 px-4 py-1.5 sm:px-8">
        <Link to="/" className="engraved flex min-h-9 items-center gap-3 text-lead font-semibold">
          <Mark />
          Subleading
        </Link>
        {heading}
        <div className="ml-auto flex flex-wrap items-center gap-x-5 gap-y-1 text-small">
          {instruments}
          <Person />
          <ThemeSwitch />
        </div>
      </div>
    </header>
  );
}

function Person() {
  const person = useMe().data?.person;
  const lapsed = useSessionLapsed();
  if (!person) return null;
  return (
    <>
      <span className="hidden text-ink-2 md:inline">{person.name}</span>
      {!lapsed && <SignOutButton />}
    </>
  );
}
