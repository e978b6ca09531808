import {
  type AtomSite,
  apply3,
  type Crystal,
  cellOfMetric,
  contactsWithin,
  cross3,
  crystalOf,
  dot3,
  inverse3,
  type Mat3,
  type Metric,
  metricOf,
  multiply3,
  siteSymmetry,
  unit3,
  type Vec3,
} from "../../lib/structure/index.ts";
import {
  type SpaceGroup,
  settingOperations,
  settingsOf,
  spaceGroup,
  transformPoint,
} from "../../lib/symmetry/index.ts";
import { atom, invariantMetric } from "./crystals.ts";
import { randomNumbers } from "./random-structures.ts";
import { axisOf, elementsOf, kindOf, type Shape, shapes, transposed } from "./rigid-shapes.ts";

/** A molecule or atom put into a crystal, with all that is needed to count its motions by hand. */
export interface PlacedUnit {
  /** Null for a single atom. */
  readonly shape: Shape | null;
  /** The point that its site group fixes; fractional. */
  readonly centre: Vec3;
  /** Direction of a linear molecule, Cartesian. */
  readonly axis: Vec3;
  /** Order of the site group of the centre. */
  readonly siteOrder: number;
  readonly atoms: readonly { readonly element: string; readonly place: Vec3 }[];
}

export interface MolecularCrystal {
  readonly crystal: Crystal;
  readonly placed: readonly PlacedUnit[];
}

/** Atoms of different units are kept farther apart than this, so that no choice of bonds can join them; angstrom. */
const APART = 3.4;

/** Larger cells would only cost time. */
const MOST_ATOMS = 160;

/** All crystal systems, kinds of centring, polar, chiral and centrosymmetric classes, symmorphic or not. */
const TYPES = [
  1, 2, 4, 5, 8, 9, 12, 14, 15, 18, 19, 36, 43, 60, 62, 63, 70, 82, 86, 88, 92, 98, 102, 113, 122, 136, 141, 146, 148,
  152, 155, 159, 161, 163, 166, 167, 173, 176, 182, 186, 190, 194, 198, 205, 212, 215, 216, 220, 221, 225, 227, 230,
];

/** A crystal of one or two kinds of molecules and up to two metal atoms, on general and special positions. */
export function molecularCrystal(seed: number): MolecularCrystal {
  const random = randomNumbers(seed);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
  for (;;) {
    const group = spaceGroup(settingOperations(settingsOf(pick(TYPES))[0]!));
    const found = metricOf(cellOfMetric(invariantMetric(group, [9 * random(), 9 * random(), 9 * random()])));
    const wanted = [true, random() < 0.3 ? true : null, random() < 0.5 ? false : null];
    const placed = wanted.flatMap((isMolecule) => {
      const kinds = isMolecule ? [pick(shapes()), pick(shapes()), pick(shapes()), pick(shapes())] : ["K"];
      const unit = isMolecule === null ? null : place(kinds, group, found, random);
      return unit ? [unit] : [];
    });
    if (!placed.some((u) => u.shape)) continue;
    const crystal = assemble(group, found, placed, MOST_ATOMS);
    if (crystal) return { crystal, placed };
  }
}

/** A crystal of a type with molecules of the shapes named, and atoms of the elements named, all on general positions. */
export function crystalWith(type: number, kinds: readonly string[], seed: number): Crystal {
  const random = randomNumbers(seed);
  const group = spaceGroup(settingOperations(settingsOf(type)[0]!));
  const narrow = metricOf(cellOfMetric(invariantMetric(group, [1, 2, 3])));
  for (;;) {
    const placed = kinds.map((kind) => {
      const shape = shapes().find((s) => s.name === kind) ?? kind;
      const centre: Vec3 = [random(), random(), random()];
      return placeAt(shape, { group, metric: narrow, centre, reach: 0 }, random)!;
    });
    const crystal = assemble(group, narrow, placed, Number.POSITIVE_INFINITY);
    if (crystal) return crystal;
  }
}

/** Puts the first of the shapes (or elements) that fits there on a random position; null where none does. */
function place(
  kinds: readonly (Shape | string)[],
  group: SpaceGroup,
  metric: Metric,
  random: () => number,
): PlacedUnit | null {
  const reach = [0.01, 2, 4, 6, 6][Math.floor(random() * 5)]!;
  const centre: Vec3 = [random(), random(), random()];
  for (const kind of kinds) {
    const unit = placeAt(kind, { group, metric, centre, reach }, random);
    if (unit) return unit;
  }
  return null;
}

/** Where a unit is to stand: on the special position within reach, angstrom, or on the point itself. */
interface Place {
  readonly group: SpaceGroup;
  readonly metric: Metric;
  readonly centre: Vec3;
  readonly reach: number;
}

function placeAt(kind: Shape | string, place: Place, random: () => number): PlacedUnit | null {
  const { group, metric, centre, reach } = place;
  const site = siteSymmetry(group.operations, metric, centre, reach);
  const common = { centre: site.point, siteOrder: site.operations.length };
  if (typeof kind === "string") {
    return { shape: null, ...common, axis: [0, 0, 1], atoms: [{ element: kind, place: [0, 0, 0] }] };
  }
  const C = metric.toCartesian;
  const matrices = site.operations.map(({ W }) => multiply3(C, multiply3(W, inverse3(C))));
  const R = orientationOn(elementsOf(kind), matrices, random);
  if (!R) return null;
  const atoms = kind.atoms.map((a) => ({ element: a.element, place: apply3(R, a.place) }));
  return { shape: kind, ...common, axis: [R[2], R[5], R[8]], atoms };
}

