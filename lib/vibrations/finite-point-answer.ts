import { gcd } from "../algebra/index.ts";
import {
  formatRoot,
  type MolecularGroup,
  type PointGroup,
  type PointGroupTable,
  pointGroupTable,
} from "../representation/index.ts";
import { activities } from "./activity.ts";
import { axesInPlanes, planeNaming } from "./plane-naming.ts";
import { type PointTensorsAnswer, tensorsAnswer } from "./point-tensors.ts";
import { type ProductAnswer, productAnswer } from "./species-product.ts";
import { internationalSymbol, type SubgroupAnswer, subgroupAnswers } from "./subgroup-answer.ts";

export interface PointClassAnswer {
  /** With the number of members: `2C3`, `3sigma_d`. */
  readonly name: string;
  /** Null for the endless classes of linear groups. */
  readonly size: number | null;
  /** Axes, and normals of planes. */
  readonly directions: readonly string[];
  /** Of planes through the principal axis: the classes of lateral twofold axes that lie in them. */
  readonly containsAxes: readonly string[];
}

export interface PointSpeciesAnswer {
  readonly label: string;
  readonly dimension: number;
  /** A pair of complex conjugate representations taken as one species, since time reversal joins them. */
  readonly complexPair: boolean;
  /** One per class: a number, or a text with phi for linear groups. */
  readonly characters: readonly (number | string)[];
  readonly vectors: readonly string[];
  readonly rotations: readonly string[];
  readonly quadratics: readonly string[];
  readonly infrared: boolean;
  readonly raman: boolean;
  readonly hyperRaman: boolean;
  readonly hyperRamanGeneral: boolean;
}

export interface PointAnswer {
  readonly schoenflies: string;
  /** Null for groups that no crystal has. */
  readonly hermannMauguin: string | null;
  /** Null for the infinite linear groups. */
  readonly order: number | null;
  /** The Cartesian frame of functions and tensors. */
  readonly frame: string;
  /** Directions that the labels refer to; empty where the frame says it all. */
  readonly axes: string;
  readonly classes: readonly PointClassAnswer[];
  /**
   * Whose names of sigma_v and sigma_d these are, where crystals and molecules have them the other way round; else null.
   * The labels of the species agree.
   */
  readonly planeNaming: "crystal" | "molecule" | null;
  readonly species: readonly PointSpeciesAnswer[];
  /** Closed forms of characters that are not whole: `sqrt2`, `2cos(2pi/5)`. */
  readonly closedForms: readonly { readonly value: number; readonly text: string }[];
  /** Null where they were not asked for. */
  readonly tensors: PointTensorsAnswer | null;
  readonly products: readonly ProductAnswer[];
  readonly subgroups: readonly SubgroupAnswer[];
}

export interface PointOptions {
  readonly tensors?: boolean;
  /** Direct products, as `E x E`. */
  readonly products?: readonly string[];
  /** Subgroups to correlate with, by name; `all` for every one. */
  readonly subgroups?: readonly string[];
}

/** The answer on a finite group. @throws InputProblem for a name, product or subgroup that there is not */
export function finitePointAnswer(name: string, options: PointOptions): PointAnswer {
  const table = pointGroupTable(name);
  const { group } = table;
  return {
    schoenflies: group.schoenflies,
    hermannMauguin: internationalSymbol(group),
    order: group.order,
    frame: table.frame,
    axes: group.axes.text,
    classes: group.classes.map((c) => {
      const { name: text, size, directions } = c;
      return { name: text, size, directions, containsAxes: axesInPlanes(group, c) };
    }),
    planeNaming: internationalSymbol(group) === null ? null : planeNaming(group),
    species: speciesAnswers(table),
    closedForms: closedForms(group),
    tensors: options.tensors ? tensorsAnswer(table) : null,
    products: (options.products ?? []).map((text) => productAnswer(group, text)),
    subgroups: (options.subgroups ?? []).flatMap((text) => subgroupAnswers(group, text)),
  };
}

function speciesAnswers({ group, functions }: PointGroupTable): PointSpeciesAnswer[] {
  const activity = activities(group);
  return group.irreps.map(({ label, dimension, norm, characters }, i) => ({
    label,
    dimension,
    complexPair: norm === 2,
    characters,
    ...functions[i]!,
    ...activity[i]!,
  }));
}

/** Closed forms of the characters that are not whole, one for each value. */
function closedForms(group: PointGroup | MolecularGroup): PointAnswer["closedForms"] {
  const forms = new Map<string, number>();
  for (const value of group.irreps.flatMap((r) => r.characters)) {
    if (!Number.isInteger(value)) forms.set(closedCharacter(value, group.order), value);
  }
  return [...forms].map(([text, value]) => ({ value, text })).sort((a, b) => b.value - a.value);
}

/** A root of an integer, or else 2 cos(2 pi k / n), where n is at most the order of the group. */
function closedCharacter(value: number, order: number): string {
  const square = Math.round(value * value);
  if (Math.abs(square - value * value) < 1e-9) return formatRoot(Math.sign(value) * square);
  for (let n = 3; n <= order; n++) {
    for (let k = 1; 2 * k < n; k++) {
      if (Math.abs(2 * Math.cos((2 * Math.PI * k) / n) - value) > 1e-9) continue;
      const g = gcd(2 * k, n);
      return `2cos(${2 * k === g ? "" : (2 * k) / g}pi/${n / g})`;
    }
  }
  throw new RangeError(`the character ${value} is no sum of two conjugate roots of unity`);
}
