import type { SiteAnswer, SitesAnswer } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { occupancyText } from "./positions-text.ts";
import { type Column, textTable } from "./table.ts";

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
  return textTable(
    columns,
    answer.sites.map((site) => [site.label, ...(atoms ? atomCells(site) : []), ...siteCells(site)]),
  );
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
