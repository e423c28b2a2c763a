import { useEffect, useRef } from "react";
import { useLocation } from "react-router-dom";

/** After a change of page the focus and the reader's ear start at its top; the first page is left to the browser. */
export function FocusOnArrival() {
  const { pathname } = useLocation();
  const previous = useRef(pathname);
  useEffect(() => {
    if (previous.current === pathname) return;
    previous.current = pathname;
    window.scrollTo(0, 0);
    document.getElementById("main")?.focus({ preventScroll: true });
  }, [pathname]);
  return null;
}
