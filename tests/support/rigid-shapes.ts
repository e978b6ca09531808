import { type Matrix3, molecularGroup } from "../../lib/representation/index.ts";
import type { Mat3, Vec3 } from "../../lib/structure/index.ts";

/** A rigid molecule in the standard orientation of its group, the fixed point of the group at the origin. */
export interface Shape {
  readonly name: string;
  /** Schoenflies symbol; a linear molecule lies along z. */
  readonly group: string;
  readonly atoms: readonly { readonly element: string; readonly place: Vec3 }[];
  /** Species of the internal vibrations. */
  readonly internal: string;
  readonly linear: boolean;
}

const ring = (element: string, radius: number, count: number, height = 0, turn = 0): string[] =>
  Array.from({ length: count }, (_, k) => {
    const angle = (2 * Math.PI * k) / count + turn;
    return `${element} ${radius * Math.cos(angle)} ${radius * Math.sin(angle)} ${height}`;
  });

const signs = ["", "-"] as const;
const tetrahedron = (element: string, d: number) =>
  [`${d} ${d} ${d}`, `${d} ${-d} ${-d}`, `${-d} ${d} ${-d}`, `${-d} ${-d} ${d}`].map((p) => `${element} ${p}`);

/**
 * Internal species: G. Herzberg, Infrared and Raman Spectra of Polyatomic Molecules (1945), section II,4; benzene with
 * C2' through the atoms, ethylene with z along C=C and x normal to the plane. From memory.
 */
const LIST: readonly (readonly [name: string, group: string, internal: string, atoms: readonly string[]])[] = [
  ["sulfate", "Td", "A1 + E + 2T2", ["S 0 0 0", ...tetrahedron("O", 0.85)]],
  ["carbonate", "D3h", "A1' + A2'' + 2E'", ["C 0 0 0", ...ring("O", 1.29, 3)]],
  ["sulfur hexafluoride", "Oh", "A1g + Eg + T2g + 2T1u + T2u", ["S 0 0 0", ...octahedron(1.56)]],
  ["sulfite", "C3v", "2A1 + 2E", ["S 0 0 0.4", ...ring("O", 1.42, 3, -0.1)]],
  ["water", "C2v", "2A1 + B2", ["O 0 0 0", "H 0 0.757 0.587", "H 0 -0.757 0.587"]],
  ["xenon tetrafluoride", "D4h", "A1g + B1g + B2g + A2u + B2u + 2Eu", ["Xe 0 0 0", ...ring("F", 1.94, 4)]],
  ["phosphorus pentafluoride", "D3h", "2A1' + 3E' + 2A2'' + E''", ["P 0 0 0", ...ring("F", 1.53, 3), ...axial(1.58)]],
  [
    "benzene",
    "D6h",
    "2A1g + A2g + 2B2g + E1g + 4E2g + A2u + 2B1u + 2B2u + 3E1u + 2E2u",
    [...ring("C", 1.39, 6), ...ring("H", 2.47, 6)],
  ],
  ["ethylene", "D2h", "3Ag + B2g + 2B3g + Au + 2B1u + 2B2u + B3u", ethylene()],
  [
    "cyclooctasulfur",
    "D4d",
    "2A1 + B1 + B2 + 2E1 + 3E2 + 2E3",
    [...ring("S", 2.34, 4, 0.5, Math.PI / 8), ...ring("S", 2.34, 4, -0.5, -Math.PI / 8)],
  ],
  ["allene", "D2d", "3A1 + B1 + 3B2 + 4E", allene()],
  ["hydrogen peroxide", "C2", "4A + 2B", ["O 0.735 0 0", "O -0.735 0 0", "H 0.84 0.85 0.45", "H -0.84 -0.85 0.45"]],
  ["diazene", "C2h", "3Ag + Au + 2Bu", ["N 0.62 0 0", "N -0.62 0 0", "H 1 0.96 0", "H -1 -0.96 0"]],
  ["hypochlorous acid", "Cs", "3A'", ["O 0 0 0", "H 0.93 0.25 0", "Cl -0.4 1.64 0"]],
  ["carbon dioxide", "Dinfh", "Sigmag+ + Sigmau+ + Piu", ["C 0 0 0", "O 0 0 1.16", "O 0 0 -1.16"]],
  ["thiocyanate", "Cinfv", "2Sigma+ + Pi", ["C 0 0 0", "S 0 0 1.63", "N 0 0 -1.17"]],
  ["nitrogen", "Dinfh", "Sigmag+", ["N 0 0 0.55", "N 0 0 -0.55"]],
  ["cyanide", "Cinfv", "Sigma+", ["C 0 0 0.6", "N 0 0 -0.56"]],
];

