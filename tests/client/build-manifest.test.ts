import { describe, expect, it } from "vitest";
import { closureOf, loadsOf, type Manifest } from "./build-manifest.ts";

const manifest: Manifest = {
  "index.html": { file: "a.js", imports: ["_shared.js"], dynamicImports: ["page.tsx"] },
  "_shared.js": { file: "s.js", imports: ["index.html"] },
  "page.tsx": { file: "p.js", imports: ["_shared.js"], css: ["p.css"] },
  "node_modules/katex/dist/katex.mjs": { file: "k.js" },
  "node_modules/katex/dist/katex.min.css": { file: "k.css" },
  "node_modules/katex/dist/fonts/Main.woff2": { file: "m.woff2" },
};

describe("what a page fetches", () => {
  it("follows imports once, also around a circle, and leaves lazy modules out", () => {
    expect([...closureOf(manifest, ["index.html"])]).toEqual(["a.js", "s.js"]);
  });
  it("adds a lazy module only when asked for it", () => {
    expect([...closureOf(manifest, ["index.html", "page.tsx"])]).toEqual(["a.js", "s.js", "p.js"]);
  });
  it("does not pass over a module that the build lacks", () => {
    expect(() => closureOf(manifest, ["gone.tsx"])).toThrow("the build has no gone.tsx");
  });
  it("counts scripts and style sheets of a library, not its fonts", () => {
    expect([...loadsOf(manifest, /katex/)]).toEqual(["k.js", "k.css"]);
  });
});
