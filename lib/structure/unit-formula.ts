import { bondClasses, isHydrogen } from "./bond-class.ts";
import { hillOrder } from "./formula-text.ts";
import { ELEMENT_SEQUENCE } from "./tables/element-sequence.ts";

/** Atoms by element and the bonds between them, as pairs of indices. */
export interface AtomGroup {
  readonly elements: readonly string[];
  readonly bonds: readonly (readonly [number, number])[];
}

type Counts = Map<string, number>;

function countsOf(elements: Iterable<string>): Counts {
  const counts: Counts = new Map();
  for (const e of elements) counts.set(e, (counts.get(e) ?? 0) + 1);
  return counts;
}

function written(counts: Counts, order: readonly string[]): string {
  return order.map((e) => e + (counts.get(e) === 1 ? "" : counts.get(e))).join("");
}

/**
 * Formula in Hill's order: C, H, then the alphabet; without carbon the alphabet alone.
 * Source: E. A. Hill, J. Am. Chem. Soc. 22 (1900) 478.
 */
export function hillFormula(elements: readonly string[]): string {
  const counts = countsOf(elements);
  return written(counts, [...hillOrder(counts).keys()]);
}

/** Formula by IUPAC's sequence of elements, the electropositive end first. */
export function sequenceFormula(elements: readonly string[]): string {
  return written(countsOf(elements), inSequence(new Set(elements)));
}

function inSequence(elements: Iterable<string>): string[] {
  const sequence = ELEMENT_SEQUENCE.split(" ");
  return [...elements].sort((a, b) => sequence.indexOf(b) - sequence.indexOf(a) || (a < b ? -1 : 1));
}

/**
 * Formula as chemists write it: Hill's for organic molecules; ligands in parentheses round a single metal; the central
 * atom first (`SO4`, `ClO4`); acid hydrogen first (`HCO3`, `H2PO4`), `OH` last (`B(OH)4`); otherwise by the sequence of
 * elements (`NH4`, `H2O`, `Si2O7`).
 */
export function unitFormula(group: AtomGroup): string {
  const { elements } = group;
  const metals = elements.flatMap((e, i) => (bondClasses().nonMetal.has(e) ? [] : [i]));
  if (metals.length === 1 && elements.length > 1) return complexFormula(group, metals[0]!);
  const chain = chainOfThree(group);
  if (chain) return chain;
  if (isOrganic(group)) return hillFormula(elements);
  if (elements.length === 2 && countsOf(elements).get("O") === 1) {
    const h = elements.find(isHydrogen);
    if (h) return `O${h}`;
  }
  return hydroxyFormula(group) ?? acidFormula(group) ?? centralFormula(group);
}

function neighbours(group: AtomGroup): number[][] {
  const around: number[][] = group.elements.map(() => []);
  for (const [a, b] of group.bonds) {
    around[a]!.push(b);
    around[b]!.push(a);
  }
  return around;
}

/** Carbon bonded to carbon, or carbon and hydrogen that is not acid: `C2O4`, `CHO2`, urea; not HCO3. */
function isOrganic({ elements, bonds }: AtomGroup): boolean {
  if (!elements.includes("C")) return false;
  return bonds.some(([a, b]) => {
    const pair = [elements[a]!, elements[b]!];
    return pair.every((e) => e === "C") || (pair.some(isHydrogen) && !pair.includes("O"));
  });
}

/** The metal, then its ligands: single atoms, then groups in parentheses. */
function complexFormula(group: AtomGroup, metal: number): string {
  const ligands = fragmentsWithout(group, metal);
  const counts = countsOf(ligands.map((l) => (l.elements.length === 1 ? l.elements[0]! : `(${unitFormula(l)})`)));
  const isGroup = (name: string) => name.startsWith("(");
  const atoms = inSequence([...counts.keys()].filter((name) => !isGroup(name)));
  const groups = [...counts.keys()].filter(isGroup).sort();
  return group.elements[metal]! + written(counts, [...atoms, ...groups]);
}

