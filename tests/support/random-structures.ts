import {
  IDENTITY,
  type IntMat3,
  inverseRatMat,
  multiply,
  multiplyRatMat,
  type RatMat3,
  ratMat3,
} from "../../lib/algebra/index.ts";
import {
  type AtomSite,
  apply3,
  type Crystal,
  cellOfMetric,
  contactsWithin,
  crystalOf,
  type Mat3,
  type Metric,
  metricOf,
  multiply3,
  type Vec3,
} from "../../lib/structure/index.ts";
import { parseTriplet, settingOperations, settingsOf, spaceGroup, wyckoffPositions } from "../../lib/symmetry/index.ts";
import { atom, invariantMetric } from "./crystals.ts";

/** Numbers in [0, 1) from a seed: S. K. Park and K. W. Miller, Commun. ACM 31 (1988) 1192. */
export function randomNumbers(seed: number): () => number {
  let state = (seed % 2147483646) + 1;
  const next = () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
  for (let i = 0; i < 5; i++) next();
  return next;
}

/** No two atoms are nearer than this, angstrom. */
const NEAREST = 0.8;
const VOLUME_PER_ATOM = 25; // cubic angstrom
const ELEMENTS = ["Fe", "Cu", "O", "S", "C"];

/** A structure of a type in its reference setting: three atoms in general positions, up to two in special ones. */
export function randomStructure(number: number, random: () => number): Crystal {
  const group = spaceGroup(settingOperations(settingsOf(number)[0]!));
  const special = wyckoffPositions(number).filter((p) => p.order > 1);
  for (let attempt = 0; attempt < 500; attempt++) {
    const sites = [0, 1, 2].map((k) => atom(`${ELEMENTS[k]}1`, ELEMENTS[k]!, [random(), random(), random()]));
    for (let k = 3; k < 5 && special.length > 0; k++) {
      const position = special[Math.floor(random() * special.length)]!;
      sites.push(atom(`${ELEMENTS[k]}1`, ELEMENTS[k]!, pointOn(position.coordinates[0]!, random)));
    }
    const g = invariantMetric(group, [random(), random(), random()]);
    const volume = metricOf(cellOfMetric(g)).volume;
    const k = ((3.2 * group.operations.length * VOLUME_PER_ATOM) / volume) ** (2 / 3);
    const metric = metricOf(cellOfMetric(g.map((e) => e * k) as unknown as Mat3));
    const crystal = crystalOf({ name: `type ${number}`, metric, group, sites, tolerance: 0.01 });
    const points = crystal.sites.flatMap((s) => s.images.map((image) => image.position));
    if (contactsWithin(metric, points, NEAREST).contacts.length === 0) return crystal;
  }
  throw new Error(`no room for atoms in type ${number}`);
}

/** A point of a Wyckoff position given as `x,-x,1/4`. */
function pointOn(coordinates: string, random: () => number): Vec3 {
  const free = [random(), random(), random()];
  return parseTriplet(coordinates, "xyz").map((e) =>
    e.coefficients.reduce((s, c, i) => s + (c.n / c.d) * free[i]!, e.constant.n / e.constant.d),
  ) as unknown as Vec3;
}

/** How a structure is disguised. */
export interface Disguise {
  /** Multiples of a primitive cell along its axes. */
  readonly multiple: readonly [number, number, number];
  /** Largest displacement of an atom along each Cartesian axis, angstrom. */
  readonly noise: number;
  /** Steps of unimodular skewing before and after the multiplication. */
  readonly steps: number;
}

/** The same structure as a list of all atoms in P 1, in a random cell with a random origin, in random order. */
export function disguised(crystal: Crystal, { multiple, noise, steps }: Disguise, random: () => number): Crystal {
  const primitive = crystal.group.primitive;
  const U = randomUnimodular(steps, random);
  const V = randomUnimodular(steps, random);
  const basis = multiplyRatMat(primitive, ratMat3(multiply(multiply(U, diagonal(multiple)), V)));
  const metric = metricIn(crystal.metric, basis);
  const back = float(inverseRatMat(basis));
  const origin: Vec3 = [random(), random(), random()];
  const sites: AtomSite[] = [];
  for (const { element, x } of primitiveAtoms(crystal)) {
    for (let i = 0; i < multiple[0]; i++) {
      for (let j = 0; j < multiple[1]; j++) {
        for (let k = 0; k < multiple[2]; k++) {
          const shift = apply3(float(primitive), apply3(U, [i, j, k]));
          const at = apply3(back, [x[0] + shift[0], x[1] + shift[1], x[2] + shift[2]]);
          const kick = [0, 1, 2].map(() => noise * (2 * random() - 1)) as unknown as Vec3;
          const moved = apply3(metric.toFractional, kick);
          sites.push(atom("", element, at.map((e, m) => e + moved[m]! + origin[m]!) as unknown as Vec3));
        }
      }
    }
  }
  const shuffled = sites
    .map((site) => ({ site, key: random() }))
    .sort((a, b) => a.key - b.key)
    .map(({ site }, i) => ({ ...site, label: `X${i + 1}` }));
  return crystalOf({ name: crystal.name, metric, group: spaceGroup([]), sites: shuffled, tolerance: 0.01 });
}

function primitiveAtoms(crystal: Crystal): { element: string; x: Vec3 }[] {
  const back = float(inverseRatMat(crystal.group.primitive));
  return crystal.sites.flatMap((site) => {
    const found: Vec3[] = [];
    for (const { position } of site.images) {
      const u = apply3(back, position);
      const isNew = found.every((x) => {
        const v = apply3(back, x);
        return u.some((e, i) => Math.abs(e - v[i]! - Math.round(e - v[i]!)) > 1e-6);
      });
      if (isNew) found.push(position);
    }
    return found.map((x) => ({ element: site.element!, x }));
  });
}

function metricIn(metric: Metric, basis: RatMat3): Metric {
  const m = float(basis);
  const t = [0, 3, 6, 1, 4, 7, 2, 5, 8].map((k) => m[k]!) as unknown as Mat3;
  return metricOf(cellOfMetric(multiply3(t, multiply3(metric.g, m))));
}

function float({ n, d }: RatMat3): Mat3 {
  return n.map((e) => e / d) as unknown as Mat3;
}

function diagonal([a, b, c]: readonly [number, number, number]): IntMat3 {
  return [a, 0, 0, 0, b, 0, 0, 0, c];
}

function randomUnimodular(steps: number, random: () => number): IntMat3 {
  let m: IntMat3 = IDENTITY;
  for (let s = 0; s < steps; s++) {
    const i = Math.floor(random() * 3);
    const j = (i + 1 + Math.floor(random() * 2)) % 3;
    const e = [...IDENTITY];
    e[3 * i + j] = random() < 0.5 ? -1 : 1;
    m = multiply(m, e as unknown as IntMat3);
  }
  return m;
}
