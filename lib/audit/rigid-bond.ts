import { apply3, type Bond, type BondRule, bondsOf, type Crystal, type Metric, type Vec3 } from "../structure/index.ts";
import type { AuditInput } from "./audit-input.ts";
import {
  cartesianTensor,
  columnsOf,
  rotatedTensor,
  type Six,
  type TensorRow,
  tensorRows,
} from "./displacement-tensors.ts";
import { type Criterion, count, type Finding, finding, some } from "./finding.ts";

/** Uncertainties that the difference must exceed. */
const SU_FACTOR = 5;
/** Hirshfeld's 0.001 is for the best data; ordinary refinements scatter to this; square angstrom. */
const LEAST_DIFFERENCE = 0.01;

const RIGID: Criterion = {
  id: "rigid-bond",
  severity: "doubt",
  criterion:
    "The mean squares of two bonded non-metal atoms along their bond differ by more than " +
    `${LEAST_DIFFERENCE} Å^2 and ${SU_FACTOR} standard uncertainties. Hydrogen and partly occupied sites are left out.`,
  source:
    "F. L. Hirshfeld, Acta Crystallographica A32 (1976) 239-244: differences below 0.001 Å^2 in well refined structures.",
  advice: "Look at disorder, at the element assigned to either atom, and at uncorrected absorption.",
};

export const criteria: readonly Criterion[] = [RIGID];

/** Bonds of these kinds are stiff; those of metals are not. */
const STIFF: readonly BondRule[] = ["non-metals", "oxo-anion", "tetrahedral oxo-anion", "thio-anion"];

/** Do bonded atoms move alike along their bond? */
export function check(input: AuditInput): Finding[] {
  const { crystal } = input;
  if (!crystal) return [];
  const tensors = new Map(tensorRows(input).map((r) => [r.atom.label, r]));
  if (tensors.size < 2) return [];
  const { atoms, bonds } = bondsOf(crystal);
  const seen = new Set<string>();
  const soft = bonds.flatMap((bond) => {
    if (!STIFF.includes(bond.rule)) return [];
    const ends = [atoms[bond.first]!, atoms[bond.second]!].map((a) => ({ a, site: crystal.sites[a.site]! }));
    const rows = ends.map(({ site }) => tensors.get(site.label));
    const [first, second] = rows;
    if (!first || !second || ends.some(({ site }) => site.occupancy < 0.99)) return [];
    const labels = `${ends[0]!.site.label}-${ends[1]!.site.label}`;
    const key = `${labels} ${bond.distance.toFixed(4)}`;
    if (seen.has(key)) return [];
    seen.add(key);
    const direction = directionOf(crystal, bond, atoms[bond.first]!.position, atoms[bond.second]!.position);
    const [p, q] = ends.map(({ a }, i) => along(crystal, rows[i]!, a, direction)) as [Along, Along];
    const difference = p.square - q.square;
    const tolerance = Math.max(LEAST_DIFFERENCE, SU_FACTOR * Math.hypot(p.su, q.su));
    return Math.abs(difference) > tolerance ? [{ labels, first, p, q, difference, tolerance }] : [];
  });
  const [worst] = soft.sort((a, b) => Math.abs(b.difference) - Math.abs(a.difference));
  if (!worst) return [];
  const others = soft.slice(1).map((s) => s.labels);
  const { name, span } = worst.first.stated[0]!;
  const message = `along the bond ${worst.labels} the two atoms move with mean squares of ${worst.p.square.toFixed(4)} and ${worst.q.square.toFixed(4)} Å^2${others.length > 0 ? `; likewise ${count(others.length, "bond")}: ${some(others)}` : ""}`;
  return [
    finding(RIGID, input.place(name, span), message, {
      stated: { what: `first atom of ${worst.labels}, along the bond`, value: worst.p.square },
      against: { what: "second atom", value: worst.q.square },
      difference: worst.difference,
      tolerance: worst.tolerance,
      unit: "Å^2",
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}

/** Unit vector along a bond, Cartesian. */
function directionOf({ metric }: Crystal, { shift, distance }: Bond, from: Vec3, to: Vec3): Vec3 {
  const d = apply3(metric.toCartesian, [
    to[0] + shift[0] - from[0],
    to[1] + shift[1] - from[1],
    to[2] + shift[2] - from[2],
  ]);
  return [d[0] / distance, d[1] / distance, d[2] / distance];
}

interface Along {
  readonly square: number;
  readonly su: number;
}

/** Mean square of an image of a site along a direction. */
function along(crystal: Crystal, row: TensorRow, atom: { site: number; image: number }, direction: Vec3): Along {
  const { metric, group, sites } = crystal;
  const { W } = group.operations[sites[atom.site]!.images[atom.image]!.operation]!;
  const of = (u: Six) => squareAlong(metric, rotatedTensor(metric, u, W), direction);
  const weights = columnsOf((u) => [of(u)]).map((c) => c[0]!);
  return { square: of(row.u), su: Math.hypot(...weights.map((w, k) => w * row.su[k]!)) };
}

function squareAlong(metric: Metric, u: Six, n: Vec3): number {
  const image = apply3(cartesianTensor(metric, u), n);
  return n[0] * image[0] + n[1] * image[1] + n[2] * image[2];
}
