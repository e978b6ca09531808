import type { RankedClass } from "./character-table.ts";
import {
  type AxialNaming,
  axialClassName,
  cubicClassName,
  icosahedralClassName,
  type NamedClass,
} from "./class-names.ts";
import { type GroupAnalysis, horizontalOf, inversionOf } from "./group-analysis.ts";
import { type LabelMarks, NO_MARKS } from "./mulliken.ts";

/** The classes of a group with names and directions. */
export function nameClasses(a: GroupAnalysis): RankedClass[] {
  const name = classNamer(a);
  return a.classes.map((members) => {
    const named = name(members);
    const prefix = members.length > 1 ? String(members.length) : "";
    const directions = a.directions(members);
    return { name: prefix + named.name, rank: named.rank, size: members.length, members, directions };
  });
}

function classNamer(a: GroupAnalysis): (members: readonly number[]) => NamedClass {
  switch (a.kind) {
    case "cubic":
      return cubicNamer(a);
    case "icosahedral":
      return (members) => icosahedralClassName(a.elements[members[0]!]!);
    case "orthorhombic":
      return orthorhombicNamer(a);
    default: {
      const naming = axialNaming(a);
      return (members) => axialClassName(members, a.axial, naming);
    }
  }
}

function cubicNamer(a: GroupAnalysis): (members: readonly number[]) => NamedClass {
  return (members) => {
    const e = a.elements[members[0]!]!;
    const chiral = e.order === 3 && members.length === 4;
    return cubicClassName(e, a.main.includes(e.axis), chiral ? a.threefoldSense(members) : 0);
  };
}

function orthorhombicNamer(a: GroupAnalysis): (members: readonly number[]) => NamedClass {
  const [x, y, z] = a.main;
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

function axialNaming(a: GroupAnalysis): AxialNaming {
  const both = (proper: boolean) => {
    const ranks = a.lateral.filter((rank, i) => rank >= 0 && a.elements[i]!.proper === proper);
    return ranks.includes(0) && ranks.includes(1);
  };
  const dihedralPlane = a.schoenflies.endsWith("d") ? "sigma_d" : "sigma_v";
  return {
    turns: a.turns,
    inversion: inversionOf(a) >= 0,
    horizontal: horizontalOf(a) >= 0,
    rankOf: (i) => a.lateral[i]!,
    axisNames: both(true) ? ["C2'", "C2''"] : ["C2'", "C2'"],
    planeNames: both(false) ? ["sigma_v", "sigma_d"] : [dihedralPlane, dihedralPlane],
  };
}

/** The elements on which the Mulliken labels of a group are read. */
export function labelMarks(a: GroupAnalysis): LabelMarks {
  const inversion = inversionOf(a);
  if (a.kind === "icosahedral") {
    // T1 is the vector: positive on the rotation by one fifth of a turn, whose trace is positive.
    return { ...NO_MARKS, inversion, fivefold: a.elements.findIndex((e) => e.proper && e.order === 5 && e.trace > 0) };
  }
  if (a.kind === "cubic") {
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
  const n = principal < 0 ? 1 : a.turns / a.axial[principal]!.turn;
  return { ...NO_MARKS, inversion, horizontal, principal, n, ...reflectingMarks(a) };
}

function reflectingMarks(a: GroupAnalysis): Pick<LabelMarks, "secondary" | "twofolds"> {
  const [x, y, z] = a.main;
  if (a.kind === "orthorhombic") {
    const find = (proper: boolean, axis: number) =>
      a.elements.findIndex((e) => e.proper === proper && e.order === 2 && e.axis === axis);
    const twofolds = [find(true, x), find(true, y), find(true, z)] as const;
    if (twofolds[0] >= 0) return { secondary: -1, twofolds };
    return { secondary: find(false, y), twofolds: null };
  }
  const first = (proper: boolean, rank: number) =>
    a.lateral.findIndex((lateral, i) => lateral === rank && a.elements[i]!.proper === proper);
  const choices = [first(true, 0), first(true, 1), first(false, 0), first(false, 1)];
  return { secondary: choices.find((i) => i >= 0) ?? -1, twofolds: null };
}
