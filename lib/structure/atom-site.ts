import {
  type CifBlock,
  type CifLoop,
  type CifValue,
  cellOf,
  findLoop,
  findValue,
  type Numb,
  numbOf,
  parseNumb,
} from "../cif/index.ts";
import { InputProblem, type Span } from "../problem.ts";
import { apply3, type Metric, type Vec3 } from "./cell.ts";
import { type DisplacementTensor, readDisplacements } from "./displacement.ts";
import { readLabel, readTypeSymbol, type SpeciesReading } from "./elements.ts";

/** One row of the atom list, as measured; nothing is moved or merged yet. */
export interface AtomSite {
  /** As written; made unique with a suffix `#2`, `#3` ... where the file repeats a label. */
  readonly label: string;
  readonly typeSymbol: string | null;
  /** Symbol of the element, null where neither type symbol nor label starts with one. */
  readonly element: string | null;
  readonly charge: number | null;
  /** Fractional coordinates as given, not wrapped. */
  readonly position: Vec3;
  /** Standard uncertainties of the coordinates, null where none is given. */
  readonly su: readonly [number | null, number | null, number | null];
  readonly occupancy: number;
  readonly assembly: string | null;
  readonly disorderGroup: string | null;
  readonly displacement: DisplacementTensor | null;
  readonly span: Span;
}

/** The atom list of a block, and what had to be left out or assumed. */
export interface AtomList {
  readonly sites: readonly AtomSite[];
  readonly notes: readonly string[];
}

/**
 * Reads the atom list. Rows without coordinates (`?`, `.`) and calculated dummy atoms are left out with a note.
 * @throws InputProblem `atoms-missing`, `coordinate-unreadable`
 */
export function readAtomSites(block: CifBlock, metric: Metric): AtomList {
  const loop =
    findLoop(block, "_atom_site.label") ??
    findLoop(block, "_atom_site.fract_x") ??
    findLoop(block, "_atom_site.Cartn_x");
  if (!loop) {
    throw new InputProblem(
      "atoms-missing",
      `block "${block.name}" lists no atoms`,
      block.span,
      "an _atom_site_label loop with _atom_site_fract_x, _y and _z is needed; choose another block with --block",
    );
  }
  const reader = new SiteReader(block, loop, metric);
  for (let row = 0; row < loop.rowCount; row++) reader.read(row);
  return reader.finish();
}

const COORDINATES = ["x", "y", "z"] as const;

class SiteReader {
  private readonly block: string;
  private readonly loop: CifLoop;
  private readonly metric: Metric;
  private readonly sites: AtomSite[] = [];
  private readonly notes: string[] = [];
  private readonly expected: ReadonlySet<string>;
  private readonly displacements: ReadonlyMap<number, DisplacementTensor>;
  private readonly labels = new Map<string, number>();
  private readonly left = { unknown: [] as string[], dummy: [] as string[] };
  private readonly guessed = { elements: [] as string[], occupancies: [] as string[] };
  private readonly repeated: string[] = [];
  private readonly cartesian: boolean;

  constructor(block: CifBlock, loop: CifLoop, metric: Metric) {
    this.block = block.name;
    this.loop = loop;
    this.metric = metric;
    this.expected = elementsNamed(block);
    this.displacements = readDisplacements(block, loop);
    this.cartesian = !COORDINATES.some((c) => cellOf(loop, 0, `_atom_site.fract_${c}`) !== null);
    if (this.cartesian && loop.rowCount > 0)
      this.notes.push("fractional coordinates were computed from Cartesian ones");
  }

  read(row: number): void {
    const written = this.text(row, "_atom_site.label") ?? this.text(row, "_atom_site.type_symbol") ?? `atom${row + 1}`;
    if (this.text(row, "_atom_site.calc_flag")?.toLowerCase() === "dum") {
      this.left.dummy.push(written);
      return;
    }
    const coordinates = this.coordinates(row, written);
    if (!coordinates) {
      this.left.unknown.push(written);
      return;
    }
    const typeSymbol = this.text(row, "_atom_site.type_symbol");
    const species = this.species(typeSymbol, written);
    this.sites.push({
      label: this.uniqueLabel(written),
      typeSymbol,
      element: species?.element ?? null,
      charge: species?.charge ?? null,
      position: this.position(coordinates),
      su: this.cartesian ? [null, null, null] : [coordinates[0].su, coordinates[1].su, coordinates[2].su],
      occupancy: this.occupancy(row, written),
      assembly: this.text(row, "_atom_site.disorder_assembly"),
      disorderGroup: this.text(row, "_atom_site.disorder_group"),
      displacement: this.displacements.get(row) ?? null,
      span: cellOf(this.loop, row, "_atom_site.label")?.span ?? this.loop.span,
    });
  }

  finish(): AtomList {
    const { unknown, dummy } = this.left;
    if (this.sites.length === 0) throw this.nothing();
    if (unknown.length > 0) this.notes.push(`left out for want of coordinates: ${unknown.join(", ")}`);
    if (dummy.length > 0) this.notes.push(`left out as dummy atoms: ${dummy.join(", ")}`);
    if (this.repeated.length > 0)
      this.notes.push(`labels used more than once: ${[...new Set(this.repeated)].join(", ")}`);
    this.notes.push(...guesses(this.guessed));
    const nameless = this.sites.filter((s) => s.element === null).map((s) => s.label);
    if (nameless.length > 0) this.notes.push(`no element could be read for ${nameless.join(", ")}`);
    return { sites: this.sites, notes: this.notes };
  }

