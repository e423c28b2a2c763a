/**
 * What a reader's browser must fetch, measured on the built client (`vite build` comes first: a missing build fails
 * here). Limits in kB (1000 bytes) of gzip -9, as a server would send it; the design's own figures.
 */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { gzipSync } from "node:zlib";
import { describe, expect, it } from "vitest";
import { closureOf, filesNamed, loadsOf, type Manifest } from "./build-manifest.ts";

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
const notebook = "pages/notebook/notebook-page.tsx";

describe("what the browser fetches", () => {
  it("opens the shelf with at most 110 kB of JavaScript", () => {
    expect(kilobytes(closureOf(readManifest(), [entry, shelf]))).toBeLessThanOrEqual(110);
  });

  it("opens the sign-in with at most 110 kB of JavaScript", () => {
    expect(kilobytes(closureOf(readManifest(), [entry, "pages/home/home-page.tsx"]))).toBeLessThanOrEqual(
      110,
    );
  });

  it("opens a notebook with at most 230 kB more", () => {
    const manifest = readManifest();
    const already = closureOf(manifest, [entry, shelf]);
    // The page asks for the editor as soon as it is there itself; that is part of opening a notebook.
    const editor = manifest[notebook]?.dynamicImports?.filter((key) => key.includes("notebook-editor")) ?? [];
    expect(editor).toHaveLength(1);
    const more = [...closureOf(manifest, [notebook, ...editor])].filter((file) => !already.has(file));
    expect(kilobytes(more)).toBeLessThanOrEqual(230);
  });

  it("draws mathematics with at most 86 kB of KaTeX, its style sheet included", () => {
    const manifest = readManifest();
    const loads = loadsOf(manifest, /katex/);
    expect(loads.size).toBeGreaterThan(0);
    expect(kilobytes(loads)).toBeLessThanOrEqual(86);
  });

  it("computes in a worker of at most 100 kB", () => {
    const workers = filesNamed(join(built, "assets"), /worker.*\.js$/);
    expect(workers.length).toBeGreaterThan(0);
    expect(kilobytes(workers.map((file) => join("assets", file)))).toBeLessThanOrEqual(100);
  });
});
