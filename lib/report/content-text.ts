import type { SpeciesContent, UnitAnswer } from "../vibrations/index.ts";
import type { SpeciesWriter } from "./species.ts";

export const KIND_NAMES: Readonly<Record<keyof SpeciesContent, readonly [one: string, many: string]>> = {
  stretch: ["stretch", "stretches"],
  outOfPlane: ["out-of-plane bend", "out-of-plane bends"],
  bend: ["bend", "bends"],
  torsion: ["torsion", "torsions"],
};

const KINDS = ["stretch", "outOfPlane", "bend", "torsion"] as const;

/** `1 stretch, 2 bends`: what the modes of a species are made of. */
export function speciesContentText(content: SpeciesContent | undefined): string {
  if (!content) return "";
  return KINDS.filter((kind) => content[kind] > 0)
    .map((kind) => `${content[kind]} ${KIND_NAMES[kind][content[kind] === 1 ? 0 : 1]}`)
    .join(", ");
}

/** `stretches (4 S-O) A₁ + T₂; bends (6 O-S-O) E + T₂, redundant A₁`: the internal coordinates of a unit. */
export function unitContentText(
  { kinds, coordinates }: Pick<UnitAnswer, "kinds" | "coordinates">,
  write: SpeciesWriter,
): string {
  return kinds
    .map(({ kind, free, redundant }) => {
      const named = coordinateNames(coordinates.filter((c) => c.kind === kind));
      const left = Object.keys(redundant).length > 0 ? `, redundant ${write.sum(redundant)}` : "";
      return `${KIND_NAMES[kind][1]}${named ? ` (${named})` : ""} ${write.sum(free)}${left}`;
    })
    .join("; ");
}

/** `6 C-H, 6 C-C`: sets of one name together. */
export function coordinateNames(sets: readonly { readonly name: string; readonly count: number }[]): string {
  const counts = new Map<string, number>();
  for (const { name, count } of sets) counts.set(name, (counts.get(name) ?? 0) + count);
  return [...counts].map(([name, n]) => `${n} ${name}`).join(", ");
}
