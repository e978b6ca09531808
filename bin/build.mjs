/**
 * Builds dist/: lib/ file by file with declarations (tsc; no Node types, so a Node API in lib/ stops the build), the
 * schema of the JSON answers, and the command line bundled into dist/bin, one bundle per command, so that a command loads
 * only what it needs.
 * Everything is built beside dist/ and moved into place at the end: a failed build leaves the old one whole.
 */
import { spawnSync } from "node:child_process";
import {
  chmodSync,
  existsSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  utimesSync,
  writeFileSync,
} from "node:fs";
import Module, { createRequire } from "node:module";
import { basename, dirname, join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";
import { Script } from "node:vm";
import { build } from "esbuild";

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const started = new Date();
const target = join(root, "dist");
const fresh = `${target}-${process.pid}`;
const old = `${fresh}-old`;

/** What is imported only when it is needed stays in a bundle of its own: the help, and what one command takes of another. */
const loadedApart = {
  name: "loaded-apart",
  setup({ onResolve }) {
    onResolve({ filter: /^\.\/[a-z-]+\.ts$/ }, ({ path, kind }) =>
      kind === "dynamic-import" ? { path: path.replace(/\.ts$/, ".js"), external: true } : null,
    );
  },
};

try {
  compileLibrary();
  await writeSchema();
  await bundleCommandLine();
  const commands = readdirSync(join(fresh, "bin", "commands"));
  for (const name of commands) await keepCompiledCode(name);
  for (const name of commands) asFunction(join(fresh, "bin", "commands", name));
  if (existsSync(target)) renameSync(target, old); // so that dist/ is missing for a moment only
  renameSync(fresh, target);
} catch (error) {
  process.stderr.write(`build failed: ${error instanceof Error ? error.message : String(error)}\n`);
  process.exitCode = 1;
} finally {
  for (const folder of [fresh, old]) rmSync(folder, { recursive: true, force: true });
}

function compileLibrary() {
  const require = createRequire(import.meta.url);
  const manifest = require.resolve("typescript/package.json");
  const tsc = join(dirname(manifest), require(manifest).bin.tsc);
  const flags = ["-p", join(root, "tsconfig.build.json"), "--outDir", join(fresh, "lib")];
  const { status } = spawnSync(process.execPath, [tsc, ...flags], {
    cwd: root,
    stdio: ["ignore", "inherit", "inherit"],
  });
  if (status !== 0) throw new Error("lib/ does not compile, see above");
  for (const file of readdirSync(join(fresh, "lib"), { recursive: true, encoding: "utf8" })) {
    if (file.endsWith(".d.ts")) nameEmittedFiles(join(fresh, "lib", file));
  }
}

/** The schema of all JSON answers, as a file that any validator reads. */
async function writeSchema() {
  const module = pathToFileURL(join(fresh, "lib", "report", "schema", "answers-schema.js"));
  const { answersSchema } = await import(module.href);
  writeFileSync(join(fresh, "schema.json"), `${JSON.stringify(answersSchema(), null, 2)}\n`);
}

/** tsc renames `./x.ts` to `./x.js` in code but not in declarations, where older compilers and tools stumble over it. */
function nameEmittedFiles(file) {
  const text = readFileSync(file, "utf8");
  writeFileSync(file, text.replace(/((?:from |import\()"\.[^"]*)\.ts"/g, '$1.js"'));
}

/**
 * main.js, which only dispatches, and one whole bundle per command: shared chunks would be loaded one by one, and carry
 * what other commands need. Code is repeated on disk so that a command loads two files and nothing that it does not use.
 */
async function bundleCommandLine() {
  const out = join(fresh, "bin");
  const { version } = JSON.parse(readFileSync(join(root, "package.json"), "utf8"));
  const common = {
    absWorkingDir: root,
    bundle: true,
    format: "cjs", // starts sooner than a module: Node's loader of modules alone costs a tenth of a bare start
    platform: "node",
    target: "node20",
    minify: true,
    charset: "ascii", // bin/load-command.ts reads it so
    supported: { "dynamic-import": false }, // becomes require: import() would scan the whole command for its exports
    banner: { js: 'const importMetaUrl=require("node:url").pathToFileURL(__filename).href;' },
    keepNames: false,
    legalComments: "none", // all licences go into one file instead
    metafile: true,
    logLevel: "warning",
    define: { SITEFOLD_VERSION: JSON.stringify(version), "import.meta.url": "importMetaUrl" },
  };
  const inFolder = (folder) =>
    readdirSync(join(root, "bin", folder), { withFileTypes: true }).filter((f) => f.isFile());
  const commands = inFolder("commands").map((f) => join(root, "bin", "commands", f.name));
  // A worker is a file of its own, so it is an entry too; it lies beside main.js.
  const workers = inFolder(".")
    .filter((f) => f.name.endsWith("worker.ts"))
    .map((f) => join(root, "bin", f.name));
  const results = [
    await build({ ...common, entryPoints: commands, outdir: join(out, "commands"), plugins: [loadedApart] }),
    await build({
      ...common,
      entryPoints: [join(root, "bin", "main.ts"), join(root, "bin", "help.ts"), ...workers],
      outdir: out,
      plugins: [loadedApart],
    }),
  ];
  const inputs = results.flatMap(({ metafile }) => Object.keys(metafile.inputs));
  writeFileSync(join(out, "LICENCES.txt"), licences(inputs));
  writeFileSync(join(out, "package.json"), '{ "type": "commonjs" }\n');
  const main = join(out, "main.js");
  const code = readFileSync(main, "utf8");
  if (!code.startsWith("#!")) writeFileSync(main, `#!/usr/bin/env node\n${code}`);
  chmodSync(main, 0o755);
  utimesSync(main, started, started); // what was saved during the build counts as newer than it
}

/**
 * Runs the example of a command and keeps the code that V8 compiled for it beside the bundle, see bin/load-command.ts.
 * A command without an example that can be run is left as it is.
 */
async function keepCompiledCode(name) {
  const file = join(fresh, "bin", "commands", name);
  const script = new Script(Module.wrap(readFileSync(file, "latin1")), { filename: file });
  const module = { exports: {} };
  script.runInThisContext()(module.exports, createRequire(file), module, file, dirname(file));
  const words = wordsOf(module.exports.spec.example.line).slice(2);
  const unseen = join(fresh, `${name}.txt`);
  const from = process.cwd();
  process.chdir(root);
  try {
    await module.exports.run([...words, "--output", unseen]);
    writeFileSync(`${file}.cache`, script.createCachedData());
  } catch {
    process.stderr.write(`sitefold: the example of ${name} could not be run; it will start a little later\n`);
  } finally {
    process.chdir(from);
    rmSync(unseen, { force: true });
  }
}

/** Writes a bundle as the function that Node makes of a module, so that nothing has to be joined when it is loaded. */
function asFunction(file) {
  writeFileSync(file, Module.wrap(readFileSync(file, "latin1")));
}

/** Words of a command line as a shell splits them; quotes may hold blanks. */
function wordsOf(line) {
  return [...line.matchAll(/"([^"]*)"|'([^']*)'|(\S+)/g)].map((m) => m[1] ?? m[2] ?? m[3]);
}

/** Licence texts of the packages whose code is in the bundle. */
function licences(inputs) {
  const folders = new Set(inputs.flatMap((file) => /^node_modules\/(?:@[^/]+\/)?[^/]+/.exec(file) ?? []));
  return [...folders]
    .sort()
    .map((folder) => {
      const { name, version, license } = JSON.parse(readFileSync(join(root, folder, "package.json"), "utf8"));
      const file = readdirSync(join(root, folder)).find((f) => /^licen[cs]e/i.test(basename(f)));
      const text = file && existsSync(join(root, folder, file)) ? readFileSync(join(root, folder, file), "utf8") : "";
      return `${name} ${version} (${license})\n\n${text.trim()}\n`;
    })
    .join("\n----\n\n");
}
