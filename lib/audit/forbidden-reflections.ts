import { isSystematicallyAbsent, reflectionConditions, type SpaceGroup } from "../symmetry/index.ts";
import { isForbiddenBy } from "./condition-test.ts";
import type { Observation } from "./observations.ts";

/** A reflection that a group forbids, as the list has it. */
export interface ForbiddenReflection {
  readonly h: number;
  readonly k: number;
  readonly l: number;
  /** Mean F^2 of the equivalents and its standard uncertainty. */
  readonly value: number;
  readonly sigma: number;
  /** Value over the mean intensity at this resolution. */
  readonly share: number;
  /** The narrowest condition that forbids it: `h0l: l=2n`. */
  readonly condition: string;
}

/** The reflections of a list that a group forbids, the strongest by value over uncertainty first. */
export function forbiddenReflections(group: SpaceGroup, observations: readonly Observation[]): ForbiddenReflection[] {
  const conditions = reflectionConditions(group);
  return observations
    .filter((r) => isSystematicallyAbsent(group.operations, r.h))
    .sort((a, b) => b.value / b.sigma - a.value / a.sigma)
    .map(({ h, value, sigma, mean }) => {
      const narrowest = conditions.findLast((c) => isForbiddenBy(c, group, h));
      const condition = narrowest ? `${narrowest.reflections}: ${narrowest.condition}` : "";
      return { h: h[0], k: h[1], l: h[2], value, sigma, share: value / mean, condition };
    });
}
