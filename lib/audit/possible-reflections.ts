import type { IntMat3 } from "../algebra/index.ts";
import type { Metric } from "../structure/index.ts";
import type { SpaceGroup } from "../symmetry/index.ts";

/** More reflections than this are not counted one by one. */
const MOST_COUNTED = 600_000;

/** How many reflections lie within a resolution. */
export interface PossibleReflections {
  /** Independent ones in the Laue class, and in the point group, where Friedel opposites count as different. */
  readonly laue: number;
  readonly pointGroup: number;
  /** Angstrom; the smallest spacing. */
  readonly resolution: number;
}

/**
 * Numbers of independent reflections up to a resolution, systematic absences left out: by Burnside's lemma from the
 * reflections that each rotation keeps.
 * @returns null where there are too many to count
 */
export function possibleReflections(metric: Metric, group: SpaceGroup, resolution: number): PossibleReflections | null {
  const most = 1 / resolution ** 2;
  const expected = ((4 / 3) * Math.PI * metric.volume) / resolution ** 3;
  if (!(expected < MOST_COUNTED)) return null;
  const rotations = group.representatives.map((a) => a.W);
  const own = new Array<number>(rotations.length).fill(0);
  const opposite = new Array<number>(rotations.length).fill(0);
  const [h1, k1, l1] = limits(metric, resolution);
  for (let h = -h1; h <= h1; h++) {
    for (let k = -k1; k <= k1; k++) {
      for (let l = -l1; l <= l1; l++) {
        const s = inverseSquare(metric, h, k, l);
        if (s > most || s === 0 || isCentred(group, h, k, l)) continue;
        if (isForbidden(group, h, k, l)) continue;
        rotations.forEach((W, i) => {
          const [p, q, r] = carried(W, h, k, l);
          if (p === h && q === k && r === l) own[i]!++;
          if (p === -h && q === -k && r === -l) opposite[i]!++;
        });
      }
    }
  }
  const sum = (list: readonly number[]) => list.reduce((s, n) => s + n, 0);
  const pointGroup = sum(own) / rotations.length;
  const centric = rotations.some((W) => W.every((e, i) => e === (i % 4 === 0 ? -1 : 0)));
  return { laue: centric ? pointGroup : (sum(own) + sum(opposite)) / (2 * rotations.length), pointGroup, resolution };
}

/** Largest indices within a resolution: an axis over the spacing. */
export function limits({ cell }: Metric, resolution: number): [number, number, number] {
  return [Math.floor(cell.a / resolution), Math.floor(cell.b / resolution), Math.floor(cell.c / resolution)];
}

/** 1/d^2, per square angstrom. */
export function inverseSquare({ toFractional: m }: Metric, h: number, k: number, l: number): number {
  const x = h * m[0] + k * m[3] + l * m[6];
  const y = h * m[1] + k * m[4] + l * m[7];
  const z = h * m[2] + k * m[5] + l * m[8];
  return x * x + y * y + z * z;
}

/** h W, indices as a row. */
function carried(W: IntMat3, h: number, k: number, l: number): [number, number, number] {
  return [h * W[0] + k * W[3] + l * W[6] + 0, h * W[1] + k * W[4] + l * W[7] + 0, h * W[2] + k * W[5] + l * W[8] + 0];
}

/** A reflection is absent if an operation keeps it and shifts its phase. */
function isForbidden({ representatives }: SpaceGroup, h: number, k: number, l: number): boolean {
  return representatives.some(({ W, w: { n, d } }) => {
    if ((h * n[0] + k * n[1] + l * n[2]) % d === 0) return false;
    const [p, q, r] = carried(W, h, k, l);
    return p === h && q === k && r === l;
  });
}

function isCentred({ centrings }: SpaceGroup, h: number, k: number, l: number): boolean {
  return centrings.some(({ n, d }) => (h * n[0] + k * n[1] + l * n[2]) % d !== 0);
}
