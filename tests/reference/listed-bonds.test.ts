import { readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { type CifBlock, type CifLoop, cellOf, findLoop, type Numb, numbOf, readCif } from "../../lib/cif/index.ts";
import {
  apply3,
  type Crystal,
  crystalFromBlock,
  inverse3,
  lengthOf,
  type Neighbour,
  neighboursAnswer,
  type Vec3,
  type WrittenOperation,
  writtenOperations,
} from "../../lib/structure/index.ts";
import { CORPUS, CORPUS_FILES } from "../support/corpus.ts";

/**
 * Distances that depositions list beside their coordinates, written by the programs that refined them: with the full
 * covariance matrix and unrounded coordinates, which a CIF does not hold.
 */
const FILES = CORPUS_FILES.filter((path) => path.startsWith("journal/"));

/** One listed distance with what we find for the same two atoms. */
interface Row {
  readonly name: string;
  readonly listed: Numb;
  /** As the file writes it, in full; null where the list has no codes. */
  readonly code: string | null;
  readonly found: Neighbour | null;
  /** The s.u. without the part of the cell. */
  readonly suOfCoordinates: number | null;
  /** What rounding of the coordinates written may do to the distance, angstrom. */
  readonly rounding: number;
  /** Whether the refinement tied an atom by restraints, constraints or a rigid group. */
  readonly tied: boolean;
}

const textAt = (loop: CifLoop, row: number, name: string): string | null => {
  const value = cellOf(loop, row, name);
  return value?.kind === "text" ? value.text.trim() : null;
};

const IDENTITY: WrittenOperation = { W: [1, 0, 0, 0, 1, 0, 0, 0, 1], t: [0, 0, 0] };

function readCode(
  operations: ReadonlyMap<string, WrittenOperation | null>,
  code: string | null,
): WrittenOperation | null {
  if (code === null || code === ".") return IDENTITY;
  const [, id = "", ...digits] = /^(\d+)(?:_(\d)(\d)(\d))?$/.exec(code) ?? [];
  const operation = operations.get(id) ?? null;
  const cell = (i: number) => (digits[i] === undefined ? 0 : Number(digits[i]) - 5);
  return operation && { W: operation.W, t: operation.t.map((e, i) => e + cell(i)) as unknown as Vec3 };
}

const imageOf = ({ W, t }: WrittenOperation, x: Vec3): Vec3 => apply3(W, x).map((e, i) => e + t[i]!) as unknown as Vec3;

/** Half a unit of the last digit of every coordinate, by label; none for exact fractions. */
function roundings(block: CifBlock): Map<string, Vec3> {
  const loop = findLoop(block, "_atom_site.label")!;
  const half = (n: Numb | null) =>
    !n || (n.su === null && Number.isInteger(24 * n.value)) ? 0 : 0.5 * 10 ** -n.decimals;
  return new Map(
    Array.from({ length: loop.rowCount }, (_, row) => {
      const halves = ["x", "y", "z"].map((c) => half(numbOf(cellOf(loop, row, `_atom_site.fract_${c}`))));
      return [textAt(loop, row, "_atom_site.label")!, halves as unknown as Vec3];
    }),
  );
}

/** Labels of atoms that were refined with restraints (D), riding (R) or in rigid groups (G), or placed by calculation. */
function tiedLabels(block: CifBlock): Set<string> {
  const loop = findLoop(block, "_atom_site.label")!;
  const tied = new Set<string>();
  for (let row = 0; row < loop.rowCount; row++) {
    const flags = ["refinement_flags", "refinement_flags_posn", "calc_flag"].map((n) =>
      textAt(loop, row, `_atom_site.${n}`),
    );
    if (/[DGR]/.test(`${flags[0] ?? ""}${flags[1] ?? ""}`) || /calc/.test(flags[2] ?? "")) {
      tied.add(textAt(loop, row, "_atom_site.label")!);
    }
  }
  return tied;
}

function rowsOf(block: CifBlock): Row[] {
  const loop = findLoop(block, "_geom_bond.distance");
  if (!loop) return [];
  const crystal = crystalFromBlock(block);
  const distances = Array.from({ length: loop.rowCount }, (_, r) => numbOf(cellOf(loop, r, "_geom_bond.distance")));
  const distance = Math.max(...distances.map((d) => d?.value ?? 0)) + 0.1;
  const sites = neighboursAnswer(crystal, { block, choice: { kind: "within", distance } }).sites;
  const plain = neighboursAnswer(crystal, { choice: { kind: "within", distance } }).sites;
  const [halves, tied] = [roundings(block), tiedLabels(block)];
  return distances.flatMap((listed, row): Row[] => {
    if (!listed) return [];
    const [from, to] = [1, 2].map((i) => textAt(loop, row, `_geom_bond.atom_site_label_${i}`)) as [string, string];
    const index = sites.findIndex((s) => s.label === from);
    const found = findNeighbour(crystal, block, loop, row, sites[index]?.neighbours ?? [], listed);
    const code = textAt(loop, row, "_geom_bond.site_symmetry_2") ?? (hasCodes(loop) ? "." : null);
    const { a, b, c } = crystal.metric.cell;
    const roundingOf = (label: string) =>
      (halves.get(label) ?? [0, 0, 0]).reduce((s, h, i) => s + h * [a, b, c][i]!, 0);
    return [
      {
        name: `${block.name} ${from}-${to} ${code ?? ""}`,
        listed,
        code: code === "." ? "1_555" : code && (code.includes("_") ? code : `${code}_555`),
        found: found === null ? null : sites[index]!.neighbours[found]!,
        suOfCoordinates: found === null ? null : plain[index]!.neighbours[found]!.su,
        rounding: roundingOf(from) + roundingOf(to),
        tied: tied.has(from) || tied.has(to),
      },
    ];
  });
}

const hasCodes = (loop: CifLoop) =>
  [1, 2].some((i) => loop.names.some((n) => n.toLowerCase().endsWith(`site_symmetry_${i}`)));

/** Index of the neighbour at the place that the row means; by its distance where the list has no codes. */
function findNeighbour(
  crystal: Crystal,
  block: CifBlock,
  loop: CifLoop,
  row: number,
  neighbours: readonly Neighbour[],
  listed: Numb,
): number | null {
  const operations = writtenOperations(block);
  const to = textAt(loop, row, "_geom_bond.atom_site_label_2");
  const point = crystal.sites.find((s) => s.label === to)?.symmetry.point;
  const codes = [1, 2].map((i) => readCode(operations, textAt(loop, row, `_geom_bond.site_symmetry_${i}`)));
  if (!point || !codes[0] || !codes[1]) return null;
  const [first, second] = codes as [WrittenOperation, WrittenOperation];
  const meant = apply3(inverse3(first.W), imageOf(second, point).map((e, i) => e - first.t[i]!) as unknown as Vec3);
  const index = neighbours.findIndex((n) => {
    if (n.label !== to || n.code === null) return false;
    if (!hasCodes(loop)) return Math.abs(n.distance - listed.value) < 2e-3;
    const there = imageOf(readCode(operations, n.code)!, point);
    return lengthOf(crystal.metric, there.map((e, i) => e - meant[i]!) as unknown as Vec3) < 0.02;
  });
  return index < 0 ? null : index;
}

const unitOf = ({ listed }: Row) => 10 ** -listed.decimals;
const offBy = ({ listed, found }: Row) => Math.abs(found!.distance - listed.value);
/** Distances are read as decimals. */
const EPSILON = 1e-9;

if (FILES.length > 0) {
  const rows = FILES.flatMap((path) =>
    readCif(readFileSync(join(CORPUS, path), "utf8")).value.blocks.flatMap((block) => rowsOf(block)),
  );
  const placed = rows.filter((r) => r.found !== null);

  describe("distances listed by depositions", () => {
    it("are found among our neighbours, but for alternatives of a disorder, which are none", () => {
      expect(rows.length).toBeGreaterThan(800);
      const absent = rows.filter((r) => r.found === null);
      expect(absent.length).toBeLessThan(0.025 * rows.length);
      expect(absent.filter((r) => r.listed.value > 0.75).map((r) => r.name)).toEqual([]);
    });

    it("have our symmetry codes", () => {
      const coded = placed.filter((r) => r.code !== null);
      expect(coded.length).toBeGreaterThan(700);
      expect(coded.filter((r) => r.found!.code !== r.code).map((r) => `${r.name}: ${r.found!.code}`)).toEqual([]);
    });

    it("agree within one unit of the last digit wherever the digits of the coordinates can tell", () => {
      const sharp = placed.filter((r) => r.rounding <= unitOf(r));
      expect(sharp.length).toBeGreaterThan(100);
      expect(sharp.filter((r) => offBy(r) > unitOf(r) + EPSILON).map((r) => r.name)).toEqual([]);
    });

    it("agree everywhere within one unit and half a unit of the last digit of every coordinate", () => {
      const off = placed.filter((r) => offBy(r) > unitOf(r) + r.rounding + EPSILON);
      expect(off.map((r) => `${r.name}: ${r.listed.text}, ours ${r.found!.distance}`)).toEqual([]);
    });

    it("agree within one standard uncertainty where they state one", () => {
      const measured = placed.filter((r) => r.listed.su);
      expect(measured.length).toBeGreaterThan(500);
      expect(measured.filter((r) => offBy(r) > r.listed.su! + EPSILON).map((r) => r.name)).toEqual([]);
    });
  });

  describe("their uncertainties", () => {
    const stated = placed.filter((r) => r.listed.su && r.found!.su);
    const agrees = (r: Row) => Math.abs(r.found!.su! - r.listed.su!) <= 0.2 * r.listed.su! + unitOf(r) / 2 + EPSILON;
    const cellShare = (r: Row) => 1 - ((r.suOfCoordinates ?? 0) / r.found!.su!) ** 2;

    it("are ours within 20 % and the rounding of the list where the cell's contribution matters", () => {
      // a two-hundredth of the variance: in most files coordinates are far less certain than the cell
      const hanging = stated.filter((r) => cellShare(r) > 0.005);
      expect(hanging.length).toBeGreaterThan(20);
      expect(hanging.filter((r) => !agrees(r)).map((r) => r.name)).toEqual([]);
    });

    it("are ours within 20 % for nine in ten atoms that were refined freely; the others have correlated errors", () => {
      const free = stated.filter((r) => !r.tied);
      expect(free.length).toBeGreaterThan(450);
      expect(free.filter(agrees).length / free.length).toBeGreaterThan(0.9);
      const ratios = free.map((r) => r.found!.su! / r.listed.su!).sort((a, b) => a - b);
      expect(ratios[Math.floor(ratios.length / 2)]).toBeCloseTo(1, 1);
    });
  });
} else {
  describe("the corpus", () => {
    it("is not beside this repository, so no listed distance was compared", () => expect(FILES).toEqual([]));
  });
}
