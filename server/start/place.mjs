/** Where the project and its data are. */
import { createHash } from "node:crypto";
import { dirname, join, resolve } from "node:path";
import { fileURLToPath } from "node:url";

export const root = resolve(dirname(fileURLToPath(import.meta.url)), "../..");
export const dataFolder = join(root, ".data");

/** Used when the database's user cannot pass a parent folder of the checkout. */
export function fallbackFolder() {
  return `/var/tmp/subleading-${createHash("sha256").update(root).digest("hex").slice(0, 12)}`;
}
