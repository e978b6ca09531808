import { type Crystal, parseShellPattern } from "../lib/structure/index.ts";
import { type PolyhedraAnswer, polyhedraAnswer } from "../lib/vibrations/index.ts";
import type { Arguments } from "./arguments.ts";
import { usage } from "./usage.ts";

/** The polyhedra that --polyhedron asks for, null where it is not given. @throws UsageProblem */
export function askedPolyhedra(args: Arguments, crystal: Crystal): PolyhedraAnswer | null {
  const asked = args.texts("polyhedron");
  if (asked.length === 0) return null;
  return usage(() => polyhedraAnswer(crystal, asked.map(parseShellPattern)));
}
