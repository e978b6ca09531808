import { formatFormula, hillOrder } from "../structure/index.ts";
import { type AuditInput, statedText, statementOf } from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";
import {
  allowance,
  formulasInCell,
  isFormulaOfCell,
  LEAST_ATOMS,
  type StatedComposition,
  statedComposition,
  surplus,
  times,
  unlike,
} from "./stated-composition.ts";

const COUNTED =
  "Atoms of the cell are counted from the sites, their images and occupancies; the counts may differ by the rounding of " +
  `occupancies and formula, and by ${LEAST_ATOMS} atoms.`;

const CONTENTS: Criterion = {
  id: "formula-contents",
  severity: "contradiction",
  criterion: `The sum formula does not have the proportions of the atoms in the cell, hydrogen left out. ${COUNTED}`,
  source: "IUCr core CIF dictionary, _chemical_formula.sum; counting.",
  advice: "Look for a wrong element, occupancy or multiplicity among the sites, or a wrong count in the formula.",
};

const UNITS: Criterion = {
  id: "formula-units",
  severity: "contradiction",
  criterion: `The sites have the proportions of the formula, but the cell holds another number of formulas than Z. ${COUNTED}`,
  source: "IUCr core CIF dictionary, _cell.formula_units_Z; counting.",
  advice: "Correct Z, or look for symmetry operations that are missing or superfluous.",
};

const WHOLE_CELL: Criterion = {
  id: "formula-of-whole-cell",
  severity: "remark",
  criterion: "The sum formula is that of the whole cell, although Z is greater than 1.",
  source: "IUCr core CIF dictionary: the formula is that of one of the Z units.",
  advice: "Divide the counts by Z; molar mass and density are then those of one formula unit.",
};

const BEYOND: Criterion = {
  id: "formula-beyond-sites",
  severity: "doubt",
  criterion:
    "The formula has more atoms than the sites, and the file says that solvent was not modelled, or rows of its list have " +
    "no coordinates.",
  source:
    "P. van der Sluis, A. L. Spek, Acta Crystallographica A46 (1990) 194-201: disordered solvent left out of a model.",
  advice: "Take the contents of the cell from the formula, not from the sites.",
};

const NO_HYDROGEN: Criterion = {
  id: "hydrogen-sites-missing",
  severity: "remark",
  criterion: `The formula has hydrogen for which there are no sites. ${COUNTED}`,
  source: "Counting.",
  advice: "Add the hydrogen atoms before computing anything that depends on them: modes, masses, hydrogen bonds.",
};

const EXTRA_HYDROGEN: Criterion = {
  id: "hydrogen-not-in-formula",
  severity: "contradiction",
  criterion: `The sites have more hydrogen than the formula. ${COUNTED}`,
  source: "IUCr core CIF dictionary, _chemical_formula.sum; counting.",
  advice: "Correct the formula, or look for hydrogen atoms listed twice or at full occupancy in a disordered group.",
};

const UNREADABLE: Criterion = {
  id: "formula-unreadable",
  severity: "doubt",
  criterion: "The sum formula is no list of element symbols with counts.",
  source: "IUCr core CIF dictionary, _chemical_formula.sum.",
  advice: "Write symbols with counts and blanks between them, such as Ca C O3.",
};

export const criteria: readonly Criterion[] = [
  CONTENTS,
  UNITS,
  WHOLE_CELL,
  BEYOND,
  NO_HYDROGEN,
  EXTRA_HYDROGEN,
  UNREADABLE,
];

/** Do the formula and Z say what the sites say? */
export function check(input: AuditInput): Finding[] {
  const c = statedComposition(input);
  if (c.formulaText && !c.formula) return [unreadable(input, c)];
  const inCell = formulasInCell(c);
  if (inCell === null) return [];
  if (isFormulaOfCell(c)) return [wholeCell(input, c), ...hydrogen(input, c, 1)];
  const z = c.z?.value ?? inCell;
  if (unlike(c, z).length === 0) return hydrogen(input, c, z);
  if (c.z && unlike(c, inCell).length === 0) return [units(input, c, inCell), ...hydrogen(input, c, inCell)];
  return [contents(input, c, z)];
}

