import { type ModelOptions, parseCellRequest, parseRange } from "../lib/structure/index.ts";
import type { Arguments } from "./arguments.ts";
import { PLAIN_FORMATS } from "./model-formats.ts";
import { FORMATS, type Format } from "./positions-options.ts";
import { UsageProblem } from "./problems.ts";
import { usage } from "./usage.ts";

/** The format asked for. @throws UsageProblem */
export function formatOf(args: Arguments): Format {
  const wanted = args.text("format") ?? (args.flag("json") ? "json" : "text");
  const format = FORMATS.find((f) => f === wanted);
  if (!format) throw new UsageProblem(`there is no format "${wanted}"; there are ${FORMATS.join(", ")}`);
  if (args.flag("json") && format !== "json")
    throw new UsageProblem(`--json and --format ${format} ask for two formats`);
  return format;
}

/** The arguments as if --json were given. */
export function asJson(args: Arguments): Arguments {
  return { ...args, flag: (name) => name === "json" || args.flag(name) };
}

/** What to list. @throws UsageProblem for options that contradict each other */
export function modelOptions(args: Arguments, format: Format): ModelOptions {
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
