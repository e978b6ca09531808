import { InputProblem } from "../problem.ts";
import { findSpecies, formatRoot, rootForm, speciesFunctions, tensorForms } from "../representation/index.ts";
import type { Crystal, Vec3 } from "../structure/index.ts";
import { formatOperation } from "../symmetry/index.ts";
import { activities } from "./activity.ts";
import { factorGroupModes } from "./factor-group.ts";
import { type ModePattern, type ModePatterns, modePatterns } from "./mode-patterns.ts";
import { opticPatterns } from "./optic-patterns.ts";
import type { VibratingSite } from "./vibrating-sites.ts";

export interface PatternAtomAnswer {
  readonly label: string;
  readonly element: string | null;
  /** Fractional in the cell of the file. */
  readonly position: Vec3;
  /** An operation that makes it from the listed atom, modulo whole cells. */
  readonly operation: string;
}

export interface PatternSpeciesAnswer {
  readonly label: string;
  readonly dimension: number;
  readonly infrared: boolean;
  readonly raman: boolean;
  /** Functions of x, y, z of the frame that transform like the partners; empty where none of low degree does. */
  readonly partnersLike: string;
}

export interface PatternAnswer {
  readonly irrep: string;
  /** Labels of the sites that move. */
  readonly sites: readonly string[];
  /** Number of this repeat from 1, of how many with these sites. */
  readonly repeat: number;
  readonly repeats: number;
  /** The atoms that move, by index in `atoms`. */
  readonly atoms: readonly number[];
  /** partners[q][k]: displacement of atom k of this list along x, y, z of the frame; all of one partner of length 1. */
  readonly partners: readonly (readonly Vec3[])[];
  /** The same as coefficients to be divided by sqrt(norm); null where the numbers are no square roots of fractions. */
  readonly exact: {
    readonly norm: number;
    readonly coefficients: readonly (readonly (readonly string[])[])[];
  } | null;
}

/** A rigid translation as a sum over patterns. */
export interface AcousticAnswer {
  readonly irrep: string;
  /** Direction along x, y, z of the frame, of every partner. */
  readonly directions: readonly (readonly number[])[];
  readonly terms: readonly {
    readonly site: string;
    readonly repeat: number;
    readonly factor: number;
    /** Factor of the pattern with its partners turned by a quarter; other than 0 only for pairs of complex species. */
    readonly turned: number;
  }[];
  /** The factors as coefficients [factor, turned] to be divided by sqrt(norm), term by term; null as in a pattern. */
  readonly exact: { readonly norm: number; readonly coefficients: readonly (readonly string[])[] } | null;
}

export interface PatternsAnswer {
  readonly frame: string;
  readonly factorGroup: { readonly hermannMauguin: string; readonly schoenflies: string; readonly axes: string };
  /** Whether the rigid translations were taken out of the patterns. */
  readonly opticOnly: boolean;
  readonly atoms: readonly PatternAtomAnswer[];
  readonly species: readonly PatternSpeciesAnswer[];
  readonly patterns: readonly PatternAnswer[];
  readonly acoustic: readonly AcousticAnswer[];
}

export interface PatternsOptions {
  /** Only patterns that move this site, by label. */
  readonly site?: string;
  /** Only patterns of this species, by label. */
  readonly species?: string;
  /** Take the rigid translations out. */
  readonly optic?: boolean;
}

/**
 * Symmetry-adapted displacement patterns of a crystal as plain data.
 * @throws InputProblem `unknown-species` or `unknown-site`
 * @throws RangeError if their number differs from that of the modes, which would be a defect of this program
 */
