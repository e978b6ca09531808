import { COVALENT_RADII } from "./tables/covalent-radii.ts";

/** What the radii are, for printing beside a choice of bonds. */
export const RADII_SOURCE = "covalent radii of Cordero et al., Dalton Trans. (2008) 2832";

let decoded: ReadonlyMap<string, number> | null = null;

function radii(): ReadonlyMap<string, number> {
  if (decoded) return decoded;
  const words = COVALENT_RADII.split(" ");
  const map = new Map<string, number>();
  for (let i = 0; i + 1 < words.length; i += 2) map.set(words[i]!, Number(words[i + 1]));
  for (const isotope of ["D", "T"]) map.set(isotope, map.get("H")!);
  decoded = map;
  return map;
}

/** Covalent radius of an element in angstrom, null where none is published. Hydrogen isotopes count as hydrogen. */
export function covalentRadius(symbol: string): number | null {
  return radii().get(symbol) ?? null;
}
