import { InputProblem } from "../problem.ts";
import type { LinearGroupName } from "../representation/index.ts";

/** A point group by name: one of the two linear ones, or a finite one in plain spelling. */
export type PointName =
  | { readonly kind: "linear"; readonly name: LinearGroupName }
  | { readonly kind: "finite"; readonly name: string };

const LINEAR: Readonly<Record<string, LinearGroupName>> = {
  cinfv: "Cinfv",
  infm: "Cinfv",
  infmm: "Cinfv",
  dinfh: "Dinfh",
  "inf/mm": "Dinfh",
  "inf/mmm": "Dinfh",
};

/**
 * Reads the name of a point group as people write it: `D3d`, `d_{3d}`, `-3m`, `3̅m`, `4/m m m`, `C∞v`, `Coov`, `∞/mm`.
 * @throws InputProblem `unknown-point-group` for infinite groups without a table
 */
export function readPointName(text: string): PointName {
  const plain = text
    .normalize("NFD")
    .replace(/(\d)[\u0304\u0305]/g, "-$1")
    .replace(/[−–]/g, "-")
    .replace(/[\s_{}]/g, "")
    .replace(/∞|(?<=^[CD])(?:oo|\*)/gi, "inf");
  const lower = plain.toLowerCase();
  const linear = Object.hasOwn(LINEAR, lower) ? LINEAR[lower] : undefined;
  if (linear) return { kind: "linear", name: linear };
  if (lower.includes("inf") || /^(?:kh?|r3|so3|o3)$/.test(lower)) {
    const hint = "Linear molecules have Cinfv or Dinfh; of the finite groups any order up to 240 is known.";
    throw new InputProblem("unknown-point-group", `There is no table of the infinite group "${text}".`, null, hint);
  }
  const schoenflies = /^[a-z]/i.test(plain) && !/^m/.test(plain);
  return { kind: "finite", name: schoenflies ? lower[0]!.toUpperCase() + lower.slice(1) : plain };
}
