import { lazy, Suspense, useRef, useState, type ReactNode } from "react";
import { buttonClasses } from "./button.tsx";
import { classes } from "./classes.ts";

const loadPanel = () => import("./menu-panel.tsx");
const MenuPanel = lazy(async () => ({ default: (await loadPanel()).MenuPanel }));

export interface MenuItem {
  readonly name: string;
  readonly tone?: "danger";
  readonly onSelect: () => void;
}

interface Props {
  /** What is read aloud: "Actions for “Lantern amplitude”". */
  readonly label: string;
  readonly children: ReactNode;
  readonly items: readonly MenuItem[];
  readonly className?: string;
}

/** A button that opens a short list of things to do. The list's code is fetched when a hand or the focus comes near. */
export function Menu({ label, children, items, className }: Props) {
  const [open, setOpen] = useState(false);
  const button = useRef<HTMLButtonElement>(null);
  const prepare = () => void loadPanel();
  return (
    <span className="relative inline-flex">
      <button
        ref={button}
        type="button"
        aria-label={label}
        aria-haspopup="menu"
        aria-expanded={open}
        className={classes(buttonClasses("quiet"), className)}
        onPointerEnter={prepare}
        onFocus={prepare}
        onClick={() => {
          setOpen(!open);
        }}
        onKeyDown={(event) => {
          if (event.key !== "ArrowDown") return;
          event.preventDefault();
          setOpen(true);
        }}
      >
        {children}
      </button>
      {open && (
        <Suspense fallback={null}>
          <MenuPanel
            label={label}
            items={items}
            button={button}
            onClose={() => {
              setOpen(false);
            }}
          />
        </Suspense>
      )}
    </span>
  );
}
