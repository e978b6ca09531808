import { COMMON_OPTIONS, type CommandSpec } from "./arguments.ts";
import { EXAMPLE } from "./examples/resite.ts";

export const RESITE_FORMATS = ["text", "json", "cif", "cif2"] as const;
export type ResiteFormat = (typeof RESITE_FORMATS)[number];

/** What `resite` takes. */
export const RESITE: CommandSpec = {
  name: "resite",
  operands: "FILE",
  summary: "Write a structure in another setting or its standard one; compare it with another file.",
  options: {
    ...COMMON_OPTIONS,
    setting: {
      type: "string",
      value: "SETTING",
      describe: 'reference (default), a name such as cab, b2, :1, :R, a symbol "P b n m", or axes "b,c,a;0,0,1/4"',
    },
    hall: { type: "string", value: "SYMBOL", describe: 'the setting of a Hall symbol, "-P 2ac 2n"' },
    standardised: {
      type: "boolean",
      describe: "standard cell, origin and positions, the same however the structure is described",
    },
    "either-hand": {
      type: "boolean",
      describe:
        "with --standardised: of a structure without improper operations take the mirror image if it comes first",
    },
    to: {
      type: "string",
      value: "FILE",
      describe: "compare with FILE (- for standard input), and write the structure on its axes",
    },
    "to-block": { type: "string", value: "NAME", describe: "data block of that file" },
    displacement: {
      type: "number",
      value: "ANGSTROM",
      describe: "largest displacement of an atom (default 0.3; with --isotypic 0.7)",
    },
    strain: {
      type: "number",
      value: "SHARE",
      describe: "largest strain of the lattice (default 0.03; with --isotypic 0.1)",
    },
    isotypic: { type: "boolean", describe: "let elements stand for others, and scale to one volume" },
    format: { type: "string", value: "FORMAT", describe: `one of ${RESITE_FORMATS.join(", ")} (default text)` },
  },
  example: EXAMPLE,
};
