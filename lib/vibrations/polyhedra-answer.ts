import {
  type CoordinationPolyhedron,
  type Crystal,
  coordinationPolyhedra,
  molecularSymmetry,
  type ShellPattern,
} from "../structure/index.ts";
import { assignWyckoff } from "../symmetry/index.ts";
import { type CoordinateKind, type CoordinateSetAnswer, coordinateContent } from "./coordinate-content.ts";
import { crystalScaffold, crystalStars, uniformTranslations } from "./crystal-scaffold.ts";
import { type FactorGroupModes, factorGroupModes } from "./factor-group.ts";
import { countsOf, type SpeciesCounts } from "./species-counts.ts";
import { type UnitContent, unitContent } from "./unit-content.ts";
import { correlateUnit } from "./unit-correlation.ts";

/** A coordination polyhedron as if it stood alone. */
export interface PolyhedronAnswer extends UnitContent {
  /** Label of the centre. */
  readonly label: string;
  readonly formula: string;
  /** In the primitive cell. */
  readonly count: number;
  /** Distances from the centre, angstrom. */
  readonly shortest: number;
  readonly longest: number;
  readonly pointGroup: string;
  /** Distance of the atoms from the ideal polyhedron, angstrom. */
  readonly deviation: { readonly largest: number; readonly mean: number };
  readonly siteSymmetry: string;
  readonly schoenflies: string;
}

/** All coordinates of a kind in the crystal, and how many of its optic modes they describe. */
export interface PolyhedraKind {
  readonly kind: CoordinateKind;
  readonly all: SpeciesCounts;
  /** Independent of each other, of the kinds before and of the acoustic modes. */
  readonly independent: SpeciesCounts;
}

/** The polyhedra of a crystal with shared atoms, under the factor group. */
export interface PolyhedraAnswer {
  readonly polyhedra: readonly PolyhedronAnswer[];
  /** Sets of coordinates in the primitive cell, with their species in the factor group. */
  readonly coordinates: readonly CoordinateSetAnswer[];
  readonly kinds: readonly PolyhedraKind[];
  /** Optic modes that change no coordinate: polyhedra turning or moving as wholes, and other atoms. */
  readonly rest: SpeciesCounts;
  readonly polyhedraNotes: readonly string[];
}

/**
 * Stretching and bending content of coordination polyhedra, which may share atoms.
 * @throws InputProblem `polyhedron-name-unknown`, `polyhedron-empty`
 */
export function polyhedraAnswer(crystal: Crystal, patterns: readonly ShellPattern[]): PolyhedraAnswer {
  const { frames } = crystal.identified;
  const modes = factorGroupModes(crystal, frames.own ?? frames.reference);
  const analysis = coordinationPolyhedra(crystal, patterns);
  const scaffold = crystalScaffold(crystal, analysis);
  const stars = crystalStars(scaffold, analysis);
  const { group } = modes;
  const { sets, kinds } = coordinateContent(scaffold, stars, group, uniformTranslations(scaffold.action.atoms));
  const rest = modes.species.map((s, i) => s.optic - kinds.reduce((sum, k) => sum + k.independent[i]!, 0));
  return {
    polyhedra: analysis.polyhedra.map((p) => polyhedronAnswer(crystal, modes, p)),
    coordinates: sets.map((s) => ({ ...s, species: countsOf(group.irreps, s.species) })),
    kinds: kinds
      .filter((k) => k.all.some((n) => n > 0))
      .map((k) => ({
        kind: k.kind,
        all: countsOf(group.irreps, k.all),
        independent: countsOf(group.irreps, k.independent),
      })),
    rest: countsOf(group.irreps, rest),
    polyhedraNotes: analysis.notes,
  };
}

function polyhedronAnswer(crystal: Crystal, modes: FactorGroupModes, p: CoordinationPolyhedron): PolyhedronAnswer {
  const symmetry = molecularSymmetry(p.unit);
  const correlation = correlateUnit(p.unit, symmetry, modes.group, modes.group.frame);
  const names = { site: correlation.siteGroup.irreps, factorGroup: modes.group.irreps };
  const { label, formula, count, shortest, longest } = p;
  return {
    ...{ label, formula, count, shortest, longest },
    pointGroup: symmetry.schoenflies,
    deviation: { largest: symmetry.deviation.largest, mean: symmetry.deviation.mean },
    siteSymmetry: assignWyckoff(crystal.identified, p.unit.site.operations).siteSymmetry,
    schoenflies: correlation.siteGroup.schoenflies,
    ...unitContent(p.unit, symmetry, correlation, names),
  };
}
