import { type CellNumbers, LATTICE_TOLERANCE, type Metric } from "../structure/index.ts";
import {
  centringLetter,
  formatBasis,
  formatVector,
  type GroupProperties,
  groupProperties,
  type IdentifiedGroup,
  independentConditions,
  reflectionConditions,
} from "../symmetry/index.ts";
import { type CandidateAnswer, candidatesOf } from "./candidates-answer.ts";
import { chooseIndexing, type IndexedList, indexedBy } from "./choose-indexing.ts";
import { type ConditionTest, testCondition, VIOLATION_SIGMA } from "./condition-test.ts";
import { type FittingGroups, fittingGroups } from "./fitting-groups.ts";
import { type ForbiddenReflection, forbiddenReflections } from "./forbidden-reflections.ts";
import { formatIndexMatrix, type IndexMatrix } from "./index-matrix.ts";
import type { IntensityStatistics } from "./intensity-statistics.ts";
import type { TranslationTest } from "./lattice-centring.ts";
import type { ReflectionList } from "./reflection-list.ts";

/** Agreement of equivalents in one of the Laue classes that the lattice allows. */
export interface LaueAnswer {
  readonly laueClass: GroupProperties["laueClass"];
  readonly rInt: number | null;
  readonly rWorst: number | null;
  readonly compared: number;
  readonly accepted: boolean;
  readonly chosen: boolean;
}

/**
 * `violated`: a condition at least is violated; `met`: some are met, and of the others the list holds nothing that they
 * forbid; `not tested`: it holds nothing that any condition forbids; `undecided`: the values are too uncertain;
 * `no conditions`: the group has none; `no group`: none is declared.
 */
export type AbsencesVerdict = "met" | "violated" | "undecided" | "not tested" | "no conditions" | "no group";

export interface AbsencesAnswer {
  readonly reflections: {
    readonly source: string;
    readonly quantity: string;
    readonly quantityFrom: string;
    readonly listed: number;
    readonly used: number;
    /** Merged in the Laue class chosen. */
    readonly unique: number;
    /** Whether uncertainties are in the list, or taken as a share of the mean intensity. */
    readonly uncertainties: "listed" | "assumed";
    /** Indices used = matrix times those listed, row by row as `l,k,-h-l`; null as listed. */
    readonly matrix: string | null;
    readonly matrixSource: string | null;
    readonly matrixWhy: string;
  };
  readonly verdict: AbsencesVerdict;
  /** General conditions of the declared group. */
  readonly conditions: readonly ConditionTest[];
  /** Forbidden reflections of the declared group in the list, and those above VIOLATION_SIGMA. */
  readonly tested: { readonly reflections: number; readonly absent: number; readonly violations: number };
  /** The strongest, by value over uncertainty. */
  readonly violations: readonly ForbiddenReflection[];
  /** Merging R in the Laue class of the declared group. */
  readonly rInt: number | null;
  /** Laue class of the declared group; null without one. */
  readonly declaredLaueClass: GroupProperties["laueClass"] | null;
  readonly centring: {
    readonly letter: string | null;
    readonly translations: readonly string[];
    readonly tests: readonly TranslationTest[];
  };
  readonly laueClasses: readonly LaueAnswer[];
  /** Limit for rWorst, and what equivalents differ by in any case. */
  readonly laueLimit: number;
  readonly rBase: number;
  readonly statistics: IntensityStatistics;
  /** Conditions that other elements possible in the Laue class would bring about, in the cell of the candidates. */
  readonly possible: readonly ConditionTest[];
  /** Cell of the candidates: (a, b, c) = (a, b, c) of the structure times P. */
  readonly candidateCell: { readonly P: string; readonly cell: CellNumbers };
  readonly extinctionSymbol: string;
  readonly candidates: readonly CandidateAnswer[];
}

export interface AbsencesQuestion {
  readonly list: ReflectionList;
  /** Found in the file; one of them is used if it fits better. */
  readonly matrices: readonly IndexMatrix[];
  /** Given by the user; used in any case. */
  readonly matrix: IndexMatrix | null;
  readonly metric: Metric;
  readonly declared: IdentifiedGroup | null;
  /** Deviation up to which the lattice is taken to have a symmetry, degrees; default LATTICE_TOLERANCE. */
  readonly angleTolerance?: number;
}

