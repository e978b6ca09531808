import { InputProblem } from "../problem.ts";
import { type AbsencesAnswer, absencesAnswer } from "./absences-answer.ts";
import { absencesQuestion } from "./absences-question.ts";
import type { AuditInput } from "./audit-input.ts";
import { VIOLATION_SIGMA } from "./condition-test.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";

const VIOLATED: Criterion = {
  id: "absences-violated",
  severity: "contradiction",
  criterion:
    "Reflections in the file that the declared group forbids are present, by the odds of their whole class (a few strong ones, " +
    "of multiple diffraction or half the wavelength, do not decide). `absences` prints the statistic of every condition.",
  source:
    "International Tables for Crystallography A (2016), chapter 1.6; A. J. C. Wilson, Acta Crystallographica 2 (1949) 318-321.",
  advice: "`absences` lists the violations and the groups that fit; the cell or the indexing may differ as well.",
};

const LAUE: Criterion = {
  id: "laue-class-disagrees",
  severity: "doubt",
  criterion:
    "Equivalent reflections of the Laue class of the declared group do not agree, while those of a lower class do.",
  source: "Friedel's law; agreement of equivalents, see `absences`.",
  advice: "The symmetry may be lower, or the crystal a twin; `absences` prints the agreement of every class.",
};

export const criteria: readonly Criterion[] = [VIOLATED, LAUE];

/** Do the measured reflections obey the conditions of the group? */
export function check(input: AuditInput): Finding[] {
  const answer = answered(input);
  const identified = input.symmetry?.identified;
  if (!answer || !identified) return [];
  const { number, hermannMauguin } = identified.summary;
  const group = `No. ${number}, ${hermannMauguin}`;
  const found: Finding[] = [];
  const said = input.declared.hermannMauguin ?? input.declared.operations[0] ?? null;
  const place = input.place(said?.name ?? "_space_group_name_H-M_alt", said?.span ?? null);
  const broken = answer.conditions.filter((c) => c.verdict === "violated" && !c.implied);
  const [worst] = broken;
  if (worst) {
    const strongest = answer.violations.map((v) => `${v.h} ${v.k} ${v.l}`);
    const message = `reflections ${worst.reflections} that ${hermannMauguin} forbids (${worst.condition}) are present: ${worst.above} of ${worst.forbidden} above ${VIOLATION_SIGMA} s.u., ${some(strongest)} the strongest`;
    found.push(
      finding(VIOLATED, place, message, {
        stated: {
          what: "condition of the declared group",
          value: `${worst.reflections}: ${worst.condition}, ${worst.cause}`,
        },
        against: {
          what: `mean value over s.u. of ${worst.forbidden} forbidden reflections`,
          value: worst.meanOverSigma ?? 0,
        },
        ...(broken.length > 1 ? { also: broken.slice(1).map((c) => `${c.reflections}: ${c.condition}`) } : {}),
      }),
    );
  }
  return [...found, ...laue(input, answer, group)];
}

function laue(input: AuditInput, answer: AbsencesAnswer, group: string): Finding[] {
  const { laueClasses, rInt, laueLimit } = answer;
  const order = laueClasses.find((c) => c.rInt !== null && rInt !== null && Math.abs(c.rInt - rInt) < 1e-9);
  const lower = laueClasses.find((c) => c.chosen);
  if (!order || order.accepted || !lower || lower === order || order.rWorst === null) return [];
  const message = `equivalent reflections of the Laue class ${order.laueClass} disagree (R ${order.rWorst.toFixed(3)}), those of ${lower.laueClass} agree`;
  const said = input.declared.hermannMauguin ?? input.declared.operations[0] ?? null;
  return [
    finding(LAUE, input.place(said?.name ?? "_space_group_name_H-M_alt", said?.span ?? null), message, {
      stated: { what: `merging R for an element of ${order.laueClass}, ${group}`, value: order.rWorst },
      against: { what: "limit", value: laueLimit },
    }),
  ];
}

/** Null where the block has no reflections, or they cannot be judged. */
function answered(input: AuditInput): AbsencesAnswer | null {
  if (!input.metric || !input.symmetry) return null;
  try {
    return absencesAnswer(absencesQuestion(input.block, [input.block]).question);
  } catch (e) {
    if (e instanceof InputProblem) return null;
    throw e;
  }
}
