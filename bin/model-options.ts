import { type ModelOptions, parseCellRequest, parseRange } from "../lib/structure/index.ts";
import type { Arguments, OptionSpec } from "./arguments.ts";
import { FORMATS, PLAIN_FORMATS } from "./model-formats.ts";
import { UsageProblem } from "./problems.ts";
import { usage } from "./usage.ts";

/** Which atoms, in which cell, in which format. */
export const MODEL_OPTIONS = {
  cell: {
    type: "string",
    value: "CELL",
    describe: 'another cell: primitive, reference, multiples "2,2,1", nine integers, or axes "a-b,a+b,c;0,0,1/4"',
  },
  p1: { type: "boolean", describe: "claim no symmetry for the cell written: list all atoms in P 1" },
  asymmetric: { type: "boolean", describe: "one atom of each site, as listed" },
  connected: { type: "boolean", describe: "one atom of each site, chosen so that they hang together by bonds" },
  "whole-units": { type: "boolean", describe: "keep molecules whole, each with its centroid in the cell" },
  range: { type: "string", value: "RANGE", describe: 'fractional coordinates wanted, "0:1,0:1,-0.5:0.5"' },
  boundary: { type: "string", value: "WHICH", describe: "in (default) or out: atoms on the ends of a range" },
  format: { type: "string", value: "FORMAT", describe: `one of ${FORMATS.join(", ")} (default text)` },
} as const satisfies Record<string, OptionSpec>;

/** The format asked for. @throws UsageProblem */
export function formatOf(args: Arguments): string {
  const format = args.text("format") ?? (args.flag("json") ? "json" : "text");
  if (!FORMATS.includes(format))
    throw new UsageProblem(`there is no format "${format}"; there are ${FORMATS.join(", ")}`);
  if (args.flag("json") && format !== "json")
    throw new UsageProblem(`--json and --format ${format} ask for two formats`);
  return format;
}

/** The arguments as if --json were given. */
export function asJson(args: Arguments): Arguments {
  return { ...args, flag: (name) => name === "json" || args.flag(name) };
}

/** What to list. @throws UsageProblem for options that contradict each other */
export function modelOptions(args: Arguments, format: string): ModelOptions {
  const [cell, range, boundary] = [args.text("cell"), args.text("range"), args.text("boundary")];
  const one = args.flag("asymmetric") || args.flag("connected");
  const whole = args.flag("whole-units");
  if (one && (range !== null || whole || args.flag("p1"))) {
    throw new UsageProblem(
      "one atom of each site (--asymmetric, --connected) goes with no --p1, --range or --whole-units",
    );
  }
  if (boundary !== null && boundary !== "in" && boundary !== "out") {
    throw new UsageProblem(`--boundary takes in or out, not "${boundary}"`);
  }
  // files that hold no symmetry need none worked out
  const plain = !one && (args.flag("p1") || PLAIN_FORMATS.includes(format) || (whole && format.startsWith("cif")));
  return {
    symmetry: plain ? "none" : "kept",
    content: args.flag("connected") ? "connected" : one ? "asymmetric" : "cell",
    wholeUnits: whole,
    ...(cell === null ? {} : { cell: usage(() => parseCellRequest(cell)) }),
    ...(range === null ? {} : { range: usage(() => parseRange(range)) }),
    ...(boundary === null ? {} : { boundary }),
  };
}