function fragmentsWithout(group: AtomGroup, left: number): AtomGroup[] {
  const around = neighbours(group);
  const fragment = new Map<number, number>();
  const fragments: number[][] = [];
  group.elements.forEach((_, start) => {
    if (start === left || fragment.has(start)) return;
    const queue = [start];
    fragment.set(start, fragments.length);
    for (let head = 0; head < queue.length; head++) {
      for (const next of around[queue[head]!]!) {
        if (next === left || fragment.has(next)) continue;
        fragment.set(next, fragments.length);
        queue.push(next);
      }
    }
    fragments.push(queue);
  });
  return fragments.map((members) => {
    const at = new Map(members.map((m, i) => [m, i]));
    const bonds = group.bonds.flatMap(([a, b]) => (at.has(a) && at.has(b) ? [[at.get(a)!, at.get(b)!] as const] : []));
    return { elements: members.map((m) => group.elements[m]!), bonds };
  });
}

/** `SCN`, `OCN`, `OCS`, `HCN`: three different atoms about carbon are written as they are bonded. */
function chainOfThree(group: AtomGroup): string | null {
  const { elements } = group;
  const carbon = elements.indexOf("C");
  if (elements.length !== 3 || new Set(elements).size !== 3 || carbon < 0) return null;
  if (neighbours(group)[carbon]!.length !== 2) return null;
  const [last, first] = inSequence(elements.filter((e) => e !== "C"));
  return `${first}C${last}`;
}

/** `B(OH)4`: every oxygen bears one hydrogen, and one other atom bears every oxygen. */
function hydroxyFormula(group: AtomGroup): string | null {
  const around = neighbours(group);
  const heavy = group.elements.flatMap((e, i) => (e === "O" || isHydrogen(e) ? [] : [i]));
  if (heavy.length !== 1) return null;
  const oxygen = group.elements.flatMap((e, i) => (e === "O" ? [i] : []));
  const hydrogen = group.elements.filter(isHydrogen);
  const bearsOne = (o: number) => around[o]!.filter((j) => isHydrogen(group.elements[j]!)).length === 1;
  if (oxygen.length < 2 || hydrogen.length !== oxygen.length || !oxygen.every(bearsOne)) return null;
  return `${group.elements[heavy[0]!]}(O${hydrogen[0]})${oxygen.length}`;
}

/** `HCO3`, `H2PO4`: all hydrogen is on oxygen, and there are other elements. */
function acidFormula(group: AtomGroup): string | null {
  const around = neighbours(group);
  const isAcid = (i: number) => around[i]!.length > 0 && around[i]!.every((j) => group.elements[j] === "O");
  const hydrogen = group.elements.flatMap((e, i) => (isHydrogen(e) ? [i] : []));
  const others = group.elements.some((e) => e !== "O" && !isHydrogen(e));
  if (hydrogen.length === 0 || !others || !hydrogen.every(isAcid)) return null;
  const acid = countsOf(hydrogen.map((i) => group.elements[i]!));
  const keep = group.elements.flatMap((e, i) => (isHydrogen(e) ? [] : [i]));
  const at = new Map(keep.map((m, i) => [m, i]));
  const bonds = group.bonds.flatMap(([a, b]) => (at.has(a) && at.has(b) ? [[at.get(a)!, at.get(b)!] as const] : []));
  const rest = { elements: keep.map((i) => group.elements[i]!), bonds };
  return written(acid, [...acid.keys()].sort().reverse()) + centralFormula(rest);
}

/** The atom that bears all others first, the rest by the sequence of elements. */
function centralFormula(group: AtomGroup): string {
  const counts = countsOf(group.elements);
  const around = neighbours(group);
  const heavy = group.elements.flatMap((e, i) => (isHydrogen(e) ? [] : [i]));
  const centre = heavy.find((i) => heavy.length > 2 && heavy.every((j) => j === i || around[i]!.includes(j)));
  const order = inSequence(counts.keys());
  if (centre === undefined) return written(counts, order);
  const first = group.elements[centre]!;
  return written(counts, [first, ...order.filter((e) => e !== first)]);
}