function octahedron(d: number): string[] {
  return [`F ${d} 0 0`, `F ${-d} 0 0`, `F 0 ${d} 0`, `F 0 ${-d} 0`, ...axial(d)];
}

function axial(d: number): string[] {
  return signs.map((s) => `F 0 0 ${s}${d}`);
}

function ethylene(): string[] {
  const hydrogen = signs.flatMap((s) => signs.map((t) => `H 0 ${s}0.922 ${t}1.237`));
  return [...signs.map((s) => `C 0 0 ${s}0.667`), ...hydrogen];
}

/** Planes of the CH2 groups at 45 degrees to x and y, so that the axes C2' lie along x and y. */
function allene(): string[] {
  const d = 0.66;
  const ends = signs.flatMap((s) => [`H ${s}${d} ${s}${d} 1.87`, `H ${s}${d} ${s === "" ? "-" : ""}${d} -1.87`]);
  return ["C 0 0 0", "C 0 0 1.31", "C 0 0 -1.31", ...ends];
}

let read: readonly Shape[] | null = null; // when the first is asked for

export function shapes(): readonly Shape[] {
  read ??= LIST.map(([name, group, internal, list]) => {
    const atoms = list.map((text) => {
      const [element = "", ...numbers] = text.split(" ");
      return { element, place: numbers.map(Number) as unknown as Vec3 };
    });
    return { name, group, internal, atoms, linear: group.includes("inf") };
  });
  return read;
}

const groups = new Map<string, readonly Matrix3[]>();

/** Elements of a shape's group; of the linear ones a finite subgroup that holds all their crystallographic subgroups. */
export function elementsOf({ group }: Shape): readonly Matrix3[] {
  const elements = groups.get(group) ?? molecularGroup(group.replace("inf", "12")).elements;
  groups.set(group, elements);
  return elements;
}

export const transposed = (m: Mat3): Mat3 => [m[0], m[3], m[6], m[1], m[4], m[7], m[2], m[5], m[8]];

/** Determinant, 1 or -1, and trace: they tell the kinds of orthogonal matrices apart. */
export function kindOf(m: Mat3): { readonly determinant: number; readonly trace: number; readonly key: string } {
  const determinant = Math.sign(
    m[0] * (m[4] * m[8] - m[5] * m[7]) - m[1] * (m[3] * m[8] - m[5] * m[6]) + m[2] * (m[3] * m[7] - m[4] * m[6]),
  );
  const trace = m[0] + m[4] + m[8];
  return { determinant, trace, key: `${determinant} ${(trace + 10).toFixed(4)}` };
}

/** Unit vector along the axis of a rotation or rotoinversion; null for the identity and the inversion. */
export function axisOf(m: Mat3): Vec3 | null {
  const { determinant, trace } = kindOf(m);
  const turn = determinant * trace;
  if (turn > 3 - 1e-6) return null;
  const r = m.map((e) => determinant * e);
  // R + R^T - (tr R - 1) 1 is a multiple of the projection onto the axis
  const columns = [0, 1, 2].map((j) => [0, 1, 2].map((i) => r[3 * i + j]! + r[3 * j + i]! - (i === j ? turn - 1 : 0)));
  const lengths = columns.map((c) => Math.hypot(c[0]!, c[1]!, c[2]!));
  const length = Math.max(...lengths);
  return columns[lengths.indexOf(length)]!.map((e) => e / length) as unknown as Vec3;
}
