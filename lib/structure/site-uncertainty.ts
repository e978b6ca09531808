import { isHydrogen } from "./bond-class.ts";
import { apply3, lengthOf, type Metric, type Vec3 } from "./cell.ts";
import type { Crystal, CrystalSite } from "./crystal.ts";
import { scaledDirections } from "./free-parameters.ts";
import { dot3 } from "./rotation-fit.ts";

/** How a site may be displaced. */
export interface SiteUncertainty {
  /** Fractional displacements of the listed point, each scaled by its s.u.; none for a fixed point. */
  readonly directions: readonly Vec3[];
  /** False where the site is free to move and the file gives no uncertainty. */
  readonly known: boolean;
}

/**
 * Uncertainty of every listed point, along the directions that its site symmetry leaves free. A coordinate without
 * uncertainty beside others that have one counts as held; in a polar group one atom may be held along the polar
 * directions to fix the origin. Where an atom has no uncertainty at all, that of its distances is unknown.
 */
export function siteUncertainties(crystal: Crystal): SiteUncertainty[] {
  const found = crystal.sites.map((site) => scaledDirections(freeDirections(site), site.su));
  const anyKnown = found.some((s) => s.directions.length > 0);
  const isPolar = polarTest(crystal);
  const held = found.flatMap(({ directions, unknown }, i) => {
    const { element } = crystal.sites[i]!;
    return directions.length === 0 && unknown.length > 0 && !isHydrogen(element) && unknown.every(isPolar) ? [i] : [];
  });
  const origin = anyKnown && held.length === 1 ? held[0]! : null;
  return found.map(({ directions, unknown }, i) => ({
    directions: isotropic(
      crystal.metric,
      (directions as unknown as readonly Vec3[]).filter((d) => d.some((e) => e !== 0)),
    ),
    known: unknown.length === 0 || directions.length > 0 || i === origin,
  }));
}

/**
 * The same uncertainties along directions that are independent if the error of the place is equal in all directions that
 * the site leaves free: in oblique axes coordinates are then correlated, by the cosines of the reciprocal angles.
 * Source: D. H. Templeton, Acta Crystallographica 12 (1959) 771-773 (from memory).
 */
function isotropic(metric: Metric, scaled: readonly Vec3[]): Vec3[] {
  if (scaled.length < 2) return [...scaled];
  // of unit lengths, so that the covariance of equal errors is the inverse of the matrix of their products
  const lengths = scaled.map((d) => lengthOf(metric, d));
  const products = scaled.map((a, i) =>
    scaled.map((b, j) => dot3(a, apply3(metric.g, b)) / (lengths[i]! * lengths[j]!)),
  );
  const covariance = inverse(products);
  const root = choleskyRoot(
    covariance.map((row, i) => row.map((e, j) => e / Math.sqrt(covariance[i]![i]! * covariance[j]![j]!))),
  );
  return scaled.map(
    (_, k) => [0, 1, 2].map((axis) => scaled.reduce((s, d, i) => s + d[axis]! * root[i]![k]!, 0)) as unknown as Vec3,
  );
}

/** Inverse of a positive definite matrix of up to three rows. */
function inverse(m: readonly (readonly number[])[]): number[][] {
  const n = m.length;
  const rows = m.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1 : 0))]);
  for (let k = 0; k < n; k++) {
    rows[k] = rows[k]!.map((e) => e / rows[k]![k]!);
    for (let i = 0; i < n; i++) if (i !== k) rows[i] = rows[i]!.map((e, j) => e - rows[i]![k]! * rows[k]![j]!);
  }
  return rows.map((row) => row.slice(n));
}

/** Lower triangular L with L L^T = m, for a positive definite matrix. */
function choleskyRoot(m: readonly (readonly number[])[]): number[][] {
  const root = m.map((row) => row.map(() => 0));
  for (let i = 0; i < m.length; i++) {
    for (let j = 0; j <= i; j++) {
      let rest = m[i]![j]!;
      for (let k = 0; k < j; k++) rest -= root[i]![k]! * root[j]![k]!;
      root[i]![j] = i === j ? Math.sqrt(Math.max(0, rest)) : rest / root[j]![j]!;
    }
  }
  return root;
}

/** Columns of the projection onto the fixed points of the site group. */
function freeDirections({ symmetry }: CrystalSite): number[][] {
  const { n, d } = symmetry.projection;
  return [0, 1, 2].map((j) => [n[j]! / d, n[3 + j]! / d, n[6 + j]! / d]);
}

/** Whether every operation of the group leaves a direction as it is. */
function polarTest({ group }: Crystal): (direction: readonly number[]) => boolean {
  return (v) =>
    group.representatives.every(({ W }) =>
      [0, 3, 6].every((r) => Math.abs(W[r]! * v[0]! + W[r + 1]! * v[1]! + W[r + 2]! * v[2]! - v[r / 3]!) < 1e-9),
    );
}
