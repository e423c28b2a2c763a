import { useLocation, useMatch } from "react-router-dom";
import { signInAddress, useMe, useSessionLapsed } from "../api/me.ts";
import { linkClasses } from "./text-link.tsx";

/** The session ended while the page was open. The page stays; this says so and leads back to the same place. */
export function SessionBanner() {
  const lapsed = useSessionLapsed();
  const person = useMe().data?.person;
  const place = useLocation();
  // Only the editor keeps a copy on this device.
  const inEditor = useMatch("/notebooks/:id") !== null;
  return (
    <div role="status">
      {lapsed && person && (
        <p className="border-b border-line bg-field px-4 py-3 text-body sm:px-8">
          <span className="border-l-2 border-hairline pl-3">
            You are signed out.{" "}
            {inEditor ? "What you typed is kept here." : "This page shows what it last read."}{" "}
            <a className={linkClasses} href={signInAddress(place.pathname + place.search + place.hash)}>
              Sign in again
            </a>
          </span>
        </p>
      )}
    </div>
  );
}
