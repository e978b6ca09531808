import type { CharacterTable, ConjugacyClass } from "../representation/index.ts";

/** Names of the classes of lateral twofold axes, without their size. */
const LATERAL_AXES = ["C2'", "C2''"];

/** Names of the classes of planes through the principal axis. */
const VERTICAL_PLANES = ["sigma_v", "sigma_d"];

/** Name of a class without the number of its members: `sigma_v` for `3sigma_v`. */
function plainName({ name }: ConjugacyClass): string {
  return name.replace(/^\d+/, "");
}

/** Classes of lateral twofold axes that lie in the planes of a class; empty where no class of planes is named sigma_v. */
export function axesInPlanes(group: CharacterTable, planes: ConjugacyClass): string[] {
  const named = group.classes.some((c) => plainName(c) === "sigma_v");
  if (!named || !VERTICAL_PLANES.includes(plainName(planes))) return [];
  // the product of a plane and of a twofold axis in it is the plane normal to it through the axis
  return lateralAxes(group, planes, (product) => product.startsWith("sigma"));
}

/** Classes of lateral twofold axes whose product with a plane of the class, for some axis, is as asked. */
function lateralAxes(group: CharacterTable, planes: ConjugacyClass, asked: (product: string) => boolean): string[] {
  const { order, products, classOf, classes } = group;
  const product = (axis: number) => plainName(classes[classOf[products[order * planes.members[0]! + axis]!]!]!);
  const axes = classes.filter((c) => LATERAL_AXES.includes(plainName(c)));
  return axes.filter((c) => c.members.some((axis) => asked(product(axis)))).map(plainName);
}

/**
 * Whether tables of crystals and of molecules call the vertical planes by each other's names: in D6h sigma_v is normal to
 * C2' in crystals, as [100] is a direction of planes as well as of axes, and contains C2' in molecules. In D4h the planes
 * normal to C2' contain the other C2'. Species are named by C2' in both, so that their labels agree.
 * Sources: International Tables for Crystallography A (2016), section 2.1.3.4 (symmetry directions); R. S. Mulliken,
 * J. Chem. Phys. 23 (1955) 1997; from memory.
 */
export function planeNaming(group: CharacterTable): "crystal" | "molecule" | null {
  const planes = group.classes.find((c) => plainName(c) === "sigma_v");
  if (!planes) return null;
  const contained = axesInPlanes(group, planes).join();
  const along = lateralAxes(group, planes, (product) => product === "i").join();
  if (contained === "" || along === "" || contained === along) return null;
  return along === "C2'" ? "crystal" : "molecule";
}
