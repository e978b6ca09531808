import type { Vec3 } from "./cell.ts";

/** An ideal coordination polyhedron: corners at distance 1 from the centre. */
export interface IdealShape {
  readonly name: string;
  /** Polyhedral symbol of IUPAC (Nomenclature of Inorganic Chemistry 2005, table IR-9.2), null where it has none. */
  readonly symbol: string | null;
  readonly corners: readonly Vec3[];
}

let made: ReadonlyMap<number, readonly IdealShape[]> | null = null;

/** Ideal shapes with a number of corners; none for fewer than 2 or more than 12. */
export function idealShapes(corners: number): readonly IdealShape[] {
  made ??= makeShapes();
  return made.get(corners) ?? [];
}

const DEGREE = Math.PI / 180;
const UP: Vec3 = [0, 0, 1];
const DOWN: Vec3 = [0, 0, -1];

/** n points at polar angle theta, the first at azimuth phi; degrees. */
function ring(n: number, theta: number, phi = 0): Vec3[] {
  const [s, c] = [Math.sin(theta * DEGREE), Math.cos(theta * DEGREE)];
  return Array.from({ length: n }, (_, k): Vec3 => {
    const a = phi * DEGREE + (2 * Math.PI * k) / n;
    return [s * Math.cos(a), s * Math.sin(a), c];
  });
}

/** Polar angle of the upper ring of a prism or antiprism with equal edges, degrees. */
function ringAngle(n: number, twisted: boolean): number {
  const half = Math.PI / n;
  const radius = 0.5 / Math.sin(half);
  // an edge from ring to ring: straight up, or turned by half a step
  const height = twisted ? Math.sqrt(1 - (2 * radius * Math.sin(half / 2)) ** 2) : 1;
  return Math.atan2(radius, height / 2) / DEGREE;
}

function prism(n: number): Vec3[] {
  const theta = ringAngle(n, false);
  return [...ring(n, theta), ...ring(n, 180 - theta)];
}

function antiprism(n: number): Vec3[] {
  const theta = ringAngle(n, true);
  return [...ring(n, theta), ...ring(n, 180 - theta, 180 / n)];
}

/**
 * Eight corners in two crossed trapezoids, all edges equal but the four that face each other across a trapezoid's end: c,
 * the cosine of the polar angle of the nearer corners, solves 4 c^4 - c^2 - 1 = 0.
 * Source: hard spheres of J. L. Hoard, J. V. Silverton, Inorganic Chemistry 2 (1963) 235-243.
 */
function dodecahedron(): Vec3[] {
  const a = Math.acos(Math.sqrt((1 + Math.sqrt(17)) / 8)) / DEGREE;
  const b = 180 - 3 * a;
  return [...ring(2, a), ...ring(2, 180 - a, 90), ...ring(2, 180 - b), ...ring(2, b, 90)];
}

/** A corner, three and three more with twelve edges of equal length. */
function cappedOctahedron(): Vec3[] {
  const farRing = (edge: number) => 180 - Math.asin((2 / Math.sqrt(3)) * Math.sin((edge / 2) * DEGREE)) / DEGREE;
  const cosine = (edge: number) => {
    const [s, c] = [Math.sin(edge * DEGREE), Math.cos(edge * DEGREE)];
    const far = farRing(edge) * DEGREE;
    return c * Math.cos(far) + (s * Math.sin(far)) / 2; // of the angle between near and far ring
  };
  let [low, high] = [70, 85];
  for (let halving = 0; halving < 60; halving++) {
    const middle = (low + high) / 2;
    if (cosine(middle) < Math.cos(middle * DEGREE)) low = middle;
    else high = middle;
  }
  return [UP, ...ring(3, low), ...ring(3, farRing(low), 60)];
}

/** Corners over the square faces of a prism. */
const caps = (n: number): Vec3[] => ring(3, 90, 60).slice(0, n);

/** Cosine -1/4 between axial and basal corners, on the way from trigonal bipyramid to octahedron. */
const PYRAMID_ANGLE = Math.acos(-1 / 4) / DEGREE;
const TETRAHEDRAL = Math.acos(-1 / 3) / DEGREE;

function cuboctahedron(mirrored: boolean): Vec3[] {
  const theta = Math.atan2(1 / Math.sqrt(3), Math.sqrt(2 / 3)) / DEGREE;
  return [...ring(6, 90), ...ring(3, theta, 30), ...ring(3, 180 - theta, mirrored ? 30 : 90)];
}

