import type { PositionsAnswer } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";

const NAMES = ["label", "element", "occupancy", "x", "y", "z", "operation", "code", "meaning"];

/**
 * Positions as comma-separated values with a line of names; fractional coordinates with eight decimals.
 * Source: Y. Shafranovich, RFC 4180 (2005): lines end with CR LF, fields with commas or quotes are quoted.
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const [names, first] = positionsCsv(positionsAnswer(halite)).split("\r\n");
 * names; // "label,element,occupancy,x,y,z,operation,code,meaning"
 * first; // 'Na,Na,1,0.00000000,0.00000000,0.00000000,"x,y,z",1_555,1'
 * ```
 */
export function positionsCsv({ positions }: PositionsAnswer): string {
  const lines = [NAMES.join(",")];
  for (const p of positions) {
    const coordinates = [p.x, p.y, p.z].map((e) => formatNumber(e, 8)).join(",");
    const made = [p.operation, p.code ?? "", p.meaning].map(field).join(",");
    lines.push(`${field(p.label)},${p.element ?? ""},${p.occupancy},${coordinates},${made}`);
  }
  return `${lines.join("\r\n")}\r\n`;
}

function field(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
