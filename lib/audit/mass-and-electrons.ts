import { findLoop } from "../cif/index.ts";
import type { Formula } from "../structure/index.ts";
import { DALTON_PER_CUBIC_ANGSTROM, massOf, metricOf } from "../structure/index.ts";
import {
  type AuditInput,
  rounding,
  rowNumber,
  rowText,
  type StatedNumber,
  statedNumber,
  statementOf,
} from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";
import { radiationOf } from "./radiation.ts";
import { cellTolerance, statedCell } from "./stated-cell.ts";
import {
  accountsOfCell,
  electronsOf,
  type StatedComposition,
  statedComposition,
  summed,
  times,
} from "./stated-composition.ts";

/** Tables of atomic masses of different years, and isotopes, differ by less; relative. */
const MASS_TOLERANCE = 2e-3;
/** Elements without a standard atomic mass, of which tables give one isotope or another; relative. */
const ISOTOPE_TOLERANCE = 2e-2;
const NO_STANDARD_MASS = ["Tc", "Pm", "Po", "At", "Rn", "Fr", "Ra", "Ac", "Np", "Pu", "Am", "Cm", "Bk", "Cf"];
/** Electrons that rounding and ions may make of F(000), and a share of it. */
const ELECTRON_TOLERANCE = { least: 1, share: 2e-3 };
/** Densities computed and measured on the same substance agree better; relative. */
const MEASURED_TOLERANCE = 0.1;

const MASS: Criterion = {
  id: "molar-mass",
  severity: "contradiction",
  criterion:
    `The molar mass differs by more than ${100 * MASS_TOLERANCE} % (${100 * ISOTOPE_TOLERANCE} % with elements that have no standard mass) and rounding from that of the sum formula, and from ` +
    "that of the sites divided by Z.",
  source: "Standard atomic masses; IUCr core CIF dictionary, _chemical_formula.weight.",
  advice: "Correct the formula or the mass; one of them is of another composition.",
};

const DENSITY: Criterion = {
  id: "density",
  severity: "contradiction",
  criterion:
    "The density computed by the author differs from the mass of the cell over its volume, whether the mass is taken from " +
    `formula and Z or from the sites: by more than ${100 * MASS_TOLERANCE} % and the rounding of density and cell.`,
  source: "Definition of the density; 1 Da/Å^3 = 1.66053907 g/cm^3 (CODATA 2018).",
  advice: "Look for a wrong Z, formula, cell length, or density.",
};

const MEASURED: Criterion = {
  id: "measured-density",
  severity: "doubt",
  criterion: `The measured density differs by more than ${100 * MEASURED_TOLERANCE} % from the mass of the cell over its volume.`,
  source: "W. H. Bragg, W. L. Bragg: the number of formula units by density; limit chosen here.",
  advice: "Units of the density, the number of formula units, or solvent lost or left out may explain it.",
};

const ELECTRONS: Criterion = {
  id: "electron-count",
  severity: "contradiction",
  criterion:
    "F(000) is not the number of electrons in the cell, whether they are counted by formula and Z or by the sites, with or " +
    `without the real dispersion terms of the file: by more than ${ELECTRON_TOLERANCE.least} and ${100 * ELECTRON_TOLERANCE.share} %. ` +
    "Asked for X-rays only.",
  source: "IUCr core CIF dictionary, _exptl_crystal.F_000: structure factor at zero angle.",
  advice: "Compare formula, Z and hydrogen atoms with what was refined.",
};

export const criteria: readonly Criterion[] = [MASS, DENSITY, MEASURED, ELECTRONS];

/** Do molar mass, density and F(000) follow from formula, Z, sites and cell? */
export function check(input: AuditInput): Finding[] {
  const c = statedComposition(input);
  return [...molarMass(input, c), ...density(input, c), ...measured(input, c), ...electrons(input, c)];
}

/** A value by one account of the composition. */
interface Expected {
  readonly what: string;
  readonly value: number;
}

function nearest(stated: StatedNumber, expected: readonly Expected[]): Expected | null {
  const far = (e: Expected) => Math.abs(e.value - stated.value);
  return expected.reduce<Expected | null>((best, e) => (best && far(best) <= far(e) ? best : e), null);
}

function expectedOf(accounts: readonly { what: string; atoms: Formula }[], of: (atoms: Formula) => number | null) {
  return accounts.flatMap(({ what, atoms }): Expected[] => {
    const value = of(atoms);
    return value === null || value === 0 ? [] : [{ what, value }];
  });
}

