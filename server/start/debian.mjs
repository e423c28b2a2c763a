/** Debian packages: finding what they bring, installing them where that is allowed. */
import { spawnSync } from "node:child_process";
import { existsSync, readdirSync } from "node:fs";
import { Advice, say } from "./say.mjs";

function install(packages) {
  const isRoot = process.getuid?.() === 0;
  const command = `${isRoot ? "" : "sudo "}apt-get install -y --no-install-recommends ${packages.join(" ")}`;
  const mayInstall =
    existsSync("/usr/bin/apt-get") &&
    (isRoot || spawnSync("sudo", ["-n", "true"], { stdio: "ignore" }).status === 0);
  if (!mayInstall)
    throw new Advice(
      `${packages.join(", ")} is missing and may not be installed from here. Please run:\n\n  ${command}\n`,
    );
  say(`installing ${packages.join(", ")} from Debian's packages`);
  const apt = isRoot ? ["apt-get"] : ["sudo", "-n", "apt-get"];
  const run = (...args) => {
    const [program, ...before] = apt;
    const options = {
      stdio: ["ignore", "ignore", "inherit"],
      env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" },
    };
    return spawnSync(program, [...before, "-o", "DPkg::Lock::Timeout=540", ...args], options).status === 0;
  };
  // An old package list is tried first: it is often good enough and saves a minute.
  const done =
    run("install", "-y", "--no-install-recommends", ...packages) ||
    (run("update") && run("install", "-y", "--no-install-recommends", ...packages));
  if (!done)
    throw new Advice(
      `Installing ${packages.join(", ")} failed; the words of apt-get are above. By hand:\n\n  ${command}\n`,
    );
}

function newestPostgres() {
  const base = "/usr/lib/postgresql";
  if (!existsSync(base)) return null;
  const versions = readdirSync(base)
    .filter((version) => existsSync(`${base}/${version}/bin/initdb`))
    .sort((a, b) => Number(b) - Number(a));
  return versions.length ? `${base}/${versions[0]}/bin` : null;
}

/** The folder with initdb, pg_ctl and postgres. */
export function ensurePostgres() {
  const found = newestPostgres();
  if (found) return found;
  install(["postgresql"]);
  const installed = newestPostgres();
  if (!installed) throw new Advice("PostgreSQL was installed, but initdb is not under /usr/lib/postgresql.");
  return installed;
}

/** Path of Debian's Chromium, for the browser tests. */
export function ensureChromium() {
  const path = "/usr/bin/chromium";
  if (!existsSync(path)) install(["chromium", "fonts-dejavu-core"]);
  return path;
}
