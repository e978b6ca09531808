import { formatSum, matrixEntries } from "../representation/index.ts";
import type { Crystal } from "../structure/index.ts";
import { type CrystalTensors, crystalTensors, hyperRamanTensors } from "./crystal-tensors.ts";
import { type FactorGroupModes, factorGroupModes } from "./factor-group.ts";
import { parseDirection } from "./geometry-text.ts";
import { naturalFaces } from "./natural-faces.ts";
import type { PolarPart, SpeciesScattering } from "./raman-scattering.ts";
import { type RotationTable, rotationTable } from "./rotation-curve.ts";
import { rotationAbout } from "./scattering-geometry.ts";
import { BACKSCATTERING, type GeometryResult, geometryResult, separatingGeometries } from "./standard-geometries.ts";

/** A Raman species with the form of its tensor; `tensor[partner][row][column]`, letters for measured numbers. */
export interface RamanTensorAnswer {
  readonly irrep: string;
  readonly modes: number;
  readonly letters: readonly string[];
  readonly tensor: readonly (readonly (readonly string[])[])[];
}

/** A polar species with the direction of its dipole, one per partner, components along x, y, z. */
export interface DipoleAnswer {
  readonly irrep: string;
  readonly modes: number;
  readonly directions: readonly (readonly string[])[];
  /** Also Raman active: its bands split into LO and TO, and the crystal is piezoelectric. */
  readonly raman: boolean;
}

export interface HyperRamanAnswer {
  readonly irrep: string;
  readonly components: readonly string[];
  readonly partners: readonly (readonly string[])[];
}

export interface AllowedSpecies {
  readonly irrep: string;
  /** Optic modes of the species. */
  readonly modes: number;
  /** Components of the tensor seen: `xy`. */
  readonly element: string;
  /** es . R . ei of each partner; partners that do not scatter are left out. */
  readonly tensor: readonly string[];
  /** For polar species: along or across the wavevector. */
  readonly part: PolarPart | null;
}

export interface GeometryAnswer {
  readonly geometry: string;
  readonly allowed: readonly AllowedSpecies[];
}

export interface PolariseAnswer {
  readonly frame: string;
  readonly labelAxes: string;
  readonly factorGroup: { readonly hermannMauguin: string; readonly schoenflies: string };
  readonly tensors: readonly RamanTensorAnswer[];
  readonly dipoles: readonly DipoleAnswer[];
  readonly hyperRaman: readonly HyperRamanAnswer[];
  readonly piezoelectric: boolean;
  /** Geometries that were asked for. */
  readonly geometries: readonly GeometryAnswer[];
  /** Backscattering from the faces normal to x, y and z. */
  readonly faces: readonly GeometryAnswer[];
  /** Backscattering from (100), (010) and (001) of monoclinic crystals, which are not all normal to axes; else empty. */
  readonly naturalFaces: readonly GeometryAnswer[];
  /** A shortest set that tells all Raman species with modes apart; null where five geometries do not. */
  readonly separating: readonly GeometryAnswer[] | null;
  readonly rotation:
    | (RotationTable & { readonly about: string; readonly zero: string; readonly letters: string })
    | null;
}

export interface PolariseOptions {
  readonly geometries?: readonly string[];
  /** Turn the crystal about this direction of the light, polarisation at angle 0 along `zero` (null: see rotationAbout). */
  readonly rotation?: {
    readonly about: string;
    readonly zero: string | null;
    readonly letters: ReadonlyMap<string, number>;
    readonly step: number;
  };
}

/**
 * Raman tensors, infrared dipoles and what each scattering geometry shows, in the Cartesian frame of the crystal.
 * @throws InputProblem for a geometry that cannot be read or whose light is not transverse
 */
export function polariseAnswer(crystal: Crystal, options: PolariseOptions = {}): PolariseAnswer {
  const tensors = crystalTensors(crystal);
  const modes = factorGroupModes(crystal, tensors.frame.labels);
  const optic = (irrep: number) => modes.species[irrep]!.optic;
  const answer = (result: GeometryResult) => geometryAnswer(result, optic);
  const present = tensors.raman.map((f) => f.irrep).filter((i) => optic(i) > 0);
  const { group } = tensors;
  return {
    frame: tensors.frame.text,
    labelAxes: group.axes.text,
    factorGroup: { hermannMauguin: group.hermannMauguin, schoenflies: group.schoenflies },
    tensors: tensors.raman.map((form) => ({
      irrep: form.label,
      modes: optic(form.irrep),
      letters: form.letters,
      tensor: form.partners.map((p) => matrixEntries(p.entries)),
    })),
    dipoles: dipoleAnswers(tensors, modes),
    hyperRaman: hyperRamanTensors(tensors, "symmetric3").map((form) => ({
      irrep: form.label,
      components: HYPER_COMPONENTS,
      partners: form.partners.map((p) => p.entries),
    })),
    piezoelectric: tensors.dipoles.some((d) => tensors.raman.some((r) => r.irrep === d.irrep)),
    geometries: (options.geometries ?? []).map((text) => answer(geometryResult(tensors, text))),
    faces: BACKSCATTERING.map((text) => answer(geometryResult(tensors, text))),
    naturalFaces: naturalFaces(crystal, tensors).map(answer),
    separating: separatingGeometries(tensors, present)?.map(answer) ?? null,
    rotation: options.rotation ? rotationAnswer(tensors, options.rotation) : null,
  };
}

const HYPER_COMPONENTS = ["xxx", "xxy", "xxz", "xyy", "xyz", "xzz", "yyy", "yyz", "yzz", "zzz"];

function dipoleAnswers(tensors: CrystalTensors, modes: FactorGroupModes): DipoleAnswer[] {
  return tensors.dipoles.map((form) => ({
    irrep: form.label,
    modes: modes.species[form.irrep]!.optic,
    directions: form.partners.map((p) => p.entries),
    raman: tensors.raman.some((r) => r.irrep === form.irrep),
  }));
}

/** Species without modes are not shown: nothing scatters. */
function geometryAnswer({ geometry, scattering }: GeometryResult, optic: (irrep: number) => number): GeometryAnswer {
  const allowed = scattering.filter((s) => optic(s.form.irrep) > 0).map((s) => allowedSpecies(s, optic(s.form.irrep)));
  return { geometry: geometry.text, allowed };
}

function allowedSpecies(s: SpeciesScattering, modes: number): AllowedSpecies {
  const shown = s.amplitudes.filter((a) => a.some((e) => e !== 0));
  return {
    irrep: s.form.label,
    modes,
    element: s.components.join("+"),
    tensor: shown.map((a) => formatSum(a, s.form.letters)),
    part: s.polar?.part ?? null,
  };
}

function rotationAnswer(
  tensors: CrystalTensors,
  { about, zero, letters, step }: NonNullable<PolariseOptions["rotation"]>,
): PolariseAnswer["rotation"] {
  const rotation = rotationAbout(parseDirection(about), zero === null ? null : parseDirection(zero), tensors.frame);
  const table = rotationTable(tensors, rotation.k, rotation.e, letters, step);
  const all = tensors.raman.flatMap((form) => form.letters);
  return { about, zero: rotation.zero, letters: all.map((l) => `${l}=${letters.get(l) ?? 1}`).join(", "), ...table };
}
