import { COMMON_OPTIONS, type CommandSpec, type OptionSpec } from "./arguments.ts";
import { EXAMPLE } from "./examples/positions.ts";

/** Formats besides text and JSON. */
export const FILE_FORMATS = ["cif", "cif2", "xyz", "extxyz", "csv", "pdb", "mmcif"] as const;
export type FileFormat = (typeof FILE_FORMATS)[number];

export type Format = "text" | "json" | FileFormat;

export const FORMATS: readonly Format[] = ["text", "json", ...FILE_FORMATS];

/** Which atoms, in which cell, in which format. */
export const MODEL_OPTIONS = {
  cell: {
    type: "string",
    value: "CELL",
    describe: 'another cell: primitive, reference, multiples "2,2,1", nine integers, or axes "a-b,a+b,c;0,0,1/4"',
  },
  p1: { type: "boolean", describe: "claim no symmetry for the cell written: list all atoms in P 1" },
  asymmetric: { type: "boolean", describe: "one atom of each site, as listed" },
  connected: { type: "boolean", describe: "one atom of each site, chosen so that they hang together by bonds" },
  "whole-units": { type: "boolean", describe: "keep molecules whole, each with its centroid in the cell" },
  range: { type: "string", value: "RANGE", describe: 'fractional coordinates wanted, "0:1,0:1,-0.5:0.5"' },
  boundary: { type: "string", value: "WHICH", describe: "in (default) or out: atoms on the ends of a range" },
  format: { type: "string", value: "FORMAT", describe: `one of ${FORMATS.join(", ")} (default text)` },
} as const satisfies Record<string, OptionSpec>;

/** What to do about disorder; without any of these, atoms keep their occupancies. */
export const DISORDER_OPTIONS = {
  component: {
    type: "string",
    value: "GROUP",
    describe: 'take one disorder group and leave the others of its assembly out: "2", or "A:1,B:2"',
  },
  ordered: { type: "boolean", describe: "one ordered structure: of alternatives the one of largest occupancy" },
  enumerate: { type: "boolean", describe: "all ordered structures of the cell up to symmetry, counted first" },
  configuration: { type: "number", value: "N", describe: "take ordered structure N of that list" },
} as const satisfies Record<string, OptionSpec>;

/** What `positions` takes. */
export const POSITIONS: CommandSpec = {
  name: "positions",
  operands: "FILE",
  summary: "List every atom of a cell, and the operation that makes it; write structures for other programs.",
  options: { ...COMMON_OPTIONS, ...MODEL_OPTIONS, ...DISORDER_OPTIONS },
  example: EXAMPLE,
};
