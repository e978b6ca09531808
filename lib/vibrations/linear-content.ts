import { linearSpecies } from "../representation/index.ts";
import { dot3, type LinearSymmetry, type MolecularUnit } from "../structure/index.ts";
import { nameAlong } from "./bond-coordinates.ts";
import type { CoordinateSetAnswer } from "./coordinate-content.ts";

/**
 * Internal coordinates of a linear unit: a stretch (Sigma+) for each bond, two bends (Pi) for each inner atom; those at
 * equal distances from an inversion centre come in pairs g and u. None is redundant.
 */
export function linearSets(unit: Pick<MolecularUnit, "atoms">, symmetry: LinearSymmetry): CoordinateSetAnswer[] {
  const along = symmetry.idealised.map((x) => dot3(x, symmetry.axis));
  const order = unit.atoms.map((_, k) => k).sort((a, b) => along[a]! - along[b]!);
  const runs = (length: number) => order.slice(length - 1).map((_, k) => order.slice(k, k + length));
  return [...setsOf("stretch", runs(2), unit, symmetry), ...setsOf("bend", runs(3), unit, symmetry)];
}

function setsOf(
  kind: "stretch" | "bend",
  runs: readonly (readonly number[])[],
  { atoms }: Pick<MolecularUnit, "atoms">,
  { schoenflies }: LinearSymmetry,
): CoordinateSetAnswer[] {
  const lambda = kind === "stretch" ? 0 : 1;
  const isCentred = schoenflies === "Dinfh";
  const own = isCentred ? runs.slice(0, Math.ceil(runs.length / 2)) : runs;
  return own.map((run, k) => {
    const partners = isCentred && 2 * k !== runs.length - 1 ? 2 : 1;
    // the stretch of a bond through the centre is even, the bend at an atom on the centre odd
    const alone = kind === "stretch" ? 1 : -1;
    const parities = !isCentred ? [0 as const] : partners === 2 ? ([1, -1] as const) : [alone as 1 | -1];
    return {
      kind,
      name: nameAlong(run.map((i) => atoms[i]!.element)),
      labels: run.map((i) => atoms[i]!.label),
      count: partners * (lambda + 1),
      species: Object.fromEntries(parities.map((p) => [linearSpecies(schoenflies, lambda, p).label, 1])),
    };
  });
}
