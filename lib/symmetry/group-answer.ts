import {
  addVectors,
  IDENTITY,
  RAT_IDENTITY,
  type RatVec3,
  ratMat3,
  subtractVectors,
  transformVector,
} from "../algebra/index.ts";
import { pointGroup } from "../representation/index.ts";
import {
  type AffineForm,
  directionsOfForm,
  formatForm,
  formFromSetting,
  formThrough,
  imageOfForm,
  isFixedBy,
} from "./affine-form.ts";
import { letterExchanges } from "./euclidean-normaliser.ts";
import { extendedSymbol } from "./extended-symbol.ts";
import { geometricMeaning } from "./geometric-meaning.ts";
import { type GroupProperties, groupProperties } from "./group-properties.ts";
import { type Operation, reduce } from "./operation.ts";
import { formatOperation } from "./operation-text.ts";
import { plainestForm } from "./plainest-form.ts";
import { reflectionConditions } from "./reflection-conditions.ts";
import { assignWyckoff } from "./site-assignment.ts";
import { type SpaceGroup, spaceGroup } from "./space-group.ts";
import { specialConditions } from "./special-reflection-conditions.ts";
import { conventionalSetting, type IdentifiedGroup, type SpaceGroupSummary } from "./summary.ts";
import { transformOperation } from "./transformation.ts";
import { formatTransformation } from "./transformation-text.ts";
import { wyckoffPositions } from "./wyckoff-positions.ts";

export interface OperationAnswer {
  readonly xyz: string;
  /** As International Tables print it: `2(0,0,1/2) 0,1/4,z`. */
  readonly meaning: string;
}

export interface ConditionAnswer {
  readonly reflections: string;
  readonly condition: string;
  readonly cause: string;
  /** Follows from the conditions on wider classes of reflections. */
  readonly implied: boolean;
}

export interface WyckoffAnswer {
  readonly letter: string;
  /** Points in the cell in use. */
  readonly multiplicity: number;
  readonly siteSymmetry: string;
  readonly schoenflies: string;
  /** Modulo the centring translations. */
  readonly coordinates: readonly string[];
  /** Extra conditions on the contribution of this position, `hkl: h+k=2n`. */
  readonly conditions: readonly string[];
}

/** A change of the reference setting under which the group looks the same, and what becomes of the letters. */
export interface LetterExchange {
  /** `a,b,c;0,0,1/2`: new axes, then the new origin. */
  readonly change: string;
  /** New letter by old one, those that change. */
  readonly letters: Readonly<Record<string, string>>;
  /** False where only a cell of special shape allows it. */
  readonly anyCell: boolean;
}

/** A space group in one setting: what `group` prints. */
export interface GroupAnswer {
  readonly spaceGroup: Omit<SpaceGroupSummary, "operations"> &
    Omit<GroupProperties, "number" | "geometricClass"> & {
      readonly symbols: { readonly short: string; readonly full: string; readonly extended: string } | null;
      readonly operations: readonly string[];
      readonly conditions: readonly ConditionAnswer[];
      readonly wyckoff: readonly WyckoffAnswer[];
    };
  /** The representatives modulo the centring translations, in their order. */
  readonly meanings: readonly OperationAnswer[];
  /** Other choices of origin or axes of the reference setting that leave the operations alone but exchange letters. */
  readonly letterExchanges: readonly LetterExchange[];
}

/**
 * Operations with their meaning, reflection conditions and Wyckoff positions of a group in the setting in use.
 * @example
 * ```ts
 * const { spaceGroup } = groupAnswer(identifyGroup(namedGroup("P 21/c").settings[0].group));
 * spaceGroup.hall; // "-P 2ybc"
 * spaceGroup.wyckoff.map((w) => `${w.multiplicity}${w.letter}`); // ["2a", "2b", "2c", "2d", "4e"]
 * spaceGroup.conditions.filter((c) => !c.implied).map((c) => `${c.reflections}: ${c.condition}`); // ["h0l: l=2n", "0k0: k=2n"]
 * ```
 */
export function groupAnswer(identified: IdentifiedGroup): GroupAnswer {
  const { group, number, summary } = identified;
  const setting = conventionalSetting(identified);
  const { number: _number, geometricClass: _class, ...properties } = groupProperties(number, group.operations);
  const symbols = setting && {
    short: setting.hermannMauguin.short,
    full: setting.hermannMauguin.full,
    extended: extendedSymbol(setting),
  };
  const conditions = reflectionConditions(group).map(({ reflections, condition, cause, implied }) => ({
    reflections,
    condition,
    cause,
    implied,
  }));
  return {
    spaceGroup: { ...summary, ...properties, symbols, conditions, wyckoff: wyckoffAnswers(identified) },
    meanings: group.representatives.map((a) => ({ xyz: formatOperation(a), meaning: geometricMeaning(a).text })),
    letterExchanges: letterExchanges(number).map(({ transformation, letters, anyCell }) => ({
      change: formatTransformation(transformation),
      letters: Object.fromEntries(Object.entries(letters).filter(([from, to]) => from !== to)),
      anyCell,
    })),
  };
}

function wyckoffAnswers(identified: IdentifiedGroup): WyckoffAnswer[] {
  const { group, number, toReference, isReference: reference } = identified;
  const centred = atReferenceOrigin(identified);
  return wyckoffPositions(number).map((position) => {
    const form = reference ? position.form : plainestForm(group, formFromSetting(position.form, toReference));
    const site = fixingOperations(group, form);
    return {
      letter: position.letter,
      multiplicity: group.operations.length / position.order,
      siteSymmetry: assignWyckoff(identified, site).siteSymmetry,
      schoenflies: pointGroup(site.map((a) => a.W)).schoenflies,
      coordinates: reference ? position.coordinates : coordinatesIn(group, form),
      conditions: specialConditions(centred.group, shifted(form, centred.origin)).map(
        (c) => `${c.reflections}: ${c.condition}`,
      ),
    };
  });
}

/**
 * The group in the same axes with the origin of its reference setting. Conditions do not depend on the origin, but an odd
 * one (333/2000) makes them costly, since they are worked out modulo all denominators.
 */
function atReferenceOrigin({ group, toReference }: IdentifiedGroup): { group: SpaceGroup; origin: RatVec3 } {
  const change = { P: RAT_IDENTITY, p: toReference.p };
  const operations = group.operations.map((a) => reduce(transformOperation(a, change)!));
  return { group: spaceGroup(operations), origin: toReference.p };
}

/** Seen from another origin, constants along free coordinates taken out. */
function shifted(form: AffineForm, origin: RatVec3): AffineForm {
  return formThrough(subtractVectors(form.t, origin), directionsOfForm(form));
}

/** The operations that fix every point of a form, their translations such that they do so as they stand. */
function fixingOperations(group: SpaceGroup, form: AffineForm): Operation[] {
  return group.operations.flatMap((a) => {
    if (!isFixedBy(a, form)) return [];
    const image = addVectors(transformVector(ratMat3(a.W), form.t), a.w);
    return [{ W: a.W, w: addVectors(a.w, subtractVectors(form.t, image)) }];
  });
}

/** Images under the representatives in their order, each once modulo the centring translations. */
function coordinatesIn(group: SpaceGroup, form: AffineForm): string[] {
  const seen = new Set<string>();
  const found: string[] = [];
  for (const a of group.representatives) {
    const image = imageOfForm(a, form);
    const text = formatForm(image);
    if (seen.has(text)) continue;
    found.push(text);
    for (const t of group.centrings) seen.add(formatForm(imageOfForm({ W: IDENTITY, w: t }, image)));
  }
  return found;
}
