import { ratMat3, ZERO_VECTOR } from "../algebra/index.ts";
import {
  centringLetter,
  chain,
  formatBasis,
  type GroupNameCandidate,
  reverse,
  type SpaceGroup,
  settingOperations,
  spaceGroup,
  type Transformation,
} from "../symmetry/index.ts";
import type { Metric } from "./cell.ts";
import { shapeMisfit } from "./shape-misfit.ts";

/** Strain up to which a cell counts as primitive cell of a lattice; cells computed without symmetry are off by some 0.1 %. */
const PRIMITIVE_STRAIN = 1e-2;

/**
 * Usual primitive axes of a centred cell, as columns of twice (R: three times) P in (a', b', c') = (a, b, c) P. Where
 * two ways are in use both are given, the more usual one first.
 * Source: International Tables for Crystallography A (2016), table 1.5.1.1 (from memory).
 */
const PRIMITIVE_AXES: Readonly<Record<string, readonly (readonly number[])[]>> = {
  F: [[0, 1, 1, 1, 0, 1, 1, 1, 0]],
  I: [
    [-1, 1, 1, 1, -1, 1, 1, 1, -1],
    [2, 0, 1, 0, 2, 1, 0, 0, 1],
  ],
  C: [
    [1, -1, 0, 1, 1, 0, 0, 0, 2],
    [1, 1, 0, -1, 1, 0, 0, 0, 2],
  ],
  A: [
    [2, 0, 0, 0, 1, -1, 0, 1, 1],
    [2, 0, 0, 0, 1, 1, 0, -1, 1],
  ],
  B: [
    [1, 0, -1, 0, 2, 0, 1, 0, 1],
    [1, 0, 1, 0, 2, 0, -1, 0, 1],
  ],
  R: [[2, -1, -1, 1, 1, -2, 1, 1, 1]],
};

/** A group that a name means, over the axes of a primitive cell. */
export interface PrimitiveSetting {
  readonly group: SpaceGroup;
  /** Index of the candidate it was made from. */
  readonly candidate: number;
  /** The primitive axes in terms of the conventional ones: `1/2b+1/2c,1/2a+1/2c,1/2a+1/2b`. */
  readonly axes: string;
}

/** The settings among those a name may mean of which a cell is the primitive cell; those of the first axes that fit. */
export function primitiveSettings(
  metric: Metric,
  candidates: readonly GroupNameCandidate[],
  groups: readonly SpaceGroup[],
): PrimitiveSetting[] {
  for (const choice of [0, 1]) {
    const fitting = candidates.flatMap((candidate, i) => {
      const letter = centringLetter(groups[i]!.centrings) ?? "P";
      const axes = PRIMITIVE_AXES[letter]?.[choice];
      if (!axes) return [];
      const found = overAxes(candidate, transformationOf(axes, letter === "R" ? 3 : 2));
      return shapeMisfit(metric, found.group) <= PRIMITIVE_STRAIN ? [{ ...found, candidate: i }] : [];
    });
    if (fitting.length > 0) return fitting;
  }
  return [];
}

function transformationOf(n: readonly number[], d: number): Transformation {
  return { P: ratMat3(n as unknown as Parameters<typeof ratMat3>[0], d), p: ZERO_VECTOR };
}

function overAxes({ number, transformation }: GroupNameCandidate, axes: Transformation) {
  const toReference = chain(reverse(axes), transformation);
  return { group: spaceGroup(settingOperations({ number, toReference })), axes: formatBasis(axes.P) };
}
