import { type AffineForm, formatForm, imageOfForm, isFixedBy, parseForm } from "./affine-form.ts";
import { arithmeticClassOf } from "./arithmetic-class.ts";
import { crystalFamily } from "./geometric-class.ts";
import { type DirectionSets, orientedSymbol } from "./oriented-site-symmetry.ts";
import { referenceGroup } from "./reference-group.ts";
import { WYCKOFF_1_74 } from "./tables/wyckoff-1-74.ts";
import { WYCKOFF_75_142 } from "./tables/wyckoff-75-142.ts";
import { WYCKOFF_143_230 } from "./tables/wyckoff-143-230.ts";

/** A Wyckoff position in the reference setting. */
export interface WyckoffPosition {
  /** `a` to `z`; the letter after z, a Greek alpha in print, is `A`. */
  readonly letter: string;
  /** Points per conventional cell. */
  readonly multiplicity: number;
  /** Oriented symbol: `.m.`, `4/mm.m`, `2`. */
  readonly siteSymmetry: string;
  /** Order of the site-symmetry group. */
  readonly order: number;
  /** The first triplet: `x,1/4,z`. */
  readonly representative: string;
  /** All triplets in the printed order, modulo the centring translations. */
  readonly coordinates: readonly string[];
  /** The first triplet as a form. */
  readonly form: AffineForm;
  /** Indices, into the representatives of the reference group, of the operations that fix it point by point. */
  readonly stabiliser: readonly number[];
}

const cache: (WyckoffPosition | undefined)[][] = [];

/**
 * Wyckoff positions of a space-group type (1 to 230) in the reference setting, in the order of their letters, the
 * general position last. Only letters and first triplets are tabulated; all else is computed from the operations.
 * @throws RangeError outside 1 to 230
 */
export function wyckoffPositions(number: number): readonly WyckoffPosition[] {
  return tabulated(number).map((_, index) => wyckoffPosition(number, index));
}

/** One position by its place in that list, 0 for the letter a; worked out alone. */
export function wyckoffPosition(number: number, index: number): WyckoffPosition {
  cache[number] ??= [];
  cache[number][index] ??= position(number, tabulated(number)[index]!, directionSets(number));
  return cache[number][index];
}

/** Sets of symmetry directions that the site-symmetry symbols of a type name. */
export function directionSets(number: number): DirectionSets {
  const { centring, geometric } = arithmeticClassOf(number);
  return centring === "R" ? "rhombohedral" : crystalFamily(geometric);
}

/** One entry of the table, as it was written down. */
export interface TabulatedPosition {
  readonly multiplicity: number;
  readonly letter: string;
  readonly siteSymmetry: string;
  readonly representative: string;
}

/** The table's entries of a type; its multiplicities and symbols serve only to check it. */
export function tabulated(number: number): readonly TabulatedPosition[] {
  const known = entries.get(number);
  if (known) return known;
  const fresh = readTable(number);
  entries.set(number, fresh);
  return fresh;
}

const entries = new Map<number, readonly TabulatedPosition[]>();

function readTable(number: number): TabulatedPosition[] {
  const line =
    number < 75 ? WYCKOFF_1_74[number - 1] : number < 143 ? WYCKOFF_75_142[number - 75] : WYCKOFF_143_230[number - 143];
  if (line === undefined) throw new RangeError(`there is no space-group type ${number}`);
  const [name, ...positions] = line.split("|");
  if (name !== String(number)) throw new RangeError(`the table of Wyckoff positions has ${name} at ${number}`);
  return positions.map((entry) => {
    const [label = "", siteSymmetry = "", representative = ""] = entry.split(" ");
    return { multiplicity: Number.parseInt(label, 10), letter: label.at(-1)!, siteSymmetry, representative };
  });
}

function position(number: number, entry: TabulatedPosition, sets: DirectionSets): WyckoffPosition {
  const { operations, representatives } = referenceGroup(number);
  const form = parseForm(entry.representative);
  // A search for one position asks the others for nothing but their form.
  let fixing: readonly number[] | null = null;
  let symbol: string | null = null;
  let listed: readonly string[] | null = null;
  const stabiliser = () => {
    fixing ??= operations
      .flatMap((a, i) => (isFixedBy(a, form) ? [i % representatives.length] : []))
      .sort((a, b) => a - b);
    return fixing;
  };
  return {
    letter: entry.letter,
    representative: entry.representative,
    form,
    get stabiliser() {
      return stabiliser();
    },
    get order() {
      return stabiliser().length;
    },
    get multiplicity() {
      return operations.length / stabiliser().length;
    },
    get siteSymmetry() {
      const rotations = () => stabiliser().map((i) => representatives[i]!.W);
      symbol ??= orientedSymbol(rotations(), sets)!;
      return symbol;
    },
    get coordinates() {
      listed ??= coordinates(number, form);
      return listed;
    },
  };
}

/** Images under the representatives in their order, each once modulo the centring translations. */
function coordinates(number: number, form: AffineForm): string[] {
  const group = referenceGroup(number);
  const seen = new Set<string>();
  const found: string[] = [];
  group.representatives.forEach((a) => {
    const image = imageOfForm(a, form);
    const text = formatForm(image);
    if (seen.has(text)) return;
    found.push(text);
    for (const t of group.centrings) seen.add(formatForm(imageOfForm({ W: UNIT, w: t }, image)));
  });
  return found;
}

const UNIT = [1, 0, 0, 0, 1, 0, 0, 0, 1] as const;
