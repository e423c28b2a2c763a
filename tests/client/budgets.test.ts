/**
 * What a reader's browser must fetch, measured on the built client (`vite build` comes first: a missing build fails
 * here). Limits in kB (1000 bytes) of gzip -9, as a server would send it; the design's own figures.
 */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { gzipSync } from "node:zlib";
import { describe, expect, it } from "vitest";
import { kindNames } from "#engine/kind.ts";
import { closureOf, filesNamed, loadsOf, startOf, type Manifest } from "./build-manifest.ts";

const built = join(import.meta.dirname, "../../dist/client");

function readManifest(): Manifest {
  return JSON.parse(readFileSync(join(built, ".vite/manifest.json"), "utf8")) as Manifest; // Vite writes this shape.
}
function kilobytes(files: Iterable<string>): number {
  let bytes = 0;
  for (const file of files) bytes += gzipSync(readFileSync(join(built, file)), { level: 9 }).length;
  return bytes / 1000;
}

const entry = "index.html";
const shelf = "pages/shelf/shelf-page.tsx";
const notebookPage = "pages/notebook/notebook-page.tsx";
const blocks = "blocks/frame.tsx";

const shelfFiles = (manifest: Manifest) => closureOf(manifest, [entry, shelf]);
const beyond = (files: ReadonlySet<string>, already: ReadonlySet<string>) =>
  [...files].filter((file) => !already.has(file));

/** The notebook's page and its editor, which the page asks for as soon as it is there itself. */
function editorOf(manifest: Manifest): readonly string[] {
  const editor =
    manifest[notebookPage]?.dynamicImports?.filter((key) => key.includes("notebook-editor")) ?? [];
  expect(editor).toHaveLength(1);
  return [entry, notebookPage, ...editor];
}

describe("what the browser fetches", () => {
  it("opens the shelf with at most 110 kB of JavaScript", () => {
    expect(kilobytes(shelfFiles(readManifest()))).toBeLessThanOrEqual(110);
  });

  it("opens the sign-in with at most 110 kB of JavaScript", () => {
    expect(kilobytes(closureOf(readManifest(), [entry, "pages/home/home-page.tsx"]))).toBeLessThanOrEqual(
      110,
    );
  });

  it("opens a notebook with at most 230 kB more", () => {
    const manifest = readManifest();
    expect(
      kilobytes(beyond(closureOf(manifest, editorOf(manifest)), shelfFiles(manifest))),
    ).toBeLessThanOrEqual(230);
  });

  // What a notebook with blocks fetches beside its prose, which is on the page by then: forms, results, words of their
  // problems. Their plots come when the first one is drawn.
  it("draws blocks with at most 40 kB on top of that, where a notebook has any", () => {
    const manifest = readManifest();
    const notebook = closureOf(manifest, editorOf(manifest));
    expect([...notebook].filter((file) => file.includes("frame"))).toEqual([]);
    expect(kilobytes(beyond(closureOf(manifest, [blocks]), notebook))).toBeLessThanOrEqual(40);
    const plots = Object.keys(manifest).filter((key) => /^blocks\/.*-plot\.tsx$/.test(key));
    expect(plots.length).toBeGreaterThan(0);
    const drawn = new Set([...notebook, ...closureOf(manifest, [blocks])]);
    expect(kilobytes(beyond(closureOf(manifest, plots), drawn))).toBeLessThanOrEqual(25);
  });

  // Fetched once the page is quiet, or sooner when one of them is opened.
  it("brings the panels of writing with at most 45 kB: formulas, links, the index of what can be placed", () => {
    const manifest = readManifest();
    const panels = [
      "editor/mathematics/formula-editor.tsx",
      "editor/placing/placement-panel.tsx",
      "editor/writing/link-panel.tsx",
    ];
    const notebook = closureOf(manifest, editorOf(manifest));
    expect(kilobytes(beyond(closureOf(manifest, panels), notebook))).toBeLessThanOrEqual(45);
  });

  it("draws mathematics with at most 86 kB of KaTeX, its style sheet included", () => {
    const manifest = readManifest();
    const loads = loadsOf(manifest, /katex/);
    expect(loads.size).toBeGreaterThan(0);
    expect(kilobytes(loads)).toBeLessThanOrEqual(86);
  });

  // The code of a kind is fetched when a notebook first has a block of it; Premises are in nearly every one.
  it("computes in a worker of at most 100 kB, whichever kind a notebook has beside Premises", () => {
    const assets = join(built, "assets");
    const entry = filesNamed(assets, /^evaluation\.worker.*\.js$/);
    expect(entry).toHaveLength(1);
    const kinds = filesNamed(assets, /^worker-kind-.*\.js$/);
    expect(kinds).toHaveLength(kindNames.length);
    const premises = kinds.filter((file) => file.startsWith("worker-kind-premises"));
    expect(premises).toHaveLength(1);
    const bytesOf = (files: readonly string[]) =>
      kilobytes([...startOf(assets, [...entry, ...premises, ...files])].map((file) => join("assets", file)));
    expect(kinds.filter((file) => bytesOf([file]) > 100)).toEqual([]);
    expect(bytesOf(kinds)).toBeLessThanOrEqual(200);
  });
});
