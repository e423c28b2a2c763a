/** Where the ruler stands, held free from the first paint on; the ruler itself comes with the notebook's blocks. */
import { lazy, Suspense, useLayoutEffect, useRef } from "react";
import "./ruler.css";

const OrderRuler = lazy(async () => ({ default: (await import("./order-ruler.tsx")).OrderRuler }));

export function RulerPlace() {
  const place = useRef<HTMLElement>(null);
  useHeightForOthers(place);
  return (
    <section ref={place} className="order-ruler" aria-label="Order ruler">
      <Suspense fallback={null}>
        <OrderRuler />
      </Suspense>
    </section>
  );
}

/** What sticks to the top of the window below the ruler reads how tall it is from `--bar-top`. */
function useHeightForOthers(place: { readonly current: HTMLElement | null }): void {
  useLayoutEffect(() => {
    const element = place.current;
    const root = document.documentElement;
    if (!element || typeof ResizeObserver === "undefined") return;
    const tell = () => {
      const isFixed = getComputedStyle(element).position === "sticky";
      root.style.setProperty("--bar-top", isFixed ? `${element.offsetHeight}px` : "0px");
    };
    tell();
    const watch = new ResizeObserver(tell);
    watch.observe(element);
    window.addEventListener("resize", tell);
    return () => {
      watch.disconnect();
      window.removeEventListener("resize", tell);
      root.style.removeProperty("--bar-top");
    };
  }, [place]);
}