/** Violations listed. */
const SHOWN_VIOLATIONS = 20;

/**
 * Absences against the declared group, agreement of equivalents, and the space groups that fit.
 * @throws InputProblem `cell-too-skew`
 */
export function absencesAnswer(question: AbsencesQuestion): AbsencesAnswer {
  const { list, metric, declared, angleTolerance = LATTICE_TOLERANCE } = question;
  const group = declared?.group ?? null;
  const indexed = question.matrix
    ? { ...indexedBy(list, question.matrix, metric, group), why: "given" }
    : chooseIndexing(list, question.matrices, metric, group);
  const fitting = fittingGroups(indexed.families, metric, angleTolerance);
  const { centring, laue, cell, observations, statistics, groups } = fitting;
  const forbidden = group ? forbiddenReflections(group, indexed.observations) : [];
  const violations = forbidden.filter((r) => r.value > VIOLATION_SIGMA * r.sigma);
  const own = fitting.metric.cell;
  return {
    reflections: reflectionsAnswer(list, indexed, observations.length),
    verdict: declared ? verdictOf(indexed.conditions) : "no group",
    conditions: indexed.conditions,
    tested: { reflections: indexed.observations.length, absent: forbidden.length, violations: violations.length },
    violations: violations.slice(0, SHOWN_VIOLATIONS),
    rInt: indexed.rInt,
    declaredLaueClass: declared ? groupProperties(declared.number).laueClass : null,
    centring: {
      letter: centringLetter(centring.centrings),
      translations: centring.centrings.map(formatVector),
      tests: centring.tests,
    },
    laueClasses: laue.groups.map((g) => ({
      laueClass: g.laueClass,
      rInt: g.rInt,
      rWorst: g.rWorst,
      compared: g.compared,
      accepted: g.accepted,
      chosen: g === laue.chosen,
    })),
    laueLimit: laue.limit,
    rBase: laue.rBase,
    statistics,
    possible: possibleConditions(fitting),
    candidateCell: { P: formatBasis(cell.P), cell: [own.a, own.b, own.c, own.alpha, own.beta, own.gamma] },
    extinctionSymbol: groups[0]!.extinctionSymbol,
    candidates: candidatesOf(groups, declared, formatBasis(cell.P) === "a,b,c"),
  };
}

function reflectionsAnswer(list: ReflectionList, indexed: IndexedList, unique: number): AbsencesAnswer["reflections"] {
  const { matrix, why, used } = indexed;
  return {
    source: list.source,
    quantity: list.quantity,
    quantityFrom: list.quantityFrom,
    listed: list.reflections.length,
    used,
    unique,
    uncertainties: list.reflections.some((r) => r.sigma !== null && r.sigma > 0) ? "listed" : "assumed",
    matrix: matrix ? formatIndexMatrix(matrix.M) : null,
    matrixSource: matrix?.source ?? null,
    matrixWhy: why,
  };
}

function verdictOf(conditions: readonly ConditionTest[]): AbsencesVerdict {
  const verdicts = conditions.filter((c) => !c.implied).map((c) => c.verdict);
  if (verdicts.length === 0) return "no conditions";
  if (verdicts.includes("violated")) return "violated";
  if (verdicts.includes("undecided")) return "undecided";
  return verdicts.includes("met") ? "met" : "not tested";
}

/** Conditions of zones and rows that some group of the Laue class has, each once. */
function possibleConditions({ cell, observations }: FittingGroups): ConditionTest[] {
  const found = new Map<string, ConditionTest>();
  for (const { groups } of cell.extinctions) {
    const { group } = groups[0]!;
    for (const condition of independentConditions(reflectionConditions(group))) {
      const key = `${condition.reflections}: ${condition.condition}`;
      if (condition.stratum.basis.length === 3 || found.has(key)) continue;
      const [element = ""] = condition.cause.split(":");
      found.set(key, { ...testCondition(condition, group, observations), cause: element });
    }
  }
  return [...found.values()].sort((a, b) =>
    a.reflections < b.reflections ? -1 : a.reflections > b.reflections ? 1 : 0,
  );
}