/** A rotation R such that every matrix of the site is R m R^T with an element m of the molecule's group. */
function orientationOn(elements: readonly Mat3[], site: readonly Mat3[], random: () => number): Mat3 | null {
  const count = (list: readonly Mat3[], key: string) => list.filter((m) => kindOf(m).key === key).length;
  const keys = new Set(site.map((m) => kindOf(m).key));
  if ([...keys].some((key) => count(site, key) > count(elements, key))) return null;
  const axes = site.flatMap((m) => {
    const axis = axisOf(m);
    return axis ? [{ key: kindOf(m).key, axis }] : [];
  });
  const main = axes[0] ?? null;
  const other = axes.find((a) => main && Math.abs(dot3(a.axis, main.axis)) < 0.99) ?? null;
  const like = (key: string) => elements.filter((m) => kindOf(m).key === key).map((m) => axisOf(m)!);
  const start = Math.floor(random() * 1e6);
  const turned = <T>(list: readonly T[]) => list.map((_, i) => list[(i + start) % list.length]!);
  for (const first of main ? turned(like(main.key)) : [anyDirection(random)]) {
    for (const second of other ? turned(like(other.key)).flatMap(bothWays) : [anyDirection(random)]) {
      const from = basisOf(first, second);
      const to = basisOf(main?.axis ?? anyDirection(random), other?.axis ?? anyDirection(random));
      if (!from || !to) continue;
      const R = multiply3(to, transposed(from));
      if (site.every((s) => elements.some((m) => same(multiply3(transposed(R), multiply3(s, R)), m)))) return R;
    }
  }
  return null;
}

const bothWays = (v: Vec3): Vec3[] => [v, [-v[0], -v[1], -v[2]]];
const same = (a: Mat3, b: Mat3): boolean => a.every((e, i) => Math.abs(e - b[i]!) < 1e-6);

function anyDirection(random: () => number): Vec3 {
  return unit3([random() - 0.5, random() - 0.5, random() - 0.5]);
}

/** Orthonormal columns, the first along u, the second in the plane of u and v; null where these are parallel. */
function basisOf(u: Vec3, v: Vec3): Mat3 | null {
  const normal = cross3(u, v);
  if (Math.hypot(...normal) < 1e-3) return null;
  const w = unit3(normal);
  const y = cross3(w, u);
  return [u[0], y[0], w[0], u[1], y[1], w[1], u[2], y[2], w[2]];
}

/** The crystal, its cell widened until the units are apart; null where it would hold too many atoms. */
function assemble(group: SpaceGroup, narrow: Metric, placed: readonly PlacedUnit[], mostAtoms: number): Crystal | null {
  for (let width = 1; width < 20; width *= 1.25) {
    const metric = metricOf(cellOfMetric(narrow.g.map((e) => e * width * width) as unknown as Mat3));
    const points = instances(group, metric, placed);
    if (points.length > mostAtoms) return null;
    const positions = points.map((p) => p.position);
    const touching = contactsWithin(metric, positions, APART).contacts.some(({ first, second, shift }) => {
      return points[first]!.instance !== points[second]!.instance || shift.some((e) => e !== 0);
    });
    if (touching) continue;
    const sites = placed.flatMap((unit, u) => unit.atoms.map((a, k) => siteOf(metric, unit, u, k, a)));
    const { sites: unique } = crystalOf({ name: "molecules", metric, group, sites, tolerance: 0.01 });
    return crystalOf({ name: "molecules", metric, group, sites: unique, tolerance: 0.01 });
  }
  return null;
}

function siteOf(metric: Metric, unit: PlacedUnit, u: number, k: number, a: PlacedUnit["atoms"][number]): AtomSite {
  return atom(`${a.element}${u}${String.fromCharCode(97 + k)}`, a.element, atomPosition(metric, unit, a.place));
}

function atomPosition(metric: Metric, unit: PlacedUnit, place: Vec3): Vec3 {
  const d = apply3(metric.toFractional, place);
  return [unit.centre[0] + d[0], unit.centre[1] + d[1], unit.centre[2] + d[2]];
}

/** The different units of the cell: one operation for each place to which the centre of a unit is carried. */
export function imagesOf(group: SpaceGroup, centre: Vec3): { readonly operation: number; readonly centre: Vec3 }[] {
  const found: { operation: number; centre: Vec3 }[] = [];
  group.operations.forEach((g, operation) => {
    const image = transformPoint(g, centre);
    if (!found.some((f) => isLattice(f.centre, image))) found.push({ operation, centre: image });
  });
  return found;
}

export function isLattice(a: Vec3, b: Vec3): boolean {
  return a.every((e, i) => Math.abs(e - b[i]! - Math.round(e - b[i]!)) < 1e-6);
}

function instances(group: SpaceGroup, metric: Metric, placed: readonly PlacedUnit[]) {
  return placed.flatMap((unit, u) =>
    imagesOf(group, unit.centre).flatMap(({ operation }) =>
      unit.atoms.map((a) => ({
        instance: `${u} ${operation}`,
        position: transformPoint(group.operations[operation]!, atomPosition(metric, unit, a.place)),
      })),
    ),
  );
}
