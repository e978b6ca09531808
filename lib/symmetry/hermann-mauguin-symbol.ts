/** Letter of a mirror or glide plane; g1 and g2 are the glides a/4+b/4 and a/4+b/4+c/2 of C-centred tetragonal cells. */
export type PlaneLetter = "m" | "a" | "b" | "c" | "e" | "n" | "d" | "g" | "g1" | "g2";

/** What a Hermann-Mauguin symbol says about one symmetry direction: `21/c` has axis "21" and plane "c". */
export interface SymbolPart {
  /** `1`, `2`, `21`, `-4`, `63`; null where only the plane is written. */
  readonly axis: string | null;
  readonly plane: PlaneLetter | null;
}

/** A Hermann-Mauguin symbol taken apart: lattice letter and one part per symmetry direction. */
export interface HermannMauguinSymbol {
  readonly lattice: string;
  readonly parts: readonly SymbolPart[];
}

/** Takes apart a symbol written with blanks, as our tables are: `P 1 21/c 1`. Meant for symbols known to be sound. */
export function splitSymbol(text: string): HermannMauguinSymbol {
  const [lattice = "", ...words] = text.split(" ");
  return { lattice, parts: words.map(splitPart) };
}

function splitPart(word: string): SymbolPart {
  const [first = "", plane] = word.split("/");
  if (/^[a-z]/.test(first)) return { axis: null, plane: first as PlaneLetter };
  return { axis: first, plane: (plane ?? null) as PlaneLetter | null };
}

/** The symbol with blanks: `P 1 21/c 1`. */
export function formatSymbol(symbol: HermannMauguinSymbol): string {
  return [symbol.lattice, ...symbol.parts.map(formatPart)].join(" ");
}

function formatPart(part: SymbolPart): string {
  if (part.axis === null) return part.plane ?? "1";
  return part.plane === null ? part.axis : `${part.axis}/${part.plane}`;
}

/** Crystal system, with the trigonal groups of rhombohedral lattice apart because their directions differ. */
export type DirectionSystem =
  | "triclinic"
  | "monoclinic"
  | "orthorhombic"
  | "tetragonal"
  | "trigonal"
  | "rhombohedral"
  | "hexagonal"
  | "cubic";

const FIRST_NUMBERS: readonly (readonly [number, DirectionSystem])[] = [
  [195, "cubic"],
  [168, "hexagonal"],
  [143, "trigonal"],
  [75, "tetragonal"],
  [16, "orthorhombic"],
  [3, "monoclinic"],
  [1, "triclinic"],
];
const RHOMBOHEDRAL = new Set([146, 148, 155, 160, 161, 166, 167]);

/** System of a space-group type, as far as it decides the symmetry directions of the symbol. */
export function directionSystem(number: number): DirectionSystem {
  if (RHOMBOHEDRAL.has(number)) return "rhombohedral";
  return FIRST_NUMBERS.find(([first]) => number >= first)![1];
}

type Direction = readonly [number, number, number];

/**
 * A representative of each symmetry direction of a Hermann-Mauguin symbol, in its order, as lattice directions.
 * Source: International Tables for Crystallography A (2016), section 1.4.1 (table of symmetry directions).
 */
export function symmetryDirections(system: DirectionSystem, rhombohedralAxes = false): readonly Direction[] {
  switch (system) {
    case "triclinic":
      return [];
    case "monoclinic":
    case "orthorhombic":
      return [A, B, C];
    case "rhombohedral":
      return rhombohedralAxes ? [BODY, DIAGONAL] : [C, A];
    case "cubic":
      return [C, BODY, DIAGONAL];
    default:
      return [C, A, DIAGONAL];
  }
}

const A: Direction = [1, 0, 0];
const B: Direction = [0, 1, 0];
const C: Direction = [0, 0, 1];
const DIAGONAL: Direction = [1, -1, 0];
const BODY: Direction = [1, 1, 1];

/**
 * The short form of a full symbol: axes normal to planes left out where the planes imply them, the ones of unique
 * axis b dropped.
 */
export function shortSymbol(full: HermannMauguinSymbol, system: DirectionSystem): HermannMauguinSymbol {
  const { lattice, parts } = full;
  if (system === "monoclinic" && parts[0]?.axis === "1" && parts[2]?.axis === "1") {
    return { lattice, parts: parts.slice(1, 2) };
  }
  const keepFirst = system === "tetragonal" || system === "hexagonal";
  if (system === "monoclinic" || system === "triclinic") return full;
  return {
    lattice,
    parts: parts.map((part, i) => (part.plane && !(i === 0 && keepFirst) ? { axis: null, plane: part.plane } : part)),
  };
}
