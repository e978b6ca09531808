import { type CifLoop, columnName, findLoop } from "../cif/index.ts";
import { type Measure, torsion } from "../structure/index.ts";
import { atomRows } from "./atom-rows.ts";
import { type AuditInput, rounding, rowNumber, rowText, type StatedNumber } from "./audit-input.ts";
import type { Criterion } from "./finding.ts";
import { type PlacedAtom, type PropagatedValue, propagate } from "./propagated-value.ts";
import { type StatedCell, statedCell } from "./stated-cell.ts";
import { codeReader } from "./symmetry-codes.ts";

/** Standard uncertainties that a listed value may be off. */
export const SU_FACTOR = 2;

/** One kind of value that a file lists between named atoms. */
export interface GeometryKind {
  readonly criterion: Criterion;
  readonly noun: string;
  /** Data names of the labels and of the codes that go with them. */
  readonly labels: readonly string[];
  readonly codes: readonly string[];
  readonly value: string;
  readonly measure: Measure;
  /** Differences below this are rounding inside a program, in the unit. */
  readonly least: number;
  readonly unit: "Å" | "°";
}

/** A listed value with what the coordinates give. */
export interface ComparedValue {
  readonly kind: GeometryKind;
  /** Atoms with their codes, `C1-O2(3_655)`. */
  readonly name: string;
  readonly stated: StatedNumber;
  readonly computed: PropagatedValue;
  readonly difference: number;
  readonly tolerance: number;
}

/** A row that could not be computed, and why. */
export interface UnplacedRow {
  readonly kind: GeometryKind;
  readonly name: string;
  readonly stated: StatedNumber;
  readonly why: { readonly kind: "label"; readonly label: string } | { readonly kind: "code"; readonly code: string };
}

export interface ListedGeometry {
  readonly compared: readonly ComparedValue[];
  readonly unplaced: readonly UnplacedRow[];
}

/** Computes every listed value of some kinds from coordinates, cell and the symmetry codes beside it. */
export function listedGeometry(input: AuditInput, kinds: readonly GeometryKind[]): ListedGeometry {
  const cell = statedCell(input);
  const compared: ComparedValue[] = [];
  const unplaced: UnplacedRow[] = [];
  if (!cell || !input.metric) return { compared, unplaced };
  const context = { atoms: knownAtoms(input), read: codeReader(input) };
  for (const kind of kinds) {
    const loop = findLoop(input.block, kind.labels[0]!);
    if (!loop || !columnName(loop, kind.value) || !hasCodes(loop, kind)) continue;
    for (let row = 0; row < loop.rowCount; row++) {
      const read = readRow(loop, row, kind, context);
      if (!read) continue;
      if ("why" in read) unplaced.push(read);
      else compared.push(comparison(cell, kind, read));
    }
  }
  return { compared, unplaced };
}

/** Without any column of codes nobody knows which images are meant. */
function hasCodes(loop: CifLoop, kind: GeometryKind): boolean {
  return kind.codes.some((code) => columnName(loop, code) !== null);
}

interface Context {
  /** Null for labels that occur twice. */
  readonly atoms: ReadonlyMap<string, Omit<PlacedAtom, "image"> | null>;
  readonly read: ReturnType<typeof codeReader>;
}

function knownAtoms(input: AuditInput): Context["atoms"] {
  const atoms = new Map<string, Omit<PlacedAtom, "image"> | null>();
  const repeated = new Set(input.atoms.flatMap((a) => /^(.*)#\d+$/.exec(a.label)?.[1] ?? []));
  for (const { atom, loop, row } of atomRows(input)) {
    const stated = ["x", "y", "z"].map((c) => rowNumber(loop, row, `_atom_site.fract_${c}`));
    const { label, position } = atom;
    const written = stated.every((n) => n !== null) ? (stated as StatedNumber[]) : null;
    atoms.set(label, repeated.has(label) ? null : { label, stated: written, position });
  }
  return atoms;
}

interface ReadRow {
  readonly name: string;
  readonly stated: StatedNumber;
  readonly atoms: readonly PlacedAtom[];
}

/** A row with its atoms in place, or why not; null where it says nothing that could be compared. */
function readRow(
  loop: CifLoop,
  row: number,
  kind: GeometryKind,
  { atoms, read }: Context,
): ReadRow | UnplacedRow | null {
  const stated = rowNumber(loop, row, kind.value);
  const labels = kind.labels.map((name) => rowText(loop, row, name)?.text ?? null);
  if (!stated || labels.some((l) => l === null)) return null;
  const codes = kind.codes.map((code) => (code ? rowText(loop, row, code) : null));
  const name = labels.map((l, i) => (codes[i] ? `${l}(${codes[i].text})` : l)).join("-");
  const placed: PlacedAtom[] = [];
  for (const [i, label] of (labels as string[]).entries()) {
    const atom = atoms.get(label);
    if (atom === undefined) return { kind, name, stated, why: { kind: "label", label } };
    const reading = read(codes[i] ?? null);
    if (reading.kind === "absent") return { kind, name, stated, why: { kind: "code", code: codes[i]!.text } };
    if (reading.kind === "unreadable" || atom === null) return null;
    placed.push({ ...atom, image: reading.image });
  }
  return { name, stated, atoms: placed };
}

function comparison(cell: StatedCell, kind: GeometryKind, { name, stated, atoms }: ReadRow): ComparedValue {
  const computed = propagate(cell, atoms, kind.measure);
  const off = stated.value - computed.value;
  const difference = kind.measure === torsion && Math.abs(off) > 180 ? off - 360 * Math.sign(off) : off;
  const tolerance =
    kind.least + rounding(stated) + computed.rounding + SU_FACTOR * Math.max(stated.su ?? 0, computed.su);
  return { kind, name, stated, computed, difference, tolerance };
}
