import { oxidationStates } from "../structure/index.ts";
import type { AuditInput } from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";
import { formulasInCell, statedComposition, surplus } from "./stated-composition.ts";

/** Net charge of a cell that rounding of occupancies may leave, in elementary charges, and a share of the positive one. */
const LEAST_CHARGE = 0.1;
const CHARGE_SHARE = 0.01;

const CHARGE: Criterion = {
  id: "charge-balance",
  severity: "doubt",
  criterion:
    "All sites have a stated oxidation number or charge, and these do not add up to 0 over the cell within " +
    `${LEAST_CHARGE} and ${100 * CHARGE_SHARE} % of the positive charge. Not asked where the sites lack hydrogen of the formula.`,
  source: "Electroneutrality; IUCr core CIF dictionary, _atom_type.oxidation_number.",
  advice: "Look for a wrong oxidation number, occupancy or element, or for hydrogen that is missing altogether.",
};

export const criteria: readonly Criterion[] = [CHARGE];

/** Stated oxidation numbers by label of the site. */
export function oxidationNumbers(input: AuditInput): ReadonlyMap<string, number> {
  return oxidationStates(input.block, input.atoms);
}

/** Do the stated charges cancel? */
export function check(input: AuditInput): Finding[] {
  const { crystal } = input;
  const states = oxidationNumbers(input);
  if (!crystal || crystal.sites.length === 0 || crystal.sites.some((s) => !states.has(s.label))) return [];
  const charges = crystal.sites.map((s) => states.get(s.label)! * s.occupancy * s.images.length);
  const positive = charges.reduce((s, q) => s + Math.max(0, q), 0);
  if (positive === 0) return []; // an element, all zero
  const c = statedComposition(input);
  if (surplus(c, "H", formulasInCell(c) ?? 1) < -LEAST_CHARGE) return [];
  const net = charges.reduce((s, q) => s + q, 0);
  const tolerance = LEAST_CHARGE + CHARGE_SHARE * positive;
  if (Math.abs(net) <= tolerance) return [];
  const message = `the stated oxidation numbers add up to ${net > 0 ? "+" : ""}${Number(net.toFixed(3))} over the cell`;
  return [
    finding(CHARGE, input.place("_atom_type_oxidation_number", null), message, {
      stated: { what: "positive charges of the cell", value: positive },
      against: { what: "negative charges", value: positive - net },
      difference: net,
      tolerance,
      unit: "elementary charges",
    }),
  ];
}
