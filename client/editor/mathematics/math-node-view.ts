/** How a formula stands in the document: drawn, focusable by the arrow keys, opened by click or Enter. */
import type { NodeViewRenderer } from "@tiptap/core";
import type { Node } from "@tiptap/pm/model";
import { drawMath } from "../../ui/math.tsx";
import { reachableWhenWide, scrollsWideEquation } from "./reachable-when-wide.ts";
import type { DrawnFormula, MathEditing } from "./math-editing.ts";

/** Sent to a formula's element to open it; `detail` is "new" for one typed just now. */
export const OPEN_FORMULA = "subleading:open-formula";

export function mathNodeView(editing: MathEditing): NodeViewRenderer {
  return ({ node, getPos, editor }) => {
    const display = node.type.name === "displayMath";
    const element: HTMLElement = document.createElement(display ? "div" : "span");
    element.className = display ? "formula formula-displayed" : "formula";
    const drawing = element.appendChild(document.createElement("span"));
    drawing.className = display ? "math math-display" : "math";
    let shown = node;
    let gone = false;
    draw(drawing, shown, display);

    const formula: DrawnFormula = {
      element,
      display,
      position: () => (gone ? null : (getPos() ?? null)),
      latex: () => String(shown.attrs["latex"]),
      label: () => String(shown.attrs["label"] ?? ""),
    };
    editing.appeared(formula);
    const endWatching = display ? reachableWhenWide(element) : () => undefined;
    const onClick = (event: MouseEvent) => {
      if (!editor.isEditable || event.shiftKey) return;
      event.preventDefault();
      editing.open(formula, false);
    };
    const onOpen = (event: Event) => {
      if (editor.isEditable) editing.open(formula, event instanceof CustomEvent && event.detail === "new");
    };
    element.addEventListener("click", onClick);
    element.addEventListener(OPEN_FORMULA, onOpen);

    return {
      dom: element,
      update(next: Node) {
        if (next.type !== shown.type) return false;
        const changed = next.attrs["latex"] !== shown.attrs["latex"];
        shown = next;
        if (changed) draw(drawing, shown, display);
        return true;
      },
      ignoreMutation: () => true,
      stopEvent: (event) => scrollsWideEquation(event, element),
      selectNode() {
        element.classList.add("is-selected");
      },
      deselectNode() {
        element.classList.remove("is-selected");
      },
      destroy() {
        gone = true;
        endWatching();
        element.removeEventListener("click", onClick);
        element.removeEventListener(OPEN_FORMULA, onOpen);
        editing.vanished(formula);
      },
    };
  };
}

function draw(drawing: HTMLElement, node: Node, display: boolean): void {
  const latex = String(node.attrs["latex"]);
  if (latex.trim() === "") {
    drawing.textContent = display ? "empty equation" : "empty formula";
    drawing.dataset["latex"] = "";
    drawing.classList.add("math-empty");
    return;
  }
  drawing.classList.remove("math-empty");
  drawMath(drawing, latex, display);
}
