import type { CrystalSite } from "../structure/index.ts";
import { atomRows } from "./atom-rows.ts";
import { type AuditInput, rounding, rowNumber } from "./audit-input.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";

/** Shifts below this are no fault even where more digits are written; angstrom. */
const LEAST_SHIFT = 2e-3;
/** Standard uncertainties that a refined coordinate may lie off a special position by chance. */
const SU_FACTOR = 3;

const ROUNDED: Criterion = {
  id: "special-position-rounded",
  severity: "remark",
  criterion:
    `A site lies more than ${LEAST_SHIFT} Å but less than the tolerance from a special position, no farther than the ` +
    "rounding of its coordinates explains (0.333 for 1/3).",
  source: "Coordinates on symmetry elements are exact fractions; International Tables for Crystallography A.",
  advice: "Write more digits (0.33333), so that programs with a smaller tolerance do not multiply the atom.",
};

const MISSED: Criterion = {
  id: "special-position-missed",
  severity: "doubt",
  criterion:
    "A site lies within the tolerance of a special position, but farther from it than the rounding of its coordinates " +
    `and ${SU_FACTOR} standard uncertainties explain. It is taken as special.`,
  source: "Two atoms cannot be nearer than the tolerance; a site so near is special or disordered about the element.",
  advice:
    "Set the coordinates exactly on the symmetry element, or halve the occupancy if the atom is disordered about it.",
};

export const criteria: readonly Criterion[] = [ROUNDED, MISSED];

/** Are sites on special positions written exactly? */
export function check(input: AuditInput): Finding[] {
  const { crystal } = input;
  if (!crystal) return [];
  const off = atomRows(input).flatMap(({ atom, loop, row, site }) => {
    if (!site || site.symmetry.shift <= LEAST_SHIFT) return [];
    const coordinates = ["x", "y", "z"].map((c) => rowNumber(loop, row, `_atom_site.fract_${c}`));
    if (coordinates.some((n) => n === null)) return [];
    const explained = coordinates.every((n, i) => {
      const moved = Math.abs(site.symmetry.point[i]! - atom.position[i]!);
      // 0.667 for 2/3 is off by a third of a unit, and a special position x,2x,z doubles the rounding of x
      return moved <= 3 * rounding(n!) + SU_FACTOR * (n!.su ?? 0) + 1e-9;
    });
    return [{ atom, site, explained, coordinates }];
  });
  return [true, false].flatMap((explained) => {
    const group = off.filter((o) => o.explained === explained).sort((a, b) => shift(b.site) - shift(a.site));
    const worst = group[0];
    if (!worst) return [];
    const { atom, site, coordinates } = worst;
    const others = group.slice(1).map((o) => o.atom.label);
    const distance = shift(site).toFixed(3);
    const message = `${atom.label} lies ${distance} Å from a special position that ${site.symmetry.operations.length} operations fix${explained ? ", as far as its coordinates are rounded" : ""}${others.length > 0 ? `; likewise ${some(others)}` : ""}`;
    return [
      finding(explained ? ROUNDED : MISSED, input.place("_atom_site_fract_x", atom.span), message, {
        stated: { what: `coordinates of ${atom.label}`, value: coordinates.map((n) => n!.text).join(" ") },
        against: { what: "nearest special position", value: site.symmetry.point.map((x) => x.toFixed(5)).join(" ") },
        difference: shift(site),
        tolerance: LEAST_SHIFT,
        unit: "Å",
        ...(others.length > 0
          ? { also: group.slice(1).map((o) => `${o.atom.label}: ${shift(o.site).toFixed(3)} Å`) }
          : {}),
      }),
    ];
  });
}

function shift(site: CrystalSite): number {
  return site.symmetry.shift;
}
