import type { Metric } from "../structure/index.ts";
import { type AuditInput, rounding, type StatedNumber, statedNumber, statementOf } from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";
import { inverseSquare } from "./possible-reflections.ts";
import { radiationOf } from "./radiation.ts";

/** Angles are given for the mean of two lines or for one, and cells change with temperature; relative in d. */
const RESOLUTION_TOLERANCE = 0.015;
/** Share of the indices within the resolution that some axis reaches in an ordinary measurement. */
const REACHED_SHARE = 0.7;

const INDEX: Criterion = {
  id: "index-limits",
  severity: "contradiction",
  criterion:
    "A limit of h, k or l is larger than the axis of the cell over the smallest spacing, lambda / (2 sin theta_max), by more " +
    `than ${100 * RESOLUTION_TOLERANCE} %, or a lower limit is above the upper one.`,
  source: "Bragg's law and the reciprocal lattice: |h| <= a s for any reflection with 1/d = s.",
  advice: "The limits, theta, wavelength or cell belong to another measurement, or to another setting of the axes.",
};

const NOT_REACHED: Criterion = {
  id: "index-limits-low",
  severity: "doubt",
  criterion: `No index comes within ${REACHED_SHARE} of what the cell, the wavelength and theta_max allow.`,
  source: "Bragg's law and the reciprocal lattice.",
  advice: "Theta may be 2 theta, or the limits belong to another cell.",
};

const THETA: Criterion = {
  id: "theta-range",
  severity: "contradiction",
  criterion:
    "The smallest theta is not below the largest, that of full coverage is above it, or the smallest is below that of the " +
    "largest spacing of the cell.",
  source: "Bragg's law.",
  advice: "Correct the angles; theta and 2 theta are often confused.",
};

const RESOLUTION: Criterion = {
  id: "resolution",
  severity: "contradiction",
  criterion: `The smallest spacing stated is not lambda / (2 sin theta_max) within ${100 * RESOLUTION_TOLERANCE} % and rounding.`,
  source: "Bragg's law.",
  advice: "One of spacing, angle and wavelength is wrong, or the refinement used fewer reflections than were measured.",
};

export const criteria: readonly Criterion[] = [INDEX, NOT_REACHED, THETA, RESOLUTION];

const DEGREE = Math.PI / 180;

/** Do indices, angles, wavelength and spacing fit the cell? */
export function check(input: AuditInput): Finding[] {
  const { wavelength } = radiationOf(input);
  const theta = statedNumber(input, "_diffrn_reflns.theta_max");
  const sound = theta && theta.value > 0 && theta.value <= 90 && wavelength && wavelength.value > 0;
  const spacing = sound ? wavelength.value / (2 * Math.sin(theta.value * DEGREE)) : null;
  return [
    ...indexLimits(input, spacing, theta),
    ...angles(input, theta, wavelength),
    ...(spacing !== null && theta ? resolution(input, spacing, theta) : []),
  ];
}

const AXES = ["h", "k", "l"] as const;

function indexLimits(input: AuditInput, spacing: number | null, theta: StatedNumber | null): Finding[] {
  const { metric } = input;
  if (!metric) return [];
  const { a, b, c } = metric.cell;
  const stated = AXES.flatMap((axis, i) => {
    const [low, high] = ["min", "max"].map((end) => statedNumber(input, `_diffrn_reflns.limit_${axis}_${end}`));
    return low && high ? [{ axis, low, high, edge: [a, b, c][i]! }] : [];
  });
  const crossed = stated.filter(({ low, high }) => low.value > high.value);
  const found = crossed.map(({ axis, low, high }) =>
    finding(
      INDEX,
      input.place(low.name, low.span),
      `the lower limit of ${axis}, ${low.text}, is above the upper one, ${high.text}`,
      {
        stated: statementOf(low),
        against: statementOf(high),
      },
    ),
  );
  if (spacing === null || !theta || stated.length === 0) return found;
  const shares: number[] = [];
  for (const { axis, low, high, edge } of stated) {
    const widest = Math.abs(low.value) > Math.abs(high.value) ? low : high;
    const most = edge / spacing;
    shares.push(Math.abs(widest.value) / Math.max(1, Math.floor(most)));
    if (Math.abs(widest.value) <= most * (1 + RESOLUTION_TOLERANCE)) continue;
    const message = `${axis} reaches ${widest.text}, but the axis of ${edge} Å allows ${Math.floor(most)} up to theta ${theta.text}°`;
    found.push(
      finding(INDEX, input.place(widest.name, widest.span), message, {
        stated: statementOf(widest),
        against: { what: "axis over the smallest spacing", value: most },
        difference: Math.abs(widest.value) - most,
        tolerance: RESOLUTION_TOLERANCE * most,
      }),
    );
  }
  return found.length > 0 || stated.length < 3 ? found : notReached(input, shares, theta);
}

