import { InputProblem } from "../problem.ts";
import type { CoordinateAtom, CoordinateList } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { type ResidueName, residueNames, UNKNOWN_LIGAND } from "./residue-names.ts";

/** Serial numbers have five columns. */
const MOST_ATOMS = 99_999;
/** B = 8 pi^2 U. */
const EIGHT_PI_SQUARED = 8 * Math.PI * Math.PI;

/**
 * PDB coordinate records: CRYST1, SCALE, HETATM, END. All atoms of the cell are listed, so its space group is P 1; a list
 * that does not repeat gets the unit cell 1 1 1 90 90 90, as the format asks where there is no crystal.
 * @throws InputProblem `format-too-small` if numbers of atoms, coordinates or names do not fit the columns
 * Source: Protein Data Bank Contents Guide, Atomic Coordinate Entry Format, version 3.3 (wwPDB, 2012).
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const list = coordinateList(atomModel(halite, { symmetry: "none", cell: { kind: "primitive" } }));
 * pdbText(list).split("\n")[0]; // "CRYST1    3.988    3.988    3.988  60.00  60.00  60.00 P 1           1          "
 * ```
 */
export function pdbText(list: CoordinateList): string {
  if (list.atoms.length > MOST_ATOMS)
    throw tooSmall(`numbers atoms up to ${MOST_ATOMS}, and there are ${list.atoms.length}`);
  const [a, b, c, alpha, beta, gamma] = list.cell ?? [1, 1, 1, 90, 90, 90];
  const lengths = [a, b, c].map((e) => column(formatNumber(e, 3), 9)).join("");
  const angles = [alpha, beta, gamma].map((e) => column(formatNumber(e, 2), 7)).join("");
  const lines = [`CRYST1${lengths}${angles} ${"P 1".padEnd(11)}${column("1", 4)}`.padEnd(80)];
  if (list.cell) lines.push(...scaleRecords(list));
  const nameOf = residueNames(list);
  list.atoms.forEach((atom, i) => {
    lines.push(atomRecord(atom, i + 1, nameOf(atom)));
  });
  lines.push("END".padEnd(80));
  return `${lines.join("\n")}\n`;
}

function scaleRecords({ toFractional }: CoordinateList): string[] {
  return toFractional.map((row, i) => {
    const entries = row.map((e) => column(formatNumber(e, 6), 10)).join("");
    return `SCALE${i + 1}    ${entries}     ${column(formatNumber(0, 5), 10)}`.padEnd(80);
  });
}

function atomRecord(atom: CoordinateAtom, serial: number, { name, residue, chain }: ResidueName): string {
  const symbol = (atom.element ?? "X").toUpperCase();
  // the symbol of the element stands right-justified in the first two of four columns
  const placed = (symbol.length === 1 && name.length < 4 && name.startsWith(symbol) ? ` ${name}` : name).padEnd(4);
  if (placed.length > 4) throw tooSmall(`has four columns for the name of an atom, and ${name} needs more`);
  const alternative = /^[A-Za-z0-9]$/.test(atom.disorderGroup ?? "") ? atom.disorderGroup! : " ";
  const coordinates = atom.cartesian.map((e) => column(formatNumber(e, 3), 8)).join("");
  const b = atom.displacement === null ? 0 : Math.max(0, atom.displacement * EIGHT_PI_SQUARED);
  const factors = column(formatNumber(atom.occupancy, 2), 6) + column(formatNumber(Math.min(b, 999.99), 2), 6);
  const start = `HETATM${column(String(serial), 5)} ${placed}${alternative}${UNKNOWN_LIGAND} ${chain}${column(String(residue), 4)}`;
  return `${start}    ${coordinates}${factors}          ${column(symbol, 2)}${chargeText(atom.charge)}`;
}

/** `2+`, `1-`; blank for none. */
function chargeText(charge: number | null): string {
  if (charge === null || !Number.isInteger(charge) || charge === 0 || Math.abs(charge) > 9) return "  ";
  return `${Math.abs(charge)}${charge > 0 ? "+" : "-"}`;
}

function column(text: string, width: number): string {
  if (text.length > width) throw tooSmall(`has ${width} columns for ${text}`);
  return text.padStart(width);
}

function tooSmall(why: string): InputProblem {
  return new InputProblem(
    "format-too-small",
    `the PDB format cannot hold this list: it ${why}`,
    null,
    "write mmcif or extxyz, or choose fewer atoms",
  );
}
