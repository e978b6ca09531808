import { groupProperties } from "../symmetry/index.ts";
import type { Crystal } from "./crystal.ts";
import type { StandardDescription } from "./standard-description.ts";
import type { StandardisedCrystal } from "./standardised-crystal.ts";

/** How a standard description was found. */
export interface StandardisationAnswer {
  /** The standardisation parameter, dimensionless. */
  readonly gamma: number;
  /** Distance of the mean position from the origin, in fractions of the axes. */
  readonly centre: number;
  /** Bravais type and atoms of the conventional cell, occupancies counted: `oP28`. */
  readonly pearsonSymbol: string;
  /** Letters of the occupied positions from the last, with their numbers: `d c4 a`. */
  readonly wyckoffSequence: string;
  /** Choices of axes with the standard cell, origins for each that the group fixes, and origins along free directions. */
  readonly axes: number;
  readonly shifts: number;
  readonly origins: number;
  /** Axes of the new cell along which the group leaves the origin free. */
  readonly free: readonly string[];
  /** Descriptions compared, and how many of them have the smallest gamma. */
  readonly compared: number;
  readonly tied: number;
  /** `kept`: axes stay right-handed; `either`: the mirror image was compared too. */
  readonly hand: "kept" | "either";
  /** Whether the mirror image is what is described. */
  readonly mirrored: boolean;
}

/** What there is to tell of a standard description. */
export function standardisationAnswer(result: StandardisedCrystal, eitherHand: boolean): StandardisationAnswer {
  const { crystal, description, mirrored } = result;
  const { gamma, centre, tied, candidates } = description;
  const { axes, shifts, origins, free, list } = candidates;
  return {
    gamma,
    centre,
    pearsonSymbol: pearsonSymbol(crystal),
    wyckoffSequence: wyckoffSequence(description),
    axes: axes.length,
    shifts: shifts.length,
    origins: origins.length,
    free: free.map((i) => "abc"[i]!),
    compared: list.length * origins.length,
    tied,
    hand: eitherHand ? "either" : "kept",
    mirrored,
  };
}

/** After W. B. Pearson, A Handbook of Lattice Spacings and Structures of Metals and Alloys, vol. 2 (1967). */
function pearsonSymbol({ identified, sites }: Crystal): string {
  const atoms = sites.reduce((s, { images, occupancy }) => s + images.length * occupancy, 0);
  return `${groupProperties(identified.number).bravaisType}${Number(atoms.toFixed(2))}`;
}

/** Sites that share a position count once. */
function wyckoffSequence({ sites, counted }: StandardDescription): string {
  const counts = new Map<string, number>();
  for (const { letter, site } of sites) if (counted[site]) counts.set(letter, (counts.get(letter) ?? 0) + 1);
  return [...counts].map(([letter, n]) => (n === 1 ? letter : `${letter}${n}`)).join(" ");
}
