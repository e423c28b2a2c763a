/** What the commands tell the person who started them. */
const started = Date.now();

export function say(text) {
  process.stdout.write(`[${((Date.now() - started) / 1000).toFixed(1).padStart(5)} s] ${text}\n`);
}

/** A mistake that the person can mend: shown without a stack. */
export class Advice extends Error {}

export function endWith(error) {
  process.stderr.write(`\n${error instanceof Advice ? error.message : (error?.stack ?? String(error))}\n`);
  process.exit(1);
}
