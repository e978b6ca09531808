import { readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import {
  apply3,
  type Crystal,
  cellOfMetric,
  crystalFromBlock,
  crystalOf,
  inverse3,
  type Mat3,
  type Metric,
  metricOf,
  multiply3,
  type PositionsAnswer,
  type Vec3,
} from "../../lib/structure/index.ts";
import { IDENTITY_OPERATION, spaceGroup } from "../../lib/symmetry/index.ts";
import { atom } from "./crystals.ts";

/** A crystal without symmetry from elements and fractional coordinates. */
function bare(metric: Metric, atoms: readonly { element: string; x: Vec3; occupancy: number }[]): Crystal {
  const sites = atoms.map(({ element, x, occupancy }, i) => atom(`${element}${i}`, element, x, occupancy));
  return crystalOf({ name: "read", metric, group: spaceGroup([IDENTITY_OPERATION]), sites, tolerance: 1e-4 });
}

const transposed = (m: Mat3): Mat3 => [m[0], m[3], m[6], m[1], m[4], m[7], m[2], m[5], m[8]];

/** Plain XYZ knows no cell, so it is given. */
export function readXyz(text: string, metric: Metric): Crystal {
  const [count, , ...lines] = text.trimEnd().split("\n");
  if (Number(count) !== lines.length) throw new Error(`${lines.length} atoms, not ${count}`);
  const atoms = lines.map((line) => {
    const [element, ...x] = line.split(/\s+/);
    return { element: element!, x: apply3(metric.toFractional, x.map(Number) as unknown as Vec3), occupancy: 1 };
  });
  return bare(metric, atoms);
}

/** Extended XYZ by its own column description. */
export function readExtendedXyz(text: string): Crystal {
  const [count, info, ...lines] = text.trimEnd().split("\n");
  if (Number(count) !== lines.length) throw new Error(`${lines.length} atoms, not ${count}`);
  const value = (key: string) => new RegExp(`(?:^| )${key}=(?:"([^"]*)"|(\\S+))`).exec(info!)?.slice(1).find(Boolean);
  const axes = transposed(value("Lattice")!.split(" ").map(Number) as unknown as Mat3); // columns
  const metric = metricOf(cellOfMetric(multiply3(transposed(axes), axes)));
  const back = inverse3(axes);
  const fields = value("Properties")!.split(":");
  const starts: Record<string, number> = {};
  for (let k = 0, column = 0; k < fields.length; k += 3) {
    starts[fields[k]!] = column;
    column += Number(fields[k + 2]);
  }
  const atoms = lines.map((line) => {
    const words = line.split(/\s+/);
    const x = words.slice(starts["pos"]!, starts["pos"]! + 3).map(Number) as unknown as Vec3;
    return { element: words[starts["species"]!]!, x: apply3(back, x), occupancy: Number(words[starts["occupancy"]!]) };
  });
  return bare(metric, atoms);
}

/** Comma-separated values after RFC 4180; fractional coordinates, so the cell is given. */
export function readCsv(text: string, metric: Metric): Crystal {
  const rows = text.split("\r\n").slice(0, -1).map(csvFields);
  const names = rows[0]!;
  if (rows.some((r) => r.length !== names.length)) throw new Error("rows of unequal length");
  const at = (row: readonly string[], name: string) => row[names.indexOf(name)]!;
  const atoms = rows.slice(1).map((row) => ({
    element: at(row, "element"),
    x: ["x", "y", "z"].map((n) => Number(at(row, n))) as unknown as Vec3,
    occupancy: Number(at(row, "occupancy")),
  }));
  return bare(metric, atoms);
}

/** The JSON of `positions`, by its schema: the cell, and fractional coordinates. */
export function readPositions(text: string): Crystal {
  const { positions, cell } = JSON.parse(text) as Pick<PositionsAnswer, "positions" | "cell">;
  const [a, b, c, alpha, beta, gamma] = cell.cell;
  const atoms = positions.map(({ element, x, y, z, occupancy }) => ({
    element: element!,
    x: [x, y, z] as Vec3,
    occupancy,
  }));
  return bare(metricOf({ a, b, c, alpha, beta, gamma }), atoms);
}

export function csvFields(line: string): string[] {
  return [...line.matchAll(/(?:^|,)(?:"((?:[^"]|"")*)"|([^",]*))/g)].map((m) =>
    m[1] === undefined ? m[2]! : m[1].replaceAll('""', '"'),
  );
}

/** PDB records by their columns, as the contents guide 3.3 gives them. */
export function readPdb(text: string): Crystal {
  const lines = text.split("\n").slice(0, -1);
  const columns = (line: string, from: number, to: number) => line.slice(from - 1, to).trim();
  const cryst = lines.find((l) => l.startsWith("CRYST1"))!;
  const [a, b, c] = [7, 16, 25].map((k) => Number(columns(cryst, k, k + 8))) as [number, number, number];
  const [alpha, beta, gamma] = [34, 41, 48].map((k) => Number(columns(cryst, k, k + 6))) as [number, number, number];
  const metric = metricOf({ a, b, c, alpha, beta, gamma });
  const records = lines.filter((l) => /^(?:ATOM {2}|HETATM)/.test(l));
  if (lines.some((l) => l.length !== 80) || columns(lines.at(-1)!, 1, 6) !== "END") throw new Error("not PDB lines");
  const names = records.map((l) => l.slice(12, 27));
  if (new Set(names).size !== names.length) throw new Error("two atoms of one name in a residue");
  const atoms = records.map((line) => {
    const x = [31, 39, 47].map((k) => Number(columns(line, k, k + 7))) as unknown as Vec3;
    const symbol = columns(line, 77, 78);
    const element = symbol[0]! + symbol.slice(1).toLowerCase();
    return { element, x: apply3(metric.toFractional, x), occupancy: Number(columns(line, 55, 60)) };
  });
  return bare(metric, atoms);
}

/** A CIF or mmCIF by our own reader. */
export function readStructure(text: string): Crystal {
  return crystalFromBlock(requireClean(readCif(text)).blocks[0]!, { tolerance: 0.01 });
}