function notReached(input: AuditInput, shares: readonly number[], theta: StatedNumber): Finding[] {
  const best = Math.max(...shares);
  if (best >= REACHED_SHARE) return [];
  const message = `no index comes within ${(100 * best).toFixed(0)} % of what theta_max ${theta.text}° allows`;
  return [
    finding(NOT_REACHED, input.place(theta.name, theta.span), message, {
      stated: statementOf(theta),
      against: { what: "largest share of an index limit", value: best },
    }),
  ];
}

function angles(input: AuditInput, theta: StatedNumber | null, wavelength: StatedNumber | null): Finding[] {
  const low = statedNumber(input, "_diffrn_reflns.theta_min");
  const full = statedNumber(input, "_diffrn_reflns.theta_full");
  const found: Finding[] = [];
  const add = (one: StatedNumber, other: { what: string; value: string | number }, message: string) =>
    found.push(
      finding(THETA, input.place(one.name, one.span), message, { stated: statementOf(one), against: other, unit: "°" }),
    );
  if (low && theta && low.value >= theta.value)
    add(low, statementOf(theta), `the smallest theta, ${low.text}°, is not below the largest, ${theta.text}°`);
  if (full && theta && full.value > theta.value + rounding(full) + rounding(theta))
    add(
      full,
      statementOf(theta),
      `coverage is said to be full up to theta ${full.text}°, beyond the largest measured, ${theta.text}°`,
    );
  const { metric } = input;
  if (low && wavelength && metric) {
    const widest = largestSpacing(metric);
    const least = Math.asin(Math.min(1, wavelength.value / (2 * widest))) / DEGREE;
    if (low.value + rounding(low) < least * (1 - RESOLUTION_TOLERANCE)) {
      const value = { what: `theta of the largest spacing, ${widest.toFixed(3)} Å`, value: least };
      add(
        low,
        value,
        `the smallest theta, ${low.text}°, is below that of the largest spacing of the cell, ${least.toFixed(2)}°`,
      );
    }
  }
  return found;
}

/** Largest spacing of lattice planes; absences are not asked. */
function largestSpacing(metric: Metric): number {
  let least = Number.POSITIVE_INFINITY;
  for (let h = -2; h <= 2; h++) {
    for (let k = -2; k <= 2; k++) {
      for (let l = -2; l <= 2; l++) if (h || k || l) least = Math.min(least, inverseSquare(metric, h, k, l));
    }
  }
  return 1 / Math.sqrt(least);
}

function resolution(input: AuditInput, spacing: number, theta: StatedNumber): Finding[] {
  const stated = statedNumber(input, "_refine_ls.d_res_high");
  if (!stated) return [];
  const difference = stated.value - spacing;
  const tolerance = rounding(stated) + RESOLUTION_TOLERANCE * spacing;
  if (Math.abs(difference) <= tolerance) return [];
  const message = `the smallest spacing is stated as ${stated.text} Å, but theta_max ${theta.text}° means ${spacing.toFixed(3)} Å`;
  return [
    finding(RESOLUTION, input.place(stated.name, stated.span), message, {
      stated: statementOf(stated),
      against: { what: `wavelength and ${theta.name}`, value: spacing },
      difference,
      tolerance,
      unit: "Å",
    }),
  ];
}