export function patternsAnswer(crystal: Crystal, options: PatternsOptions = {}): PatternsAnswer {
  const all = modePatterns(crystal);
  compareNumbers(crystal, all);
  const { group, sites } = all;
  const irrep = options.species === undefined ? null : findSpecies(group.irreps, options.species);
  const site = options.site === undefined ? null : findSite(sites, options.site);
  const list = options.optic ? opticPatterns(all) : all.patterns;
  const counts = new Map<string, number>();
  for (const p of list) counts.set(keyOf(p), (counts.get(keyOf(p)) ?? 0) + 1);
  const wanted = list.filter((p) => (irrep ?? p.irrep) === p.irrep && (site === null || p.sites.includes(site)));
  return {
    frame: all.frame.text,
    factorGroup: {
      hermannMauguin: group.hermannMauguin,
      schoenflies: group.schoenflies,
      axes: group.axes.text,
    },
    opticOnly: options.optic ?? false,
    atoms: all.atoms.map((a) => ({
      label: sites[a.site]!.label,
      element: sites[a.site]!.site.element,
      position: a.position,
      operation: formatOperation(crystal.group.operations[a.operation]!),
    })),
    species: speciesAnswers(all),
    patterns: wanted.map((p) => patternAnswer(all, p, counts.get(keyOf(p))!)),
    acoustic: acousticAnswers(all),
  };
}

const keyOf = (p: ModePattern): string => `${p.irrep} ${p.sites.join()}`;

function findSite(sites: readonly VibratingSite[], label: string): number {
  const exact = sites.findIndex((s) => s.label === label);
  const index = exact >= 0 ? exact : sites.findIndex((s) => s.label.split("+").includes(label));
  if (index >= 0) return index;
  const known = sites.map((s) => s.label);
  const shown = known.slice(0, 12).join(", ") + (known.length > 12 ? ` and ${known.length - 12} more` : "");
  throw new InputProblem("unknown-site", `there is no site "${label}" here`, null, `The sites are ${shown}.`);
}

function compareNumbers(crystal: Crystal, { frame, patterns, group }: ModePatterns): void {
  const modes = factorGroupModes(crystal, frame.labels);
  group.irreps.forEach(({ label }, irrep) => {
    const found = patterns.filter((p) => p.irrep === irrep).length;
    const { total } = modes.species[irrep]!;
    if (found !== total) throw new RangeError(`${found} patterns of ${label} for ${total} modes`);
  });
}

function speciesAnswers({ group, frame }: ModePatterns): PatternSpeciesAnswer[] {
  const forms = (kind: "vector" | "axial" | "symmetric2") => tensorForms(group, frame.matrices, kind);
  const functions = speciesFunctions(group, {
    vector: forms("vector"),
    axial: forms("axial"),
    symmetric2: forms("symmetric2"),
  });
  const activity = activities(group);
  return group.irreps.map(({ label, dimension }, i) => {
    const { vectors, rotations, quadratics } = functions[i]!;
    const { infrared, raman } = activity[i]!;
    return { label, dimension, infrared, raman, partnersLike: [...vectors, ...rotations, ...quadratics][0] ?? "" };
  });
}

function patternAnswer({ group, sites }: ModePatterns, pattern: ModePattern, repeats: number): PatternAnswer {
  const form = rootForm(pattern.partners);
  const exactly = form?.squares.map((p) => p.map((n) => Math.sign(n) * Math.sqrt(Math.abs(n) / form.norm) + 0));
  return {
    irrep: group.irreps[pattern.irrep]!.label,
    sites: pattern.sites.map((s) => sites[s]!.label),
    repeat: pattern.repeat,
    repeats,
    atoms: pattern.atoms,
    partners: (exactly ?? pattern.partners).map((p) => inThrees(p) as unknown as Vec3[]),
    exact: form ? { norm: form.norm, coefficients: form.squares.map((p) => inThrees(p.map(formatRoot))) } : null,
  };
}

function inThrees<T>(list: readonly T[]): T[][] {
  return Array.from({ length: list.length / 3 }, (_, k) => list.slice(3 * k, 3 * k + 3));
}

function acousticAnswers({ group, sites, patterns, acoustic }: ModePatterns): AcousticAnswer[] {
  return acoustic.map(({ irrep, directions, terms }) => {
    const form = rootForm(terms.map((t) => [t.factor, t.turned]));
    return {
      irrep: group.irreps[irrep]!.label,
      directions,
      terms: terms.map(({ pattern, factor, turned }) => {
        const { sites: moving, repeat } = patterns[pattern]!;
        return { site: sites[moving[0]!]!.label, repeat, factor, turned };
      }),
      exact: form ? { norm: form.norm, coefficients: form.squares.map((t) => t.map(formatRoot)) } : null,
    };
  });
}
