import { inverseRatMat, type RatVec3, ratVec3 } from "../algebra/index.ts";
import { chain, type Transformation } from "../symmetry/index.ts";
import { floatMatrix } from "./atom-set.ts";
import type { AtomSite } from "./atom-site.ts";
import { carriedAtom } from "./carried-atom.ts";
import { apply3, type Vec3 } from "./cell.ts";
import { changeOfCell, metricIn } from "./change-of-cell.ts";
import { type Crystal, crystalOf } from "./crystal.ts";
import { INVERSION, mirroredCrystal } from "./mirrored-crystal.ts";
import { type StandardDescription, standardDescription } from "./standard-description.ts";

/** A crystal in its standard description. */
export interface StandardisedCrystal {
  readonly crystal: Crystal;
  /** For each site of the crystal, its label in the crystal given. */
  readonly origins: readonly string[];
  /** From the cell given, but for the shift: (a', b', c') = (a, b, c) P, x = P x' + p + shift. */
  readonly transformation: Transformation;
  /** Shift of the origin along directions in which the group leaves it free; fractional in the cell given. */
  readonly shift: Vec3;
  readonly description: StandardDescription;
  /** Whether the mirror image is described instead. */
  readonly mirrored: boolean;
}

/**
 * The standard description of a crystal, worked out from the reference setting, see `standardDescription` for the rules.
 * Axes stay right-handed, so a chiral structure keeps its hand, and P 41 stays P 41, unless `eitherHand` is set: then of
 * a structure in a Sohncke group and its mirror image the one with the lower space-group number is described, else the
 * one with the smaller parameter.
 */
export function standardisedCrystal(
  crystal: Crystal,
  options: { readonly eitherHand?: boolean } = {},
): StandardisedCrystal {
  const own = standardise(crystal, false);
  if (!options.eitherHand || !crystal.identified.summary.sohncke) return own;
  const other = standardise(mirroredCrystal(crystal), true);
  const byNumber = other.crystal.identified.number - own.crystal.identified.number;
  if (byNumber !== 0) return byNumber < 0 ? other : own;
  return other.description.gamma < own.description.gamma - SAME_GAMMA ? other : own;
}

/** Parameters that differ by less are equal; dimensionless. */
const SAME_GAMMA = 1e-6;

function standardise(given: Crystal, mirrored: boolean): StandardisedCrystal {
  const { toReference } = given.identified;
  const reference = changeOfCell(given, toReference).crystal;
  const description = standardDescription(reference);
  const change = description.candidate.transformation;
  const start = mirrored ? chain(INVERSION, toReference) : toReference;
  const { P, p } = chain(start, change);
  return {
    crystal: describedCrystal(reference, change, description),
    origins: description.sites.map(({ site }) => reference.sites[site]!.label),
    transformation: { P, p: centred(p) },
    shift: apply3(floatMatrix(start.P), description.shift).map((e) => e + 0) as unknown as Vec3,
    description,
    mirrored,
  };
}

/** Each component moved by whole cells into (-1/2, 1/2]. */
function centred({ n, d }: RatVec3): RatVec3 {
  const at = (i: 0 | 1 | 2) => n[i] - d * Math.ceil(n[i] / d - 0.5);
  return ratVec3([at(0), at(1), at(2)], d);
}

function describedCrystal(reference: Crystal, change: Transformation, { sites }: StandardDescription): Crystal {
  const M = floatMatrix(inverseRatMat(change.P));
  const to = metricIn(reference.metric, change.P);
  const labels = new ElementLabels();
  const list = sites.map(({ site, image, position }): AtomSite => {
    const from = reference.sites[site]!;
    const { W } = reference.group.operations[from.images[image]!.operation]!;
    const carried = carriedAtom(from, position, { W, M, from: reference.metric, to });
    return { ...carried, label: labels.next(from) };
  });
  const { name, group, identified, tolerance } = reference;
  return crystalOf({ name, metric: to, group, identified, sites: list, tolerance });
}

/** Element and a number that counts the sites of that element. */
class ElementLabels {
  private readonly counts = new Map<string, number>();

  next({ element, typeSymbol, label }: AtomSite): string {
    const name = element ?? typeSymbol ?? label;
    const count = (this.counts.get(name) ?? 0) + 1;
    this.counts.set(name, count);
    return `${name}${count}`;
  }
}
