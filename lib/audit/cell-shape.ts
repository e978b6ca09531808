import type { IntMat3 } from "../algebra/index.ts";
import { metricMisfit, metricOf } from "../structure/index.ts";
import { formatOperation } from "../symmetry/index.ts";
import type { AuditInput } from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";
import { cellTolerance, cellUncertainty, statedCell } from "./stated-cell.ts";

/** Standard uncertainties of the cell that its shape may be off. */
const SU_FACTOR = 3;
/** Strain below which a cell counts as right whatever its digits say: five units in the fourth decimal of 5 Å. */
const LEAST_STRAIN = 1e-4;
/** Most operations that are measured with uncertainties; all rotations of a cubic group would say the same again. */
const MOST_SHOWN = 3;

const SHAPE: Criterion = {
  id: "cell-shape",
  severity: "contradiction",
  criterion:
    "A symmetry operation in use does not keep lengths and angles of the cell: W^T G W differs from the metric tensor G " +
    `(relative to the axes) by more than the rounding of the six parameters and ${SU_FACTOR} standard uncertainties, and ` +
    `by more than ${LEAST_STRAIN}.`,
  source: "An isometry keeps the metric tensor; International Tables for Crystallography A (2016), chapter 1.3.",
  advice: "Compare the cell with the crystal system: an axis or angle is wrong, or the group belongs to other axes.",
};

export const criteria: readonly Criterion[] = [SHAPE];

/** Does every operation keep the cell? */
export function check(input: AuditInput): Finding[] {
  const { metric, symmetry } = input;
  const cell = statedCell(input);
  if (!metric || !symmetry || !cell) return [];
  const { group, summary } = symmetry.identified;
  const strained = group.representatives
    .map((a) => ({ a, strain: metricMisfit(metric, a.W) }))
    .filter(({ strain }) => strain > LEAST_STRAIN)
    .sort((p, q) => q.strain - p.strain);
  for (const { a, strain } of strained.slice(0, MOST_SHOWN)) {
    const misfit = misfitOf(a.W);
    const tolerance = LEAST_STRAIN + cellTolerance(cell, misfit) + SU_FACTOR * cellUncertainty(cell, misfit);
    if (strain <= tolerance) continue;
    const xyz = formatOperation(a);
    const shape = `${cell.a.text} ${cell.b.text} ${cell.c.text} Å, ${cell.alpha.text} ${cell.beta.text} ${cell.gamma.text}°`;
    const message =
      `the cell ${shape} is not kept by the operation ${xyz} of the ${summary.crystalSystem} group in use: ` +
      `it is strained by ${(100 * strain).toFixed(2)} %`;
    return [
      finding(SHAPE, input.place(cell.a.name, cell.a.span), message, {
        stated: { what: "cell", value: shape },
        against: { what: "operation of the group in use", value: xyz },
        difference: strain,
        tolerance,
        unit: "relative change of the metric tensor",
      }),
    ];
  }
  return [];
}

function misfitOf(W: IntMat3) {
  return (cell: Parameters<typeof metricOf>[0]) => metricMisfit(metricOf(cell), W);
}
