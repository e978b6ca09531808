import type { Crystal, CrystalSite, Metric } from "../structure/index.ts";
import { atomRows } from "./atom-rows.ts";
import { type AuditInput, rounding, rowNumber, statementOf } from "./audit-input.ts";
import { equivalentSquare, principalSquares, type TensorRow, tensorRows } from "./displacement-tensors.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";
import { nearAtoms } from "./near-atoms.ts";

/** U_eq of a file may be defined in several ways and rounded more; relative. */
const EQUIVALENT_TOLERANCE = 0.1;
const SU_FACTOR = 3;
/** Ratio of mean squares along the longest and shortest principal axis. */
const LARGEST_RATIO = 8;
/** Ratio of an atom's mean square to the mean of those next to it. */
const NEIGHBOUR_RATIO = 4;
/** Mean squares above this are clouds of smeared atoms, in molecular crystals at room temperature; square angstrom. */
const LARGEST_SQUARE = 0.3;
/** Sites less occupied than this have displacements that stand for more than motion. */
const FULL = 0.99;

const NOT_POSITIVE: Criterion = {
  id: "displacement-not-positive",
  severity: "doubt",
  criterion: "A displacement tensor has a principal mean square of 0 or less, or an isotropic U is 0 or less.",
  source: "A mean square is positive; R. T. Downs, Reviews in Mineralogy and Geochemistry 41 (2000) 61-87.",
  advice: "Look for a wrong component or sign; otherwise absorption, scattering power (element) or twinning.",
};

const EQUIVALENT: Criterion = {
  id: "displacement-equivalent",
  severity: "contradiction",
  criterion:
    "U_iso_or_equiv of an atom with a displacement tensor is neither a third of its trace nor the geometric mean of its " +
    `principal mean squares, within ${100 * EQUIVALENT_TOLERANCE} %, rounding and ${SU_FACTOR} standard uncertainties.`,
  source: "R. X. Fischer, E. Tillmanns, Acta Crystallographica C44 (1988) 775-776: definitions of U_eq.",
  advice: "One of the two belongs to another stage of the refinement, or to another atom; B is 8 pi^2 U.",
};

const ANISOTROPY: Criterion = {
  id: "displacement-anisotropy",
  severity: "remark",
  criterion: `The largest principal mean square of an atom is more than ${LARGEST_RATIO} times the smallest.`,
  source: "Limit chosen here; larger ratios are mostly unresolved disorder.",
  advice: "Consider a split position, or constraints on an atom that the data do not determine.",
};

const SIZE: Criterion = {
  id: "displacement-size",
  severity: "doubt",
  criterion:
    `The mean square displacement of a fully occupied atom other than hydrogen is more than ${NEIGHBOUR_RATIO} times, or less ` +
    `than 1/${NEIGHBOUR_RATIO} of, the mean of the atoms next to it.`,
  source:
    "Atoms that hold each other move alike: F. L. Hirshfeld, Acta Crystallographica A32 (1976) 239-244; limit chosen here.",
  advice: "A heavier or lighter element on the site, a partial occupancy, or disorder would explain it.",
};

const LARGE: Criterion = {
  id: "displacement-large",
  severity: "remark",
  criterion: `A mean square displacement exceeds ${LARGEST_SQUARE} Å^2.`,
  source: "Limit chosen here: displacements of half an angstrom are disorder.",
  advice: "Such an atom stands for several positions; leave it out where geometry matters.",
};

export const criteria: readonly Criterion[] = [NOT_POSITIVE, EQUIVALENT, ANISOTROPY, SIZE, LARGE];

/** Are the displacements possible, alone and beside those of their neighbours? */
export function check(input: AuditInput): Finding[] {
  const { metric, crystal } = input;
  if (!metric) return [];
  const rows = tensorRows(input).filter((r) => r.u.some((e) => e !== 0));
  return [
    ...notPositive(input, metric, rows),
    ...equivalents(input, metric, rows),
    ...anisotropic(input, metric, rows),
    ...(crystal ? [...sizes(input, crystal), ...large(input, crystal)] : []),
  ];
}

