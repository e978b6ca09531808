import { determinant, equal, MINUS_IDENTITY } from "../algebra/index.ts";
import { type CrystalSystem, pointGroup } from "../representation/index.ts";
import { hallSymbolBy } from "./hall-symbol-of.ts";
import { identify } from "./identification.ts";
import { type LabelFrames, ownFrame, referenceFrame } from "./label-frame.ts";
import { matchingSetting } from "./matching-setting.ts";
import { formatOperation } from "./operation-text.ts";
import type { Setting } from "./settings.ts";
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
  /** The conventional setting that the group is written in, null for none. */
  readonly setting: Setting | null;
  readonly summary: SpaceGroupSummary;
  readonly toReference: Transformation;
  readonly frames: LabelFrames;
}

/**
 * Identifies a group and sums up what is known of it.
 * @throws InputProblem `operations-no-space-group`
 */
export function identifyGroup(group: SpaceGroup): IdentifiedGroup {
  const { number, transformation } = identify(group.operations);
  const type = spaceGroupType(number);
  const setting = matchingSetting(number, group);
  const toReference = setting?.reference ? setting.toReference : transformation;
  const rotations = rotationParts(group);
  const reference = referenceFrame(toReference);
  const point = pointGroup(rotations, reference);
  const frames: LabelFrames = { own: ownFrame(group, point.crystalSystem, toReference), reference };
  const summary: SpaceGroupSummary = {
    number,
    hermannMauguin: setting?.hermannMauguin.short ?? type.hermannMauguin,
    hall: hallSymbolBy(group.operations, number, toReference),
    schoenflies: type.schoenflies,
    crystalSystem: point.crystalSystem,
    pointGroup: { hermannMauguin: point.crystalClass, schoenflies: point.schoenflies },
    settingName: setting ? (setting.reference ? "reference" : setting.name) : "unconventional",
    referenceSymbol: type.hermannMauguin,
    toReference: { P: formatBasis(toReference.P), p: formatVector(toReference.p) },
    operations: group.operations.map(formatOperation),
    centrings: group.centrings.map(formatVector),
    centrosymmetric: rotations.some((W) => equal(W, MINUS_IDENTITY)),
    sohncke: rotations.every((W) => determinant(W) === 1),
  };
  return { group, number, setting, summary, toReference, frames };
}
