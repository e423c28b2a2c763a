/** Keeps React from noting the selection in the prose, which is ProseMirror's alone. */
import { Extension, type AnyExtension } from "@tiptap/core";
import { Plugin } from "@tiptap/pm/state";

/**
 * Before each change of the page React notes where the selection stands in the element that has the focus, by walking
 * through all that is inside: in a notebook with a hundred blocks 30 ms for every word said about saving. It looks for
 * the focus by this property, not by the attribute that browsers and ProseMirror go by.
 */
export const OwnSelection: AnyExtension = Extension.create({
  name: "ownSelection",
  addProseMirrorPlugins: () => [
    new Plugin({
      view({ dom }) {
        Object.defineProperty(dom, "contentEditable", {
          configurable: true,
          get: () => {
            const stated = dom.getAttribute("contenteditable");
            return stated === null || stated === "true" ? "inherit" : stated;
          },
          set(stated: string) {
            dom.setAttribute("contenteditable", stated);
          },
        });
        return {
          destroy() {
            // The element's own property, from its prototype, comes back.
            Reflect.deleteProperty(dom, "contentEditable");
          },
        };
      },
    }),
  ],
});
