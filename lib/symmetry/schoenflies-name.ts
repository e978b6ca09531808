import { spaceGroupTypes } from "./space-group-type.ts";

/** Point-group symbols by other names in use. */
const OTHER_NAMES: Readonly<Record<string, string>> = {
  S1: "Cs",
  S2: "Ci",
  S6: "C3i",
  C1H: "Cs",
  C1I: "Ci",
  V: "D2",
  VH: "D2h",
  VD: "D2d",
  S3: "C3h",
  S4: "S4",
};

/** Number of the type that a Schoenflies symbol names (`D2h^16`, `D2h-16`, `D2h.16`, `D_2h^16`), or null. */
export function numberOfSchoenflies(text: string): number | null {
  const match = /^\s*([a-z])_?\{?(\d?[a-z]?)\}?\s*[\^.\s-]\s*\{?(\d{1,2})\}?\s*$/i.exec(text);
  if (!match) return null;
  const written = `${match[1]}${match[2]}`.toUpperCase();
  const point = (OTHER_NAMES[written] ?? written).toUpperCase();
  const wanted = `${point}^${match[3]}`;
  return spaceGroupTypes().find((t) => t.schoenflies.toUpperCase() === wanted)?.number ?? null;
}
