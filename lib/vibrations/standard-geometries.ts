import { directionVector, type Vec3 } from "../structure/index.ts";
import type { CrystalTensors } from "./crystal-tensors.ts";
import { parseGeometry } from "./geometry-text.ts";
import { type SpeciesScattering, scatteringOf } from "./raman-scattering.ts";
import { placeGeometry, type ScatteringGeometry } from "./scattering-geometry.ts";

/** Backscattering from the faces normal to x, y and z: both parallel settings and the crossed one of each. */
export const BACKSCATTERING: readonly string[] = [
  "z(xx)-z",
  "z(xy)-z",
  "z(yy)-z",
  "x(yy)-x",
  "x(yz)-x",
  "x(zz)-x",
  "y(zz)-y",
  "y(zx)-y",
  "y(xx)-y",
];

/** Right-angle scattering along the axes of the frame. */
function rightAngle(): string[] {
  const axes = ["x", "y", "z"];
  const across = (direction: string) => axes.filter((axis) => axis !== direction);
  return axes.flatMap((ki) =>
    across(ki).flatMap((ks) => across(ki).flatMap((ei) => across(ks).map((es) => `${ki}(${ei}${es})${ks}`))),
  );
}

/**
 * Crossed polarisers along the diagonals of the face normal to z, where a and b are equal and at right angles: shows
 * xx - yy alone, and so tells E from A1 in cubic crystals, which no geometry along the axes does.
 */
function diagonal({ frame }: CrystalTensors): string[] {
  const [u, v] = [directionVector(frame, [1, 1, 0]), directionVector(frame, [1, -1, 0])];
  const along = (d: Vec3, sign: number) => Math.hypot(d[0] - Math.SQRT1_2, d[1] - sign * Math.SQRT1_2) < 1e-6;
  return along(u, 1) && along(v, -1) ? ["z([110][1-10])-z"] : [];
}

/** A geometry with the species that show in it. */
export interface GeometryResult {
  readonly geometry: ScatteringGeometry;
  readonly scattering: readonly SpeciesScattering[];
}

export function geometryResult(tensors: CrystalTensors, text: string): GeometryResult {
  const geometry = placeGeometry(parseGeometry(text), tensors.frame);
  return { geometry, scattering: scatteringOf(tensors, geometry) };
}

/**
 * A smallest set of geometries in which no two of the given species show and hide alike, and each shows at least once:
 * backscattering along the axes where it suffices, else with diagonal polarisations and right-angle scattering. Of sets of one size, the one whose geometries
 * show the fewest species is taken.
 * @param species indices of the Raman species that the crystal has modes of
 * @returns null where no set of up to five tells all of them apart; an empty list where there is no species
 */
export function separatingGeometries(
  tensors: CrystalTensors,
  species: readonly number[],
): readonly GeometryResult[] | null {
  if (species.length === 0) return [];
  const present = new Set(species);
  const only = { ...tensors, raman: tensors.raman.filter((form) => present.has(form.irrep)) };
  return smallestSet(only);
}

function smallestSet(tensors: CrystalTensors): GeometryResult[] | null {
  const more = diagonal(tensors);
  for (const texts of [BACKSCATTERING, [...BACKSCATTERING, ...more], [...BACKSCATTERING, ...more, ...rightAngle()]]) {
    const candidates = distinctPatterns(
      tensors,
      texts.map((t) => geometryResult(tensors, t)),
    );
    for (let size = 1; size <= Math.min(5, candidates.length); size++) {
      const best = bestSubset(tensors, candidates, size);
      if (best) return best;
    }
  }
  return null;
}

function patternOf(tensors: CrystalTensors, result: GeometryResult): boolean[] {
  return tensors.raman.map((form) => result.scattering.some((s) => s.form.irrep === form.irrep));
}

/** Geometries that show different sets of species, the first of each, the most selective first. */
function distinctPatterns(tensors: CrystalTensors, results: readonly GeometryResult[]): GeometryResult[] {
  const seen = new Map<string, GeometryResult>();
  for (const result of results) {
    const key = patternOf(tensors, result).join();
    if (!seen.has(key) && result.scattering.length > 0) seen.set(key, result);
  }
  return [...seen.values()].sort((a, b) => a.scattering.length - b.scattering.length);
}

function bestSubset(
  tensors: CrystalTensors,
  candidates: readonly GeometryResult[],
  size: number,
): GeometryResult[] | null {
  let best: GeometryResult[] | null = null;
  let least = Number.POSITIVE_INFINITY;
  const shown = (set: readonly GeometryResult[]) => set.reduce((n, r) => n + r.scattering.length, 0);
  const extend = (start: number, chosen: GeometryResult[]) => {
    if (chosen.length === size) {
      if (shown(chosen) < least && separates(tensors, chosen)) {
        best = [...chosen];
        least = shown(chosen);
      }
      return;
    }
    for (let i = start; i < candidates.length; i++) extend(i + 1, [...chosen, candidates[i]!]);
  };
  extend(0, []);
  return best;
}

/** Every species shows somewhere, and no two of them in the same geometries only. */
function separates(tensors: CrystalTensors, set: readonly GeometryResult[]): boolean {
  const patterns = set.map((result) => patternOf(tensors, result));
  const columns = tensors.raman.map((_, s) => patterns.map((p) => (p[s] ? "1" : "0")).join(""));
  return columns.every((c) => c.includes("1")) && new Set(columns).size === columns.length;
}
