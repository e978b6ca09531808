import { type CifBlock, cellOf, findLoop, findValue } from "../../../lib/cif/index.ts";
import { element } from "../../../lib/structure/index.ts";
import {
  angleOf,
  applyTo,
  distanceOf,
  imagesOf,
  minus,
  type Nine,
  type PlainCell,
  type PlainOperation,
  plainCell,
  plainOperation,
  rowTimes,
  seeded,
  siteOperations,
  type Triple,
  times,
  transposed,
} from "./plain-crystal.ts";

export interface AtomLine {
  label: string;
  type: string;
  /** As written, with uncertainties. */
  x: string;
  y: string;
  z: string;
  occupancy: string;
  multiplicity: string;
  order: string;
  letter: string;
  uiso: string;
}

export interface BondLine {
  a: string;
  b: string;
  distance: string;
  code: string;
}

export interface AngleLine {
  a: string;
  b: string;
  c: string;
  angle: string;
  codeA: string;
  codeC: string;
}

export interface ReflectionLine {
  h: Triple;
  value: number;
  sigma: number;
  absent: boolean;
}

/** What a depositor hands in, open to every kind of slip. */
export interface Deposition {
  items: Record<string, string>;
  operations: string[];
  atoms: AtomLine[];
  tensors: { label: string; u: string[] }[];
  bonds: BondLine[];
  angles: AngleLine[];
  reflections: ReflectionLine[];
}

const WAVELENGTH = 0.71073;
const THETA = 22;
/** Neighbours listed for each atom, and how far they may be; angstrom. */
const NEIGHBOURS = { most: 3, reach: 3.4 };

/** A fixture with everything that a careful depositor would have added. */
export function deposit(block: CifBlock): Deposition {
  const texts = (name: string) => value(findValue(block, name)?.value ?? null);
  const cell = cellFrom(block);
  const operations = operationTexts(block);
  const plain = operations.map(plainOperation);
  const random = seeded(block.name);
  const atoms = atomLines(block, cell, plain);
  const tensors = atoms.map((atom) => tensorLine(atom, cell, plain, random));
  tensors.forEach(({ square }, i) => {
    atoms[i]!.uiso = `${square.toFixed(5)}(20)`;
  });
  const names = ["name_H-M_alt", "IT_number", "name_Hall", "crystal_system"];
  const items: Record<string, string> = {
    _chemical_formula_sum: texts("_chemical_formula.sum"),
    _chemical_formula_weight: texts("_chemical_formula.weight"),
    _cell_formula_units_Z: texts("_cell.formula_units_Z"),
    ...Object.fromEntries(CELL.map((name) => [`_cell_${name}`, texts(`_cell.${name}`)])),
    _cell_volume: cell.volume.toFixed(2),
    _exptl_crystal_density_diffrn: texts("_exptl_crystal.density_diffrn"),
    ...Object.fromEntries(names.map((name) => [`_space_group_${name}`, texts(`_space_group.${name}`)])),
    _exptl_crystal_F_000: String(Math.round(electrons(atoms))),
    ...experiment(cell, plain),
  };
  const bare = { items, operations, atoms, tensors: tensors.map(({ label, u }) => ({ label, u })), reflections: [] };
  return { ...bare, ...geometry(atoms, cell, plain) };
}

function value(v: ReturnType<CifBlock["get"]>): string {
  return v?.kind === "text" ? v.text : "?";
}

const CELL = ["length_a", "length_b", "length_c", "angle_alpha", "angle_beta", "angle_gamma"];

function cellFrom(block: CifBlock): PlainCell {
  const numbers = CELL.map((name) => Number.parseFloat(value(findValue(block, `_cell.${name}`)!.value)));
  return plainCell(...(numbers as [number, number, number, number, number, number]));
}

function operationTexts(block: CifBlock): string[] {
  const loop = findLoop(block, "_space_group_symop.operation_xyz")!;
  return Array.from({ length: loop.rowCount }, (_, i) => value(cellOf(loop, i, "_space_group_symop.operation_xyz")));
}