function unreadable(input: AuditInput, { formulaText }: StatedComposition): Finding {
  const { name, text, span } = formulaText!;
  return finding(UNREADABLE, input.place(name, span), `the sum formula "${text}" cannot be read`, {
    stated: { what: name, value: text },
    against: { what: "a sum formula", value: "symbols of elements with counts" },
  });
}

function wholeCell(input: AuditInput, { formulaText, z }: StatedComposition): Finding {
  const { name, text, span } = formulaText!;
  const message = `the formula ${text} is that of the whole cell, not of one of its ${z!.text} units`;
  return finding(WHOLE_CELL, input.place(name, span), message, {
    stated: { what: name, value: text },
    against: statementOf(z!),
  });
}

function units(input: AuditInput, c: StatedComposition, inCell: number): Finding {
  const { name, text, span } = c.z!;
  const message = `Z is stated as ${text}, but the sites fill the cell with ${short(inCell)} times the formula ${c.formulaText!.text}`;
  return finding(UNITS, input.place(name, span), message, {
    stated: statementOf(c.z!),
    against: { what: `sites over ${c.formulaText!.name}`, value: inCell },
    difference: c.z!.value - inCell,
    unit: "formula units",
  });
}

function contents(input: AuditInput, c: StatedComposition, factor: number): Finding {
  const odd = unlike(c, factor).sort((a, b) => Math.abs(surplus(c, b, factor)) - Math.abs(surplus(c, a, factor)));
  const worst = odd[0]!;
  const { name, text, span } = c.formulaText!;
  const tooFew = odd.every((e) => surplus(c, e, factor) < 0);
  const excused = tooFew && (c.leftOut > 0 || hasMask(input));
  const differences = odd.map(
    (e) => `${e} ${short(c.contents!.get(e) ?? 0)} instead of ${short(factor * (c.formula!.get(e) ?? 0))}`,
  );
  const message = `the sites give other numbers of atoms in the cell than ${c.z ? `Z = ${c.z.text} times ` : ""}${text}: ${differences.slice(0, 6).join(", ")}`;
  return finding(excused ? BEYOND : CONTENTS, input.place(name, span), message, {
    stated: {
      what: c.z ? `${c.z.name} times ${name}` : name,
      value: formatFormula(hillOrder(times(c.formula!, factor))),
    },
    against: { what: "atoms of the cell by its sites", value: formatFormula(hillOrder(c.contents!)) },
    difference: surplus(c, worst, factor),
    tolerance: allowance(c, worst, factor),
    unit: `atoms of ${worst}`,
  });
}

/** Data names of voids or masks: solvent was taken out of the data, whatever software wrote the item. */
const MASK = /_(?:void|voids|mask|masks|masked)(?:_|$)/i;

function hasMask({ block }: AuditInput): boolean {
  return block.names().some((name) => MASK.test(name));
}

function hydrogen(input: AuditInput, c: StatedComposition, factor: number): Finding[] {
  const extra = surplus(c, "H", factor);
  const tolerance = allowance(c, "H", factor);
  if (Math.abs(extra) <= tolerance) return [];
  const { name, span } = c.formulaText!;
  const [have, want] = [c.contents!.get("H") ?? 0, factor * (c.formula!.get("H") ?? 0)];
  const treatment = statedText(input, "_refine_ls.hydrogen_treatment");
  const why = treatment?.text.toLowerCase() === "undef" ? "; the file says that their treatment is undefined" : "";
  const message =
    extra < 0
      ? `the formula asks for ${short(want)} hydrogen atoms in the cell, the sites give ${short(have)}${why}`
      : `the sites give ${short(have)} hydrogen atoms in the cell, the formula allows ${short(want)}`;
  return [
    finding(extra < 0 ? NO_HYDROGEN : EXTRA_HYDROGEN, input.place(name, span), message, {
      stated: { what: name, value: c.formulaText!.text },
      against: { what: "hydrogen atoms of the cell by its sites", value: have },
      difference: extra,
      tolerance,
      unit: "atoms of H",
    }),
  ];
}

function short(x: number): string {
  return String(Number(x.toFixed(3)));
}
