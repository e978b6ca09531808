/**
 * Makes a fresh clone ready with Node and npm alone: installs the packages when they are missing or differ from
 * package-lock.json, builds dist/ when it is missing or older than its sources. Silent when there is nothing to do.
 */
import { spawnSync } from "node:child_process";
import { readdirSync, readFileSync, statSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

const root = dirname(dirname(fileURLToPath(import.meta.url)));

try {
  requireNode();
  if (!installed()) {
    say("installing the packages (npm ci)");
    npmCi();
  }
  if (!built()) {
    say("building dist/");
    build();
  }
} catch (error) {
  say(error.message);
  process.exitCode = 1;
}

function say(text) {
  process.stderr.write(`sitefold: ${text}\n`);
}

function requireNode() {
  const [major, minor] = process.versions.node.split(".").map(Number);
  if (major < 20 || (major === 20 && minor < 19)) {
    throw new Error(`Node ${process.versions.node} is too old, version 20.19 or later is needed`);
  }
}

/** True when node_modules holds every package of the lock file in its version, those for other machines excepted. */
function installed() {
  const lock = join(root, "package-lock.json");
  const record = join(root, "node_modules", ".package-lock.json");
  if (newest(record) === 0) return false;
  if (newest(record) >= newest(lock)) return true;
  const have = JSON.parse(readFileSync(record, "utf8")).packages;
  const want = Object.entries(JSON.parse(readFileSync(lock, "utf8")).packages);
  return want.every(([path, { version, optional }]) => path === "" || optional || have[path]?.version === version);
}

function npmCi() {
  const args = ["ci", "--include=dev", "--no-audit", "--no-fund", "--loglevel=error"];
  const own = process.env.npm_execpath; // the npm that runs this script
  const options = { cwd: root, stdio: ["ignore", "ignore", "pipe"], encoding: "utf8" };
  const { status, stderr } = own?.endsWith("npm-cli.js")
    ? spawnSync(process.execPath, [own, ...args], options)
    : spawnSync("npm", args, { ...options, shell: process.platform === "win32" });
  if (status === 0) return;
  const code = /^npm error code (\S+)/m.exec(stderr ?? "")?.[1] ?? "npm did not run";
  throw new Error(`the packages could not be installed (${code}); npm ci, which needs the registry, tells more`);
}

/** True when dist/ is there and no source was saved since it was built. */
function built() {
  const sources = ["lib", "bin", "package.json", "tsconfig.json", "tsconfig.build.json"];
  const time = newest(join(root, "dist", "bin", "main.js"));
  return time > 0 && sources.every((name) => newest(join(root, name)) <= time);
}

function build() {
  const { status } = spawnSync(process.execPath, [join(root, "bin", "build.mjs")], { cwd: root, stdio: "inherit" });
  if (status !== 0) throw new Error("dist/ could not be built, see above");
}

/** Latest change of a file or of anything in a folder, the folder itself included; 0 if it does not exist. */
function newest(path) {
  const stat = statSync(path, { throwIfNoEntry: false });
  if (!stat) return 0;
  if (!stat.isDirectory()) return stat.mtimeMs;
  return readdirSync(path).reduce((latest, name) => Math.max(latest, newest(join(path, name))), stat.mtimeMs);
}
