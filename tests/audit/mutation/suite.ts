import { vetAnswer } from "../../../lib/audit/index.ts";
import { type CifBlock, readCif } from "../../../lib/cif/index.ts";
import { type Deposition, deposit } from "./deposition.ts";
import { MUTATIONS } from "./mutations.ts";
import { seeded } from "./plain-crystal.ts";
import type { Mutation } from "./slip.ts";
import { writeDeposition } from "./write-deposition.ts";

/** How one kind of slip fared. */
export interface Rate {
  readonly kind: string;
  readonly owed: Mutation["owed"];
  readonly planted: number;
  readonly found: number;
  /** Ids that told of it, the most frequent first. */
  readonly by: readonly string[];
  /** Fixtures in which it was not found. */
  readonly missed: readonly string[];
}

export interface SuiteResult {
  readonly fixtures: number;
  /** Sound depositions in which a contradiction was found, with its id. */
  readonly falseAlarms: readonly string[];
  /** Doubts in sound depositions. */
  readonly doubts: number;
  readonly rates: readonly Rate[];
}

export interface NamedBlock {
  readonly name: string;
  readonly block: CifBlock;
}

type Found = ReturnType<typeof vetAnswer>["findings"];

function vetted(d: Deposition): Found {
  return vetAnswer(readCif(writeDeposition(d)).value.blocks[0]!).findings;
}

/** Plants every kind of slip in every fixture, dressed as a full deposition, and asks `vet` for each. */
export function runSuite(fixtures: readonly NamedBlock[]): SuiteResult {
  const sound = fixtures.map(({ name, block }) => {
    const deposition = deposit(block);
    return { name, deposition, findings: vetted(deposition) };
  });
  const serious = sound.flatMap((s) => s.findings.map((f) => ({ ...f, name: s.name })));
  return {
    fixtures: fixtures.length,
    falseAlarms: serious.flatMap((f) => (f.severity === "contradiction" ? [`${f.name}: ${f.id}`] : [])),
    doubts: serious.filter((f) => f.severity === "doubt").length,
    rates: MUTATIONS.map((mutation) => rateOf(mutation, sound)),
  };
}

function rateOf(
  { kind, owed, plant }: Mutation,
  sound: readonly { name: string; deposition: Deposition; findings: Found }[],
): Rate {
  const by = new Map<string, number>();
  const missed: string[] = [];
  let planted = 0;
  for (const { name, deposition, findings } of sound) {
    const changed = plant(structuredClone(deposition), seeded(`${kind} in ${name}`));
    if (!changed) continue;
    planted++;
    const known = new Set(findings.map((f) => f.id));
    const fresh = vetted(changed).filter((f) => !known.has(f.id));
    const telling = fresh.filter((f) => f.severity === "contradiction" || (owed === "doubt" && f.severity === "doubt"));
    if (telling.length === 0) missed.push(name);
    for (const id of new Set(telling.map((f) => f.id))) by.set(id, (by.get(id) ?? 0) + 1);
  }
  const ids = [...by].sort(([a, n], [b, m]) => m - n || (a < b ? -1 : 1)).map(([id, n]) => `${id} ${n}`);
  return { kind, owed, planted, found: planted - missed.length, by: ids, missed };
}

/** The result as the table that is kept. */
export function suiteTable({ fixtures, falseAlarms, doubts, rates }: SuiteResult): string {
  const width = Math.max(...rates.map((r) => r.kind.length));
  const lines = rates.map(({ kind, owed, planted, found, by, missed }) => {
    const share = planted > 0 ? `${((100 * found) / planted).toFixed(0)} %` : "";
    const numbers = `${String(planted).padStart(7)}  ${String(found).padStart(5)}  ${share.padStart(5)}`;
    const not = missed.length > 0 ? `; not in ${missed.join(", ")}` : "";
    return `${kind.padEnd(width)}  ${owed.padEnd(13)}  ${numbers}  ${by.slice(0, 4).join(", ")}${not}`;
  });
  return [
    `${fixtures} sound depositions: ${falseAlarms.length} contradictions${falseAlarms.length > 0 ? ` (${falseAlarms.join(", ")})` : ""}, ${doubts} doubts`,
    `contradictions owed and found: ${shareOf(rates, "contradiction")}; doubts owed and found: ${shareOf(rates, "doubt")}`,
    "",
    `${"planted".padEnd(width)}  ${"owed".padEnd(13)}  planted  found  share  by`,
    ...lines,
    "",
  ].join("\n");
}

/** `95 of 100 (95.0 %)` */
function shareOf(rates: readonly Rate[], owed: Mutation["owed"]): string {
  const own = rates.filter((r) => r.owed === owed);
  const [found, planted] = [own.reduce((s, r) => s + r.found, 0), own.reduce((s, r) => s + r.planted, 0)];
  return `${found} of ${planted} (${((100 * found) / planted).toFixed(1)} %)`;
}
