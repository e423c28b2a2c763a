/** Reads of a Vite build what a page fetches. */
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";

interface Chunk {
  readonly file: string;
  /** Keys of the chunks it cannot start without. */
  readonly imports?: readonly string[];
  readonly dynamicImports?: readonly string[];
  readonly css?: readonly string[];
}
export type Manifest = Readonly<Record<string, Chunk>>;

/** The JavaScript files of these modules and of everything they import at once; a missing module is an error. */
export function closureOf(manifest: Manifest, keys: readonly string[]): ReadonlySet<string> {
  const seen = new Set<string>();
  const files = new Set<string>();
  const visit = (key: string) => {
    if (seen.has(key)) return;
    seen.add(key);
    const chunk = manifest[key];
    if (!chunk) throw new Error(`the build has no ${key}`);
    if (chunk.file.endsWith(".js")) files.add(chunk.file);
    chunk.imports?.forEach(visit);
  };
  keys.forEach(visit);
  return files;
}

/** Scripts and style sheets whose module matches; fonts are fetched one by one as a page needs them. */
export function loadsOf(manifest: Manifest, module: RegExp): ReadonlySet<string> {
  const files = Object.entries(manifest).filter(([key]) => module.test(key));
  return new Set(files.map(([, chunk]) => chunk.file).filter((file) => /\.(js|css)$/.test(file)));
}

export function filesNamed(folder: string, name: RegExp): readonly string[] {
  return readdirSync(folder).filter((file) => name.test(file));
}

/** A worker's chunks are in no manifest: the files in a folder that some need to start, by what they import at once. */
export function startOf(folder: string, files: readonly string[]): ReadonlySet<string> {
  const seen = new Set<string>();
  const visit = (file: string) => {
    if (seen.has(file)) return;
    seen.add(file);
    const source = readFileSync(join(folder, file), "utf8");
    for (const [, next = ""] of source.matchAll(/(?:\bfrom|\bimport)\s*"\.\/([^"]+\.js)"/g)) visit(next);
  };
  files.forEach(visit);
  return seen;
}
