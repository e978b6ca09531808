import { transpose } from "../algebra/index.ts";
import type { SpaceGroup } from "../symmetry/index.ts";
import { cellOfMetric, type Mat3, type Metric, metricMisfit, metricOf, multiply3 } from "./cell.ts";

/** A cell whose operations strain it less than this is left as it is; rounding of doubles lies below. Dimensionless. */
const ROUNDING = 1e-12;

/**
 * The metric nearest to a given one that every operation of the group leaves unchanged: the mean of its images.
 * Operations are orthogonal in its Cartesian frame, which a measured cell (a = 5.001, b = 5.002) does not grant.
 */
export function invariantMetric(metric: Metric, group: SpaceGroup): Metric {
  const rotations = group.representatives.map((a) => a.W);
  if (rotations.every((W) => metricMisfit(metric, W) < ROUNDING)) return metric;
  const sum = new Array<number>(9).fill(0);
  for (const W of rotations) {
    const image = multiply3(transpose(W), multiply3(metric.g, W));
    for (let i = 0; i < 9; i++) sum[i]! += image[i]! / rotations.length;
  }
  return metricOf(cellOfMetric(sum as unknown as Mat3));
}
