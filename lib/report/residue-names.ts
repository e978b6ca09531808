import type { CoordinateAtom, CoordinateList } from "../structure/index.ts";

/** The name that the wwPDB reserves for a ligand that is not in its dictionary. */
export const UNKNOWN_LIGAND = "UNL";

/** Name of an atom within its residue, and the residue: the copies of the atom list are numbered. */
export interface ResidueName {
  readonly name: string;
  /** From 1 to 9999. */
  readonly residue: number;
  readonly chain: string;
}

const CHAINS = "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789";
const RESIDUES = 9999;

/** Copies of a list that one-letter chains of residues can number. */
export const MOST_COPIES = CHAINS.length * RESIDUES;

/**
 * Names for the atoms of a list of coordinates: every copy of the list is a residue, within which no two atoms share a
 * name of up to four characters. Labels are kept where they fit, else atoms are numbered by element.
 */
export function residueNames(list: CoordinateList): (atom: CoordinateAtom) => ResidueName {
  const labels = new Map<number, CoordinateAtom>();
  for (const atom of list.atoms) if (!labels.has(atom.site)) labels.set(atom.site, atom);
  const plain = [...labels.values()].map(({ label }) => label.toUpperCase());
  const fit = plain.every((l) => /^[A-Z0-9'*"]{1,4}$/.test(l)) && new Set(plain).size === plain.length;
  const names = new Map<number, string>();
  const counts = new Map<string, number>();
  for (const [site, { label, element }] of labels) {
    const symbol = (element ?? "X").toUpperCase();
    const count = (counts.get(symbol) ?? 0) + 1;
    counts.set(symbol, count);
    names.set(site, fit ? label.toUpperCase() : `${symbol}${count.toString(36).toUpperCase()}`);
  }
  return ({ site, copy }) => ({
    name: names.get(site)!,
    residue: (copy % RESIDUES) + 1,
    chain: CHAINS[Math.floor(copy / RESIDUES) % CHAINS.length]!,
  });
}
