/**
 * `npm run bench`: bundles the benches named, or all of them, into one temporary file and runs each in a process of its
 * own, so that none finds the memory and the compiled code of another.
 */
import { spawnSync } from "node:child_process";
import { mkdtempSync, readdirSync, rmSync } from "node:fs";
import { cpus, tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { build } from "esbuild";

const here = fileURLToPath(new URL(".", import.meta.url));
const wanted = process.argv.slice(2);
const benches = readdirSync(here)
  .filter((file) => file.endsWith(".ts") && !["run.ts", "ratio.ts"].includes(file))
  .map((file) => file.slice(0, -".ts".length));
const chosen = wanted.length > 0 ? wanted : benches;
const unknown = chosen.filter((name) => !benches.includes(name));

if (unknown.length > 0) {
  process.stderr.write(`no bench ${unknown.join(", ")}; there are ${benches.join(", ")}\n`);
  process.exitCode = 2;
} else {
  const folder = mkdtempSync(join(tmpdir(), "sitefold-bench-"));
  try {
    const outfile = join(folder, "bench.mjs");
    const imports = chosen.map((name, i) => `import { measure as m${i} } from "./${name}.ts";`);
    const list = chosen.map((name, i) => `[${JSON.stringify(name)}, m${i}]`);
    const contents = `import { report } from "./run.ts";\n${imports.join("\n")}\nreport([${list.join(", ")}], process.argv[2]);\n`;
    await build({
      stdin: { contents, resolveDir: here, loader: "ts" },
      outfile,
      bundle: true,
      format: "esm",
      platform: "node",
      target: "node20",
      logLevel: "warning",
    });
    const processors = cpus();
    console.log(`Node ${process.versions.node}, ${processors.length} x ${processors[0]?.model ?? "unknown processor"}`);
    for (const name of chosen) {
      const { status } = spawnSync(process.execPath, [outfile, name], { stdio: "inherit" });
      if (status !== 0) process.exitCode = 1;
    }
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