function notPositive(input: AuditInput, metric: Metric, rows: readonly TensorRow[]): Finding[] {
  const tensors = rows.flatMap((row) => {
    const smallest = principalSquares(metric, row.u)[2]!;
    const { name, span } = row.stated[0]!;
    return smallest <= 0
      ? [{ label: row.atom.label, value: smallest, name, span, what: "smallest principal mean square" }]
      : [];
  });
  const isotropic = atomRows(input).flatMap(({ atom, loop, row }) => {
    const stated =
      rowNumber(loop, row, "_atom_site.U_iso_or_equiv") ?? rowNumber(loop, row, "_atom_site.B_iso_or_equiv");
    return stated && stated.value < 0
      ? [
          {
            label: atom.label,
            value: stated.value,
            name: stated.name,
            span: stated.span,
            what: "isotropic displacement",
          },
        ]
      : [];
  });
  const all = [...tensors, ...isotropic].sort((a, b) => a.value - b.value);
  const [worst] = all;
  if (!worst) return [];
  const others = all.slice(1).map((o) => o.label);
  const message = `the ${worst.what} of ${worst.label} is ${worst.value.toFixed(4)} Å^2${others.length > 0 ? `; not positive as well: ${some(others)}` : ""}`;
  return [
    finding(NOT_POSITIVE, input.place(worst.name, worst.span), message, {
      stated: { what: `${worst.what} of ${worst.label}`, value: worst.value },
      against: { what: "a mean square", value: "more than 0" },
      unit: "Å^2",
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}

function equivalents(input: AuditInput, metric: Metric, rows: readonly TensorRow[]): Finding[] {
  const listed = new Map(atomRows(input).map((r) => [r.atom.label, r]));
  const off = rows.flatMap((row) => {
    const of = listed.get(row.atom.label);
    const stated = of && rowNumber(of.loop, of.row, "_atom_site.U_iso_or_equiv");
    if (!stated) return [];
    const trace = equivalentSquare(metric, row.u);
    const product = principalSquares(metric, row.u).reduce((p, e) => p * Math.max(0, e), 1);
    const tolerance =
      EQUIVALENT_TOLERANCE * Math.abs(trace) +
      rounding(stated) +
      Math.max(...row.rounding) +
      SU_FACTOR * Math.hypot(stated.su ?? 0, ...row.su.slice(0, 3).map((s) => s / 3));
    const difference = stated.value - trace;
    const agrees = Math.abs(difference) <= tolerance || Math.abs(stated.value - Math.cbrt(product)) <= tolerance;
    return agrees ? [] : [{ row, stated, trace, difference, tolerance }];
  });
  const [worst] = off.sort((a, b) => Math.abs(b.difference) / b.tolerance - Math.abs(a.difference) / a.tolerance);
  if (!worst) return [];
  const { row, stated, trace, difference, tolerance } = worst;
  const others = off.slice(1).map((o) => o.row.atom.label);
  const message = `the equivalent displacement of ${row.atom.label} is listed as ${stated.text} Å^2, but its tensor gives ${trace.toFixed(4)}${others.length > 0 ? `; likewise ${some(others)}` : ""}`;
  return [
    finding(EQUIVALENT, input.place(stated.name, stated.span), message, {
      stated: { ...statementOf(stated), what: `${stated.name} of ${row.atom.label}` },
      against: { what: "a third of the trace of its tensor", value: trace },
      difference,
      tolerance,
      unit: "Å^2",
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}

function anisotropic(input: AuditInput, metric: Metric, rows: readonly TensorRow[]): Finding[] {
  const long = rows.flatMap((row) => {
    const [largest, , smallest] = principalSquares(metric, row.u) as [number, number, number];
    return smallest > 0 && largest / smallest > LARGEST_RATIO
      ? [{ row, ratio: largest / smallest, largest, smallest }]
      : [];
  });
  const [worst] = long.sort((a, b) => b.ratio - a.ratio);
  if (!worst) return [];
  const { row, ratio, largest, smallest } = worst;
  const others = long.slice(1).map((o) => `${o.row.atom.label} (${o.ratio.toFixed(1)})`);
  const message = `${row.atom.label} moves ${ratio.toFixed(1)} times as much along one axis as along another (mean squares)${others.length > 0 ? `; likewise ${some(others)}` : ""}`;
  return [
    finding(ANISOTROPY, input.place(row.stated[0]!.name, row.stated[0]!.span), message, {
      stated: { what: `largest principal mean square of ${row.atom.label}`, value: largest },
      against: { what: "smallest", value: smallest },
      unit: "Å^2",
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}

/** Equivalent mean square of a site, null where none is known or it is not positive. */
function squareOf(metric: Metric, { displacement: d }: CrystalSite): number | null {
  const value = d === null ? null : d.kind === "isotropic" ? d.iso : equivalentSquare(metric, d.u);
  return value !== null && value > 0 ? value : null;
}

function isJudged({ element, occupancy, sharesPositionOf }: CrystalSite): boolean {
  return element !== null && !["H", "D", "T"].includes(element) && occupancy >= FULL && sharesPositionOf === null;
}

function sizes(input: AuditInput, crystal: Crystal): Finding[] {
  const { sites, metric } = crystal;
  const near = nearAtoms(crystal);
  const odd = sites.flatMap((site, i) => {
    const own = squareOf(metric, site);
    if (own === null || !isJudged(site)) return [];
    const around = near[i]!.flatMap((n) => (isJudged(sites[n.site]!) ? (squareOf(metric, sites[n.site]!) ?? []) : []));
    if (around.length === 0) return [];
    const mean = around.reduce((s, u) => s + u, 0) / around.length;
    const ratio = own / mean;
    return ratio > NEIGHBOUR_RATIO || ratio < 1 / NEIGHBOUR_RATIO ? [{ site, own, mean, ratio }] : [];
  });
  const [worst] = odd.sort((a, b) => Math.abs(Math.log(b.ratio)) - Math.abs(Math.log(a.ratio)));
  if (!worst) return [];
  const { site, own, mean } = worst;
  const others = odd.slice(1).map((o) => o.site.label);
  const message = `${site.label} moves with a mean square of ${own.toFixed(4)} Å^2, the atoms next to it with ${mean.toFixed(4)}${others.length > 0 ? `; out of proportion as well: ${some(others)}` : ""}`;
  return [
    finding(SIZE, input.place("_atom_site_label", site.span), message, {
      stated: { what: `mean square of ${site.label}`, value: own },
      against: { what: "mean of the atoms next to it", value: mean },
      unit: "Å^2",
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}

function large(input: AuditInput, { sites, metric }: Crystal): Finding[] {
  const found = sites.flatMap((site) => {
    const own = squareOf(metric, site);
    return own !== null && own > LARGEST_SQUARE ? [{ site, own }] : [];
  });
  const [worst] = found.sort((a, b) => b.own - a.own);
  if (!worst) return [];
  const others = found.slice(1).map((o) => o.site.label);
  const message = `${worst.site.label} has a mean square displacement of ${worst.own.toFixed(3)} Å^2${others.length > 0 ? `; very large as well: ${some(others)}` : ""}`;
  return [
    finding(LARGE, input.place("_atom_site_label", worst.site.span), message, {
      stated: { what: `mean square of ${worst.site.label}`, value: worst.own },
      against: { what: "usual at most", value: LARGEST_SQUARE },
      unit: "Å^2",
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}
