import type { CoordinateAtom, CoordinateList } from "../structure/index.ts";

/** Decimals of coordinates in angstrom. */
const DECIMALS = 6;

/** The symbol that stands for an atom whose element is not known. */
const UNKNOWN = "X";

/**
 * XYZ: the number of atoms, a line of comment, then element and Cartesian coordinates in angstrom, a line each.
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const list = coordinateList(atomModel(halite, { symmetry: "none", cell: { kind: "primitive" } }));
 * xyzText(list).split("\n")[3]; // "Cl 3.988082 2.302520 1.628128"
 * ```
 */
export function xyzText(list: CoordinateList): string {
  const lines = [String(list.atoms.length), oneLine(list.name)];
  for (const atom of list.atoms) lines.push(`${symbolOf(atom)} ${coordinates(atom)}`);
  return `${lines.join("\n")}\n`;
}

/**
 * Extended XYZ: the second line holds `key=value` pairs, among them the lattice (Cartesian components of a, b, c) and
 * the meaning of the columns: species, position, occupancy, label of the site, number of the operation that made it.
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const list = coordinateList(atomModel(halite, { symmetry: "none", cell: { kind: "primitive" } }));
 * extendedXyz(list).split("\n")[3]; // "Cl 3.988082 2.302520 1.628128 1 Cl 1"
 * ```
 */
export function extendedXyz(list: CoordinateList): string {
  const lattice = list.cell ? [`Lattice="${list.axes.flatMap((axis) => axis.map(figure)).join(" ")}"`] : [];
  const pbc = list.cell ? 'pbc="T T T"' : 'pbc="F F F"';
  const properties = "Properties=species:S:1:pos:R:3:occupancy:R:1:site:S:1:operation:I:1";
  const name = `name="${oneLine(list.name).replaceAll('"', "'").replaceAll("\\", "/")}"`;
  const lines = [String(list.atoms.length), [...lattice, properties, pbc, name].join(" ")];
  for (const atom of list.atoms) {
    const { occupancy, label, operation } = atom;
    lines.push(`${symbolOf(atom)} ${coordinates(atom)} ${occupancy} ${oneWord(label)} ${operation + 1}`);
  }
  return `${lines.join("\n")}\n`;
}

function symbolOf({ element }: CoordinateAtom): string {
  return element ?? UNKNOWN;
}

function coordinates({ cartesian: [x, y, z] }: CoordinateAtom): string {
  return `${figure(x)} ${figure(y)} ${figure(z)}`;
}

function figure(x: number): string {
  const text = x.toFixed(DECIMALS);
  return x > -1 && x < 0 && /^-0\.0*$/.test(text) ? text.slice(1) : text;
}

function oneLine(text: string): string {
  return text.replace(/[^\x20-\x7e]+/g, " ").trim();
}

function oneWord(text: string): string {
  return text.replace(/\s+/g, "_") || "-";
}
