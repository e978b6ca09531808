import { angle, distance, torsion } from "../structure/index.ts";
import type { AuditInput } from "./audit-input.ts";
import { type Criterion, count, type Finding, finding } from "./finding.ts";
import {
  type ComparedValue,
  type GeometryKind,
  listedGeometry,
  SU_FACTOR,
  type UnplacedRow,
} from "./listed-geometry.ts";

/** Differences below these are rounding inside programs. */
const LEAST_DISTANCE = 2e-3;
const LEAST_ANGLE = 0.1;
/** Fewest values by which uncertainties are judged, and how far their median may be from the propagated one. */
const FEWEST_JUDGED = 8;
const MEDIAN_RATIO = 2.5;

const RECOMPUTED =
  "It is computed from coordinates, cell and the symmetry codes of the row; the difference may be that of the rounding of " +
  `all numbers that go in, ${SU_FACTOR} standard uncertainties (propagated without correlations, or stated) and`;
const SOURCE = "Geometry of the metric tensor; IUCr core CIF dictionary, GEOM categories and their symmetry codes.";
const ADVICE = "Look for a wrong digit in a coordinate, a cell parameter or the value, or a wrong symmetry code.";

const BOND: Criterion = {
  id: "listed-distance",
  severity: "contradiction",
  criterion: `A listed bond or contact distance is not that of the atoms. ${RECOMPUTED} ${LEAST_DISTANCE} Å.`,
  source: SOURCE,
  advice: ADVICE,
};

const ANGLE: Criterion = {
  id: "listed-angle",
  severity: "contradiction",
  criterion: `A listed angle is not that of the atoms. ${RECOMPUTED} ${LEAST_ANGLE}°.`,
  source: SOURCE,
  advice: ADVICE,
};

const TORSION: Criterion = {
  id: "listed-torsion",
  severity: "contradiction",
  criterion: `A listed torsion angle is not that of the atoms, with its sign. ${RECOMPUTED} ${LEAST_ANGLE}°.`,
  source: `${SOURCE} Sign: W. Klyne, V. Prelog, Experientia 16 (1960) 521-523.`,
  advice: ADVICE,
};

const INVERTED: Criterion = {
  id: "listed-torsions-inverted",
  severity: "doubt",
  criterion: "All listed torsion angles have the opposite sign of those of the coordinates.",
  source: "W. Klyne, V. Prelog, Experientia 16 (1960) 521-523.",
  advice: "The coordinates and the list belong to opposite enantiomers, or were computed by another convention.",
};

const HYDROGEN_BOND: Criterion = {
  id: "listed-hydrogen-bond",
  severity: "contradiction",
  criterion: `A distance or angle of a listed hydrogen bond is not that of the atoms. ${RECOMPUTED} ${LEAST_DISTANCE} Å or ${LEAST_ANGLE}°.`,
  source: SOURCE,
  advice: ADVICE,
};

const LABEL: Criterion = {
  id: "label-not-listed",
  severity: "doubt",
  criterion: "A list of distances, angles or hydrogen bonds names an atom that the atom list does not have.",
  source: "IUCr core CIF dictionary: labels in GEOM categories are those of the atom list.",
  advice: "Correct the label; for centroids and planes say in the details what they are.",
};

const CODE: Criterion = {
  id: "symmetry-code-not-listed",
  severity: "contradiction",
  criterion: "A symmetry code names an operation that the list of operations does not have.",
  source: "IUCr core CIF dictionary, _geom_bond.site_symmetry_1.",
  advice: "Operations were lost from the list, or the code was typed wrongly.",
};

const UNCERTAINTY: Criterion = {
  id: "listed-distance-su",
  severity: "remark",
  criterion:
    `The median of stated over propagated standard uncertainties of at least ${FEWEST_JUDGED} distances is above ` +
    `${MEDIAN_RATIO} or below 1/${MEDIAN_RATIO}.`,
  source: "Propagation of errors without correlations; limit chosen here.",
  advice: "Coordinates and distances come from different refinements, or the uncertainties of the cell were left out.",
};

