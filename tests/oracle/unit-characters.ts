import { apply3, dot3, inverse3, multiply3, type Vec3 } from "../../lib/structure/index.ts";
import { transformPoint } from "../../lib/symmetry/index.ts";
import { imagesOf, isLattice, type MolecularCrystal } from "../support/molecular-crystals.ts";
import { kindOf } from "../support/rigid-shapes.ts";

/**
 * Characters of translations, librations and all displacements, one per element of the factor group: for each
 * operation the molecules, their axes and the atoms that it carries onto themselves modulo the lattice.
 */
export function unitCharacters({ crystal, placed }: MolecularCrystal) {
  const { group, metric } = crystal;
  const C = metric.toCartesian;
  const cartesian = group.operations.map(({ W }) => multiply3(C, multiply3(W, inverse3(C))));
  const centrings = group.centrings.map(({ n, d }) => n.map((e) => e / d) as unknown as Vec3);
  const fixes = (g: (typeof group.operations)[number], x: Vec3) => {
    const y = transformPoint(g, x);
    return centrings.some((c) => isLattice(y, [x[0] + c[0], x[1] + c[1], x[2] + c[2]]));
  };
  const atoms = crystal.sites.flatMap((s) => s.images.map((image) => image.position));
  const units = placed.flatMap(({ shape, centre, axis }) =>
    imagesOf(group, centre).map((image) => ({ ...image, shape, axis: apply3(cartesian[image.operation]!, axis) })),
  );
  const rows = group.representatives.map((g) => {
    const m = multiply3(C, multiply3(g.W, inverse3(C)));
    const { determinant, trace } = kindOf(m);
    const kept = units.filter((u) => fixes(g, u.centre));
    // a linear molecule does not turn about its axis: s of the axis is 1 where it is kept, -1 where it is reversed
    const about = (u: (typeof units)[number]) => (u.shape!.linear ? dot3(u.axis, apply3(m, u.axis)) : 0);
    const molecules = kept.filter((u) => u.shape !== null);
    const turning = molecules.reduce((s, u) => s + determinant * (trace - about(u)), 0);
    return [kept.length * trace, turning, atoms.filter((x) => fixes(g, x)).length * trace];
  });
  const column = (k: number) => rows.map((row) => row[k]! / centrings.length);
  return { translations: column(0), librations: column(1), all: column(2) };
}
