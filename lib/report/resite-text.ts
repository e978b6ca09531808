import type { ResiteAnswer, ResitedSite, StandardisationAnswer } from "../structure/index.ts";
import { comparisonText } from "./comparison-text.ts";
import { formatNumber } from "./format-number.ts";
import { groupName } from "./heading.ts";
import { numberWithSu } from "./number-with-su.ts";
import { occupancyText } from "./positions-text.ts";
import { cellCells } from "./reduce-text.ts";
import { textTable, wrapText } from "./table.ts";

const WIDTH = 110;
const right = { align: "right" } as const;

/** The whole answer of `resite` for a person, below the heading. */
export function resiteText(answer: ResiteAnswer): string {
  const { comparison, standardisation } = answer;
  const parts = [
    ...(comparison ? [comparisonText(comparison)] : []),
    ...(standardisation ? [standardisationText(standardisation, answer.spaceGroup)] : []),
    ...(comparison?.verdict === "different" ? [] : [writtenText(answer), siteTable(answer.sites)]),
  ];
  return parts.join("\n\n");
}

function writtenText({ spaceGroup, P, p, cell, volume }: ResiteAnswer): string {
  const same = P === "a,b,c" && p === "0,0,0";
  const lines = [
    `${same ? "on the axes of the file:" : "written in"} ${groupName(spaceGroup)}`,
    ...(same ? [] : [`axes ${P}, origin ${p}, in terms of the cell of the file: (a',b',c') = (a,b,c) P, x = P x' + p`]),
    `cell ${cellCells(cell).join(" ")}, volume ${formatNumber(volume, 2)} Å^3`,
  ];
  return lines.map((line) => wrapText(line, WIDTH, "  ")).join("\n");
}

function standardisationText(found: StandardisationAnswer, { sohncke, number }: ResiteAnswer["spaceGroup"]): string {
  const { gamma, centre, axes, shifts, origins, free, compared, tied } = found;
  const along =
    free.length > 0
      ? `; the origin is free along ${free.join(", ")}: ${origins} ${origins === 1 ? "place" : "places"} tried, each with an atom at 0`
      : "";
  const lines = [
    `standardised: gamma = ${formatNumber(gamma, 5)}, ${compared === 1 ? "of the only description" : `the smallest of ${compared} descriptions`}${tied > 1 ? `, found in ${tied}` : ""}; mean position ${formatNumber(centre, 4)} from the origin`,
    `Pearson symbol ${found.pearsonSymbol}, Wyckoff sequence ${number}: ${found.wyckoffSequence}`,
    `compared: ${plural(axes, "choice")} of axes for the standard cell, ${plural(shifts, "origin")} for each${along}`,
    ...(sohncke ? [handText(found)] : []),
    ...(number === 1
      ? ["in P 1, as the file tells; where the atoms have more symmetry, symmetrise the structure first"]
      : []),
    "gamma is the sum of sqrt(x^2 + y^2 + z^2) over the sites (E. Parthe, L. M. Gelato, Acta Cryst. A40, 1984, 169)",
  ];
  return lines.map((line) => wrapText(line, WIDTH, "  ")).join("\n");
}

function handText({ hand, mirrored }: StandardisationAnswer): string {
  if (hand === "kept") {
    return "the group has no operation of the second kind: the hand of the structure is kept, its mirror image was not tried";
  }
  return mirrored
    ? "the mirror image of the structure in the file is described: its hand was left open, and this one comes first (lower space-group number, else smaller gamma)"
    : "the hand of the structure was left open; its mirror image does not come first (lower space-group number, else smaller gamma)";
}

function plural(n: number, word: string): string {
  return `${n} ${word}${n === 1 ? "" : "s"}`;
}

/** Decimals of coordinates without s.u. */
const DECIMALS = 5;

function siteTable(sites: readonly ResitedSite[]): string {
  const renamed = sites.some((s) => s.from !== s.label);
  const rows = sites.map((s) => [
    s.label,
    ...(renamed ? [s.from] : []),
    s.element ?? "?",
    occupancyText(s.occupancy),
    `${s.multiplicity}${s.wyckoff}`,
    s.siteSymmetry,
    ...s.position.map((e, i) => numberWithSu(e, s.su[i] ?? null, DECIMALS)),
  ]);
  const columns = [
    { heading: "label" },
    ...(renamed ? [{ heading: "in the file" }] : []),
    { heading: "element" },
    { heading: "occ.", ...right },
    { heading: "position", ...right },
    { heading: "site symmetry" },
    { heading: "x", ...right },
    { heading: "y", ...right },
    { heading: "z", ...right },
  ];
  return textTable(columns, rows);
}