export const criteria: readonly Criterion[] = [BOND, ANGLE, TORSION, INVERTED, HYDROGEN_BOND, LABEL, CODE, UNCERTAINTY];

const DISTANCE = { measure: distance, least: LEAST_DISTANCE, unit: "Å" } as const;
const ANGULAR = { measure: angle, least: LEAST_ANGLE, unit: "°" } as const;

function numbered(category: string, item: string, n: number): string[] {
  return Array.from({ length: n }, (_, i) => `${category}.${item}_${i + 1}`);
}

function plain(category: string, n: number) {
  return { labels: numbered(category, "atom_site_label", n), codes: numbered(category, "site_symmetry", n) };
}

function hydrogenBond(ends: string) {
  const all = [...ends];
  return {
    criterion: HYDROGEN_BOND,
    labels: all.map((e) => `_geom_hbond.atom_site_label_${e}`),
    codes: all.map((e) => `_geom_hbond.site_symmetry_${e}`),
  };
}

function kinds(): readonly GeometryKind[] {
  return [
    { criterion: BOND, noun: "distance", ...plain("_geom_bond", 2), value: "_geom_bond.distance", ...DISTANCE },
    { criterion: BOND, noun: "contact", ...plain("_geom_contact", 2), value: "_geom_contact.distance", ...DISTANCE },
    { criterion: ANGLE, noun: "angle", ...plain("_geom_angle", 3), value: "_geom_angle.value", ...ANGULAR },
    {
      criterion: TORSION,
      noun: "torsion angle",
      ...plain("_geom_torsion", 4),
      value: "_geom_torsion.angle",
      ...ANGULAR,
      measure: torsion,
    },
    { ...hydrogenBond("DH"), noun: "distance", value: "_geom_hbond.distance_DH", ...DISTANCE },
    { ...hydrogenBond("HA"), noun: "distance", value: "_geom_hbond.distance_HA", ...DISTANCE },
    { ...hydrogenBond("DA"), noun: "distance", value: "_geom_hbond.distance_DA", ...DISTANCE },
    { ...hydrogenBond("DHA"), noun: "angle", value: "_geom_hbond.angle_DHA", ...ANGULAR },
  ];
}

/** Are listed distances, angles and torsions those of the atoms? */
export function check(input: AuditInput): Finding[] {
  const { compared, unplaced } = listedGeometry(input, kinds());
  const torsions = compared.filter((c) => c.kind.criterion === TORSION);
  const inverted = torsions.length > 1 && areInverted(torsions);
  const judged = [BOND, ANGLE, ...(inverted ? [] : [TORSION]), HYDROGEN_BOND];
  return [
    ...judged.flatMap((criterion) =>
      unlike(
        input,
        compared.filter((c) => c.kind.criterion === criterion),
      ),
    ),
    ...(inverted ? [inversion(input, torsions)] : []),
    ...misnamed(input, unplaced),
    ...uncertainties(
      input,
      compared.filter((c) => c.kind.criterion === BOND),
    ),
  ];
}

function excess(c: ComparedValue): number {
  return Math.abs(c.difference) / c.tolerance;
}

function unlike(input: AuditInput, list: readonly ComparedValue[]): Finding[] {
  const off = list.filter((c) => excess(c) > 1).sort((a, b) => excess(b) - excess(a));
  const [worst, ...rest] = off;
  if (!worst) return [];
  const { kind, name, stated, computed, difference, tolerance } = worst;
  const digits = Math.max(2, stated.decimals);
  const message = `the ${kind.noun} ${name} is listed as ${stated.text} ${kind.unit}, but the atoms give ${computed.value.toFixed(digits)} ${kind.unit}${rest.length > 0 ? `; of ${count(list.length, "listed value")} ${rest.length} more differ` : ""}`;
  return [
    finding(kind.criterion, input.place(stated.name, stated.span), message, {
      stated: { what: `${stated.name} ${name}`, value: withSu(stated.value, stated.su, digits) },
      against: { what: "by coordinates, cell and codes", value: withSu(computed.value, computed.su || null, digits) },
      difference,
      tolerance,
      unit: kind.unit,
      ...(rest.length > 0
        ? {
            also: rest.map(
              (c) => `${c.name} ${c.stated.text}, not ${c.computed.value.toFixed(Math.max(2, c.stated.decimals))}`,
            ),
          }
        : {}),
    }),
  ];
}

