import type { AtomSite } from "./atom-site.ts";
import type { Formula } from "./formula-text.ts";

/** What counting asks of a site: its species, and its images in the cell. */
type ExpandedSite = Pick<AtomSite, "element" | "occupancy"> & { readonly images: readonly unknown[] };

/** Atoms of each element in the cell, occupancies counted; D and T count as hydrogen; nameless sites under `?`. */
export function cellContents(sites: readonly ExpandedSite[]): Formula {
  const counts = new Map<string, number>();
  for (const { element, occupancy, images } of sites) {
    const symbol = element === "D" || element === "T" ? "H" : (element ?? "?");
    counts.set(symbol, (counts.get(symbol) ?? 0) + occupancy * images.length);
  }
  return counts;
}

/**
 * How far contents are from a whole multiple of a formula: the largest relative misfit over the elements of both, for
 * the best factor. 0 where they agree; 1 where an element is missing. Hydrogen is left out, since files often lack it.
 */
export function contentsMisfit(contents: Formula, formula: Formula): number {
  const heavy = [...new Set([...contents.keys(), ...formula.keys()])].filter((e) => e !== "H" && e !== "D");
  const total = (f: Formula) => heavy.reduce((s, e) => s + (f.get(e) ?? 0), 0);
  if (total(formula) === 0 || total(contents) === 0) return 1;
  const factor = total(contents) / total(formula);
  return heavy.reduce((worst, e) => {
    const have = contents.get(e) ?? 0;
    const want = (formula.get(e) ?? 0) * factor;
    return Math.max(worst, Math.abs(have - want) / Math.max(have, want));
  }, 0);
}
