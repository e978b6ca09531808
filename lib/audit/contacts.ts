import {
  bondClasses,
  type Crystal,
  type CrystalSite,
  cellAtoms,
  contactsWithin,
  isHydrogen,
} from "../structure/index.ts";
import type { AuditInput } from "./audit-input.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";
import { mayMeet, NEAR_REACH, nearAtoms } from "./near-atoms.ts";

/** Share of the sum of covalent radii below which no two atoms come; short pairs of metals reach 0.7. */
const CLOSEST_SHARE = 0.65;
/** The same for two non-metals: their shortest bonds, triple ones, reach 0.77; libration takes off some hundredths. */
const NON_METAL_SHARE = 0.72;
/** The same where one atom is hydrogen, whose X-ray positions lie up to 0.15 Å too near. */
const HYDROGEN_SHARE = 0.7;
/** Two hydrogen atoms; those of water are 1.5 apart; angstrom. */
const HYDROGEN_PAIR = 1.1;
/** No atom of a solid but a noble gas is farther than this from all others; angstrom. */
const LONELY = 3.5;

const TOO_CLOSE: Criterion = {
  id: "atoms-too-close",
  severity: "doubt",
  criterion:
    "Two atoms that may be there at the same time (not alternatives of a disorder, occupancies adding up to more than 1) are " +
    `nearer than ${CLOSEST_SHARE} of the sum of their covalent radii, ${NON_METAL_SHARE} for two non-metals, ` +
    `${HYDROGEN_SHARE} with hydrogen, ${HYDROGEN_PAIR} Å between two hydrogen atoms.`,
  source: "Covalent radii of B. Cordero et al., Dalton Transactions (2008) 2832-2838; limits chosen here.",
  advice: "Look for a wrong coordinate, cell length, element or operation, or an occupancy that is missing.",
};

const LONE: Criterion = {
  id: "lone-atom",
  severity: "doubt",
  criterion:
    `An atom occupied by more than half has no other within ${LONELY} Å, nor within the sum of their covalent radii and ` +
    `${NEAR_REACH} Å, in a structure of more than one element (noble gases left out).`,
  source: "Atoms of a solid touch: covalent radii of B. Cordero et al., Dalton Transactions (2008) 2832-2838.",
  advice: "Look for a wrong coordinate, or for atoms that are missing: hydrogen of a water molecule, for one.",
};

const FREE_HYDROGEN: Criterion = {
  id: "hydrogen-unbonded",
  severity: "doubt",
  criterion: `A hydrogen atom has no other atom within the sum of the covalent radii and ${NEAR_REACH} Å.`,
  source: "Covalent radii of B. Cordero et al., Dalton Transactions (2008) 2832-2838.",
  advice: "Look for a wrong coordinate, or a missing atom that carries it.",
};

export const criteria: readonly Criterion[] = [TOO_CLOSE, LONE, FREE_HYDROGEN];

const NOBLE = ["He", "Ne", "Ar", "Kr", "Xe", "Rn"];

/** Do atoms keep their distance, and has each a neighbour? */
export function check(input: AuditInput): Finding[] {
  const { crystal } = input;
  if (!crystal) return [];
  return [...tooClose(input, crystal), ...lone(input, crystal)];
}

function closest(a: CrystalSite, b: CrystalSite, distance: number, share: number): number {
  const [h, k] = [isHydrogen(a.element), isHydrogen(b.element)];
  if (h && k) return HYDROGEN_PAIR;
  const { nonMetal } = bondClasses();
  const nonMetals = nonMetal.has(a.element ?? "") && nonMetal.has(b.element ?? "");
  const least = h || k ? HYDROGEN_SHARE : nonMetals ? NON_METAL_SHARE : CLOSEST_SHARE;
  return (least * distance) / share;
}

function tooClose(input: AuditInput, crystal: Crystal): Finding[] {
  const { sites } = crystal;
  const near = nearAtoms(crystal);
  const pairs = near.flatMap((list, i) =>
    list.flatMap(({ site, distance, share }) => {
      const [a, b] = [sites[i]!, sites[site]!];
      if (site < i || a.element === null || b.element === null || !mayMeet(a, b)) return [];
      const limit = closest(a, b, distance, share);
      return distance < limit ? [{ a, b, distance, limit }] : [];
    }),
  );
  const [worst, ...rest] = pairs.sort((p, q) => p.distance / p.limit - q.distance / q.limit);
  if (!worst) return [];
  const { a, b, distance, limit } = worst;
  const others = [...new Set(rest.map((p) => `${p.a.label}-${p.b.label} ${p.distance.toFixed(2)} Å`))];
  const message = `${a.label} and ${a === b ? "an image of itself" : b.label} are ${distance.toFixed(2)} Å apart${others.length > 0 ? `; too close as well: ${some(others)}` : ""}`;
  return [
    finding(TOO_CLOSE, input.place("_atom_site_label", a.span), message, {
      stated: { what: `distance ${a.label}-${b.label}`, value: distance },
      against: { what: "nearest that these elements come", value: limit },
      difference: distance - limit,
      unit: "Å",
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}

function lone(input: AuditInput, crystal: Crystal): Finding[] {
  const { sites } = crystal;
  if (new Set(sites.map((s) => s.element)).size < 2) return [];
  const near = nearAtoms(crystal);
  const alone = sites.flatMap((s, i) =>
    near[i]!.length === 0 && s.occupancy > 0.5 && s.element !== null && !NOBLE.includes(s.element) ? [i] : [],
  );
  const free = alone.filter((i) => isHydrogen(sites[i]!.element));
  const far = lonely(
    crystal,
    alone.filter((i) => !free.includes(i)),
  );
  return [
    ...listed(
      input,
      LONE,
      far.map((i) => sites[i]!),
      LONELY,
    ),
    ...listed(
      input,
      FREE_HYDROGEN,
      free.map((i) => sites[i]!),
      NEAR_REACH,
    ),
  ];
}

/** Of some sites, those without any atom within LONELY. */
function lonely(crystal: Crystal, candidates: readonly number[]): number[] {
  if (candidates.length === 0) return [];
  const atoms = cellAtoms(crystal);
  const asked = atoms.map((a) => candidates.includes(a.site));
  const { contacts } = contactsWithin(
    crystal.metric,
    atoms.map((a) => a.position),
    LONELY,
    (i, j) => (asked[i] || asked[j] ? LONELY : 0),
  );
  const met = new Set(contacts.flatMap(({ first, second }) => [atoms[first]!.site, atoms[second]!.site]));
  return candidates.filter((i) => !met.has(i));
}

function listed(input: AuditInput, criterion: Criterion, sites: readonly CrystalSite[], reach: number): Finding[] {
  const [first, ...rest] = sites.map((s) => s.label);
  if (first === undefined) return [];
  const message = `${first} has no atom near it${rest.length > 0 ? `; likewise ${some(rest)}` : ""}`;
  const beyond = criterion === FREE_HYDROGEN ? "the sum of the covalent radii and " : "";
  return [
    finding(criterion, input.place("_atom_site_label", sites[0]!.span), message, {
      stated: { what: `atoms near ${first}`, value: 0 },
      against: { what: "looked for within", value: `${beyond}${reach} Å` },
      ...(rest.length > 0 ? { also: rest } : {}),
    }),
  ];
}
