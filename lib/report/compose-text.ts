import type { CellNumbers, ComposeAnswer } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { sitesText } from "./sites-text.ts";

/** The sites in their places, and what follows from them. */
export function composeText(answer: ComposeAnswer): string {
  return `${sitesText(answer)}\n\n${composedFacts(answer).join("\n")}`;
}

/** Contents, density, distances and symmetry, one sentence a line; everything is computed from the sites. */
export function composedFacts({ cell, volume, contents, shortest, higher }: ComposeAnswer): string[] {
  const { formula, z, weight, density } = contents;
  const mass = weight === null ? "" : `, ${formatNumber(weight, 2)} Da`;
  return [
    cellText(cell, volume),
    `computed from the sites: ${formula}, Z = ${z}${mass}`,
    ...(density === null ? [] : [`density computed from formula, Z and cell: ${formatNumber(density, 3)} g cm⁻³`]),
    ...(shortest === null
      ? []
      : [`shortest distance: ${shortest.labels.join("-")} ${formatNumber(shortest.distance, 3)} Å`]),
    ...(higher === null ? [] : [`symmetry of the sites: ${higher.hermannMauguin} (No. ${higher.number})`]),
  ];
}

function cellText([a, b, c, alpha, beta, gamma]: CellNumbers, volume: number): string {
  return `cell ${[a, b, c].map((e) => trimmed(e, 5)).join(" ")} Å, ${[alpha, beta, gamma].map((e) => trimmed(e, 4)).join(" ")}°, volume ${formatNumber(volume, 2)} Å³`;
}

function trimmed(x: number, decimals: number): string {
  return formatNumber(x, decimals).replace(/\.?0+$/, "");
}
