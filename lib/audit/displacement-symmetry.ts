import type { IntMat3 } from "../algebra/index.ts";
import type { Metric } from "../structure/index.ts";
import { formatOperation, TENSOR_COMPONENTS } from "../symmetry/index.ts";
import type { AuditInput } from "./audit-input.ts";
import { columnsOf, rotatedTensor, type TensorRow, tensorRows } from "./displacement-tensors.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";

/** Standard uncertainties that a component may be off. */
const SU_FACTOR = 3;
/** Differences below this are rounding inside a program; square angstrom. */
const LEAST = 2e-4;

const SYMMETRY: Criterion = {
  id: "displacement-symmetry",
  severity: "contradiction",
  criterion:
    "A displacement tensor is changed by an operation that fixes its site: a component of W U W^T (on the axes of the cell) " +
    `differs from that of U by more than the rounding, ${SU_FACTOR} standard uncertainties and ${LEAST} Å^2.`,
  source: "W. J. A. M. Peterse, J. H. Palm, Acta Crystallographica 20 (1966) 147-150; Neumann's principle.",
  advice: "Look for exchanged or wrong components; `sites` prints what the site allows.",
};

export const criteria: readonly Criterion[] = [SYMMETRY];

interface Broken {
  readonly row: TensorRow;
  readonly xyz: string;
  readonly component: number;
  readonly image: number;
  readonly difference: number;
  readonly tolerance: number;
}

/** Does every displacement tensor have the symmetry of its site? */
export function check(input: AuditInput): Finding[] {
  const { crystal } = input;
  if (!crystal) return [];
  const broken = tensorRows(input).flatMap((row) => brokenBy(crystal.metric, row) ?? []);
  const worst = broken.reduce<Broken | null>((m, b) => (m && excess(m) >= excess(b) ? m : b), null);
  if (!worst) return [];
  const { row, xyz, component, image, difference, tolerance } = worst;
  const name = `U${TENSOR_COMPONENTS[component]}`;
  const others = broken.filter((b) => b !== worst).map((b) => b.row.atom.label);
  const stated = row.stated[component]!;
  const message = `the displacement tensor of ${row.atom.label} is changed by ${xyz}, which fixes the site: ${name} ${row.u[component]!.toFixed(4)} becomes ${image.toFixed(4)} Å^2${others.length > 0 ? `; likewise ${some(others)}` : ""}`;
  return [
    finding(SYMMETRY, input.place(stated.name, stated.span), message, {
      stated: { what: `${stated.name} of ${row.atom.label}`, value: row.u[component]! },
      against: { what: `the same after ${xyz}`, value: image },
      difference,
      tolerance,
      unit: "Å^2",
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}

function excess(b: Broken): number {
  return Math.abs(b.difference) / b.tolerance;
}

function brokenBy(metric: Metric, row: TensorRow): Broken | null {
  let worst: Broken | null = null;
  for (const a of row.site?.symmetry.operations ?? []) {
    if (isTrivial(a.W)) continue;
    const image = rotatedTensor(metric, row.u, a.W);
    const columns = columnsOf((u) => rotatedTensor(metric, u, a.W));
    image.forEach((value, i) => {
      const difference = value - row.u[i]!;
      const weights = columns.map((c, j) => c[i]! - (i === j ? 1 : 0));
      const slack = weights.reduce((s, w, j) => s + Math.abs(w) * row.rounding[j]!, 0);
      const su = Math.hypot(...weights.map((w, j) => w * row.su[j]!));
      const tolerance = LEAST + slack + SU_FACTOR * su;
      const found = { row, xyz: formatOperation(a), component: i, image: value, difference, tolerance };
      if (Math.abs(difference) > tolerance && (!worst || excess(found) > excess(worst))) worst = found;
    });
  }
  return worst;
}

/** Identity and inversion change no tensor. */
function isTrivial(W: IntMat3): boolean {
  return [1, -1].some((s) => W.every((e, i) => e === (i % 4 === 0 ? s : 0)));
}
