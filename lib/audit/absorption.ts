import { findLoop } from "../cif/index.ts";
import { element } from "../structure/index.ts";
import { type AuditInput, rowNumber, rowText, statedNumber, statementOf } from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";
import { radiationOf } from "./radiation.ts";
import { accountsOfCell, statedComposition, summed } from "./stated-composition.ts";

/** Classical electron radius, angstrom. Source: CODATA 2018, 2.8179403e-15 m. */
const ELECTRON_RADIUS = 2.8179403e-5;
/** Thomson cross-section of one electron, square angstrom: 8 pi / 3 times the square of the radius. */
const THOMSON = ((8 * Math.PI) / 3) * ELECTRON_RADIUS ** 2;
/** mm^-1 of one inverse angstrom. */
const PER_MILLIMETRE = 1e7;
/** Dispersion terms of different tables differ by so much; relative. */
const TABLE_TOLERANCE = 0.12;
/** Coherent scattering of an atom with Z electrons at small angles adds up; bounded by Z^2 with this share of it. */
const COHERENT_SHARE = 0.25;
/** The smallest coefficients are rounded and hang on scattering alone; mm^-1. */
const LEAST = 0.03;

const ABSORPTION: Criterion = {
  id: "absorption-coefficient",
  severity: "contradiction",
  criterion:
    "The linear absorption coefficient lies outside what the imaginary dispersion terms f'' of the file's own list give: " +
    "at least the photoelectric part, sum of 2 r_e lambda f'' over the atoms of the cell by its volume, at most that and " +
    `the scattering, each end widened by ${100 * TABLE_TOLERANCE} % and ${LEAST} mm^-1.`,
  source:
    "Optical theorem, sigma = 2 r_e lambda f'': International Tables for Crystallography C (2006), section 4.2.4; " +
    "classical electron radius and Thomson cross-section, CODATA 2018.",
  advice: "Coefficients in cm^-1 are ten times those in mm^-1; otherwise compare composition, Z and wavelength.",
};

export const criteria: readonly Criterion[] = [ABSORPTION];

/** Is the absorption coefficient that of the atoms, by the file's own dispersion terms? */
export function check(input: AuditInput): Finding[] {
  const stated = statedNumber(input, "_exptl_absorpt.coefficient_mu");
  const { probe, wavelength } = radiationOf(input);
  const { metric } = input;
  if (!stated || stated.value <= 0 || probe !== "x-ray" || !wavelength || !metric) return [];
  const terms = imaginaryDispersion(input);
  const photoelectric = (e: string) => {
    const f = terms.get(e);
    return f === undefined ? null : 2 * ELECTRON_RADIUS * wavelength.value * f;
  };
  const scattered = (e: string) => {
    const z = element(e)?.number ?? null;
    return z === null ? null : THOMSON * (z + COHERENT_SHARE * z * z);
  };
  const ranges = accountsOfCell(statedComposition(input)).flatMap(({ what, atoms }) => {
    const [absorbed, spread] = [summed(atoms, photoelectric), summed(atoms, scattered)];
    if (absorbed === null || spread === null || absorbed + spread === 0) return [];
    const scale = PER_MILLIMETRE / metric.volume;
    const low = (1 - TABLE_TOLERANCE) * absorbed * scale - LEAST;
    const high = (1 + TABLE_TOLERANCE) * (absorbed + spread) * scale + LEAST;
    return [{ what, low, high }];
  });
  const [first] = ranges;
  if (!first || ranges.some(({ low, high }) => stated.value >= low && stated.value <= high)) return [];
  const range = `${Math.max(0, first.low).toPrecision(3)} to ${first.high.toPrecision(3)} mm^-1`;
  const tenfold = ranges.some(({ low, high }) => stated.value / 10 >= low && stated.value / 10 <= high);
  const message = `the absorption coefficient ${stated.text} mm^-1 is outside the ${range} that the dispersion terms listed give${tenfold ? "; it seems to be in cm^-1" : ""}`;
  return [
    finding(ABSORPTION, input.place(stated.name, stated.span), message, {
      stated: statementOf(stated),
      against: { what: `f'' of the atom types for ${first.what}`, value: range },
      unit: "mm^-1",
    }),
  ];
}

/** f'' by element, as the file lists it. */
function imaginaryDispersion({ block }: AuditInput): Map<string, number> {
  const loop = findLoop(block, "_atom_type.symbol");
  const found = new Map<string, number>();
  for (let row = 0; loop && row < loop.rowCount; row++) {
    const symbol = rowText(loop, row, "_atom_type.symbol")?.text;
    const value = rowNumber(loop, row, "_atom_type_scat.dispersion_imag");
    if (symbol && value && value.value >= 0) found.set(symbol, value.value);
  }
  return found;
}
