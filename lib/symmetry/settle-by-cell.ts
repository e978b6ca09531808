import { inverseRatMat, multiplyRatMat, ratMat3 } from "../algebra/index.ts";
import type { GroupNameCandidate, GroupNameReading } from "./hermann-mauguin.ts";
import { ambiguities } from "./name-ambiguity.ts";
import { referenceGroup } from "./reference-group.ts";

/** Lengths in any one unit, angles in degrees. */
export interface CellShape {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly alpha: number;
  readonly beta: number;
  readonly gamma: number;
}

/**
 * Largest relative misfit of the metric (dimensionless; about 0.06 degrees in a right angle, 5e-4 in a ratio of
 * lengths) of a cell written so as to obey its symmetry: the rounding of files, not a distortion.
 */
export const WRITTEN_METRIC_TOLERANCE = 1e-3;

/**
 * Largest relative misfit of the metric (dimensionless; about one degree, one per cent in length) of a cell that was
 * measured or relaxed without constraints.
 */
export const MEASURED_METRIC_TOLERANCE = 2e-2;

/**
 * Keeps the candidates whose axes the cell allows: the metric must be the same after every rotation of the group. Where
 * some fit as written, those that fit only as measured are dropped; where none fits, the reading comes back with that
 * said among its ambiguities.
 */
export function settleByCell(reading: GroupNameReading, cell: CellShape): GroupNameReading {
  const metric = metricTensor(cell);
  const rated = reading.candidates.map((candidate) => ({ candidate, misfit: metricMisfit(candidate, metric) }));
  const within = (limit: number) => rated.filter((r) => r.misfit <= limit).map((r) => r.candidate);
  const written = within(WRITTEN_METRIC_TOLERANCE);
  const kept = written.length > 0 ? written : within(MEASURED_METRIC_TOLERANCE);
  if (kept.length === 0) return { ...reading, ambiguity: [...reading.ambiguity, "the cell fits none of them"] };
  const first = kept[0]!.setting;
  const open = ambiguities(kept.map((c) => c.setting));
  const known = ambiguities(reading.candidates.map((c) => c.setting));
  const remarks = reading.ambiguity.filter((a) => !known.includes(a));
  const named = reading.kind === "hermann-mauguin" && kept.length < reading.candidates.length;
  const understoodAs = named ? nameOf(first.hermannMauguin.full, reading) : reading.understoodAs;
  return { ...reading, understoodAs, candidates: kept, ambiguity: [...remarks, ...open] };
}

function nameOf(full: string, reading: GroupNameReading): string {
  const [, ...codes] = reading.understoodAs.split(", ");
  return [full, ...codes].join(", ");
}

type Metric = readonly number[];

function metricTensor({ a, b, c, alpha, beta, gamma }: CellShape): Metric {
  const cos = (degrees: number) => Math.cos((degrees * Math.PI) / 180);
  const [xy, xz, yz] = [a * b * cos(gamma), a * c * cos(beta), b * c * cos(alpha)];
  return [a * a, xy, xz, xy, b * b, yz, xz, yz, c * c];
}

/** Largest |W^T G W - G| over all rotations, relative to the lengths of the axes. */
function metricMisfit(candidate: GroupNameCandidate, G: Metric): number {
  let worst = 0;
  for (const W of rotationsOf(candidate)) {
    for (let i = 0; i < 3; i++) {
      for (let j = i; j < 3; j++) {
        let sum = 0;
        for (let k = 0; k < 3; k++) for (let l = 0; l < 3; l++) sum += W[3 * k + i]! * G[3 * k + l]! * W[3 * l + j]!;
        worst = Math.max(worst, Math.abs(sum - G[3 * i + j]!) / Math.sqrt(G[4 * i]! * G[4 * j]!));
      }
    }
  }
  return worst;
}

/** Rotation parts of a candidate in its own axes; an axis system that does not keep the lattice has fractions. */
function rotationsOf({ number, transformation: { P } }: GroupNameCandidate): number[][] {
  const back = inverseRatMat(P);
  return referenceGroup(number).representatives.map(({ W }) => {
    const own = multiplyRatMat(multiplyRatMat(P, ratMat3(W)), back);
    return own.n.map((n) => n / own.d);
  });
}
