import { type AtomLine, cellOfItems, type Deposition, measure, pointOf } from "./deposition.ts";
import { applyTo, plainOperation } from "./plain-crystal.ts";
import { type Mutation, otherDigit, pick, type Random } from "./slip.ts";

/** Atoms with a refined coordinate, and that coordinate. */
function freeCoordinates(d: Deposition): { atom: AtomLine; axis: "x" | "y" | "z" }[] {
  return d.atoms.flatMap((atom) =>
    (["x", "y", "z"] as const).flatMap((axis) => (atom[axis].includes("(") ? [{ atom, axis }] : [])),
  );
}

export function coordinateDigit(place: number): Mutation["plant"] {
  return (d, random) => {
    const chosen = pick(freeCoordinates(d), random);
    const changed = chosen && otherDigit(chosen.atom[chosen.axis], place, random);
    if (!chosen || !changed) return null;
    chosen.atom[chosen.axis] = changed;
    return d;
  };
}

/** Components of a tensor turned round: 22 33 11, 23 12 13; only where the site notices, and by more than chance. */
export function tensorRotated(d: Deposition, random: Random): Deposition | null {
  const chosen = pick(
    d.tensors.filter(({ u }) => {
      const n = u.map((t) => Number.parseFloat(t));
      return (
        u.some((t) => t === "0") &&
        Math.max(n[0]!, n[1]!, n[2]!) - Math.min(n[0]!, n[1]!, n[2]!) > 0.0015 &&
        n.slice(3).some((e) => Math.abs(e) > 0.0015)
      );
    }),
    random,
  );
  if (!chosen) return null;
  const [u11, u22, u33, u12, u13, u23] = chosen.u as [string, string, string, string, string, string];
  chosen.u = [u22, u33, u11, u23, u12, u13];
  return d;
}

/** All components of one tensor, and the equivalent, changed by a factor. */
function scaledTensor(factor: (k: number) => number, equivalent: number): Mutation["plant"] {
  return (d, random) => {
    const heavy = d.tensors.filter(({ label }) => !/^[HD]/.test(d.atoms.find((a) => a.label === label)!.type));
    const chosen = pick(heavy, random);
    if (!chosen || d.atoms.length < 2) return null;
    chosen.u = chosen.u.map((t, k) => (t === "0" ? t : (factor(k) * Number.parseFloat(t)).toFixed(5)));
    const atom = d.atoms.find((a) => a.label === chosen.label)!;
    atom.uiso = (equivalent * Number.parseFloat(atom.uiso)).toFixed(5);
    return d;
  };
}

export const negativeTensor = scaledTensor((k) => (k === 2 ? -1 : 1), 1);
export const largeTensor = scaledTensor(() => 10, 10);

const SCATTERERS = ["C", "O", "Na", "Al", "S", "Fe", "Sr", "Pb"];

export function otherElement({ type }: AtomLine, random: Random): Partial<AtomLine> {
  return {
    type: pick(
      SCATTERERS.filter((e) => !type.startsWith(e)),
      random,
    )!,
  };
}

/** The letter of a site with another multiplicity; letters of like positions may be a matter of origin. */
export function otherLetter(
  { letter, multiplicity }: AtomLine,
  random: Random,
  d: Deposition,
): Partial<AtomLine> | null {
  const other = pick(
    d.atoms.filter((a) => a.multiplicity !== multiplicity && a.letter !== letter && a.letter !== "?"),
    random,
  );
  return other && letter !== "?" ? { letter: other.letter } : null;
}

/** A row for another element at the place of an atom, both there in full. */
export function secondAtom(d: Deposition, random: Random): Deposition | null {
  const atom = pick(d.atoms, random)!;
  d.atoms.push({ ...atom, ...otherElement(atom, random), label: "X99", uiso: "?" });
  return d;
}

/** A row of the list lost, with all that speaks of the atom. */
export function atomLost(d: Deposition, random: Random): Deposition | null {
  const gone = pick(
    d.atoms.filter((a) => !/^[HD]/.test(a.type)),
    random,
  );
  if (!gone || d.atoms.length < 3) return null;
  const other = (label: string) => label !== gone.label;
  d.atoms = d.atoms.filter((a) => other(a.label));
  d.tensors = d.tensors.filter((t) => other(t.label));
  d.bonds = d.bonds.filter((b) => other(b.a) && other(b.b));
  d.angles = d.angles.filter((a) => other(a.a) && other(a.b) && other(a.c));
  return d;
}

export function labelRepeated(d: Deposition, random: Random): Deposition | null {
  const [first, second] = [pick(d.atoms, random)!, pick(d.atoms, random)!];
  if (first.label === second.label) return null;
  second.label = first.label;
  return d;
}

/** A coordinate without an uncertainty gets one; atoms in general positions have none such. */
export function uncertainFixed(d: Deposition, random: Random): Deposition | null {
  const fixed = d.atoms.flatMap((a) =>
    (["x", "y", "z"] as const).flatMap((axis) => (a[axis].includes("(") ? [] : [{ a, axis }])),
  );
  const chosen = pick(
    fixed.filter(({ a }) => Number(a.order) > 1),
    random,
  );
  if (!chosen) return null;
  chosen.a[chosen.axis] = `${Number.parseFloat(chosen.a[chosen.axis]).toFixed(5)}(3)`;
  return d;
}

export function bondLength(d: Deposition, random: Random): Deposition | null {
  const bond = pick(d.bonds, random);
  const changed = bond && otherDigit(bond.distance, 2, random);
  if (!bond || !changed) return null;
  bond.distance = changed;
  return d;
}

export function bondAngle(d: Deposition, random: Random): Deposition | null {
  const angle = pick(d.angles, random);
  if (!angle) return null;
  const value = Number.parseFloat(angle.angle);
  angle.angle = `${(value > 90 ? value - 3 : value + 3).toFixed(2)}(8)`;
  return d;
}

/** Exchanges what a code names: another operation of the list. */
export function otherCode(d: Deposition, random: Random): Deposition | null {
  const cell = cellOfItems(d.items);
  const operations = d.operations.map(plainOperation);
  const bond = pick(d.bonds, random);
  const target = bond && d.atoms.find((a) => a.label === bond.b)!;
  if (!bond || !target || operations.length === 1) return null;
  const [n, cells] = bond.code.split("_") as [string, string];
  const place = (i: number) => applyTo(operations[i]!, pointOf(target));
  const old = place(Number(n) - 1);
  const others = operations.flatMap((_, i) =>
    place(i).some((e, k) => Math.abs(e - old[k]!) * cell.edges[k]! > 0.3) ? [i] : [],
  );
  const other = pick(others, random);
  if (other === null) return null;
  bond.code = `${other + 1}_${cells}`;
  return d;
}

/** Reflections that the group forbids, as strong as the others. */
export function absentPresent(d: Deposition, random: Random): Deposition | null {
  d.reflections = measure(d, cellOfItems(d.items), 500);
  const absent = d.reflections.filter((r) => r.absent);
  const present = d.reflections.filter((r) => !r.absent);
  if (absent.length < 8) return null;
  const mean = present.reduce((s, r) => s + r.value, 0) / present.length;
  for (const r of absent) r.value = -mean * Math.log(1 - random());
  return d;
}
