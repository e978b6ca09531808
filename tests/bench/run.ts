import { cpus } from "node:os";
import { consumed, type Measurement } from "./ratio.ts";

type Bench = readonly [name: string, measure: () => readonly Measurement[]];

/** Runs the benches one after the other and prints each result as it is there. */
export function report(benches: readonly Bench[]): void {
  const processor = cpus();
  console.log(`Node ${process.versions.node}, ${processor.length} x ${processor[0]?.model ?? "unknown processor"}`);
  for (const [name, measure] of benches) {
    console.log(`\n${name}`);
    for (const row of measure()) console.log(line(row));
  }
  if (!Number.isFinite(consumed())) console.log("a bench returned no number");
}

function line({ name, ratio, reference, detail }: Measurement): string {
  return `${ratio.toFixed(2).padStart(8)} of ${reference}: ${name}${detail ? ` (${detail})` : ""}`;
}
