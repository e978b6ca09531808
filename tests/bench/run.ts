import { consumed, type Measurement } from "./ratio.ts";

type Bench = readonly [name: string, measure: () => readonly Measurement[]];

/** Runs the bench of a name and prints its results. */
export function report(benches: readonly Bench[], wanted: string | undefined): void {
  for (const [name, measure] of benches.filter(([n]) => n === wanted)) {
    console.log(`\n${name}`);
    for (const row of measure()) console.log(line(row));
  }
  if (!Number.isFinite(consumed())) console.log("a bench returned no number");
}

function line({ name, ratio, reference, detail }: Measurement): string {
  return `${ratio.toFixed(2).padStart(8)} of ${reference}: ${name}${detail ? ` (${detail})` : ""}`;
}
