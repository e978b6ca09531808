import { directionSystem } from "./hermann-mauguin-symbol.ts";
import type { Setting } from "./settings.ts";

/** In words, what a list of settings that a name may mean leaves open; empty for a single one. */
export function ambiguities(settings: readonly Setting[]): string[] {
  const differs = (of: (s: Setting) => string) => new Set(settings.map(of)).size > 1;
  const open: string[] = [];
  if (differs((s) => String(s.number))) {
    open.push(`type: ${[...new Set(settings.map((s) => s.number))].join(" or ")}`);
  }
  const system = settings[0] ? directionSystem(settings[0].number) : "triclinic";
  const choices = new Set(settings.map((s) => s.choice));
  if (choices.has("R") && choices.size > 1) open.push("hexagonal or rhombohedral axes");
  else if (choices.size > 1) open.push("origin choice");
  if (system === "monoclinic") {
    if (differs((s) => s.axes.replace(/[-123]/g, ""))) open.push("unique axis");
    const uniqueAxis = (s: Setting) => /[abc]/.exec(s.axes)?.[0];
    if (settings.some((s) => settings.some((t) => s !== t && uniqueAxis(s) === uniqueAxis(t))))
      open.push("cell choice");
  } else if (differs((s) => s.axes)) open.push("order of the axes");
  return open;
}
