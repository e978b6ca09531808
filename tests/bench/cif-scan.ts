import { readCif } from "../../lib/cif/index.ts";
import { fastest, type Measurement, milliseconds, ratio } from "./ratio.ts";

const ROUNDS = 9;

/** Seeded generator (Park and Miller, Commun. ACM 31, 1192, 1988), so that every run measures the same text. */
function minimalStandard(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

/** Rows of a reflection list: h k l, F squared, its standard uncertainty, a flag. */
export function reflectionRows(rowCount: number): string[][] {
  const random = minimalStandard(20);
  const rows: string[][] = [];
  for (let i = 0; i < rowCount; i++) {
    const index = () => String(Math.floor(random() * 61) - 30);
    const f = (random() * 5000).toFixed(2);
    rows.push([index(), index(), index(), f, (random() * 40).toFixed(2), "o"]);
  }
  return rows;
}

const NAMES = ["index_h", "index_k", "index_l", "F_squared_meas", "F_squared_sigma", "include_status"];

export function reflectionCif(rows: readonly (readonly string[])[]): string {
  const head = `data_halite\n_cell_length_a 5.6402(2)\nloop_\n${NAMES.map((n) => ` _refln_${n}\n`).join("")}`;
  return head + rows.map((row) => ` ${row[0]!.padStart(3)} ${row.slice(1).join(" ")}\n`).join("");
}

export function proseCif(length: number): string {
  const line = "Efflorescence scraped from the north face of the harbour wall, second course, near the old mooring.\n";
  return `data_halite\n_exptl_special_details\n;\n${line.repeat(Math.ceil(length / line.length))};\n`;
}

/** Reading the CIF against `JSON.parse` on the same values re-encoded. */
function against(name: string, cif: string, json: string): Measurement {
  const ours = () => readCif(cif).value.blocks[0]!.names().length;
  return ratio(name, "JSON.parse", { ours, reference: () => Object.keys(JSON.parse(json)).length }, ROUNDS);
}

/** How many times longer a text four times as long takes, over four: 1 is linear growth. */
function growth(name: string, make: (size: number) => string, size: number): Measurement {
  const [small, large] = [make(size), make(4 * size)];
  const sides = { ours: () => readCif(large).problems.length, reference: () => readCif(small).problems.length };
  const time = fastest(sides, ROUNDS);
  const detail = `${(large.length / 1e6).toFixed(2)} MB in ${milliseconds(time.ours)}`;
  return { name, ratio: time.ours / (4 * time.reference), reference: "linear growth", detail };
}

/** Texts made to be hard: each is a shape that a careless reader goes over again and again. */
export const HARD_TEXTS: Readonly<Record<string, (size: number) => string>> = {
  "open quotes": (n) => "data_a\n" + "_x 'a\n".repeat(n / 6),
  "open brackets": (n) => "#\\#CIF_2.0\ndata_a\n_x " + "[".repeat(n),
  "text fields that swallow names": (n) => "data_a\n" + "_x\n;a\n_y\n;b c\n".repeat(n / 14),
  "strings that touch": (n) => `#\\#CIF_2.0\ndata_a\n_x [${"'a'".repeat(n / 3)}]\n`,
  "quotes in quotes on one line": (n) => `#\\#CIF_2.0\ndata_a\n_x ${"'a'b ".repeat(n / 5)}\n`,
  "three quotes, never closed": (n) => `#\\#CIF_2.0\ndata_a\n${`_x """a\n_y 5\n`.repeat(n / 14)}_z '''b\n`,
  "text fields in a loop": (n) => "data_a\nloop_\n_x\n" + ";\n_y\n;\n".repeat(n / 8),
  "semicolons and names": (n) => "data_a\n" + "_x\n;\n;;\n".repeat(n / 9),
  "words before the first block": (n) => "word\n".repeat(n / 5),
  "distinct data names": (n) => "data_a\n" + Array.from({ length: n / 12 }, (_, i) => `_x${i} 1\n`).join(""),
  "a carriage return now and then": (n) => "data_a\n" + "_x\r\n;\na\r\n;\r\n".repeat(n / 13),
  "a loop with odd lines": (n) => "data_a\nloop_\n_x\n_y\n" + "1 2\n1\n1 2\n".repeat(n / 10) + "1\n",
};

export function measure(): Measurement[] {
  const rows = reflectionRows(400_000);
  const cif = reflectionCif(rows);
  const asNumbers = rows.map((row) => row.map((cell, i) => (i < 5 ? Number(cell) : cell)));
  const prose = proseCif(5e6);
  const text = prose.slice(prose.indexOf(";\n") + 2, prose.lastIndexOf("\n;"));
  return [
    against("400,000 reflections, the same strings in JSON", cif, JSON.stringify({ names: NAMES, rows })),
    against("400,000 reflections, the same numbers in JSON", cif, JSON.stringify({ names: NAMES, rows: asNumbers })),
    against("text field of 5 MB, the same string in JSON", prose, JSON.stringify({ text })),
    ...Object.entries(HARD_TEXTS).map(([name, make]) => growth(name, make, 240_000)),
  ];
}
