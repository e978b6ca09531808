import { ALVAREZ_RADII, BONDI_RADII } from "./tables/van-der-waals-radii.ts";

/** What the radii are, for printing beside contacts. */
export const VAN_DER_WAALS_SOURCE =
  "van der Waals radii of Bondi, J. Phys. Chem. 68 (1964) 441, for non-metals, of Alvarez, Dalton Trans. (2013) 8617, for others";

let decoded: ReadonlyMap<string, number> | null = null;

function radii(): ReadonlyMap<string, number> {
  if (decoded) return decoded;
  const words = `${ALVAREZ_RADII} ${BONDI_RADII}`.split(" ");
  const map = new Map<string, number>();
  for (let i = 0; i + 1 < words.length; i += 2) map.set(words[i]!, Number(words[i + 1]));
  for (const isotope of ["D", "T"]) map.set(isotope, map.get("H")!);
  decoded = map;
  return map;
}

/** Van der Waals radius of an element in angstrom, null where none is published. */
export function vanDerWaalsRadius(symbol: string): number | null {
  return radii().get(symbol) ?? null;
}

/** Sum of the van der Waals radii of two elements, angstrom; null where one has none. */
export function vanDerWaalsSum(a: string | null, b: string | null): number | null {
  const [ra, rb] = [a && vanDerWaalsRadius(a), b && vanDerWaalsRadius(b)];
  return ra && rb ? ra + rb : null;
}
