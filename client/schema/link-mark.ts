/** Links. Only the address is stored: target, rel and class of a link are ours to choose, not a writer's. */
import { InputRule, Mark, markPasteRule, type Editor } from "@tiptap/core";
import { Plugin } from "@tiptap/pm/state";
import { addressesIn } from "./addresses.ts";
import { isSafeLink } from "./safe-link.ts";

declare module "@tiptap/core" {
  interface Commands<ReturnType> {
    link: {
      /** Refused for an address that is not safe. */
      setLink: (attributes: { readonly href: string }) => ReturnType;
      unsetLink: () => ReturnType;
    };
  }
}

export const Link = Mark.create({
  name: "link",
  // Before marks that code and emphasis bring: their text is inside the link.
  priority: 1000,
  keepOnSplit: false,
  exitable: true,
  inclusive: true,
  addAttributes: () => ({ href: { default: null } }),
  parseHTML: () => [
    {
      tag: "a[href]",
      getAttrs: (element: HTMLElement) => (isSafeLink(element.getAttribute("href")) ? null : false),
    },
  ],
  // The document comes from colleagues: an address that is not safe is drawn as plain words.
  renderHTML({ HTMLAttributes: { href } }) {
    if (!isSafeLink(href)) return ["span", {}, 0];
    return ["a", { rel: "noopener noreferrer nofollow", target: "_blank", href: String(href) }, 0];
  },
  addCommands() {
    return {
      setLink:
        ({ href }) =>
        ({ commands }) =>
          isSafeLink(href) && commands.setMark(this.name, { href }),
      unsetLink:
        () =>
        ({ commands }) =>
          commands.unsetMark(this.name, { extendEmptyMarkRange: true }),
    };
  },
  addInputRules() {
    return [
      // An address becomes a link with the space after it, which stays outside.
      new InputRule({
        find: /(\S+)\s$/,
        handler({ state, range, match }) {
          const address = addressBefore(match[1] ?? "");
          const space = match[0].slice(-1);
          const type = state.schema.marks["link"];
          // The end of a paragraph is no space to insert; Enter is seen to below.
          if (!address || !type || space === "\n") return null;
          const from = range.from + address.index;
          if (!mayLink(state.doc, from, from + address.text.length)) return null;
          state.tr
            .addMark(from, from + address.text.length, type.create({ href: address.text }))
            .insertText(space, range.to)
            .removeMark(range.to, range.to + space.length, type)
            .removeStoredMark(type);
          return undefined;
        },
      }),
    ];
  },
  addKeyboardShortcuts() {
    const { editor } = this;
    const linkAndGoOn = () => {
      linkWordBeforeCaret(editor);
      return false;
    };
    return { Enter: linkAndGoOn, "Shift-Enter": linkAndGoOn };
  },
  addPasteRules() {
    return [
      markPasteRule({
        find: (text) => addressesIn(text).map((found) => ({ ...found, data: { href: found.text } })),
        type: this.type,
        getAttributes: ({ data }) => ({ href: String(data?.["href"]) }),
      }),
    ];
  },
  /** An address pasted over selected words becomes their link. */
  addProseMirrorPlugins() {
    const { editor, type } = this;
    return [
      new Plugin({
        props: {
          handlePaste(view, _event, slice) {
            const text = slice.content.textBetween(0, slice.content.size).trim();
            const { empty, $from, $to } = view.state.selection;
            const [address] = addressesIn(text);
            if (empty || !$from.sameParent($to) || address?.text !== text) return false;
            return editor.commands.setMark(type, { href: text });
          },
        },
      }),
    ];
  },
});

/** The address that a run of letters ends in, if it is one to its end but for the sentence's own marks. */
function addressBefore(word: string) {
  return addressesIn(word).at(-1);
}

function linkWordBeforeCaret(editor: Editor): void {
  const { doc, schema, selection, tr } = editor.state;
  const { $from, empty } = selection;
  if (!empty || !$from.parent.isTextblock) return;
  // U+FFFC stands for what is no text, so that offsets stay those of the document.
  const before = $from.parent.textBetween(0, $from.parentOffset, undefined, "\ufffc");
  const word = /[^\s\ufffc]+$/.exec(before)?.[0] ?? "";
  const address = addressBefore(word);
  const type = schema.marks["link"];
  if (!address || !type) return;
  const from = $from.pos - word.length + address.index;
  if (mayLink(doc, from, from + address.text.length))
    editor.view.dispatch(
      tr
        .addMark(from, from + address.text.length, type.create({ href: address.text }))
        .removeStoredMark(type),
    );
}

/** Not in code, and not where there is a link already. */
function mayLink(doc: Editor["state"]["doc"], from: number, to: number): boolean {
  const type = doc.type.schema.marks["link"];
  const parent = doc.resolve(from).parent;
  if (!type || !parent.type.allowsMarkType(type)) return false;
  let plain = true;
  doc.nodesBetween(from, to, (node) => {
    if (node.marks.some(({ type: { name } }) => name === "link" || name === "code")) plain = false;
  });
  return plain;
}