  /** An empty list, or one of unknown places: counts of modes and sites would be nonsense. */
  private nothing(): InputProblem {
    const { unknown, dummy } = this.left;
    const why =
      unknown.length + dummy.length === 0
        ? "the list is empty"
        : `of ${unknown.length + dummy.length} rows, ${unknown.length} lack coordinates and ${dummy.length} are dummies`;
    return new InputProblem(
      "atoms-missing",
      `block "${this.block}" places no atom: ${why}`,
      this.loop.span,
      "give _atom_site_fract_x, _y and _z of each atom; choose another block with --block",
    );
  }

  private text(row: number, name: string): string | null {
    const value = cellOf(this.loop, row, name);
    return value?.kind === "text" ? value.text.trim() : null;
  }

  private coordinates(row: number, label: string): [Numb, Numb, Numb] | null {
    const stem = this.cartesian ? "_atom_site.Cartn_" : "_atom_site.fract_";
    const read = COORDINATES.map((c) => {
      const n = coordinate(cellOf(this.loop, row, stem + c), stem + c, label);
      return n && { ...n, su: n.su ?? numbOf(cellOf(this.loop, row, `${stem}${c}_su`))?.value ?? null };
    });
    return read.every((n) => n !== null) ? (read as [Numb, Numb, Numb]) : null;
  }

  private position(n: readonly [Numb, Numb, Numb]): Vec3 {
    const x: Vec3 = [n[0].value, n[1].value, n[2].value];
    return this.cartesian ? apply3(this.metric.toFractional, x) : x;
  }

  private species(typeSymbol: string | null, label: string): SpeciesReading | null {
    const fromType = typeSymbol ? readTypeSymbol(typeSymbol, this.expected) : null;
    if (fromType) return fromType;
    const guess = readLabel(label, this.expected);
    const goesOn = guess !== null && /^[A-Za-z]/.test(label.slice(guess.element.length));
    if (guess && goesOn && !this.expected.has(guess.element)) this.guessed.elements.push(`${label} (${guess.element})`);
    return guess;
  }

  private occupancy(row: number, label: string): number {
    const value = cellOf(this.loop, row, "_atom_site.occupancy");
    if (value?.kind === "unknown") this.guessed.occupancies.push(label);
    if (value === null || value.kind === "unknown" || value.kind === "inapplicable") return 1;
    const n = numbOf(value);
    if (!n) throw unreadable("_atom_site.occupancy", label, value);
    return n.value;
  }

  private uniqueLabel(written: string): string {
    const count = (this.labels.get(written) ?? 0) + 1;
    this.labels.set(written, count);
    if (count === 1) return written;
    this.repeated.push(written);
    return `${written}#${count}`;
  }
}

/** Labels of one note at most. */
const SHOWN_LABELS = 12;

function guesses({ elements, occupancies }: Record<"elements" | "occupancies", readonly string[]>): string[] {
  const list = (labels: readonly string[]) => {
    const more = labels.length - SHOWN_LABELS;
    return labels.slice(0, SHOWN_LABELS).join(", ") + (more > 0 ? ` and ${more} more` : "");
  };
  const notes: string[] = [];
  if (elements.length > 0) {
    notes.push(`elements guessed from labels that go on with letters, as no type symbol is given: ${list(elements)}`);
  }
  if (occupancies.length > 0) notes.push(`occupancy is ? and taken as 1: ${list(occupancies)}`);
  return notes;
}

function coordinate(value: CifValue | null, name: string, label: string): Numb | null {
  if (value === null || value.kind === "unknown" || value.kind === "inapplicable") return null;
  const n = numbOf(value);
  if (n && Number.isFinite(n.value)) return n;
  throw unreadable(name, label, value);
}

function unreadable(name: string, label: string, value: CifValue): InputProblem {
  const text = value.kind === "text" ? `"${value.text}"` : `a ${value.kind}`;
  return new InputProblem(
    "number-unreadable",
    `${name} of ${label} is ${text}, not a number`,
    value.span,
    "write a number with its s.u. in parentheses, such as 0.1234(5), or ? if it is not known",
  );
}

/** Element symbols that the sum formula and the atom types of a block name. */
function elementsNamed(block: CifBlock): ReadonlySet<string> {
  const out = new Set<string>();
  const formula = findValue(block, "_chemical_formula.sum")?.value;
  if (formula?.kind === "text") for (const m of formula.text.matchAll(/[A-Z][a-z]?/g)) out.add(m[0]);
  const types = findLoop(block, "_atom_type.symbol");
  for (let row = 0; types && row < types.rowCount; row++) {
    const value = cellOf(types, row, "_atom_type.symbol");
    const m = value?.kind === "text" ? /^[A-Z][a-z]?/.exec(value.text) : null;
    if (m) out.add(m[0]);
  }
  return out;
}

/** A cell parameter or other single number of a block, null where absent or `?` or `.`. */
export function readNumber(block: CifBlock, name: string): Numb | null {
  const found = findValue(block, name);
  if (!found || found.value.kind === "unknown" || found.value.kind === "inapplicable") return null;
  const n = found.value.kind === "text" ? parseNumb(found.value.text.trim()) : null;
  if (n && Number.isFinite(n.value)) return n;
  throw unreadable(found.name, `block "${block.name}"`, found.value);
}
