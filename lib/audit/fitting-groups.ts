import {
  equal,
  IDENTITY,
  type IntMat3,
  type IntVec3,
  inverseRatMat,
  MINUS_IDENTITY,
  negate,
  ZERO_VECTOR,
} from "../algebra/index.ts";
import type { Metric } from "../structure/index.ts";
import { isSystematicallyAbsent, rotationParts, type Setting, type SpaceGroup } from "../symmetry/index.ts";
import { presenceEvidence, STRONG_EVIDENCE } from "./absence-likelihood.ts";
import { type CandidateCell, candidateCell, familiesIn, metricIn } from "./candidate-cell.ts";
import { centricityEvidence, type IntensityStatistics, intensityStatistics } from "./intensity-statistics.ts";
import { type FoundCentring, isForbidden, latticeCentring } from "./lattice-centring.ts";
import { type LaueTests, testLaueGroups } from "./laue-groups.ts";
import type { Family } from "./merge-reflections.ts";
import { keepsReflection, type Observation, observe } from "./observations.ts";
import { omissionEvidence, specialClasses } from "./omissions.ts";
import { type ReducedLattice, reducedLattice, rotationsIn } from "./reduced-lattice.ts";
import { classEvidence } from "./zone-statistics.ts";

/** A space group that may be the one of the crystal; all evidence as natural logarithms of odds, larger is better. */
export interface FittingGroup {
  readonly setting: Setting;
  readonly group: SpaceGroup;
  readonly extinctionSymbol: string;
  /** For its absences, against a group without any: from the reflections it forbids, and from gaps of the list. */
  readonly absenceEvidence: number;
  /** For its crystal class from the special reflections, against the best one with the same absences; at least -STRONG_EVIDENCE. */
  readonly classEvidence: number;
  /** For its having or lacking an inversion centre, from |E^2 - 1|; 0 or negative. */
  readonly centricityEvidence: number;
  /** The three together, less those of the best. */
  readonly evidence: number;
}

/** What cell and reflections alone tell of the space group. */
export interface FittingGroups {
  readonly centring: FoundCentring;
  readonly lattice: ReducedLattice;
  readonly laue: LaueTests;
  readonly cell: CandidateCell;
  readonly metric: Metric;
  /** Merged in the Laue class chosen, in the candidate cell. */
  readonly observations: readonly Observation[];
  readonly statistics: IntensityStatistics;
  /** Those with the same absences together, the best first. */
  readonly groups: readonly FittingGroup[];
}

const TRICLINIC: readonly IntMat3[] = [IDENTITY];

/**
 * Lattice centring, Laue class and space groups from the cell and the reflections alone.
 * @param angleTolerance deviation up to which the lattice is taken to have a symmetry, degrees
 * @throws InputProblem `cell-too-skew`
 */
export function fittingGroups(families: readonly Family[], metric: Metric, angleTolerance: number): FittingGroups {
  const centring = latticeCentring(generalReflections(families, metric, angleTolerance));
  const allowed = families.filter((f) => !centring.centrings.some((t) => isForbidden(t, f.h)));
  const lattice = reducedLattice(metric, centring.centrings, angleTolerance);
  const laue = testLaueGroups(familiesIn(allowed, lattice.basis), lattice.rotations);
  const cell = candidateCell(lattice, centring.centrings, laue.chosen);
  const own = metricIn(metric, cell.P);
  const observations = observe(familiesIn(allowed, cell.P), own, cell.rotations, () => false);
  const statistics = intensityStatistics(observations);
  const groups = ordered(cell, observations, own, statistics);
  return { centring, lattice, laue, cell, metric: own, observations, statistics, groups };
}

/** Fewer reflections in general position than this are not relied upon. */
const FEWEST_GENERAL = 50;

/**
 * The reflections that no symmetry of the lattice keeps, since glide planes and screw axes do not touch them; all
 * reflections where these are few.
 */
function generalReflections(families: readonly Family[], metric: Metric, angleTolerance: number): Observation[] {
  const { basis, rotations } = reducedLattice(metric, [ZERO_VECTOR], angleTolerance);
  const inCell = rotationsIn(inverseRatMat(basis), rotations) ?? TRICLINIC;
  const keeping = [...inCell, ...inCell.map(negate)].filter((W) => !equal(W, IDENTITY));
  const all = observe(families, metric, TRICLINIC, () => false);
  const general = all.filter((r) => !keeping.some((W) => keepsReflection(W, r.h)));
  return general.length >= FEWEST_GENERAL ? general : all;
}

function ordered(
  cell: CandidateCell,
  observations: readonly Observation[],
  metric: Metric,
  statistics: IntensityStatistics,
): FittingGroup[] {
  const special = observations.filter((r) => r.special);
  const classes = specialClasses(observations, metric, cell.rotations, cell.centrings);
  const bySymbol = cell.extinctions.map((extinction) => {
    const { symbol, forbidden, groups } = extinction;
    const operations = groups[0]!.group.representatives;
    const isAbsent = (h: IntVec3) => isSystematicallyAbsent(operations, h);
    const gone = special.filter((r) => isAbsent(r.h));
    const present = special.filter((r) => !isAbsent(r.h));
    const against = gone.reduce((sum, r) => sum + presenceEvidence(r.value, r.sigma, r.mean), 0);
    const absenceEvidence = omissionEvidence(classes, isAbsent) - against;
    const ofClass = groups.map(({ group }) => classEvidence(present, rotationParts(group)));
    const bestClass = Math.max(...ofClass);
    const members = groups.map(({ setting, group }, i) => {
      const ofZones = Math.max(-STRONG_EVIDENCE, ofClass[i]! - bestClass);
      const ofCentre = centricityEvidence(statistics, isCentrosymmetric(group));
      const evidence = absenceEvidence + ofZones + ofCentre;
      const parts = { absenceEvidence, classEvidence: ofZones, centricityEvidence: ofCentre };
      return { setting, group, extinctionSymbol: symbol, ...parts, evidence };
    });
    members.sort((a, b) => b.evidence - a.evidence || a.setting.number - b.setting.number);
    return { forbidden, members, evidence: members[0]!.evidence };
  });
  // equal evidence: what forbids less claims less
  bySymbol.sort((a, b) => b.evidence - a.evidence || a.forbidden - b.forbidden);
  const best = bySymbol[0]!.evidence;
  return bySymbol.flatMap((s) => s.members.map((m) => ({ ...m, evidence: m.evidence - best })));
}

export function isCentrosymmetric(group: SpaceGroup): boolean {
  return rotationParts(group).some((W) => equal(W, MINUS_IDENTITY));
}
