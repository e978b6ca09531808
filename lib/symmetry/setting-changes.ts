import type { DirectionSystem } from "./hermann-mauguin-symbol.ts";
import {
  AXIS_ORDERS,
  CELL_CHOICES,
  FIRST_ORIGINS,
  REVERSE_SETTING,
  RHOMBOHEDRAL_AXES,
  TETRAGONAL_CELL,
  TRICLINIC_CELLS,
  TRIPLE_HEXAGONAL_CELL,
  TURNED_CUBIC,
  UNIQUE_AXES,
} from "./tables/setting-changes.ts";
import { chain, type Transformation } from "./transformation.ts";
import { parseTransformation } from "./transformation-text.ts";

/** One way to leave the reference setting. */
export interface SettingChange {
  /** Monoclinic axis and cell choice, order of orthorhombic axes, larger cell, or "". */
  readonly axes: string;
  /** Origin choice 1 or 2, hexagonal (obverse or reverse) or rhombohedral axes, or "". */
  readonly choice: "" | "1" | "2" | "H" | "R" | "H-reverse";
  /** New axes in terms of the reference axes; the shift of origin choice 1 comes before it. */
  readonly basis: Transformation;
  /** True for the reference setting itself. */
  readonly first: boolean;
}

/** All changes that lead to conventional settings of a type, the reference setting itself first. */
export function settingChanges(number: number, system: DirectionSystem, lattice: string): SettingChange[] {
  switch (system) {
    case "triclinic":
      return [change("", "a,b,c"), ...Object.entries(TRICLINIC_CELLS).map(([axes, basis]) => change(axes, basis))];
    case "monoclinic":
      return monoclinicChanges(number);
    case "orthorhombic":
      return withOrigins(
        number,
        Object.entries(AXIS_ORDERS).map(([axes, basis]) => change(axes, basis)),
      );
    case "tetragonal":
      return withOrigins(number, [change("", "a,b,c"), change(lattice === "P" ? "C" : "F", TETRAGONAL_CELL)]);
    case "rhombohedral":
      return [change("", "a,b,c", "H"), change("", RHOMBOHEDRAL_AXES, "R"), change("", REVERSE_SETTING, "H-reverse")];
    case "trigonal":
    case "hexagonal":
      return [change("", "a,b,c"), change("H", TRIPLE_HEXAGONAL_CELL)];
    default:
      return withOrigins(number, [change("", "a,b,c"), change("ba-c", TURNED_CUBIC)]);
  }
}

function change(axes: string, basis: string, choice: SettingChange["choice"] = ""): SettingChange {
  return { axes, choice, basis: changeOfBasis(basis), first: basis === "a,b,c" };
}

const read = new Map<string, Transformation>();

/** The few changes of basis serve all types, so each text is read once. */
function changeOfBasis(text: string): Transformation {
  const found = read.get(text) ?? parseTransformation(text);
  read.set(text, found);
  return found;
}

function withOrigins(number: number, changes: readonly SettingChange[]): SettingChange[] {
  if (!(number in FIRST_ORIGINS)) return [...changes];
  return changes.flatMap((c) => [
    { ...c, choice: "2" as const },
    { ...c, choice: "1" as const, first: false },
  ]);
}

/** Types without glide plane or centring have one cell for each unique axis; the others have eighteen settings. */
function monoclinicChanges(number: number): SettingChange[] {
  if (CELL_INDIFFERENT.has(number)) return (["b", "c", "a"] as const).map((axes) => change(axes, UNIQUE_AXES[axes]));
  return Object.entries(UNIQUE_AXES).flatMap(([axis, then]) =>
    Object.entries(CELL_CHOICES).map(
      ([cell, basis]): SettingChange => ({
        axes: `${axis}${cell}`,
        choice: "",
        basis: chain(changeOfBasis(basis), changeOfBasis(then)),
        first: axis === "b" && cell === "1",
      }),
    ),
  );
}

const CELL_INDIFFERENT: ReadonlySet<number> = new Set([3, 4, 6, 10, 11]);
