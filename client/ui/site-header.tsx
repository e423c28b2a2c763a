import type { ReactNode } from "react";
import { Link } from "react-router-dom";
import { useMe, useSessionLapsed } from "../api/me.ts";
import { Mark } from "./mark.tsx";
import { SignOutButton } from "./sign-out-button.tsx";
import "./site-header.css";
import { ThemeSwitch } from "./theme-switch.tsx";

interface Props {
  readonly heading?: ReactNode;
  readonly instruments?: ReactNode;
}

/** The mark and the name, what the page adds, who is here, and the light. */
export function SiteHeader({ heading, instruments }: Props) {
  return (
    <header className="site-header">
      <Link to="/" className="site-name engraved">
        <Mark />
        Subleading
      </Link>
      {heading && <div className="site-heading">{heading}</div>}
      {instruments && <div className="site-instruments">{instruments}</div>}
      <div className="site-person">
        <Person />
        <ThemeSwitch />
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
      <span className="site-person-name">{person.name}</span>
      {!lapsed && <SignOutButton />}
    </>
  );
}
