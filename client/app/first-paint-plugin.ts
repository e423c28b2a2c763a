/** What a page needs before its first paint: the theme, and the faces its first words are set in. */
import { readFileSync } from "node:fs";
import type { HtmlTagDescriptor, Plugin } from "vite";

const facesOfTheFirstScreen = [
  /\/commissioner-latin-[\w-]{8}\.woff2$/,
  /\/stix-two-text-latin-[\w-]{8}\.woff2$/,
];

/** Puts first-paint.js as a blocking script into the head (a module would run too late) and preloads two faces. */
export function firstPaint(): Plugin {
  const source = new URL("./first-paint.js", import.meta.url);
  let building = false;
  return {
    name: "subleading:first-paint",
    configResolved(config) {
      building = config.command === "build";
    },
    buildStart() {
      if (building)
        this.emitFile({ type: "asset", name: "first-paint.js", source: readFileSync(source, "utf8") });
    },
    transformIndexHtml: {
      order: "post",
      handler(_html, context): HtmlTagDescriptor[] {
        const files = Object.keys(context.bundle ?? {});
        const script = building
          ? files.find((file) => /\/first-paint-[\w-]+\.js$/.test(file))
          : "app/first-paint.js";
        if (!script) throw new Error("first-paint.js was not emitted");
        const faces = files.filter((file) => facesOfTheFirstScreen.some((face) => face.test(file)));
        return [
          { tag: "script", attrs: { src: `/${script}` }, injectTo: "head-prepend" },
          ...faces.map((file): HtmlTagDescriptor => ({
            tag: "link",
            attrs: { rel: "preload", as: "font", type: "font/woff2", crossorigin: "", href: `/${file}` },
            injectTo: "head",
          })),
        ];
      },
    },
  };
}
