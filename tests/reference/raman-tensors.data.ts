/**
 * Raman tensors of the 32 crystal classes: R. Loudon, Advances in Physics 13 (1964) 423, table 1 (from memory).
 * First line of a block: tensors, entries xx xy xz / yy yz / zz. A line below it: class, species of every tensor and in
 * brackets the polarisation of its infrared dipole; a dash where the class has no species with the tensor. Loudon's x,
 * y, z: y along the twofold axis or the normal of the mirror plane of monoclinic classes; z along the principal axis;
 * x along a twofold axis of 32, -3m, 422, -42m and 622, normal to a mirror plane of 3m, 6mm and -6m2. In conventional
 * axes that is x along a and z along c of the classes as they are written here, with no turn between the two frames.
 * F of triply degenerate species is written T.
 */
const LOUDON = `
a d e / b f / c
1: A(x,y,z)
-1: Ag

a . d / b . / c | . e . / . f / .
2: A(y) | B(x,z)
m: A'(x,z) | A''(y)
2/m: Ag | Bg

a . . / b . / c | . d . / . . / . | . . e / . . / . | . . . / . f / .
222: A | B1(z) | B2(y) | B3(x)
mm2: A1(z) | A2 | B1(x) | B2(y)
mmm: Ag | B1g | B2g | B3g

a . . / a . / b | c d e / -c f / . | d -c -f / -d e / .
3: A(z) | E(x) | E(y)
-3: Ag | Eg | Eg

a . . / a . / b | c . . / -c d / . | . -c -d / . . / .
321: A1 | E(x) | E(y)
3m1: A1(z) | E(y) | E(-x)
-3m1: A1g | Eg | Eg

a . . / a . / b | c d . / -c . / . | . . e / . f / . | . . -f / . e / .
4: A(z) | B | E(x) | E(y)
-4: A | B(z) | E(x) | E(-y)
4/m: Ag | Bg | Eg | Eg

a . . / a . / b | c . . / -c . / . | . d . / . . / . | . . e / . . / . | . . . / . e / .
4mm: A1(z) | B1 | B2 | E(x) | E(y)
422: A1 | B1 | B2 | E(-y) | E(x)
-42m: A1 | B1 | B2(z) | E(y) | E(x)
4/mmm: A1g | B1g | B2g | Eg | Eg

a . . / a . / b | . . c / . d / . | . . -d / . c / . | e f . / -e . / . | f -e . / -f . / .
6: A(z) | E1(x) | E1(y) | E2 | E2
-6: A' | E'' | E'' | E'(x) | E'(y)
6/m: Ag | E1g | E1g | E2g | E2g

a . . / a . / b | . . . / . c / . | . . -c / . . / . | . d . / . . / . | d . . / -d . / .
622: A1 | E1(x) | E1(y) | E2 | E2
6mm: A1(z) | E1(y) | E1(-x) | E2 | E2
-6m2: A1' | E'' | E'' | E'(x) | E'(y)
6/mmm: A1g | E1g | E1g | E2g | E2g

a . . / a . / a | b . . / b . / -2b | -sqrt3b . . / sqrt3b . / . | . . . / . d / . | . . d / . . / . | . d . / . . / .
23: A | E | E | T(x) | T(y) | T(z)
m-3: Ag | Eg | Eg | Tg | Tg | Tg
432: A1 | E | E | T2 | T2 | T2
-43m: A1 | E | E | T2(x) | T2(y) | T2(z)
m-3m: A1g | Eg | Eg | T2g | T2g | T2g
`;

/** A rotation that carries Loudon's axes to those of another orientation: images of x, y, z. */
export type Turn = readonly [x: Vector, y: Vector, z: Vector];
export type Vector = readonly number[];

export const NONE: Turn = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];
const CYCLIC: Turn = [
  [0, 1, 0],
  [0, 0, 1],
  [1, 0, 0],
];
const BACK: Turn = [
  [0, 0, 1],
  [1, 0, 0],
  [0, 1, 0],
];

function about(degrees: number): Turn {
  const [c, s] = [Math.cos((degrees * Math.PI) / 180), Math.sin((degrees * Math.PI) / 180)];
  return [
    [c, s, 0],
    [-s, c, 0],
    [0, 0, 1],
  ];
}

/** Orientations that Loudon does not tabulate, with the turn that carries his axes to them. */
export const OTHERS: readonly (readonly [symbol: string, loudon: string, words: string, turn: Turn])[] = [
  ["112", "2", "x to y, y to z, z to x", CYCLIC],
  ["11m", "m", "x to y, y to z, z to x", CYCLIC],
  ["112/m", "2/m", "x to y, y to z, z to x", CYCLIC],
  ["211", "2", "x to z, y to x, z to y", BACK],
  ["m11", "m", "x to z, y to x, z to y", BACK],
  ["2/m11", "2/m", "x to z, y to x, z to y", BACK],
  ["2mm", "mm2", "x to y, y to z, z to x", CYCLIC],
  ["m2m", "mm2", "x to z, y to x, z to y", BACK],
  ["312", "321", "30 degrees about z", about(30)],
  ["31m", "3m1", "90 degrees about z", about(90)], // or 30 degrees, with the sign of one of the two letters changed
  ["-31m", "-3m1", "90 degrees about z", about(90)],
  ["-4m2", "-42m", "45 degrees about z", about(45)],
  ["-62m", "-6m2", "30 degrees about z", about(30)],
];

/** A species of Loudon's table: its tensors and their polarisations, none for species without dipole. */
export interface Published {
  readonly label: string;
  readonly tensors: readonly (readonly string[])[];
  readonly polarisations: readonly string[];
}

export function readLoudon(): Map<string, Published[]> {
  const classes = new Map<string, Published[]>();
  for (const block of LOUDON.trim().split("\n\n")) {
    const [head, ...lines] = block.split("\n") as [string, ...string[]];
    const tensors = head.split("|").map((t) => t.trim().split(/[ /]+/));
    for (const line of lines) {
      const [symbol, list] = line.split(": ") as [string, string];
      const species = new Map<string, { tensors: string[][]; polarisations: string[] }>();
      list.split("|").forEach((text, k) => {
        const [, label, polarisation] = /^([^(]+)(?:\((.*)\))?$/.exec(text.trim()) as unknown as string[];
        const entry = species.get(label!) ?? { tensors: [], polarisations: [] };
        entry.tensors.push(tensors[k]!);
        if (polarisation) entry.polarisations.push(polarisation);
        species.set(label!, entry);
      });
      classes.set(
        symbol,
        [...species].map(([label, entry]) => ({ label, ...entry })),
      );
    }
  }
  return classes;
}
