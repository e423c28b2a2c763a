/** Sections as engraved marks on a narrow scale down the margin; titles unfold under the pointer or on focus. */
import type { Editor } from "@tiptap/core";
import { useEditorState } from "@tiptap/react";
import { useEffect, useState } from "react";
import { classes } from "../ui/classes.ts";
import { numberingOf, type Section } from "./numbering.ts";

export function SectionScale({ editor }: { readonly editor: Editor }) {
  const sections = useEditorState({
    editor,
    selector: ({ editor: now }) => numberingOf(now.state).sections,
    equalityFn: (a, b) => JSON.stringify(a) === JSON.stringify(b),
  });
  const current = useCurrentSection(editor, sections);
  if (sections.length === 0) return <div className="section-scale is-empty" />;
  return (
    <nav className="section-scale" aria-label="Sections">
      <ol>
        {sections.map((section, index) => (
          <li key={section.position}>
            <button
              type="button"
              className={classes("section-mark", `level-${String(section.level)}`)}
              aria-current={index === current ? "location" : undefined}
              onClick={() => {
                goTo(editor, section);
              }}
            >
              <span className="section-number">{section.number}</span>
              <span className="section-title">{section.text || "untitled section"}</span>
            </button>
          </li>
        ))}
      </ol>
    </nav>
  );
}

function goTo(editor: Editor, section: Section): void {
  const element = editor.view.nodeDOM(section.position);
  if (!(element instanceof HTMLElement)) return;
  element.scrollIntoView({ block: "start", behavior: "smooth" });
  // The caret follows, so that the keyboard goes on from there.
  if (editor.isEditable)
    editor
      .chain()
      .setTextSelection(section.position + 1)
      .focus(undefined, { scrollIntoView: false })
      .run();
}

/** The last section whose heading is above a third of the window. */
function useCurrentSection(editor: Editor, sections: readonly Section[]): number {
  const [current, setCurrent] = useState(0);
  useEffect(() => {
    let asked = 0;
    const look = () => {
      asked = 0;
      if (editor.isDestroyed) return;
      const line = window.innerHeight / 3;
      const tops = sections.map(({ position }) => {
        const element = editor.view.nodeDOM(position);
        return element instanceof HTMLElement ? element.getBoundingClientRect().top : Infinity;
      });
      setCurrent(
        Math.max(
          0,
          tops.findLastIndex((top) => top < line),
        ),
      );
    };
    const lookSoon = () => {
      if (asked === 0) asked = requestAnimationFrame(look);
    };
    lookSoon();
    window.addEventListener("scroll", lookSoon, { passive: true });
    window.addEventListener("resize", lookSoon);
    return () => {
      cancelAnimationFrame(asked);
      window.removeEventListener("scroll", lookSoon);
      window.removeEventListener("resize", lookSoon);
    };
  }, [editor, sections]);
  return current;
}
