import { findLoop, findValue, numbOf } from "../cif/index.ts";
import type { InputProblem } from "../problem.ts";
import { type AuditInput, statedText } from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";

const CELL: Criterion = {
  id: "cell-missing",
  severity: "doubt",
  criterion: "One of the six cell parameters is absent or no number.",
  source: "A crystal structure cannot be built without its cell; IUCr core CIF dictionary, CELL category.",
  advice: "Add the parameter; nothing else could be compared.",
};

const IMPOSSIBLE: Criterion = {
  id: "cell-impossible",
  severity: "contradiction",
  criterion: "The six cell parameters enclose no volume: a length that is not positive, or angles that do not close.",
  source: "International Tables for Crystallography A (2016), chapter 1.3: the metric tensor is positive definite.",
  advice: "Look for a wrong digit in a length or an angle.",
};

const SYMMETRY: Criterion = {
  id: "symmetry-missing",
  severity: "doubt",
  criterion: "The block states no operations, Hall symbol, name or number of a space group that can be read.",
  source: "IUCr core CIF dictionary, SPACE_GROUP categories.",
  advice: "Add the operations; a name alone leaves origins and axes open.",
};

const NO_OPERATIONS: Criterion = {
  id: "operations-missing",
  severity: "remark",
  criterion: "The block names its space group but lists no operations.",
  source: "IUCr core CIF dictionary: symmetry codes refer to the list of operations.",
  advice: "Add the list: names leave origin choices open, and programs differ in what they assume.",
};

const ATOMS: Criterion = {
  id: "atoms-missing",
  severity: "doubt",
  criterion: "The block lists no atoms with coordinates.",
  source: "IUCr core CIF dictionary, ATOM_SITE category.",
  advice: "Choose another block if the file has several.",
};

const FORMULA: Criterion = {
  id: "formula-missing",
  severity: "remark",
  criterion: "The block gives no sum formula, no number of formula units, or neither.",
  source: "IUCr core CIF dictionary, _chemical_formula.sum and _cell.formula_units_Z.",
  advice: "Add what is missing; without formula and Z the contents of the cell cannot be compared with anything.",
};

const NUMBER: Criterion = {
  id: "number-unreadable",
  severity: "doubt",
  criterion: "A value that must be a number is none.",
  source: "IUCr core CIF dictionary; International Tables for Crystallography G (2006), chapter 2.2.",
  advice: "Write a number with its s.u. in parentheses, such as 0.1234(5), or ? if it is not known.",
};

export const criteria: readonly Criterion[] = [CELL, IMPOSSIBLE, SYMMETRY, NO_OPERATIONS, ATOMS, FORMULA, NUMBER];

/** Criteria by the code of the problem that kept a part from being read. */
const BY_CODE: Readonly<Record<string, Criterion>> = {
  "cell-missing": CELL,
  "cell-impossible": IMPOSSIBLE,
  "symmetry-missing": SYMMETRY,
  "atoms-missing": ATOMS,
  "number-unreadable": NUMBER,
};

/** Single numbers that other checks compare. */
const NUMBERS = [
  "_cell.volume",
  "_cell.formula_units_Z",
  "_chemical_formula.weight",
  "_exptl_crystal.density_diffrn",
  "_exptl_crystal.F_000",
  "_exptl_absorpt.coefficient_mu",
  "_diffrn_radiation_wavelength.value",
];

/** Is everything there that a structure needs? */
export function check(input: AuditInput): Finding[] {
  return [
    ...input.obstacles.flatMap((problem) => obstacle(input, problem)),
    ...unreadableNumbers(input),
    ...withoutAtoms(input),
    ...withoutOperations(input),
    ...withoutFormula(input),
  ];
}

function obstacle(input: AuditInput, problem: InputProblem): Finding[] {
  const criterion = BY_CODE[problem.code];
  if (!criterion) return [];
  const name = /(?<!\S)_[A-Za-z][\w.-]*/.exec(problem.message)?.[0] ?? NAMES[criterion.id] ?? "data_";
  const text = problem.span
    ? input.block.source.slice(problem.span.start, Math.min(problem.span.end, problem.span.start + 40))
    : "";
  const inBlock = problem.code === "number-unreadable" ? problem.span : null;
  return [
    finding(criterion, input.place(name, inBlock), problem.message, {
      stated: { what: name, value: inBlock ? text : "absent or unusable" },
      against: { what: "needed", value: criterion.criterion },
    }),
  ];
}

const NAMES: Readonly<Record<string, string>> = {
  "cell-missing": "_cell_length_a",
  "cell-impossible": "_cell_length_a",
  "symmetry-missing": "_space_group_name_H-M_alt",
  "atoms-missing": "_atom_site_label",
};

function unreadableNumbers(input: AuditInput): Finding[] {
  return NUMBERS.flatMap((name) => {
    const found = findValue(input.block, name);
    if (found?.value.kind !== "text" || numbOf(found.value)) return [];
    const text = found.value.text.trim();
    const message = `${found.name} is "${text.slice(0, 40)}", not a number`;
    return [
      finding(NUMBER, input.place(found.name, found.value.span), message, {
        stated: { what: found.name, value: text.slice(0, 40) },
        against: { what: "needed", value: "a number" },
      }),
    ];
  });
}

/** A list of which no row has coordinates. */
function withoutAtoms(input: AuditInput): Finding[] {
  const loop = findLoop(input.block, "_atom_site.label");
  if (!input.metric || !loop || input.atoms.length > 0 || input.obstacles.some((o) => BY_CODE[o.code])) return [];
  return [
    finding(ATOMS, input.place("_atom_site_label", loop.span), "no atom of the list has coordinates", {
      stated: { what: "rows of the atom list", value: loop.rowCount },
      against: { what: "rows with coordinates", value: 0 },
    }),
  ];
}

function withoutOperations(input: AuditInput): Finding[] {
  const { declared, symmetry } = input;
  if (!symmetry || declared.operations.length > 0) return [];
  const said = declared.hall ?? declared.hermannMauguin ?? declared.number ?? declared.schoenflies;
  if (!said) return [];
  return [
    finding(
      NO_OPERATIONS,
      input.place(said.name, said.span),
      `the space group is given as ${said.text}, but no operations are listed`,
      {
        stated: { what: said.name, value: said.text },
        against: { what: "operations listed", value: 0 },
      },
    ),
  ];
}

function withoutFormula(input: AuditInput): Finding[] {
  if (!input.crystal || !findLoop(input.block, "_atom_site.label")) return [];
  const formula = statedText(input, "_chemical_formula.sum");
  const z = numbOf(findValue(input.block, "_cell.formula_units_Z")?.value ?? null);
  if (formula && z) return [];
  const lacking = [
    ...(formula ? [] : [{ name: "_chemical_formula_sum", what: "sum formula" }]),
    ...(z ? [] : [{ name: "_cell_formula_units_Z", what: "number of formula units Z" }]),
  ];
  const names = lacking.map((l) => l.name);
  const message = `the block gives no ${lacking.map((l) => l.what).join(" and no ")}`;
  const found = finding(FORMULA, input.place(names[0]!, null), message, {
    stated: { what: names.join(" and "), value: "absent" },
    against: { what: "atoms listed", value: input.atoms.length },
  });
  const why = "without formula and Z the contents of the cell cannot be compared with anything.";
  return [{ ...found, advice: `Add ${names.join(" and ")}; ${why}` }];
}
