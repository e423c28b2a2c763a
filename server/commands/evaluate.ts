/**
 * npm run -s evaluate -- FILE
 * npm run -s evaluate -- -          (reads standard input)
 *
 * Blocks as JSON in, results as JSON out on standard output; what is wrong goes to standard error.
 * Ends with 0 when every block has a value and no problem, 1 when a block is in error, 2 when the file cannot be read.
 */
import { readFile } from "node:fs/promises";
import { pathToFileURL } from "node:url";
import { text as readAll } from "node:stream/consumers";
import type { ResultsFile } from "#contract/evaluate-file.ts";
import { evaluateFile } from "../compute/evaluate-file.ts";
import { locateJsonError } from "#contract/locate-json-error.ts";

export interface Streams {
  readonly stdin: NodeJS.ReadableStream;
  readonly out: (text: string) => void;
  readonly error: (text: string) => void;
}

const usage = "Say which file: npm run -s evaluate -- FILE, or - to read standard input.";

/** Returns the exit code. */
export async function runEvaluate(
  names: readonly string[],
  { stdin, out, error }: Streams,
): Promise<0 | 1 | 2> {
  const [name, ...others] = names;
  if (name === undefined || others.length > 0) {
    error(`${usage}\n`);
    return 2;
  }
  const shownName = name === "-" ? "standard input" : name;
  let source: string;
  try {
    source = (name === "-" ? await readAll(stdin) : await readFile(name, "utf8")).replace(/^\uFEFF/, "");
  } catch (failure) {
    error(`${shownName}: ${readingFailure(failure)}\n`);
    return 2;
  }
  const wrongPlace = locateJsonError(source);
  if (wrongPlace) {
    const what = source.trim() === "" ? "is empty" : "is not JSON from here on";
    error(`${shownName}, line ${wrongPlace.line}, column ${wrongPlace.column}: ${what}\n`);
    return 2;
  }
  const outcome = evaluateFile(JSON.parse(source), (failure, block) => {
    error(`${shownName}: a mistake of ours while computing block “${block.id}”: ${String(failure)}\n`);
  });
  if (!outcome.ok) {
    for (const { place, message } of outcome.complaints) error(`${shownName}: ${place} ${message}\n`);
    return 2;
  }
  out(`${JSON.stringify(outcome.results, null, 2)}\n`);
  return reportProblems(outcome.results, (line) => error(`${shownName}: ${line}\n`)) ? 1 : 0;
}

/** Says every problem with its block; true when there is one, or a block without a value. */
function reportProblems({ results }: ResultsFile, say: (line: string) => void): boolean {
  let isWrong = false;
  for (const { id, evaluation, messages } of results) {
    for (const message of messages) say(`block “${id}”: ${message}`);
    if (evaluation.value === null && messages.length === 0) say(`block “${id}” has no value`);
    isWrong ||= evaluation.value === null || messages.length > 0;
  }
  return isWrong;
}

function readingFailure(failure: unknown): string {
  const code = failure instanceof Error && "code" in failure ? failure.code : null;
  if (code === "ENOENT") return "there is no such file";
  if (code === "EACCES") return "may not be read";
  if (code === "EISDIR") return "is a folder";
  return failure instanceof Error ? failure.message : String(failure);
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) {
  const code = await runEvaluate(process.argv.slice(2), {
    stdin: process.stdin,
    out: (text) => process.stdout.write(text),
    error: (text) => process.stderr.write(text),
  });
  process.exitCode = code;
}
