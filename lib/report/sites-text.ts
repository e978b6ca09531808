import type { SiteAnswer, SitesAnswer } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { occupancyText } from "./positions-text.ts";
import { type Column, textTable } from "./table.ts";

/** One line for each site of the file. */
export function sitesText(answer: SitesAnswer): string {
  const right = { align: "right" } as const;
  const columns: Column[] = [
    { heading: "label" },
    { heading: "element" },
    { heading: "occ.", ...right },
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
  return textTable(columns, answer.sites.map(row));
}

function tensorHeading({ sites }: SitesAnswer): string {
  const beta = sites.some((s) => s.adpHoldsFor === "beta");
  return `${beta ? "beta" : "U"} 11,22,33,12,13,23`;
}

function row(site: SiteAnswer): string[] {
  return [
    site.label,
    site.element ?? "?",
    occupancyText(site.occupancy),
    String(site.multiplicity),
    site.referencePosition,
    `${site.siteSymmetry} (${site.schoenflies})`,
    ...site.snapped.map((e) => formatNumber(e, 5)),
    site.shift > 5e-5 ? formatNumber(site.shift, 4) : "",
    site.constraint,
    site.adp,
  ];
}
