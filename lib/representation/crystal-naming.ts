import { apply, type IntVec3, negate } from "../algebra/index.ts";
import type { RankedClass } from "./character-table.ts";
import { type AxialNaming, axialClassName, cubicClassName, type NamedClass } from "./class-names.ts";
import type { CrystalAnalysis } from "./crystal-analysis.ts";
import { rotationParts } from "./crystal-analysis.ts";
import { CRYSTAL_TURNS } from "./crystal-element.ts";
import { compareDirections, formatDirection, triple } from "./direction.ts";
import { type LabelMarks, NO_MARKS } from "./mulliken.ts";

/** The classes of a crystallographic group with names and directions. */
export function nameClasses(a: CrystalAnalysis): RankedClass[] {
  const name = classNamer(a);
  return a.classes.map((members) => {
    const named = name(members);
    const used = [...new Set(members.map((m) => a.elements[m]!.axis))].filter((axis) => axis >= 0);
    const directions = used
      .map((axis) => a.axes[axis]!.uvw)
      .sort(compareDirections)
      .map(formatDirection);
    const prefix = members.length > 1 ? String(members.length) : "";
    return { name: prefix + named.name, rank: named.rank, size: members.length, members, directions };
  });
}

function classNamer(a: CrystalAnalysis): (members: readonly number[]) => NamedClass {
  switch (a.orientation.kind) {
    case "cubic":
      return cubicNamer(a);
    case "orthorhombic":
      return orthorhombicNamer(a);
    default: {
      const naming = axialNaming(a);
      return (members) => axialClassName(members, a.axial, naming);
    }
  }
}

function cubicNamer(a: CrystalAnalysis): (members: readonly number[]) => NamedClass {
  const { x, y, z } = a.orientation;
  const parts = rotationParts(a.elements);
  return (members) => {
    const e = a.elements[members[0]!]!;
    const main = e.axis === x || e.axis === y || e.axis === z;
    const chiral = e.order === 3 && members.length === 4;
    return cubicClassName(parts[members[0]!]!, main, chiral ? threefoldSense(a, members) : 0);
  };
}

/**
 * Sense of the four conjugate rotations of order 3 of T or Th: that of the one about the first axis in the order of
 * `compareDirections`, seen against its direction [uvw].
 */
function threefoldSense(a: CrystalAnalysis, members: readonly number[]): number {
  const uvw = (m: number) => a.axes[a.elements[m]!.axis]!.uvw;
  const first = members.reduce((p, q) => (compareDirections(uvw(q), uvw(p)) < 0 ? q : p));
  const { W, proper, axis } = a.elements[first]!;
  const R = proper ? W : negate(W);
  const v = a.axes[axis]!.vector;
  const probe: IntVec3 = v[1] === 0 && v[2] === 0 ? [0, 1, 0] : [1, 0, 0];
  return Math.sign(triple(probe, apply(R, probe), v)) * a.handedness;
}

function orthorhombicNamer(a: CrystalAnalysis): (members: readonly number[]) => NamedClass {
  const { x, y, z } = a.orientation;
  const order = [z, y, x];
  const polar = a.elements.filter((e) => e.proper).length === 2;
  return (members) => {
    const e = a.elements[members[0]!]!;
    if (e.axis < 0) return { name: e.proper ? "E" : "i", rank: e.proper ? 0 : 10 };
    const k = order.indexOf(e.axis);
    if (!e.proper) return { name: `sigma(${["xy", "xz", "yz"][k]})`, rank: 11 + k };
    return { name: polar ? "C2" : `C2(${"zyx"[k]})`, rank: 1 + k };
  };
}

function axialNaming(a: CrystalAnalysis): AxialNaming {
  const { secondary, tertiary } = a.orientation;
  const reflecting = a.elements.filter((_, i) => a.axial[i]!.reflects);
  const both = (proper: boolean) => {
    const used = new Set(reflecting.filter((e) => e.proper === proper).map((e) => e.axis));
    return secondary.some((i) => used.has(i)) && tertiary.some((i) => used.has(i));
  };
  const dihedralPlane = a.schoenflies.endsWith("d") ? "sigma_d" : "sigma_v";
  return {
    turns: CRYSTAL_TURNS,
    inversion: inversionOf(a) >= 0,
    horizontal: horizontalOf(a) >= 0,
    rankOf: (i) => (secondary.includes(a.elements[i]!.axis) ? 0 : 1),
    axisNames: both(true) ? ["C2'", "C2''"] : ["C2'", "C2'"],
    planeNames: both(false) ? ["sigma_v", "sigma_d"] : [dihedralPlane, dihedralPlane],
  };
}

function inversionOf(a: CrystalAnalysis): number {
  return a.elements.findIndex((e) => !e.proper && e.order === 1);
}

function horizontalOf(a: CrystalAnalysis): number {
  return a.axial.findIndex((e) => e.flips && !e.reflects && e.turn === 0);
}

/** The elements on which the Mulliken labels of a crystallographic group are read. */
export function crystalMarks(a: CrystalAnalysis): LabelMarks {
  const inversion = inversionOf(a);
  if (a.orientation.kind === "cubic") {
    const fourfold = a.elements.findIndex((e) => e.order === 4 && (e.proper || inversion < 0));
    return { ...NO_MARKS, inversion, fourfold };
  }
  const horizontal = horizontalOf(a);
  const onlyProper = inversion >= 0 || horizontal >= 0;
  let principal = -1;
  a.axial.forEach((e, i) => {
    if (e.reflects || e.turn === 0 || (onlyProper && e.flips)) return;
    if (principal < 0 || e.turn < a.axial[principal]!.turn) principal = i;
  });
  const n = principal < 0 ? 1 : CRYSTAL_TURNS / a.axial[principal]!.turn;
  return { ...NO_MARKS, inversion, horizontal, principal, n, ...reflectingMarks(a) };
}

function reflectingMarks(a: CrystalAnalysis): Pick<LabelMarks, "secondary" | "twofolds"> {
  const { kind, x, y, z, secondary, tertiary } = a.orientation;
  const find = (proper: boolean, axis: number) =>
    a.elements.findIndex((e) => e.proper === proper && e.order === 2 && e.axis === axis);
  if (kind === "orthorhombic") {
    const twofolds = [find(true, x), find(true, y), find(true, z)] as const;
    if (twofolds[0] >= 0) return { secondary: -1, twofolds };
    return { secondary: find(false, y), twofolds: null };
  }
  const directions = [...secondary, ...tertiary];
  const first = (proper: boolean) => directions.map((axis) => find(proper, axis)).find((i) => i >= 0) ?? -1;
  const rotation = first(true);
  return { secondary: rotation >= 0 ? rotation : first(false), twofolds: null };
}
