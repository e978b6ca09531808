import type { AtomLine, Deposition } from "./deposition.ts";

/** A source of random numbers in [0, 1). */
export type Random = () => number;

/** A kind of slip. `plant` changes a copy and returns it, or null where the deposition gives no occasion for it. */
export interface Mutation {
  readonly kind: string;
  /** What `vet` owes: a contradiction, or at least a doubt. */
  readonly owed: "contradiction" | "doubt";
  readonly plant: (d: Deposition, random: Random) => Deposition | null;
}

/** One of a list, or null. */
export function pick<T>(list: readonly T[], random: Random): T | null {
  return list.length > 0 ? list[Math.floor(random() * list.length)]! : null;
}

/** Replaces the digit at a decimal place by another one; null where there is none. */
export function otherDigit(text: string, place: number, random: Random): string | null {
  const at = text.indexOf(".") + place;
  if (!text.includes(".") || !/\d/.test(text[at] ?? "")) return null;
  const digit = (Number(text[at]) + 2 + Math.floor(7 * random())) % 10; // at least two away, round the clock
  return text.slice(0, at) + digit + text.slice(at + 1);
}

/** Changes an item by `change`; null where it is absent or does not change. */
export function item(
  name: string,
  change: (text: string, random: Random, d: Deposition) => string | null,
): Mutation["plant"] {
  return (d, random) => {
    const old = d.items[name];
    const text = old === undefined || old === "?" ? null : change(old, random, d);
    if (text === null || text === old) return null;
    d.items[name] = text;
    return d;
  };
}

/** Change of one decimal. */
export const digit = (place: number) => (text: string, random: Random) => otherDigit(text, place, random);

/** Changes one atom, any of those that `change` accepts by returning its new fields. */
export function atom(
  change: (atom: AtomLine, random: Random, d: Deposition) => Partial<AtomLine> | null,
): Mutation["plant"] {
  return (d, random) => {
    const start = Math.floor(d.atoms.length * random());
    for (let k = 0; k < d.atoms.length; k++) {
      const chosen = d.atoms[(start + k) % d.atoms.length]!;
      const fields = change(chosen, random, d);
      if (!fields) continue;
      Object.assign(chosen, fields);
      return d;
    }
    return null;
  };
}
