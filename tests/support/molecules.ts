import {
  type MolecularUnit,
  molecularSymmetry,
  type ShapedUnit,
  type UnitAtom,
  type Vec3,
} from "../../lib/structure/index.ts";
import { coordinateContent, rigidMotions, unitScaffold, unitStars } from "../../lib/vibrations/index.ts";

/** A molecule in space: atoms as `O 0 0 0.1`, bonded where nearer than the limit; angstrom. */
export function molecule(atoms: readonly string[], bondLimit: number): ShapedUnit & Pick<MolecularUnit, "atoms"> {
  const read = atoms.map((text) => {
    const [element = "", ...numbers] = text.split(" ");
    return { element, place: numbers.map(Number) as unknown as Vec3 };
  });
  const distance = (a: Vec3, b: Vec3) => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
  const bonds = read.flatMap((a, i) =>
    read.flatMap((b, j) => (j > i && distance(a.place, b.place) < bondLimit ? [[i, j] as const] : [])),
  );
  const mean = [0, 1, 2].map((i) => read.reduce((s, a) => s + a.place[i]! / read.length, 0)) as unknown as Vec3;
  return {
    atoms: read.map((a, k): UnitAtom => {
      const place = { fractional: a.place, cartesian: a.place };
      return {
        site: k,
        label: `${a.element}${k}`,
        element: a.element,
        occupancy: 1,
        image: 0,
        shift: [0, 0, 0],
        ...place,
      };
    }),
    bonds,
    centroid: { fractional: mean, cartesian: mean },
    site: {
      operations: [{ W: [1, 0, 0, 0, 1, 0, 0, 0, 1], w: { n: [0, 0, 0], d: 1 } }],
      matrices: [[1, 0, 0, 0, 1, 0, 0, 0, 1]],
      permutations: [read.map((_, k) => k)],
    },
  };
}

/** Sums of species by kind of coordinate, independent and redundant, of a molecule that is not linear. */
export function contentOf(unit: ShapedUnit, lowerTo?: string) {
  const symmetry = molecularSymmetry(unit, lowerTo === undefined ? {} : { lowerTo });
  if (symmetry.kind === "linear") throw new RangeError("a linear molecule has no finite group");
  const { group, idealised } = symmetry;
  const content = coordinateContent(
    unitScaffold({ unit, ...symmetry }),
    unitStars({ unit, ...symmetry }),
    group,
    rigidMotions(idealised),
  );
  const text = (n: readonly number[]) =>
    n.flatMap((k, i) => (k > 0 ? [`${k > 1 ? k : ""}${group.irreps[i]!.label}`] : [])).join(" + ");
  const modes = (n: readonly number[]) => n.reduce((s, k, i) => s + k * group.irreps[i]!.dimension, 0);
  const kinds = content.kinds.map((k) => ({
    kind: k.kind,
    independent: text(k.independent),
    redundant: text(k.all.map((n, i) => n - k.independent[i]!)),
    modes: modes(k.independent),
  }));
  return {
    schoenflies: symmetry.schoenflies,
    kinds,
    sets: content.sets.map((s) => ({ ...s, species: text(s.species) })),
  };
}
