import {
  type Crystal,
  type CrystalSite,
  formatCellParameters,
  nearestDistance,
  type Vec3,
} from "../../lib/structure/index.ts";
import { freeLetters, type PositionInCell, pointOfForm, positionsInCell } from "../../lib/symmetry/index.ts";

/** How the sites of a crystal are written down: by coordinates alone, with the letter too, or by free parameters. */
export type TableStyle = "coordinates" | "letters" | "parameters";

/** The crystal as the text of a table, numbers with all their digits, another image of each site than the listed one. */
export function tableOf(crystal: Crystal, style: TableStyle, groupText = `Hall: ${crystal.identified.summary.hall}`) {
  const { cell } = crystal.metric;
  const positions = positionsInCell(crystal.identified);
  const lines = crystal.sites.map((site) => siteLine(crystal, site, positions, style));
  return [`group ${groupText}`, `cell ${formatCellParameters(cell)}`, ...lines].join("\n");
}

function siteLine(crystal: Crystal, site: CrystalSite, positions: readonly PositionInCell[], style: TableStyle) {
  const head = [site.label, site.typeSymbol ?? site.element ?? "?"];
  const order = site.symmetry.operations.length;
  const image = site.images.at(-1)!.position;
  const tail = site.occupancy === 1 ? [] : [`occ=${site.occupancy}`];
  if (style === "coordinates") return [...head, image.map(String).join(","), ...tail].join(" ");
  for (const position of positions.filter((p) => p.order === order)) {
    const found = site.images.find((i) => isFirst(crystal, position, i.position));
    if (!found) continue;
    const name = `${position.multiplicity}${position.letter}`;
    const free = freeLetters(position.form).map((j) => `${"xyz"[j]}=${found.position[j]}`);
    const told = style === "letters" ? [image.map(String).join(",")] : free;
    return [...head, name, ...told, ...tail].join(" ");
  }
  throw new Error(`no position of ${site.label}`);
}

/** Whether a point is on the first triplet, its coordinates being the values of the letters. */
function isFirst({ metric }: Crystal, { form }: PositionInCell, x: Vec3): boolean {
  return nearestDistance(metric, pointOfForm(form, x), x) < 1e-6;
}
