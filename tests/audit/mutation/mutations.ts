import { atom, digit, item, type Mutation, pick, type Random } from "./slip.ts";
import {
  absentPresent,
  atomLost,
  bondAngle,
  bondLength,
  coordinateDigit,
  labelRepeated,
  largeTensor,
  negativeTensor,
  otherCode,
  otherElement,
  otherLetter,
  secondAtom,
  tensorRotated,
  uncertainFixed,
} from "./slips-of-atoms.ts";
import {
  centreLost,
  copyInP1,
  doubledCell,
  exchangedAxes,
  operationFraction,
  operationLost,
  operationSign,
  originShifted,
  otherGroup,
  otherSetting,
} from "./slips-of-symmetry.ts";

const doubled = (text: string) => String(2 * Number(text));

/** One count of the formula higher by one. */
function formulaCount(text: string, random: Random): string {
  const terms = text.split(" ");
  const heavy = terms.flatMap((t, i) => (/^[HD]\d*$/.test(t) ? [] : [i]));
  const at = pick(heavy, random)!;
  terms[at] = terms[at]!.replace(/^([A-Z][a-z]?)(.*)$/, (_, symbol, n) => `${symbol}${Number(n || "1") + 1}`);
  return terms.length > 1 ? terms.join(" ") : `${text} Ar`;
}

function formulaElement(text: string): string {
  return text.replace(/([A-Z][a-z]?)(\S*)$/, "Kr$2");
}

/** Every kind, those that owe a contradiction first. */
export const MUTATIONS: readonly Mutation[] = [
  { kind: "coordinate, second decimal", owed: "contradiction", plant: coordinateDigit(2) },
  { kind: "coordinate, third decimal", owed: "contradiction", plant: coordinateDigit(3) },
  { kind: "cell length, first decimal", owed: "contradiction", plant: item("_cell_length_a", digit(1)) },
  { kind: "cell length, second decimal", owed: "contradiction", plant: item("_cell_length_c", digit(2)) },
  {
    kind: "cell angle",
    owed: "contradiction",
    plant: item("_cell_angle_beta", (t) => (Number.parseFloat(t) + 1.3).toFixed(2)),
  },
  { kind: "axes exchanged", owed: "contradiction", plant: exchangedAxes },
  { kind: "cell volume", owed: "contradiction", plant: item("_cell_volume", (t) => (1.02 * Number(t)).toFixed(2)) },
  { kind: "operation, a sign", owed: "contradiction", plant: operationSign },
  { kind: "operation, a half", owed: "contradiction", plant: operationFraction },
  { kind: "operation lost", owed: "contradiction", plant: operationLost },
  { kind: "inversion centre lost", owed: "contradiction", plant: centreLost },
  {
    kind: "name of another group",
    owed: "contradiction",
    plant: item("_space_group_name_H-M_alt", otherGroup("name")),
  },
  {
    kind: "number of another group",
    owed: "contradiction",
    plant: item("_space_group_IT_number", otherGroup("number")),
  },
  {
    kind: "Hall symbol of another group",
    owed: "contradiction",
    plant: item("_space_group_name_Hall", otherGroup("hall")),
  },
  { kind: "crystal system", owed: "contradiction", plant: item("_space_group_crystal_system", otherGroup("system")) },
  { kind: "origin shifted", owed: "contradiction", plant: originShifted },
  { kind: "copy in P 1", owed: "contradiction", plant: copyInP1 },
  { kind: "cell doubled", owed: "contradiction", plant: doubledCell },
  { kind: "Z doubled", owed: "contradiction", plant: item("_cell_formula_units_Z", doubled) },
  { kind: "formula, a count", owed: "contradiction", plant: item("_chemical_formula_sum", formulaCount) },
  { kind: "formula, an element", owed: "contradiction", plant: item("_chemical_formula_sum", formulaElement) },
  {
    kind: "molar mass",
    owed: "contradiction",
    plant: item("_chemical_formula_weight", (t) => (1.05 * Number.parseFloat(t)).toFixed(2)),
  },
  {
    kind: "density",
    owed: "contradiction",
    plant: item("_exptl_crystal_density_diffrn", (t) => (1.03 * Number.parseFloat(t)).toFixed(3)),
  },
  { kind: "F(000)", owed: "contradiction", plant: item("_exptl_crystal_F_000", (t) => String(Number(t) + 6)) },
  { kind: "multiplicity", owed: "contradiction", plant: atom((a) => ({ multiplicity: doubled(a.multiplicity) })) },
  { kind: "site-symmetry order", owed: "contradiction", plant: atom((a) => ({ order: doubled(a.order) })) },
  { kind: "Wyckoff letter", owed: "contradiction", plant: atom(otherLetter) },
  { kind: "element of a site", owed: "contradiction", plant: atom(otherElement) },
  {
    kind: "occupancy halved",
    owed: "contradiction",
    plant: atom((a) => (a.occupancy === "1" && !/^[HD]/.test(a.type) ? { occupancy: "0.5" } : null)),
  },
  { kind: "occupancy above 1", owed: "contradiction", plant: atom(() => ({ occupancy: "1.5" })) },
  { kind: "two atoms at one place", owed: "contradiction", plant: secondAtom },
  { kind: "atom lost", owed: "contradiction", plant: atomLost },
  { kind: "tensor turned", owed: "contradiction", plant: tensorRotated },
  {
    kind: "equivalent displacement",
    owed: "contradiction",
    plant: atom((a) => ({ uiso: (2 * Number.parseFloat(a.uiso)).toFixed(5) })),
  },
  { kind: "bond length", owed: "contradiction", plant: bondLength },
  { kind: "bond angle", owed: "contradiction", plant: bondAngle },
  { kind: "symmetry code", owed: "contradiction", plant: otherCode },
  { kind: "wavelength", owed: "contradiction", plant: item("_diffrn_radiation_wavelength", () => "0.91073") },
  { kind: "largest theta", owed: "contradiction", plant: item("_diffrn_reflns_theta_max", () => "15.2") },
  {
    kind: "limit of an index",
    owed: "contradiction",
    plant: item("_diffrn_reflns_limit_h_max", (t) => String(Number(t) + 3)),
  },
  {
    kind: "number of reflections",
    owed: "contradiction",
    plant: item("_reflns_number_total", (t) => String(5 * Number(t) + 20)),
  },
  { kind: "absent reflections present", owed: "contradiction", plant: absentPresent },
  { kind: "name of another setting", owed: "doubt", plant: item("_space_group_name_H-M_alt", otherSetting) },
  { kind: "label repeated", owed: "doubt", plant: labelRepeated },
  { kind: "displacement not positive", owed: "doubt", plant: negativeTensor },
  { kind: "displacement tenfold", owed: "doubt", plant: largeTensor },
  { kind: "uncertainty of a fixed coordinate", owed: "doubt", plant: uncertainFixed },
];
