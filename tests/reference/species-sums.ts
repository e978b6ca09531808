/** Sums of species as the reference tables write them, compared with those computed. */

export type Counts = Readonly<Record<string, number>>;

/** Sum with labels replaced, as by a change of axes; labels not named stay. */
export function relabelled(sum: Counts, relabel: Readonly<Record<string, string>> = {}): Counts {
  return Object.fromEntries(Object.entries(sum).map(([label, n]) => [relabel[label] ?? label, n]));
}

/**
 * The same sum without telling B1, B2 and B3 of one parity apart: what is left to compare where the axes of a table are not
 * known. Their numbers are sorted.
 */
export function axesLeftOpen(sum: Counts): Counts {
  const open = new Map<string, number[]>();
  const rest: Record<string, number> = {};
  for (const [label, n] of Object.entries(sum)) {
    const m = /^B[123]([gu]?)$/.exec(label);
    if (m) open.set(m[1]!, [...(open.get(m[1]!) ?? []), n]);
    else rest[label] = n;
  }
  for (const [parity, numbers] of open) {
    numbers
      .sort((a, b) => a - b)
      .forEach((n, i) => {
        rest[`B(${i + 1})${parity}`] = n;
      });
  }
  return rest;
}

/** Only the species that `keep` names. */
export function restricted(sum: Counts, keep: (label: string) => boolean): Counts {
  return Object.fromEntries(Object.entries(sum).filter(([label, n]) => n !== 0 && keep(label)));
}
