import type { SiteAnswer, SitesAnswer } from "../structure/index.ts";
import { sitesText } from "./sites-text.ts";
import { textTable } from "./table.ts";

/** One line for each point, then its equivalent positions where they were asked for. */
export function pointsText(answer: SitesAnswer): string {
  return [sitesText(answer, "points"), ...answer.sites.flatMap(imagesText)].join("\n\n");
}

function imagesText({ label, referencePosition, images }: SiteAnswer): string[] {
  if (!images) return [];
  const columns = [{ heading: "equivalent position" }, { heading: "made by" }];
  const rows = images.map(({ coordinates, operation }) => [coordinates, operation]);
  return [`${label} (${referencePosition}), ${images.length} in the cell:\n${textTable(columns, rows)}`];
}
