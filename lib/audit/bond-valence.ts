import {
  bondValence,
  type CationState,
  type Crystal,
  type CrystalSite,
  cationStates,
  isHydrogen,
} from "../structure/index.ts";
import type { AuditInput } from "./audit-input.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";
import { type NearAtom, nearAtoms } from "./near-atoms.ts";
import { oxidationNumbers } from "./oxidation-numbers.ts";

/** Sums of well determined structures lie within a tenth; lone pairs, distortions and thermal motion reach this. */
const RELATIVE_TOLERANCE = 0.3;
/** And in valence units, for ions of charge 1. */
const LEAST_TOLERANCE = 0.4;
/** Occupied by less, a site or neighbour says nothing of a sum. */
const FULL = 0.99;
/** An oxide ion has a sum near 2, hydroxide without its hydrogen 1, water 0 to 0.5. */
const PROTONATED = 1.4;

const SUM: Criterion = {
  id: "bond-valence-sum",
  severity: "doubt",
  criterion:
    "The bond valences around a fully occupied cation, surrounded by anions alone, add up to a number that differs from " +
    `every oxidation state it can have (the stated one, if there is one) by more than ${100 * RELATIVE_TOLERANCE} % and ${LEAST_TOLERANCE}.`,
  source:
    "I. D. Brown, D. Altermatt, Acta Crystallographica B41 (1985) 244-247; N. E. Brese, M. O'Keeffe, Acta Crystallographica " +
    "B47 (1991) 192-197: s = exp((R0 - d)/0.37 Å).",
  advice: "Look for a wrong element, cell length or coordinate, or for neighbours that are missing.",
};

const HYDROGEN: Criterion = {
  id: "hydrogen-expected",
  severity: "doubt",
  criterion:
    `The bond valences of an oxygen atom add up to less than ${PROTONATED}, in a structure of cations with known parameters and ` +
    "oxygen that has hydrogen neither in its formula nor among its sites.",
  source:
    "Sums near 1 mean hydroxide and near 0 water: I. D. Brown, D. Altermatt, Acta Crystallographica B41 (1985) 244-247.",
  advice:
    "The oxygen atoms named seem to be hydroxide or water; add hydrogen to the formula and, if known, to the sites.",
};

export const criteria: readonly Criterion[] = [SUM, HYDROGEN];

/** Do bond valences add up to the charges? */
export function check(input: AuditInput): Finding[] {
  const { crystal } = input;
  if (!crystal) return [];
  const states = oxidationNumbers(input);
  const near = nearAtoms(crystal);
  const sums = crystal.sites.flatMap((site, i) => {
    if (near[i]!.some((n) => isPaired(crystal, n.site))) return [];
    return cationSum(crystal, site, near[i]!, states.get(site.label) ?? null) ?? [];
  });
  return [...cations(input, sums), ...oxygens(input, crystal)];
}

/** Anions bonded to their like (disulfide, peroxide) have another charge than the parameters mean. */
function isPaired(crystal: Crystal, site: number): boolean {
  const { element } = crystal.sites[site]!;
  return nearAtoms(crystal)[site]!.some((n) => crystal.sites[n.site]!.element === element && n.share < LOOSE_SHARE);
}

interface CationSum {
  readonly site: CrystalSite;
  readonly state: CationState;
  readonly sum: number;
  readonly stated: boolean;
}

function misfit({ state, sum }: Pick<CationSum, "state" | "sum">): number {
  return Math.abs(sum - state.charge) / Math.max(LEAST_TOLERANCE, RELATIVE_TOLERANCE * state.charge);
}

/** Sum by the state that fits best; null where the surroundings are not only anions with parameters. */
function cationSum(
  crystal: Crystal,
  site: CrystalSite,
  near: readonly NearAtom[],
  charge: number | null,
): CationSum | null {
  if (!isWhole(site) || isHydrogen(site.element) || (charge !== null && charge <= 0)) return null;
  const known = cationStates(site.element!).filter((s) => charge === null || s.charge === charge);
  const around = near.map(({ site: j, distance, share }) => ({ site: crystal.sites[j]!, distance, share }));
  const best = known
    .flatMap((state): CationSum[] => {
      // anything bonded that is no anion of the table (a metal, hydrogen, the same element) makes the sum meaningless
      const usable = around.every((n) => (isWhole(n.site) && state.r0.has(n.site.element!)) || n.share > LOOSE_SHARE);
      if (!usable || around.filter((n) => state.r0.has(n.site.element ?? "")).length < 2) return [];
      const sum = around.reduce((s, n) => s + (isWhole(n.site) ? valence(state, n.site.element!, n.distance) : 0), 0);
      return [{ site, state, sum, stated: charge !== null }];
    })
    .sort((a, b) => misfit(a) - misfit(b));
  return best[0] ?? null;
}

