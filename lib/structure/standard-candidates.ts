import {
  addVectors,
  apply,
  type IntMat3,
  type IntVec3,
  inverseUnimodular,
  modOne,
  type RatVec3,
  ratMat3,
  ratVec3,
  subtractVectors,
  ZERO_VECTOR,
} from "../algebra/index.ts";
import {
  normaliserShifts,
  normalisingShift,
  type Operation,
  placedPoints,
  type Transformation,
} from "../symmetry/index.ts";
import { apply3, type Vec3 } from "./cell.ts";
import type { Crystal, CrystalSite } from "./crystal.ts";
import { wrap } from "./orbit.ts";
import { freeCoordinates, standardAxes } from "./standard-axes.ts";

/** A site as it may be described after a change of axes and origin. */
export interface CandidateSite {
  readonly letter: string;
  /** Indices of the images that lie on the first triplet of the position. */
  readonly images: readonly number[];
  /** Their coordinates after the change, three for each, not wrapped. */
  readonly points: Float64Array;
}

/** A change of axes and origin that leaves the reference setting as it is. */
export interface Candidate {
  readonly transformation: Transformation;
  readonly sites: readonly CandidateSite[];
  /** From shifts of the old origin to those of the new. */
  readonly back: IntMat3;
}

/** Every way that the rules of the standard cell leave open to describe a crystal in its reference setting. */
export interface Candidates {
  readonly axes: readonly IntMat3[];
  /** Shifts of the origin for each choice of axes. */
  readonly shifts: readonly RatVec3[];
  /** Coordinates along which the origin is free. */
  readonly free: readonly number[];
  /** Origins tried along these, in the cell given: those that put an atom at 0. */
  readonly origins: readonly Vec3[];
  readonly list: readonly Candidate[];
}

/** @param crystal in the reference setting of its type */
export function standardCandidates(crystal: Crystal): Candidates {
  const { group, metric, identified } = crystal;
  const { number } = identified;
  const axes = standardAxes(metric, group, number);
  const shifts = [ZERO_VECTOR, ...normaliserShifts(number)];
  const free = freeCoordinates(group);
  const sites = crystal.sites.map((site) => imagesOf(site, group.operations));
  const list = axes.flatMap((N) => {
    const p = normalisingShift(number, N)!;
    return shifts.map((t) => candidate(number, N, modOne(addVectors(p, t)), sites));
  });
  return { axes, shifts, free, origins: originsOf(crystal, free), list };
}

/** An image of a site with the points that its site-symmetry group fixes. */
interface PlacedImage {
  readonly position: Vec3;
  readonly order: number;
  readonly point: RatVec3;
  readonly directions: readonly IntVec3[];
  /** Equal for equal points and directions. */
  readonly key: string;
}

function imagesOf({ symmetry, images }: CrystalSite, operations: readonly Operation[]): PlacedImage[] {
  const { projection, offset } = symmetry;
  const columns = [0, 1, 2].map((j): IntVec3 => [projection.n[j]!, projection.n[3 + j]!, projection.n[6 + j]!]);
  return images.map(({ position, operation }) => {
    const { W, w } = operations[operation]!;
    const point = modOne(addVectors(ratVec3(apply(W, offset.n), offset.d), w));
    const directions = columns.map((v) => apply(W, v));
    const key = `${symmetry.operations.length}|${point.n.join()}/${point.d}|${directions.join(";")}`;
    return { position, order: symmetry.operations.length, point, directions, key };
  });
}

function candidate(number: number, N: IntMat3, p: RatVec3, sites: readonly (readonly PlacedImage[])[]): Candidate {
  const back = inverseUnimodular(N);
  const known = new Map<string, ReturnType<typeof placedPoints>>();
  const placed = ({ key, point, directions, order }: PlacedImage) => {
    let found = known.get(key);
    if (!found) {
      const moved = subtractVectors(point, p);
      const at = ratVec3(apply(back, moved.n), moved.d);
      found = placedPoints(
        number,
        at,
        directions.map((v) => apply(back, v)),
        order,
      );
      known.set(key, found);
    }
    return found;
  };
  return {
    transformation: { P: ratMat3(N), p },
    back,
    sites: sites.map((images) => candidateSite(images, placed, back, p)),
  };
}

function candidateSite(
  images: readonly PlacedImage[],
  placed: (image: PlacedImage) => { readonly letter: string; readonly first: boolean },
  back: IntMat3,
  { n, d }: RatVec3,
): CandidateSite {
  const kept = images.flatMap((image, i) => (image.order === 1 || placed(image).first ? [i] : []));
  const points = new Float64Array(3 * kept.length);
  kept.forEach((i, k) => {
    const { position } = images[i]!;
    points.set(apply3(back, [position[0] - n[0] / d, position[1] - n[1] / d, position[2] - n[2] / d]), 3 * k);
  });
  return { letter: placed(images[0]!).letter, images: kept, points };
}

/** Shifts nearer to each other than this are one; fractional; rounding. */
const SAME_ORIGIN = 1e-9;

function originsOf({ sites }: Crystal, free: readonly number[]): Vec3[] {
  if (free.length === 0) return [[0, 0, 0]];
  const found = new Map<string, Vec3>();
  for (const { images } of sites) {
    for (const { position } of images) {
      const shift = position.map((e, i) => (free.includes(i) ? wrap(e) : 0)) as unknown as Vec3;
      found.set(shift.map((e) => Math.round(e / SAME_ORIGIN)).join(), shift);
    }
  }
  return [...found.values()];
}
