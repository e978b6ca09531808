/** Hands out labels that no atom has yet: `O1_2`, `O1_3` ... */
export class FreeLabels {
  private readonly taken: Set<string>;
  private readonly last = new Map<string, number>();

  constructor(taken: Iterable<string>) {
    this.taken = new Set(taken);
  }

  /** The label itself if it is free, else with the next number that is. */
  claim(label: string): string {
    if (this.taken.has(label)) return this.next(label);
    this.taken.add(label);
    return label;
  }

  next(label: string): string {
    for (let k = (this.last.get(label) ?? 1) + 1; ; k++) {
      const candidate = `${label}_${k}`;
      if (this.taken.has(candidate)) continue;
      this.taken.add(candidate);
      this.last.set(label, k);
      return candidate;
    }
  }
}
