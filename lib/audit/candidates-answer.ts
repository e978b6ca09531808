import { extinctionSymbol, type IdentifiedGroup, matchingSetting, spaceGroupType } from "../symmetry/index.ts";
import { type FittingGroup, isCentrosymmetric } from "./fitting-groups.ts";

/** A space group that may be that of the crystal, with the figures that put it where it stands. */
export interface CandidateAnswer {
  readonly number: number;
  /** Short symbol in the cell of the candidates. */
  readonly hermannMauguin: string;
  readonly settingName: string;
  readonly schoenflies: string;
  readonly extinctionSymbol: string;
  readonly centrosymmetric: boolean;
  /** Natural logarithms of odds: for its absences, its crystal class, its centricity; together, against the best. */
  readonly absenceEvidence: number;
  readonly classEvidence: number;
  readonly centricityEvidence: number;
  readonly evidence: number;
  readonly declared: boolean;
}

/** Candidates further than this from the best are left out, the declared group excepted: odds of e^25. */
const FARTHEST_CANDIDATE = 25;

/**
 * The candidates near the best, and the declared group wherever it stands.
 * @param sameCell the candidates are written in the cell of the declared group, so that its setting can be told apart
 */
export function candidatesOf(
  groups: readonly FittingGroup[],
  declared: IdentifiedGroup | null,
  sameCell: boolean,
): CandidateAnswer[] {
  const setting = declared && sameCell ? matchingSetting(declared.number, declared.group) : null;
  const symbol = declared && setting ? extinctionSymbol(setting, declared.group) : null;
  return groups.flatMap((g): CandidateAnswer[] => {
    const { number, hermannMauguin, name } = g.setting;
    const isDeclared = number === declared?.number && (symbol === null || symbol === g.extinctionSymbol);
    if (g.evidence < -FARTHEST_CANDIDATE && !isDeclared) return [];
    const { absenceEvidence, classEvidence, centricityEvidence, evidence } = g;
    return [
      {
        number,
        hermannMauguin: hermannMauguin.short,
        settingName: name,
        schoenflies: spaceGroupType(number).schoenflies,
        extinctionSymbol: g.extinctionSymbol,
        centrosymmetric: isCentrosymmetric(g.group),
        absenceEvidence,
        classEvidence,
        centricityEvidence,
        evidence,
        declared: isDeclared,
      },
    ];
  });
}
