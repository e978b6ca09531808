import { spawnSync } from "node:child_process";
import { type Measurement, milliseconds } from "./ratio.ts";

const STARTS = 25;
const MAIN = "dist/bin/main.js";

/** Start of a command on a small file, seen from outside, against a bare start of Node; run from the root. */
export function measure(): Measurement[] {
  const commands: Readonly<Record<string, readonly string[]>> = {
    "sitefold --version": [MAIN, "--version"],
    "sitefold modes, calcite": [MAIN, "modes", "fixtures/calcite.cif"],
    "sitefold sites, calcite": [MAIN, "sites", "fixtures/calcite.cif"],
    "sitefold --help, which loads yargs": [MAIN, "modes", "--help"],
  };
  return Object.entries(commands).map(([name, args]) => {
    const [ours, bare] = medians(args, ["-e", "0"]);
    return { name, ratio: ours / bare, reference: "node -e 0", detail: `${milliseconds(ours)}, median of ${STARTS}` };
  });
}

/** Medians of both, started in turn. */
function medians(...sides: readonly [readonly string[], readonly string[]]): [number, number] {
  const times: [number[], number[]] = [[], []];
  for (let start = 0; start < STARTS; start++) {
    sides.forEach((args, side) => {
      times[side]!.push(run(args));
    });
  }
  return times.map((t) => t.sort((a, b) => a - b)[STARTS >> 1]!) as [number, number];
}

function run(args: readonly string[]): number {
  const begin = performance.now();
  const { status, stderr } = spawnSync(process.execPath, args, { stdio: ["ignore", "ignore", "pipe"] });
  const time = performance.now() - begin;
  if (status !== 0) throw new Error(`node ${args.join(" ")} ended with status ${status}: ${stderr}`);
  return time;
}
