import {
  type BondChoice,
  type BondOptions,
  type Crystal,
  type ExtendedUnit,
  type MolecularUnit,
  molecularSymmetry,
  molecularUnits,
} from "../structure/index.ts";
import { assignWyckoff } from "../symmetry/index.ts";
import { activities } from "./activity.ts";
import { factorGroupModes } from "./factor-group.ts";
import { countsOf, type SpeciesCounts } from "./species-counts.ts";
import { addAll, type SplitSums, siteContributions, sumUp } from "./split-sums.ts";
import { type UnitAnswer, unitAnswer } from "./unit-answer.ts";
import { correlateUnit } from "./unit-correlation.ts";
import { placeOccupancies } from "./vibrating-sites.ts";

export interface LoneAtomAnswer {
  readonly label: string;
  readonly element: string;
  readonly count: number;
  readonly siteSymmetry: string;
  readonly factorGroup: SpeciesCounts;
}

export interface ExtendedAnswer {
  readonly kind: ExtendedUnit["kind"];
  readonly formula: string;
  readonly count: number;
  readonly labels: readonly string[];
  readonly direction: string | null;
  readonly factorGroup: SpeciesCounts;
}

export interface SplitAnswer {
  readonly factorGroup: { readonly hermannMauguin: string; readonly schoenflies: string; readonly axes: string };
  readonly labelAxes: "file" | "reference";
  /** Activity of the species of the factor group. */
  readonly activity: readonly { readonly label: string; readonly infrared: boolean; readonly raman: boolean }[];
  readonly bonds: BondChoice;
  readonly units: readonly UnitAnswer[];
  readonly loneAtoms: readonly LoneAtomAnswer[];
  readonly extended: readonly ExtendedAnswer[];
  readonly sums: SplitSums;
  readonly unitNotes: readonly string[];
}

export interface SplitOptions {
  readonly bonds?: BondOptions;
  /** Largest distance of an atom from its place in the idealised unit, angstrom; by default it depends on the unit. */
  readonly shapeTolerance?: number;
  /** Group to be taken for the units of a formula, below the one found: SO4 -> C2v. */
  readonly lower?: ReadonlyMap<string, string>;
}

/**
 * Internal modes, librations and translations of every unit of a crystal, from the free unit through its site to the
 * factor group.
 * @throws InputProblem for options that do not fit the crystal
 * @throws RangeError if the sum over units differs from the atom-by-atom result: a defect of this program
 * @example
 * ```ts
 * const nitratine = composedCrystal(parseSiteTable("group R -3 c\ncell a=5.07 c=16.82\nNa 6b\nN 6a\nO 18e x=0.245"));
 * const [nitrate] = splitAnswer(nitratine).units;
 * nitrate!.formula; // "NO3"
 * nitrate!.internal.map((m) => m.name); // ["nu1", "nu3", "nu4", "nu2"]
 * ```
 */
export function splitAnswer(crystal: Crystal, options: SplitOptions = {}): SplitAnswer {
  const { frames } = crystal.identified;
  const frame = frames.own ?? frames.reference;
  const modes = factorGroupModes(crystal, frame);
  const analysis = molecularUnits(crystal, options.bonds ?? {});
  const correlated = analysis.units.map((unit) => {
    const symmetry = molecularSymmetry(unit, shapeOptions(unit, options));
    return { unit, symmetry, correlation: correlateUnit(unit, symmetry, modes.group, frame) };
  });
  const occupancies = placeOccupancies(crystal);
  const ofSite = siteContributions(crystal, modes);
  const { sums, notes } = sumUp(crystal, modes, analysis, correlated);
  const named = (numbers: readonly number[]) => countsOf(modes.group.irreps, numbers);
  const activity = activities(modes.group);
  return {
    factorGroup: {
      hermannMauguin: modes.group.hermannMauguin,
      schoenflies: modes.group.schoenflies,
      axes: modes.group.axes.text,
    },
    labelAxes: frames.own ? "file" : "reference",
    activity: modes.group.irreps.map((r, i) => ({
      label: r.label,
      infrared: activity[i]!.infrared,
      raman: activity[i]!.raman,
    })),
    bonds: analysis.choice,
    units: correlated.map((c) => unitAnswer(crystal, modes, c, occupancies)),
    loneAtoms: analysis.loneAtoms.map((atom) => ({
      label: atom.label,
      element: atom.element,
      count: atom.count,
      siteSymmetry: siteSymbol(crystal, atom.site),
      factorGroup: named(ofSite(atom.site)),
    })),
    extended: analysis.extended.map((e) => ({
      kind: e.kind,
      formula: e.formula,
      count: e.count,
      labels: e.labels,
      direction: directionText(e),
      factorGroup: named(addAll(modes, e.sites.map(ofSite))),
    })),
    sums,
    unitNotes: [...analysis.notes, ...notes],
  };
}

function shapeOptions(unit: MolecularUnit, options: SplitOptions) {
  const lowerTo = options.lower?.get(unit.formula);
  return {
    ...(options.shapeTolerance === undefined ? {} : { tolerance: options.shapeTolerance }),
    ...(lowerTo === undefined ? {} : { lowerTo }),
  };
}

function siteSymbol(crystal: Crystal, site: number): string {
  return assignWyckoff(crystal.identified, crystal.sites[site]!.symmetry.operations).siteSymmetry;
}

function directionText({ direction, kind }: ExtendedUnit): string | null {
  if (direction === null) return null;
  const inner = direction.join(direction.some((i) => Math.abs(i) > 9) ? " " : "");
  return kind === "chain" ? `[${inner}]` : `(${inner})`;
}
