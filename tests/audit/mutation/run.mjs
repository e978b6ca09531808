/**
 * `npm run mutation`: detection rate by kind of planted slip, and false alarms, compared with the table that is kept;
 * `npm run mutation -- --write` renews that table.
 */
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";
import { build } from "esbuild";

const here = fileURLToPath(new URL(".", import.meta.url));
const root = join(here, "..", "..", "..");
const golden = join(root, "tests", "golden", "mutation.txt");
const folder = mkdtempSync(join(tmpdir(), "sitefold-mutation-"));

try {
  const outfile = join(folder, "suite.mjs");
  await build({
    entryPoints: [join(here, "main.ts")],
    outfile,
    bundle: true,
    format: "esm",
    platform: "node",
    target: "node20",
    logLevel: "warning",
  });
  const { mutationTable } = await import(pathToFileURL(outfile).href);
  const table = mutationTable(join(root, "fixtures"));
  process.stdout.write(table);
  if (process.argv.includes("--write")) writeFileSync(golden, table);
  else if (readFileSync(golden, "utf8") !== table) {
    process.stderr.write("this differs from tests/golden/mutation.txt; renew it with --write if that is meant\n");
    process.exitCode = 1;
  }
} finally {
  rmSync(folder, { recursive: true, force: true });
}
