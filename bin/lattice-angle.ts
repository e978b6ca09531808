import { LATTICE_TOLERANCE } from "../lib/structure/index.ts";
import type { Arguments, OptionSpec } from "./arguments.ts";
import { UsageProblem } from "./problems.ts";

/** Largest angle that may be asked for; beyond it any lattice is nearly cubic; degrees. */
const LARGEST = 10;

/** How far a lattice may miss its symmetry, for the commands that look for it. */
export const ANGLE_OPTION = {
  angle: {
    type: "number",
    value: "DEGREES",
    describe: `largest angle by which the lattice may miss its symmetry (default ${LATTICE_TOLERANCE})`,
  },
} as const satisfies Record<string, OptionSpec>;

/** The angle asked for, degrees. @throws UsageProblem for one that no lattice misses its symmetry by */
export function latticeAngle(args: Arguments): number {
  const angle = args.number("angle") ?? LATTICE_TOLERANCE;
  if (angle >= 0 && angle <= LARGEST) return angle;
  throw new UsageProblem(`--angle ${angle} is not between 0 and ${LARGEST} degrees`);
}
