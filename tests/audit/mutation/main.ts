import { readFileSync } from "node:fs";
import { readCif } from "../../../lib/cif/index.ts";
import { CHOSEN } from "./fixtures.ts";
import { runSuite, suiteTable } from "./suite.ts";

/** Runs the suite on the chosen fixtures in a folder; the table, and whether it is good enough. */
export function mutationTable(folder: string): string {
  const fixtures = CHOSEN.map((name) => {
    const text = readFileSync(`${folder}/${name}.cif`, "utf8");
    return { name, block: readCif(text).value.blocks[0]! };
  });
  return suiteTable(runSuite(fixtures));
}
