import { type AuditInput, type StatedNumber, statedNumber, statementOf } from "./audit-input.ts";
import { type Criterion, count, type Finding, finding } from "./finding.ts";
import { type PossibleReflections, possibleReflections } from "./possible-reflections.ts";
import { radiationOf } from "./radiation.ts";

/** Reflections at the edge of the sphere, by rounding of theta and cell; relative, and a number of reflections. */
const COUNT_TOLERANCE = { share: 0.01, least: 3 };
/** Completeness stated and counted may differ by so much: beam stop, overlap, absences. */
const FRACTION_TOLERANCE = 0.05;
/** A fraction of 1 may be rounded up from counts to this. */
const LARGEST_FRACTION = 1.0051;
const DEGREE = Math.PI / 180;

const ORDER: Criterion = {
  id: "reflection-numbers",
  severity: "contradiction",
  criterion:
    "More reflections are counted as strong than there are independent ones, or more independent ones than were measured.",
  source: "IUCr core CIF dictionary, _reflns.number_gt, _reflns.number_total, _diffrn_reflns.number.",
  advice: "The numbers belong to different data sets.",
};

const TOO_MANY: Criterion = {
  id: "reflections-too-many",
  severity: "contradiction",
  criterion:
    "More independent reflections are stated than cell, wavelength, theta_max, centring and point group allow (Friedel " +
    `opposites counted as different), by more than ${100 * COUNT_TOLERANCE.share} % and ${COUNT_TOLERANCE.least}.`,
  source: "Bragg's law; number of orbits of reciprocal-lattice points by Burnside's lemma.",
  advice: "The number, the cell or the group belongs to another data set; or reflections were not merged.",
};

const COMPLETENESS: Criterion = {
  id: "completeness",
  severity: "doubt",
  criterion:
    "The measured fraction stated differs from the number of independent reflections over the possible ones, in the Laue " +
    `class or the point group, by more than ${FRACTION_TOLERANCE}.`,
  source: "IUCr core CIF dictionary, _diffrn.measured_fraction_theta_max; counted as for `reflections-too-many`.",
  advice: "Look at theta_max and at the group in which reflections were merged.",
};

const FRACTION: Criterion = {
  id: "fraction-range",
  severity: "contradiction",
  criterion: "A measured fraction is outside 0 to 1 by more than rounding.",
  source: "IUCr core CIF dictionary, _diffrn.measured_fraction_theta_full.",
  advice: "Percentages are to be divided by 100.",
};

export const criteria: readonly Criterion[] = [ORDER, TOO_MANY, COMPLETENESS, FRACTION];

/** Are the numbers of reflections possible? */
export function check(input: AuditInput): Finding[] {
  const total = statedNumber(input, "_reflns.number_total");
  return [...order(input, total), ...fractions(input), ...(total ? counted(input, total) : [])];
}

function order(input: AuditInput, total: StatedNumber | null): Finding[] {
  const strong = statedNumber(input, "_reflns.number_gt");
  const measured = statedNumber(input, "_diffrn_reflns.number");
  const pairs: [StatedNumber | null, StatedNumber | null, string][] = [
    [strong, total, "more reflections are counted as strong than as independent"],
    [total, measured, "more reflections are counted as independent than were measured"],
  ];
  return pairs.flatMap(([less, more, what]) => {
    if (!less || !more || more.value <= 0 || less.value <= more.value) return [];
    const message = `${what}: ${less.text} and ${more.text}`;
    return [
      finding(ORDER, input.place(less.name, less.span), message, {
        stated: statementOf(less),
        against: statementOf(more),
        difference: less.value - more.value,
      }),
    ];
  });
}

const FRACTIONS = ["_diffrn.measured_fraction_theta_max", "_diffrn.measured_fraction_theta_full"];

function fractions(input: AuditInput): Finding[] {
  return FRACTIONS.flatMap((name) => {
    const stated = statedNumber(input, name);
    if (!stated || (stated.value >= 0 && stated.value <= LARGEST_FRACTION)) return [];
    return [
      finding(
        FRACTION,
        input.place(stated.name, stated.span),
        `the measured fraction ${stated.text} is not between 0 and 1`,
        {
          stated: statementOf(stated),
          against: { what: "a fraction", value: "0 to 1" },
        },
      ),
    ];
  });
}

function counted(input: AuditInput, total: StatedNumber): Finding[] {
  const { metric, symmetry } = input;
  const { wavelength } = radiationOf(input);
  const theta = statedNumber(input, "_diffrn_reflns.theta_max");
  const powder = input.block.names().some((name) => /^_pd_/i.test(name));
  if (!metric || !symmetry || !wavelength || !theta || powder || !(theta.value > 0 && theta.value <= 90)) return [];
  const spacing = wavelength.value / (2 * Math.sin(theta.value * DEGREE));
  const possible = possibleReflections(metric, symmetry.identified.group, spacing);
  if (!possible) return [];
  const tolerance = COUNT_TOLERANCE.least + COUNT_TOLERANCE.share * possible.pointGroup;
  if (total.value > possible.pointGroup + tolerance) {
    const message = `${count(total.value, "independent reflection")} stated, but up to theta ${theta.text}° there are ${possible.pointGroup} at most`;
    return [
      finding(TOO_MANY, input.place(total.name, total.span), message, {
        stated: statementOf(total),
        against: { what: "cell, wavelength, theta_max and point group", value: possible.pointGroup },
        difference: total.value - possible.pointGroup,
        tolerance,
        unit: "reflections",
      }),
    ];
  }
  return completeness(input, total, possible);
}

function completeness(input: AuditInput, total: StatedNumber, possible: PossibleReflections): Finding[] {
  const stated = statedNumber(input, "_diffrn.measured_fraction_theta_max");
  if (!stated || stated.value > LARGEST_FRACTION) return [];
  const [high, low] = [total.value / possible.laue, total.value / possible.pointGroup];
  // merged with Friedel opposites apart, in part or together: anything between is possible
  const beyond = Math.max(low - stated.value, stated.value - high);
  if (beyond <= FRACTION_TOLERANCE) return [];
  const message = `the measured fraction is stated as ${stated.text}, but ${total.text} of ${possible.laue} possible reflections are ${high.toFixed(3)}`;
  return [
    finding(COMPLETENESS, input.place(stated.name, stated.span), message, {
      stated: statementOf(stated),
      against: { what: "reflections over possible ones", value: high },
      difference: stated.value - high,
      tolerance: FRACTION_TOLERANCE,
    }),
  ];
}
