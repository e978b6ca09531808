import type { BondChoice, LeftOutPair } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";

/** Beyond the longest of some bonds, so that rounding loses none in a pattern; angstrom. */
const BEYOND = 0.01;

/** How bonds were chosen: what counts, what was left out and why, what only just decided, and how to overrule it. */
export function bondLines(bonds: BondChoice): string[] {
  const bonded = bonds.bonded.map((b) => `${b.elements.join("-")} ${range(b)} (${b.rule})`);
  return [
    `bonds that make units: ${bonded.join(", ") || "none"}`,
    ...leftOutLine(bonds, "water", "not counted, so that water is a unit of its own", "counts them"),
    ...leftOutLine(bonds, "ions", "short enough for bonds, but taken for ions", "counts them"),
    ...leftOutLine(bonds, "asked", "cut as asked", null),
    ...bonds.nearLimit.map(
      (n) =>
        `close to the limit: ${n.labels.join("-")} ${formatNumber(n.distance, 3)} Å, ${n.bonded ? "a bond" : "no bond"} (limit ${formatNumber(n.limit, 2)} Å)`,
    ),
  ];
}

function leftOutLine({ leftOut }: BondChoice, why: LeftOutPair["why"], what: string, remedy: string | null): string[] {
  const pairs = leftOut.filter((p) => p.why === why);
  if (pairs.length === 0) return [];
  const shown = pairs.map((p) => `${p.elements.join("-")} ${range(p)}${limit(p)}`).join(", ");
  const pattern = pairs.map((p) => `${p.elements.join("-")}<${formatNumber(p.longest + BEYOND, 2)}`).join(", ");
  return [`${what}: ${shown}${remedy ? `; --bond "${pattern}" ${remedy}` : ""}`];
}

function limit({ bondedBelow }: LeftOutPair): string {
  return bondedBelow === null ? "" : ` (a bond below ${formatNumber(bondedBelow, 2)} Å)`;
}

function range({ shortest, longest }: { readonly shortest: number; readonly longest: number }): string {
  const [a, b] = [formatNumber(shortest, 3), formatNumber(longest, 3)];
  return a === b ? `${a} Å` : `${a} to ${b} Å`;
}
