import { execFileSync, spawnSync } from "node:child_process";
import { mkdirSync, mkdtempSync, readFileSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { createRequire } from "node:module";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

const ROOT = fileURLToPath(new URL("../..", import.meta.url));

interface Manifest {
  readonly version: string;
  readonly exports: Readonly<Record<string, { readonly types: string; readonly default: string }>>;
  readonly dependencies: Readonly<Record<string, string>>;
}

export const MANIFEST: Manifest = JSON.parse(readFileSync(join(ROOT, "package.json"), "utf8"));

/** A folder outside the repository in which the packed package is installed as a user would have it. */
export interface Packed {
  readonly folder: string;
  /** Where the package itself lies. */
  readonly home: string;
  /** Paths of the files in the package, with slashes. */
  readonly files: readonly string[];
  remove(): void;
}

/** Packs what `npm publish` would send and unpacks it; its dependencies are linked from here, so no network is used. */
export function installPacked(): Packed {
  const folder = mkdtempSync(join(tmpdir(), "sitefold-packed-"));
  const npm = ["pack", "--json", "--ignore-scripts", "--pack-destination", folder];
  const [{ filename, files }] = packs(
    execFileSync("npm", npm, { cwd: ROOT, encoding: "utf8", shell: process.platform === "win32" }),
  );
  const home = join(folder, "node_modules", "sitefold");
  mkdirSync(home, { recursive: true });
  execFileSync("tar", ["-xzf", join(folder, filename), "-C", home, "--strip-components=1"]);
  for (const name of Object.keys(MANIFEST.dependencies)) {
    symlinkSync(join(ROOT, "node_modules", name), join(folder, "node_modules", name), "junction");
  }
  writeFileSync(join(folder, "package.json"), JSON.stringify({ type: "module" }));
  return {
    folder,
    home,
    files: files.map((f) => f.path),
    remove: () => rmSync(folder, { recursive: true, force: true }),
  };
}

interface PackReport {
  readonly filename: string;
  readonly files: readonly { readonly path: string }[];
}

/** npm prints a list of packages, newer versions an object of them by name. */
function packs(text: string): [PackReport] {
  return Object.values(JSON.parse(text)) as [PackReport];
}

/** Compiles the files of a folder with the options given; what the compiler printed, and its status. */
export function compile(folder: string, options: Readonly<Record<string, unknown>>, files: readonly string[]) {
  const config = join(folder, "tsconfig.json");
  const compilerOptions = { strict: true, skipLibCheck: false, types: [], target: "es2022", outDir: "out", ...options };
  writeFileSync(config, JSON.stringify({ compilerOptions, files }));
  const compiler = createRequire(import.meta.url).resolve("typescript/package.json");
  const run = spawnSync(process.execPath, [join(dirname(compiler), "bin", "tsc"), "-p", config], { encoding: "utf8" });
  return { status: run.status, output: run.stdout + run.stderr };
}
