import { InputProblem } from "../problem.ts";
import { brokenOperations, type Crystal, type SymmetriseAnswer, symmetriseAnswer } from "../structure/index.ts";
import type { AuditInput } from "./audit-input.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";

/** Displacements up to this are the rounding of coordinates with four digits; angstrom. */
const EXACT = 5e-3;
/** Most atoms in the cell for which the search is made; larger ones take seconds. */
const MOST_ATOMS = 4000;

const MISSED: Criterion = {
  id: "symmetry-missed",
  severity: "contradiction",
  criterion: `The atoms have operations or translations that the file does not declare, all exact within ${EXACT} Å.`,
  source: "A space group holds every operation that keeps the structure; International Tables for Crystallography A.",
  advice: "`symmetrise` describes the structure in the group found; or say why a lower group was chosen.",
};

const NEARLY: Criterion = {
  id: "symmetry-nearly-higher",
  severity: "doubt",
  criterion: "The atoms have operations or translations that the file does not declare, within the search tolerance.",
  source:
    "R. E. Marsh and coworkers on space groups of too low symmetry, e.g. Acta Crystallographica B58 (2002) 893-899.",
  advice: "Compare the displacements with the uncertainties; `symmetrise` describes the structure in the group found.",
};

const BROKEN: Criterion = {
  id: "symmetry-broken",
  severity: "contradiction",
  criterion:
    "The list holds the whole cell, but a declared operation does not carry the listed atoms onto listed atoms of the kind " +
    "within the tolerance.",
  source: "Definition of a symmetry operation.",
  advice: "An atom of the list is misplaced, or the declared group is too high.",
};

export const criteria: readonly Criterion[] = [MISSED, NEARLY, BROKEN];

/** Have the atoms just the symmetry that is declared? */
export function check(input: AuditInput): Finding[] {
  const { crystal } = input;
  if (!crystal) return [];
  return [...broken(input, crystal), ...missed(input, crystal)];
}

function missed(input: AuditInput, crystal: Crystal): Finding[] {
  const size = crystal.sites.reduce((s, site) => s + site.images.length, 0);
  const answer = size > MOST_ATOMS ? null : found(crystal);
  if (!answer || answer.index <= 1) return [];
  const extra = answer.operations.filter((o) => !o.declared);
  const largest = Math.max(0, ...extra.map((o) => o.largest), ...answer.translations.map((t) => t.largest));
  const exact = largest <= EXACT;
  const { declared, found: group } = answer;
  const example = extra[0] ? extra[0].inGivenCell : `the translation ${answer.translations[0]?.vector ?? ""}`;
  const message = `the atoms have the symmetry ${group.hermannMauguin} (No. ${group.number}), ${Number(answer.index.toFixed(2))} times that declared, ${declared.hermannMauguin} (No. ${declared.number}); largest displacement ${largest.toFixed(3)} Å; ${example} for one`;
  const said = input.declared.hermannMauguin ?? input.declared.hall ?? input.declared.operations[0] ?? null;
  return [
    finding(
      exact ? MISSED : NEARLY,
      input.place(said?.name ?? "_space_group_name_H-M_alt", said?.span ?? null),
      message,
      {
        stated: { what: "declared group", value: `${declared.hermannMauguin}, No. ${declared.number}` },
        against: { what: "symmetry of the atoms", value: `${group.hermannMauguin}, No. ${group.number}` },
        difference: largest,
        tolerance: exact ? EXACT : answer.tolerance.displacement,
        unit: "Å, largest displacement",
        ...(extra.length > 1
          ? { also: extra.slice(1).map((o) => `${o.inGivenCell} (${o.largest.toFixed(3)} Å)`) }
          : {}),
      },
    ),
  ];
}

/** The symmetry of the atoms; null where the search cannot be made. */
function found(crystal: Crystal): SymmetriseAnswer | null {
  try {
    return symmetriseAnswer(crystal, { cell: "conventional" });
  } catch (e) {
    if (e instanceof InputProblem) return null;
    throw e;
  }
}

function broken(input: AuditInput, crystal: Crystal): Finding[] {
  const { broken: list } = brokenOperations(crystal, input.atoms);
  const [worst, ...rest] = list;
  if (!worst || input.atoms.length < 2) return [];
  const labels = worst.unmatched.length > 0 ? worst.unmatched : worst.displaced;
  const what = worst.unmatched.length > 0 ? "carries these atoms to where none is listed" : "displaces these atoms";
  const message = `the declared operation ${worst.xyz} ${what}: ${some(labels)}`;
  const said = input.declared.hermannMauguin ?? input.declared.operations[0] ?? null;
  return [
    finding(BROKEN, input.place(said?.name ?? "_space_group_symop_operation_xyz", said?.span ?? null), message, {
      stated: { what: "declared operation", value: worst.xyz },
      against: { what: "atoms that break it", value: some(labels) },
      difference: worst.largest,
      tolerance: crystal.tolerance,
      unit: "Å",
      ...(rest.length > 0 ? { also: rest.map((b) => b.xyz) } : {}),
    }),
  ];
}
