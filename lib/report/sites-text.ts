import type { SiteAnswer, SitesAnswer } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { occupancyText } from "./positions-text.ts";
import { type Column, textTable, wrapText } from "./table.ts";

const WIDTH = 110;

/** One line for each site. @param of points are no atoms: they have no element and no occupancy */
export function sitesText(answer: SitesAnswer, of: "atoms" | "points" = "atoms"): string {
  const right = { align: "right" } as const;
  const atoms = of === "atoms";
  const columns: Column[] = [
    ...(atoms ? [{ heading: "label" }, { heading: "element" }, { heading: "occ.", ...right }] : [{ heading: "point" }]),
    { heading: "in cell", ...right },
    { heading: "position" },
    { heading: "site symmetry" },
    { heading: "x", ...right },
    { heading: "y", ...right },
    { heading: "z", ...right },
    { heading: "moved/Å", ...right },
    { heading: "may move in" },
    { heading: tensorHeading(answer) },
  ];
  const table = textTable(
    columns,
    answer.sites.map((site) => [site.label, ...(atoms ? atomCells(site) : []), ...siteCells(site)]),
  );
  return [table, ...otherCell(answer)].join("\n\n");
}

/** Multiplicities of positions count in the reference cell; without a word, `1` beside `4a` looks like a fault. */
function otherCell({ sites }: SitesAnswer): string[] {
  const differing = sites.find((s) => s.multiplicity !== Number.parseInt(s.referencePosition, 10));
  if (!differing) return [];
  const { multiplicity, referencePosition } = differing;
  const letter = referencePosition.replace(/^\d+/, "");
  const text =
    `"in cell" counts in the cell of the file, the multiplicity before the letter in the cell of the reference setting: ` +
    `position ${referencePosition} has multiplicity ${multiplicity} here, under the letter ${letter} of that setting`;
  return [wrapText(text, WIDTH, "  ")];
}

function tensorHeading({ sites }: SitesAnswer): string {
  const beta = sites.some((s) => s.adpHoldsFor === "beta");
  return `${beta ? "beta" : "U"} 11,22,33,12,13,23`;
}

function atomCells({ element, occupancy }: SiteAnswer): string[] {
  return [element ?? "?", occupancyText(occupancy)];
}

function siteCells(site: SiteAnswer): string[] {
  return [
    String(site.multiplicity),
    site.referencePosition,
    `${site.siteSymmetry} (${site.schoenflies})`,
    ...site.snapped.map((e) => formatNumber(e, 5)),
    site.shift > 5e-5 ? formatNumber(site.shift, 4) : "",
    site.constraint,
    site.adp,
  ];
}
