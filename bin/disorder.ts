import {
  type ConfigurationList,
  type Crystal,
  chosenComponent,
  orderedConfigurations,
  orderedCrystal,
} from "../lib/structure/index.ts";
import type { Arguments } from "./arguments.ts";
import { UsageProblem } from "./problems.ts";
import { usage } from "./usage.ts";

/** A crystal with the disorder decided that --component and --ordered decide. */
export function decided(
  crystal: Crystal,
  args: Arguments,
): { readonly crystal: Crystal; readonly notes: readonly string[] } {
  const component = args.text("component");
  const first = component === null ? { crystal, notes: [] } : usage(() => chosenComponent(crystal, component));
  if (!args.flag("ordered")) return first;
  const second = usage(() => orderedCrystal(first.crystal));
  return { crystal: second.crystal, notes: [...first.notes, ...second.notes] };
}

/** The ordered structures asked for, or null; `chosen` is the one that --configuration names. */
export function enumerated(
  crystal: Crystal,
  args: Arguments,
): { readonly list: ConfigurationList; readonly chosen: Crystal | null } | null {
  const wanted = args.number("configuration");
  if (wanted === null && !args.flag("enumerate")) return null;
  const list = usage(() => orderedConfigurations(crystal));
  if (wanted === null) return { list, chosen: null };
  const found = Number.isInteger(wanted) ? list.configurations[wanted - 1] : undefined;
  if (!found) {
    throw new UsageProblem(`--configuration takes a number from 1 to ${list.configurations.length}, not ${wanted}`);
  }
  return { list, chosen: found.crystal };
}