/** Beyond this share of the sum of radii a contact between cations is none. */
const LOOSE_SHARE = 1.15;

function valence(state: CationState, anion: string, distance: number): number {
  const r0 = state.r0.get(anion);
  return r0 === undefined ? 0 : bondValence(r0, distance);
}

function isWhole({ element, occupancy, sharesPositionOf }: CrystalSite): boolean {
  return element !== null && occupancy >= FULL && sharesPositionOf === null;
}

function cations(input: AuditInput, sums: readonly CationSum[]): Finding[] {
  const odd = sums.filter((s) => misfit(s) > 1).sort((a, b) => misfit(b) - misfit(a));
  const [worst, ...rest] = odd;
  if (!worst) return [];
  const { site, state, sum, stated } = worst;
  const others = rest.map((s) => `${s.site.label} ${s.sum.toFixed(2)} for ${s.state.charge}`);
  const message = `the bond valences of ${site.label} add up to ${sum.toFixed(2)}, where ${site.element}${state.charge}+ asks for ${state.charge}${others.length > 0 ? `; likewise ${some(others)}` : ""}`;
  return [
    finding(SUM, input.place("_atom_site_label", site.span), message, {
      stated: {
        what: `oxidation state of ${site.label}, ${stated ? "stated" : "the best fitting"}`,
        value: state.charge,
      },
      against: { what: "sum of its bond valences", value: sum },
      difference: sum - state.charge,
      tolerance: Math.max(LEAST_TOLERANCE, RELATIVE_TOLERANCE * state.charge),
      unit: "valence units",
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}

function oxygens(input: AuditInput, crystal: Crystal): Finding[] {
  const { sites } = crystal;
  const formula = input.block.has("_chemical_formula_sum") ? (/\bH\d*\b/.exec(formulaText(input))?.[0] ?? null) : null;
  const whole = sites.every(
    (s) => isWhole(s) && (s.element === "O" || cationStates(s.element!).some((c) => c.r0.has("O"))),
  );
  if (formula || !whole || sites.some((s) => isHydrogen(s.element))) return [];
  const near = nearAtoms(crystal);
  const poor = sites.flatMap((site, i) => {
    if (site.element !== "O") return [];
    if (near[i]!.some((n) => sites[n.site]!.element === "O" && n.share < LOOSE_SHARE)) return []; // a peroxide, or a fault
    const most = near[i]!.reduce((s, n) => s + largestValence(sites[n.site]!.element!, n.distance), 0);
    return most < PROTONATED ? [{ site, sum: most }] : [];
  });
  const [worst, ...rest] = poor.sort((a, b) => a.sum - b.sum);
  if (!worst) return [];
  const others = rest.map((p) => `${p.site.label} ${p.sum.toFixed(2)}`);
  const message = `the bond valences of ${worst.site.label} add up to ${worst.sum.toFixed(2)} only, as if hydrogen were missing${others.length > 0 ? `; likewise ${some(others)}` : ""}`;
  return [
    finding(HYDROGEN, input.place("_atom_site_label", worst.site.span), message, {
      stated: { what: `sum of the bond valences of ${worst.site.label}`, value: worst.sum },
      against: { what: "of an oxide ion", value: 2 },
      unit: "valence units",
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}

function formulaText({ block }: AuditInput): string {
  const value = block.get("_chemical_formula_sum");
  return value?.kind === "text" ? value.text : "";
}

/** Valence by the state that gives most. */
function largestValence(symbol: string, distance: number): number {
  return Math.max(0, ...cationStates(symbol).map((s) => valence(s, "O", distance)));
}
