import { determinant, equal, equalVectors, IDENTITY, MINUS_IDENTITY, ZERO_VECTOR } from "../algebra/index.ts";
import { type CrystalClass, type CrystalSystem, crystalClasses } from "../representation/index.ts";
import { arithmeticClassOf } from "./arithmetic-class.ts";
import { hallSymbolBy } from "./hall-symbol-of.ts";
import { directionSystem, formatSymbol, shortSymbol, splitSymbol } from "./hermann-mauguin-symbol.ts";
import { identify } from "./identification.ts";
import { type LabelFrames, ownFrame, referenceFrame } from "./label-frame.ts";
import { matchingSetting } from "./matching-setting.ts";
import { formatOperation } from "./operation-text.ts";
import { type Setting, settingsOf } from "./settings.ts";
import { rotationParts, type SpaceGroup } from "./space-group.ts";
import { spaceGroupType } from "./space-group-type.ts";
import type { Transformation } from "./transformation.ts";
import { formatBasis, formatVector } from "./transformation-text.ts";

/** What every answer says of the space group, in the setting of the file; field names by the JSON contract. */
export interface SpaceGroupSummary {
  readonly number: number;
  /** Short symbol of the setting in use; of the reference setting where the one in use has none. */
  readonly hermannMauguin: string;
  readonly hall: string;
  readonly schoenflies: string;
  readonly crystalSystem: CrystalSystem;
  readonly pointGroup: { readonly hermannMauguin: string; readonly schoenflies: string };
  /** Name of a conventional setting, `reference`, or `unconventional`. */
  readonly settingName: string;
  /** Symbol of the reference setting. */
  readonly referenceSymbol: string;
  /** (a,b,c) reference = (a,b,c) of the file times P, x = P x(reference) + p. */
  readonly toReference: { readonly P: string; readonly p: string };
  readonly operations: readonly string[];
  readonly centrings: readonly string[];
  readonly centrosymmetric: boolean;
  readonly sohncke: boolean;
}

/** A group with its type, the way to the reference setting, and the frames of its labels. */
export interface IdentifiedGroup {
  readonly group: SpaceGroup;
  readonly number: number;
  /** Written exactly as the reference setting. */
  readonly isReference: boolean;
  readonly summary: SpaceGroupSummary;
  readonly toReference: Transformation;
  readonly frames: LabelFrames;
}

/**
 * Identifies a group and sums up what is known of it. Settings are made only for a group that is not in its reference
 * setting, since that costs more than all the rest.
 * @param guess a type to try first, such as the number that the file states
 * @throws InputProblem `operations-no-space-group`
 */
export function identifyGroup(group: SpaceGroup, guess: number | null = null): IdentifiedGroup {
  const { number, transformation } = identify(group.operations, guess);
  const isReference = isIdentity(transformation);
  const setting = isReference ? null : matchingSetting(number, group);
  // of the many ways to the reference setting, letters of positions follow the one that defines the setting
  const toReference = setting?.toReference ?? transformation;
  const rotations = rotationParts(group);
  const crystalClass = classOfType(number);
  const frames: LabelFrames = {
    own: ownFrame(group, crystalClass.crystalSystem, toReference),
    reference: referenceFrame(toReference),
  };
  const summary: SpaceGroupSummary = {
    number,
    ...namesIn(number, setting, isReference),
    hall: hallSymbolBy(group.operations, number, toReference),
    schoenflies: spaceGroupType(number).schoenflies,
    crystalSystem: crystalClass.crystalSystem,
    pointGroup: { hermannMauguin: crystalClass.hermannMauguin, schoenflies: crystalClass.schoenflies },
    toReference: { P: formatBasis(toReference.P), p: formatVector(toReference.p) },
    operations: group.operations.map(formatOperation),
    centrings: group.centrings.map(formatVector),
    centrosymmetric: rotations.some((W) => equal(W, MINUS_IDENTITY)),
    sohncke: rotations.every((W) => determinant(W) === 1),
  };
  return { group, number, isReference, summary, toReference, frames };
}

/** The conventional setting in which a group is written, or null if it is in none. */
export function conventionalSetting({ group, number, isReference }: IdentifiedGroup): Setting | null {
  return isReference ? settingsOf(number)[0]! : matchingSetting(number, group);
}

function isIdentity({ P, p }: Transformation): boolean {
  return P.d === 1 && equal(P.n, IDENTITY) && equalVectors(p, ZERO_VECTOR);
}

function namesIn(number: number, setting: Setting | null, isReference: boolean) {
  const type = spaceGroupType(number);
  const short = formatSymbol(shortSymbol(splitSymbol(type.fullHermannMauguin), directionSystem(number)));
  return {
    hermannMauguin: setting?.hermannMauguin.short ?? short,
    settingName: isReference || setting?.reference ? "reference" : (setting?.name ?? "unconventional"),
    referenceSymbol: short,
  };
}

function classOfType(number: number): CrystalClass {
  const { geometric } = arithmeticClassOf(number);
  for (const found of crystalClasses().values()) if (found.hermannMauguin === geometric) return found;
  throw new RangeError(`no crystal class ${geometric}`);
}