function truncatedTetrahedron(): Vec3[] {
  const l = Math.sqrt(11);
  const signs = [
    [1, 1, 1],
    [1, -1, -1],
    [-1, 1, -1],
    [-1, -1, 1],
  ];
  return [0, 1, 2].flatMap((long) =>
    signs.map((s) => s.map((e, i) => (e * (i === long ? 3 : 1)) / l) as unknown as Vec3),
  );
}

function makeShapes(): Map<number, IdealShape[]> {
  const shape = (name: string, symbol: string | null, ...corners: Vec3[]): IdealShape => ({ name, symbol, corners });
  const equator = (n: number, phi = 0) => ring(n, 90, phi);
  const polygonal: IdealShape[] = [
    shape("line", "L-2", UP, DOWN),
    shape("bent, tetrahedral angle", "A-2", UP, ...ring(1, TETRAHEDRAL)),
    shape("bent, right angle", null, UP, ...ring(1, 90)),
    shape("trigonal plane", "TP-3", ...equator(3)),
    shape("trigonal pyramid", "TPY-3", ...ring(3, TETRAHEDRAL)),
    shape("T-shape", "TS-3", UP, DOWN, ...ring(1, 90)),
    shape("three corners of an octahedron face", null, UP, ...ring(2, 90).slice(0, 1), ...ring(1, 90, 90)),
    shape("tetrahedron", "T-4", UP, ...ring(3, TETRAHEDRAL)),
    shape("square plane", "SP-4", ...equator(4)),
    shape("see-saw", "SS-4", UP, DOWN, ...ring(1, 90), ...ring(1, 90, 90)),
    shape("trigonal bipyramid without an axial corner", null, UP, ...equator(3)),
    shape("trigonal bipyramid", "TBPY-5", UP, DOWN, ...equator(3)),
    shape("square pyramid", "SPY-5", UP, ...ring(4, PYRAMID_ANGLE)),
    shape("octahedron without a corner", null, UP, ...equator(4)),
    shape("pentagon", null, ...equator(5)),
    shape("octahedron", "OC-6", UP, DOWN, ...equator(4)),
    shape("trigonal prism", "TPR-6", ...prism(3)),
    shape("pentagonal pyramid", null, UP, ...equator(5)),
    shape("hexagon", null, ...equator(6)),
    shape("pentagonal bipyramid", "PBPY-7", UP, DOWN, ...equator(5)),
    shape("capped octahedron", "OCF-7", ...cappedOctahedron()),
    shape("capped trigonal prism", "TPRS-7", ...prism(3), ...caps(1)),
    shape("hexagonal pyramid", null, UP, ...equator(6)),
    shape("cube", "CU-8", ...ring(4, TETRAHEDRAL / 2), ...ring(4, 180 - TETRAHEDRAL / 2)),
    shape("square antiprism", "SAPR-8", ...antiprism(4)),
    shape("triangular dodecahedron", "DD-8", ...dodecahedron()),
    shape("bicapped trigonal prism", "TPRS-8", ...prism(3), ...caps(2)),
    shape("hexagonal bipyramid", "HBPY-8", UP, DOWN, ...equator(6)),
    shape("tricapped trigonal prism", "TPRS-9", ...prism(3), ...caps(3)),
    shape("capped square antiprism", null, UP, ...antiprism(4)),
    shape("capped cube", null, UP, ...ring(4, TETRAHEDRAL / 2), ...ring(4, 180 - TETRAHEDRAL / 2)),
    shape("heptagonal bipyramid", "HBPY-9", UP, DOWN, ...equator(7)),
    shape("bicapped square antiprism", null, UP, DOWN, ...antiprism(4)),
    shape("bicapped cube", null, UP, DOWN, ...ring(4, TETRAHEDRAL / 2), ...ring(4, 180 - TETRAHEDRAL / 2)),
    shape("pentagonal prism", null, ...prism(5)),
    shape("pentagonal antiprism", null, ...antiprism(5)),
    shape("capped pentagonal prism", null, UP, ...prism(5)),
    shape("capped pentagonal antiprism", null, UP, ...antiprism(5)),
    shape("icosahedron", null, UP, DOWN, ...antiprism(5)),
    shape("cuboctahedron", null, ...cuboctahedron(false)),
    shape("anticuboctahedron", null, ...cuboctahedron(true)),
    shape("bicapped pentagonal prism", null, UP, DOWN, ...prism(5)),
    shape("hexagonal prism", null, ...prism(6)),
    shape("hexagonal antiprism", null, ...antiprism(6)),
    shape("truncated tetrahedron", null, ...truncatedTetrahedron()),
  ];
  const map = new Map<number, IdealShape[]>();
  for (const s of polygonal) map.set(s.corners.length, [...(map.get(s.corners.length) ?? []), s]);
  return map;
}
