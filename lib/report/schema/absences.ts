import type { AbsencesAnswer } from "../../audit/index.ts";
import type { SpaceGroupSummary } from "../../symmetry/index.ts";
import { cellNumbers, type Heading, heading, positionTolerance, spaceGroup, xyz } from "./common.ts";
import { laueClass } from "./group.ts";
import { amount, choice, count, flag, list, number, object, orNull, type Shape, text, whole } from "./shape.ts";

type Document = Heading & { readonly spaceGroup: SpaceGroupSummary | null } & AbsencesAnswer;
type Condition = AbsencesAnswer["conditions"][number];

const odds = (of: string) => number(`natural logarithm of the odds ${of}`);
const rFactor = () => orNull(amount(), "null where there are no equivalents to compare");

export function absencesSchema(): Shape<Document> {
  return object<Document>({
    ...heading("absences"),
    tolerance: positionTolerance(),
    spaceGroup: orNull(spaceGroup(), "declared or given; null without one"),
    reflections: reflections(),
    verdict: choice({
      met: true,
      violated: true,
      undecided: true,
      "not tested": true,
      "no conditions": true,
      "no group": true,
    }),
    conditions: list(condition(), "general conditions of the declared group"),
    tested: object<AbsencesAnswer["tested"]>({ reflections: count(), absent: count(), violations: count() }),
    violations: list(
      object<AbsencesAnswer["violations"][number]>({
        h: whole(),
        k: whole(),
        l: whole(),
        value: number("mean F^2 of the equivalents"),
        sigma: amount("its standard uncertainty"),
        share: number("value over the mean intensity at this resolution"),
        condition: text("the narrowest that forbids it"),
      }),
      "the strongest",
    ),
    rInt: rFactor(),
    declaredLaueClass: orNull(laueClass()),
    centring: object<AbsencesAnswer["centring"]>({
      letter: orNull(text(), "null where the translations have no letter"),
      translations: list(xyz()),
      tests: list(
        object<AbsencesAnswer["centring"]["tests"][number]>({
          translation: xyz(),
          listed: count("reflections that it forbids"),
          evidence: odds("that they are present rather than forbidden"),
          accepted: flag(),
        }),
      ),
    }),
    laueClasses: list(
      object<AbsencesAnswer["laueClasses"][number]>({
        laueClass: laueClass(),
        rInt: rFactor(),
        rWorst: rFactor(),
        compared: count(),
        accepted: flag(),
        chosen: flag(),
      }),
    ),
    laueLimit: amount("for rWorst"),
    rBase: amount("what equivalents differ by in any case"),
    statistics: statistics(),
    possible: list(condition(), "that other elements possible in the Laue class would bring about"),
    candidateCell: object<AbsencesAnswer["candidateCell"]>({ P: xyz("(a',b',c') = (a,b,c) P"), cell: cellNumbers() }),
    extinctionSymbol: text(),
    candidates: list(candidate(), "space groups that fit, the best first"),
  });
}

const reflections = () =>
  object<AbsencesAnswer["reflections"]>({
    source: text(),
    quantity: text(),
    quantityFrom: text("how it is known"),
    listed: count(),
    used: count(),
    unique: count("merged in the Laue class chosen"),
    uncertainties: choice({ listed: true, assumed: true }),
    matrix: orNull(xyz(), "indices used = matrix times those listed; null as listed"),
    matrixSource: orNull(text()),
    matrixWhy: text(),
  });

function condition(): Shape<Condition> {
  const none = "null where it forbids none of the reflections listed";
  return object<Condition>({
    reflections: text(),
    condition: text(),
    cause: text(),
    implied: flag("follows from the conditions on wider classes of reflections"),
    tested: count("merged reflections of the class"),
    forbidden: count("of them"),
    meanOverSigma: orNull(number(), none),
    medianOverSigma: orNull(number(), none),
    meanShare: orNull(number(), none),
    above: count("forbidden ones above 3 standard uncertainties"),
    evidence: odds("that the forbidden ones are present rather than forbidden"),
    verdict: choice({ met: true, violated: true, undecided: true, "not listed": true, "not measured": true }),
    systematicallyWeak: flag(),
  });
}

const statistics = () =>
  object<AbsencesAnswer["statistics"]>({
    meanDeviation: orNull(amount(), "mean |E^2 - 1|; null with too few reflections"),
    standardError: orNull(amount()),
    reflections: count(),
    expectedCentric: amount(),
    expectedAcentric: amount(),
    verdict: choice({ centric: true, acentric: true, "below acentric": true, undecided: true }),
  });

const candidate = () =>
  object<AbsencesAnswer["candidates"][number]>({
    number: count("", 1),
    hermannMauguin: text("in the cell of the candidates"),
    settingName: text(),
    schoenflies: text(),
    extinctionSymbol: text(),
    centrosymmetric: flag(),
    absenceEvidence: odds("for its absences"),
    classEvidence: odds("for its crystal class"),
    centricityEvidence: odds("for its centricity"),
    evidence: odds("together, against the best"),
    declared: flag(),
  });
