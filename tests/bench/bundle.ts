/**
 * node --import tsx tests/bench/bundle.ts
 *
 * What a browser fetches, by route and by need, in kB (1000 bytes) of gzip -9, beside the design's aims. Needs the built
 * page. tests/client/budgets.test.ts holds the same figures to their limits.
 */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { gzipSync } from "node:zlib";
import { closureOf, filesNamed, loadsOf, type Manifest } from "../client/build-manifest.ts";
import { columns } from "./figures.ts";

const built = join(import.meta.dirname, "../../dist/client");
const manifest = JSON.parse(readFileSync(join(built, ".vite/manifest.json"), "utf8")) as Manifest; // Vite's shape

function kilobytes(files: Iterable<string>): number {
  let bytes = 0;
  for (const file of files) bytes += gzipSync(readFileSync(join(built, file)), { level: 9 }).length;
  return bytes / 1000;
}

const entry = "index.html";
const page = (name: string) => `pages/${name}/${name}-page.tsx`;
const editors = (name: string) =>
  manifest[name]?.dynamicImports?.filter((key) => /notebook-editor|referee-notebook/.test(key)) ?? [];
const route = (name: string) => [entry, page(name), ...editors(page(name))];
const shelf = closureOf(manifest, route("shelf"));
const notebook = closureOf(manifest, route("notebook"));
const blocks = closureOf(manifest, ["blocks/frame.tsx"]);

function beyond(keys: readonly string[], ...already: readonly ReadonlySet<string>[]): number {
  const files = [...closureOf(manifest, keys)];
  return kilobytes(files.filter((file) => already.every((known) => !known.has(file))));
}

const plots = Object.keys(manifest).filter((key) => /^blocks\/.*-plot\.tsx$/.test(key));
const panels = [
  "editor/mathematics/formula-editor.tsx",
  "editor/placing/placement-panel.tsx",
  "editor/writing/link-panel.tsx",
];
const workers = filesNamed(join(built, "assets"), /worker.*\.js$/).map((file) => join("assets", file));

const figures: readonly (readonly [what: string, measured: number, aim: number | null])[] = [
  ["start page, signed out", kilobytes(closureOf(manifest, route("home"))), 110],
  ["shelf", kilobytes(shelf), 110],
  ["notebook, beyond the shelf", beyond(route("notebook"), shelf), 230],
  ["  its blocks, where it has any", beyond(["blocks/frame.tsx"], notebook), 40],
  ["  their plots, when one is drawn", beyond(plots, notebook, blocks), 25],
  ["  panels of writing, once the page is quiet", beyond(panels, notebook), 45],
  ["sharing, beyond the shelf", beyond(route("sharing"), shelf), null],
  ["a referee's page, whole", kilobytes(closureOf(manifest, route("referee"))), null],
  ["mathematics, with its style sheet", kilobytes(loadsOf(manifest, /katex/)), 86],
  ["the evaluating worker with every kind", kilobytes(workers), 200],
];

console.log("JavaScript fetched, gzip -9\n");
columns([
  ["what", "kB", "aim", "ratio"],
  ...figures.map(([what, measured, aim]) => [
    what,
    measured.toFixed(1),
    aim === null ? "" : String(aim),
    aim === null ? "" : (measured / aim).toFixed(2),
  ]),
]);