function atomLines(block: CifBlock, cell: PlainCell, operations: readonly PlainOperation[]): AtomLine[] {
  const loop = findLoop(block, "_atom_site.label")!;
  return Array.from({ length: loop.rowCount }, (_, row) => {
    const text = (name: string) => value(cellOf(loop, row, `_atom_site.${name}`));
    const axes = ["x", "y", "z"].map((c) => text(`fract_${c}`).replace(/\(.*/, ""));
    const x = axes.map(Number) as Triple;
    const site = siteOperations(cell, operations, x);
    const free = (i: number) => [0, 1, 2].some((j) => Math.abs(site.reduce((s, a) => s + a.W[3 * i + j]!, 0)) > 1e-9);
    const [fx, fy, fz] = axes.map((t, i) => (free(i) && /\.\d{3}/.test(t) ? `${t}(2)` : t)) as [string, string, string];
    return {
      label: text("label"),
      type: text("type_symbol"),
      x: fx,
      y: fy,
      z: fz,
      occupancy: text("occupancy"),
      multiplicity: String(operations.length / site.length),
      order: String(site.length),
      letter: text("Wyckoff_symbol"),
      uiso: "?",
    };
  });
}

/** Fractional coordinates of a line. */
export function pointOf({ x, y, z }: AtomLine): Triple {
  return [x, y, z].map((t) => Number.parseFloat(t)) as Triple;
}

/** A tensor of the site's symmetry, the mean over the site group of one drawn at random. */
function tensorLine(atom: AtomLine, cell: PlainCell, operations: readonly PlainOperation[], random: () => number) {
  const r = () => 0.004 * (random() - 0.5);
  const [p, q, s] = [r(), r(), r()];
  const start: Nine = [0.011 + r(), p, q, p, 0.011 + r(), s, q, s, 0.011 + r()];
  const site = siteOperations(cell, operations, pointOf(atom));
  const mean = new Array<number>(9).fill(0);
  for (const { W } of site) {
    const R = times(times(cell.A, W), cell.inverse);
    times(times(R, start), transposed(R)).forEach((e, i) => {
      mean[i]! += e / site.length;
    });
  }
  const V = times(times(cell.inverse, mean), transposed(cell.inverse));
  const reciprocal = [0, 1, 2].map((i) => Math.hypot(...cell.inverse.slice(3 * i, 3 * i + 3)));
  const u = PAIRS.map(([i, j]) => V[3 * i + j]! / (reciprocal[i]! * reciprocal[j]!));
  const text = u.map((e) => (Math.abs(e) < 1e-9 ? "0" : `${e.toFixed(5)}(20)`));
  return { label: atom.label, u: text, square: (mean[0]! + mean[4]! + mean[8]!) / 3 };
}

/** Components 11 22 33 12 13 23. */
const PAIRS = [
  [0, 0],
  [1, 1],
  [2, 2],
  [0, 1],
  [0, 2],
  [1, 2],
] as const;

function electrons(atoms: readonly AtomLine[]): number {
  return atoms.reduce((s, a) => s + numberOf(a.type) * Number(a.multiplicity) * Number(a.occupancy), 0);
}

/** Atomic number of a type symbol, `Fe3+`. */
function numberOf(type: string): number {
  return element(/^[A-Za-z]+/.exec(type)![0])!.number;
}

/** Independent reflections within theta, with their numbers and limits. */
function experiment(cell: PlainCell, operations: readonly PlainOperation[]): Record<string, string> {
  const spacing = WAVELENGTH / (2 * Math.sin((THETA * Math.PI) / 180));
  const unique = uniqueReflections(cell, operations, spacing).filter((r) => !r.absent);
  const limits = ["h", "k", "l"].flatMap((axis, i) => {
    const most = Math.max(...unique.map((r) => Math.max(...r.orbit.map((h) => Math.abs(h[i]!)))));
    return [
      [`_diffrn_reflns_limit_${axis}_min`, String(-most)],
      [`_diffrn_reflns_limit_${axis}_max`, String(most)],
    ];
  });
  const longest = Math.max(...unique.map((r) => r.spacing));
  return {
    _diffrn_radiation_type: "'Mo K\\a'",
    _diffrn_radiation_wavelength: String(WAVELENGTH),
    _diffrn_reflns_theta_min: ((Math.asin(WAVELENGTH / (2 * longest)) * 180) / Math.PI + 0.05).toFixed(2),
    _diffrn_reflns_theta_max: String(THETA),
    _diffrn_reflns_theta_full: String(THETA),
    _diffrn_reflns_number: String(4 * unique.length),
    _diffrn_measured_fraction_theta_max: "1.000",
    _refine_ls_d_res_high: spacing.toFixed(3),
    _reflns_number_total: String(unique.length),
    _reflns_number_gt: String(Math.floor(0.9 * unique.length)),
    ...Object.fromEntries(limits),
  };
}

export interface UniqueReflection {
  readonly h: Triple;
  readonly orbit: readonly Triple[];
  readonly spacing: number;
  readonly absent: boolean;
}

/** One reflection of each orbit of the Laue class within a spacing; Friedel opposites are one. */
export function uniqueReflections(
  cell: PlainCell,
  operations: readonly PlainOperation[],
  least: number,
): UniqueReflection[] {
  const rotations = [...new Map(operations.map((a) => [a.W.join(), a.W])).values()];
  const [H, K, L] = cell.edges.map((e) => Math.floor(e / least)) as Triple;
  const done = new Set<string>();
  const found: UniqueReflection[] = [];
  for (let h = H; h >= -H; h--) {
    for (let k = K; k >= -K; k--) {
      for (let l = L; l >= -L; l--) {
        const s = Math.hypot(...rowTimes([h, k, l], cell.inverse));
        if (s === 0 || s > 1 / least || done.has([h, k, l].join())) continue;
        const orbit = rotations.flatMap((W) => {
          const p = rowTimes([h, k, l], W);
          return [p, p.map((e) => -e + 0) as Triple];
        });
        for (const p of orbit) done.add(p.join());
        found.push({ h: [h, k, l], orbit, spacing: 1 / s, absent: isAbsent(operations, [h, k, l]) });
      }
    }
  }
  return found;
}

function isAbsent(operations: readonly PlainOperation[], h: Triple): boolean {
  return operations.some(({ W, t }) => {
    const phase = h[0] * t[0] + h[1] * t[1] + h[2] * t[2];
    return rowTimes(h, W).join() === h.join() && Math.abs(phase - Math.round(phase)) > 1e-6;
  });
}

interface Neighbour {
  readonly label: string;
  readonly code: string;
  readonly at: Triple;
  readonly distance: number;
}

function geometry(atoms: readonly AtomLine[], cell: PlainCell, operations: readonly PlainOperation[]) {
  const bonds: BondLine[] = [];
  const angles: AngleLine[] = [];
  for (const atom of atoms) {
    const x = pointOf(atom);
    const near = neighboursOf(x, atoms, cell, operations);
    for (const n of near) {
      const other = atoms.find((a) => a.label === n.label)!;
      const su = Math.round(1e4 * Math.hypot(uncertaintyOf(atom, cell), uncertaintyOf(other, cell)));
      const distance = `${n.distance.toFixed(4)}${su > 0 ? `(${su})` : ""}`;
      bonds.push({ a: atom.label, b: n.label, distance, code: n.code });
    }
    const [p, q] = near;
    if (!p || !q) continue;
    const angle = angleOf(cell, p.at, x, q.at);
    angles.push({
      a: p.label,
      b: atom.label,
      c: q.label,
      angle: `${angle.toFixed(2)}(3)`,
      codeA: p.code,
      codeC: q.code,
    });
  }
  return { bonds, angles };
}

/** Uncertainty of a position along one direction, angstrom: two units of the last digit of a refined coordinate. */
function uncertaintyOf({ x, y, z }: AtomLine, { volume }: PlainCell): number {
  const refined = [x, y, z].flatMap((t) => /\.(\d+)\(/.exec(t)?.[1]?.length ?? []);
  return refined.length > 0 ? 2 * 10 ** -Math.max(...refined) * Math.cbrt(volume) : 0;
}

function neighboursOf(
  x: Triple,
  atoms: readonly AtomLine[],
  cell: PlainCell,
  operations: readonly PlainOperation[],
): Neighbour[] {
  const found: Neighbour[] = [];
  for (const other of atoms) {
    operations.forEach((a, i) => {
      const y = applyTo(a, pointOf(other));
      const home = minus(x, y).map(Math.round) as Triple;
      for (const [u, v, w] of SHIFTS) {
        const cells: Triple = [home[0] + u, home[1] + v, home[2] + w];
        const at: Triple = [y[0] + cells[0], y[1] + cells[1], y[2] + cells[2]];
        const distance = distanceOf(cell, x, at);
        if (distance < 0.3 || distance > NEIGHBOURS.reach || cells.some((c) => Math.abs(c) > 4)) continue;
        found.push({ label: other.label, code: `${i + 1}_${cells.map((c) => c + 5).join("")}`, at, distance });
      }
    });
  }
  const different = found.sort((p, q) => p.distance - q.distance);
  return different
    .filter((n, i) => !different.slice(0, i).some((m) => distanceOf(cell, m.at, n.at) < 0.05))
    .slice(0, NEIGHBOURS.most);
}

const SHIFTS = [-1, 0, 1].flatMap((u) => [-1, 0, 1].flatMap((v) => [-1, 0, 1].map((w): Triple => [u, v, w])));

/** Intensities of a list, computed from atoms that scatter as their electrons do, with errors drawn at random. */
export function measure(d: Deposition, cell: PlainCell, count: number): ReflectionLine[] {
  const operations = d.operations.map(plainOperation);
  const random = seeded(d.items["_chemical_formula_sum"]!);
  const normal = () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
  const unique = uniqueReflections(cell, operations, 0.9)
    .sort((a, b) => b.spacing - a.spacing)
    .slice(0, count);
  const images = d.atoms.flatMap((a) =>
    imagesOf(cell, operations, pointOf(a)).map((x) => ({ x, z: numberOf(a.type) })),
  );
  const exact = unique.map(({ h, spacing, absent }) => (absent ? 0 : squared(images, h, spacing)));
  const mean = exact.reduce((s, e) => s + e, 0) / exact.length;
  return unique.map(({ h, absent }, i) => {
    const sigma = 0.03 * exact[i]! + 0.005 * mean;
    return { h, value: exact[i]! + sigma * normal(), sigma, absent };
  });
}

function squared(images: readonly { x: Triple; z: number }[], h: Triple, spacing: number): number {
  const damping = Math.exp(-1.5 / (4 * spacing * spacing));
  let [re, im] = [0, 0];
  for (const { x, z } of images) {
    const phase = 2 * Math.PI * (h[0] * x[0] + h[1] * x[1] + h[2] * x[2]);
    re += z * damping * Math.cos(phase);
    im += z * damping * Math.sin(phase);
  }
  return re * re + im * im;
}

/** The cell that a deposition states. */
export function cellOfItems(items: Record<string, string>): PlainCell {
  const numbers = CELL.map((name) => Number.parseFloat(items[`_cell_${name}`]!));
  return plainCell(...(numbers as [number, number, number, number, number, number]));
}