/** A finding unless the stated number agrees with one of the expected ones. */
function compared(
  input: AuditInput,
  criterion: Criterion,
  stated: StatedNumber,
  expected: readonly Expected[],
  tolerance: number,
  wording: { readonly noun: string; readonly unit: string; readonly decimals: number },
): Finding[] {
  const first = expected[0];
  const best = nearest(stated, expected);
  if (!first || !best || Math.abs(best.value - stated.value) <= tolerance) return [];
  const { noun, unit, decimals } = wording;
  const by = expected.map((e) => `${e.value.toFixed(decimals)} by ${e.what}`).join(", ");
  return [
    finding(
      criterion,
      input.place(stated.name, stated.span),
      `the ${noun} is stated as ${stated.text}${unit && ` ${unit}`}, but it is ${by}`,
      {
        stated: statementOf(stated),
        against: first,
        difference: stated.value - first.value,
        tolerance,
        ...(unit ? { unit } : {}),
      },
    ),
  ];
}

function massTolerance({ formula, contents }: StatedComposition): number {
  const unsettled = NO_STANDARD_MASS.some((e) => formula?.has(e) || contents?.has(e));
  return unsettled ? ISOTOPE_TOLERANCE : MASS_TOLERANCE;
}

function molarMass(input: AuditInput, c: StatedComposition): Finding[] {
  const stated = statedNumber(input, "_chemical_formula.weight");
  if (!stated || stated.value <= 0) return [];
  const z = c.z?.value ?? null;
  const accounts = [
    ...(c.formula ? [{ what: c.formulaText!.name, atoms: c.formula }] : []),
    ...(c.contents && z && !c.contents.has("?") ? [{ what: "the sites over Z", atoms: times(c.contents, 1 / z) }] : []),
  ];
  const tolerance = rounding(stated) + massTolerance(c) * stated.value;
  return compared(input, MASS, stated, expectedOf(accounts, massOf), tolerance, {
    noun: "molar mass",
    unit: "Da",
    decimals: 2,
  });
}

function densities(input: AuditInput, c: StatedComposition): Expected[] {
  const { metric } = input;
  if (!metric) return [];
  return expectedOf(accountsOfCell(c), (atoms) => {
    const mass = massOf(atoms);
    return mass === null ? null : (mass * DALTON_PER_CUBIC_ANGSTROM) / metric.volume;
  });
}

const DENSITY_WORDS = { unit: "g/cm^3", decimals: 3 };

function density(input: AuditInput, c: StatedComposition): Finding[] {
  const stated = statedNumber(input, "_exptl_crystal.density_diffrn");
  const cell = statedCell(input);
  if (!stated || stated.value <= 0 || !input.metric || !cell) return [];
  const strain = cellTolerance(cell, (x) => metricOf(x).volume) / input.metric.volume;
  const tolerance = rounding(stated) + (stated.su ?? 0) + (massTolerance(c) + strain) * stated.value;
  return compared(input, DENSITY, stated, densities(input, c), tolerance, {
    noun: "computed density",
    ...DENSITY_WORDS,
  });
}

function measured(input: AuditInput, c: StatedComposition): Finding[] {
  const stated = statedNumber(input, "_exptl_crystal.density_meas");
  if (!stated || stated.value <= 0) return [];
  const tolerance = MEASURED_TOLERANCE * stated.value + 3 * (stated.su ?? 0);
  return compared(input, MEASURED, stated, densities(input, c), tolerance, {
    noun: "measured density",
    ...DENSITY_WORDS,
  });
}

function electrons(input: AuditInput, c: StatedComposition): Finding[] {
  const stated = statedNumber(input, "_exptl_crystal.F_000");
  if (!stated || stated.value <= 0 || radiationOf(input).probe !== "x-ray") return [];
  const dispersion = realDispersion(input);
  const accounts = accountsOfCell(c);
  const expected = [
    ...expectedOf(accounts, electronsOf),
    ...expectedOf(accounts, (atoms) => {
      const [neutral, shift] = [electronsOf(atoms), summed(atoms, (e) => dispersion.get(e) ?? null)];
      return neutral === null || shift === null ? null : neutral + shift;
    }).map((e) => ({ ...e, what: `${e.what} with dispersion` })),
  ];
  const tolerance = rounding(stated) + ELECTRON_TOLERANCE.least + ELECTRON_TOLERANCE.share * stated.value;
  return compared(input, ELECTRONS, stated, expected, tolerance, {
    noun: "number of electrons F(000)",
    unit: "",
    decimals: 1,
  });
}

/** f' by element, as the file lists it. */
function realDispersion({ block }: AuditInput): Map<string, number> {
  const loop = findLoop(block, "_atom_type.symbol");
  const found = new Map<string, number>();
  for (let row = 0; loop && row < loop.rowCount; row++) {
    const symbol = rowText(loop, row, "_atom_type.symbol")?.text;
    const value =
      rowNumber(loop, row, "_atom_type_scat.dispersion_real") ??
      rowNumber(loop, row, "_atom_type.scat_dispersion_real");
    if (symbol && value) found.set(symbol, value.value);
  }
  return found;
}