/** A value with its uncertainty in parentheses. */
function withSu(value: number, su: number | null, digits: number): string {
  const units = su === null ? 0 : Math.round(su * 10 ** digits);
  return units > 0 ? `${value.toFixed(digits)}(${units})` : value.toFixed(digits);
}

/** Whether the list fits the mirror image and not the coordinates. */
function areInverted(torsions: readonly ComparedValue[]): boolean {
  const opposite = (c: ComparedValue) => Math.abs(c.stated.value + c.computed.value) <= c.tolerance;
  return torsions.some((c) => excess(c) > 1) && torsions.every((c) => opposite(c) || Math.abs(c.computed.value) > 179);
}

function inversion(input: AuditInput, torsions: readonly ComparedValue[]): Finding {
  const first = torsions.find((c) => excess(c) > 1)!;
  const { name, stated, computed } = first;
  const message = `all ${torsions.length} listed torsion angles have the opposite sign of those of the coordinates, ${name} ${stated.text}° for one`;
  return finding(INVERTED, input.place(stated.name, stated.span), message, {
    stated: { what: `${stated.name} ${name}`, value: stated.value },
    against: { what: "by coordinates, cell and codes", value: computed.value },
    unit: "°",
  });
}

function misnamed(input: AuditInput, unplaced: readonly UnplacedRow[]): Finding[] {
  return ([LABEL, CODE] as const).flatMap((criterion) => {
    const rows = unplaced.filter(({ why }) => (why.kind === "label") === (criterion === LABEL));
    const [first] = rows;
    if (!first) return [];
    const names = [...new Set(rows.map(({ why }) => (why.kind === "label" ? why.label : why.code)))];
    const message =
      criterion === LABEL
        ? `${count(names.length, "label")} of geometry lists not in the atom list: ${names.slice(0, 6).join(", ")}`
        : `${count(names.length, "symmetry code")} with operations that are not listed: ${names.slice(0, 6).join(", ")}`;
    return [
      finding(criterion, input.place(first.stated.name, first.stated.span), message, {
        stated: { what: `row ${first.name}`, value: names[0]! },
        against:
          criterion === LABEL
            ? { what: "atoms listed", value: input.atoms.length }
            : { what: "operations listed", value: input.declared.operations.length },
        ...(names.length > 1 ? { also: names.slice(1) } : {}),
      }),
    ];
  });
}

function uncertainties(input: AuditInput, bonds: readonly ComparedValue[]): Finding[] {
  const ratios = bonds
    .flatMap((c) => (c.stated.su && c.computed.su > 0 ? [{ c, ratio: c.stated.su / c.computed.su }] : []))
    .sort((a, b) => a.ratio - b.ratio);
  const middle = ratios[Math.floor(ratios.length / 2)];
  if (ratios.length < FEWEST_JUDGED || !middle) return [];
  if (middle.ratio <= MEDIAN_RATIO && middle.ratio >= 1 / MEDIAN_RATIO) return [];
  const { stated, computed, name } = middle.c;
  const message = `standard uncertainties of listed distances are, in the median of ${ratios.length}, ${middle.ratio.toFixed(2)} times those of the coordinates`;
  return [
    finding(UNCERTAINTY, input.place(stated.name, stated.span), message, {
      stated: { what: `s.u. of ${name}`, value: stated.su! },
      against: { what: "propagated from coordinates and cell", value: computed.su },
      unit: "Å",
    }),
  ];
}
