import type { SpaceGroup } from "../symmetry/index.ts";
import { type Metric, metricMisfit } from "./cell.ts";

/** Largest strain of the cell under the operations of a group; dimensionless. */
export function shapeMisfit(metric: Metric, group: SpaceGroup): number {
  return group.representatives.reduce((worst, a) => Math.max(worst, metricMisfit(metric, a.W)), 0);
}
