import { InputProblem } from "../problem.ts";
import { type BondPattern, formatBondPattern } from "./bond-choice-text.ts";
import { isHydrogen } from "./bond-class.ts";
import { BOND_TOLERANCE, type ContactTable, type PairLimits, radiusSum } from "./contact-table.ts";
import type { Crystal } from "./crystal.ts";
import { element } from "./elements.ts";

/** What the user says about bonds. Later words win: units over `noBond`, `noBond` over `bond`, all over the rules. */
export interface BondOptions {
  /** Pairs that are bonded: below their distance, or else below the sum of the radii and BOND_TOLERANCE. */
  readonly bond?: readonly BondPattern[];
  readonly noBond?: readonly BondPattern[];
  /** Lists of labels or elements; the atoms of each list bond to each other and to nothing else. */
  readonly units?: readonly (readonly string[])[];
}

/** The options of one crystal, with names resolved to sites. */
export class BondOverrides {
  private readonly crystal: Crystal;
  private readonly options: BondOptions;
  private readonly units: readonly ReadonlySet<number>[];

  /** @throws InputProblem `bond-name-unknown` for a name that is neither an element present nor a label */
  constructor(crystal: Crystal, options: BondOptions) {
    this.crystal = crystal;
    this.options = options;
    for (const p of [...(options.bond ?? []), ...(options.noBond ?? [])]) {
      for (const end of p.ends) this.requireKnown(end, formatBondPattern(p));
    }
    this.units = (options.units ?? []).map((names) => {
      for (const name of names) this.requireKnown(name, names.join(","));
      return new Set(crystal.sites.flatMap((_, i) => (names.some((name) => this.names(name, i)) ? [i] : [])));
    });
  }

  /** Search limits that the options need, null where they need none. */
  limits(): PairLimits | null {
    if (!this.options.bond?.length && !this.units.length) return null;
    const radii = this.crystal.sites.map((s) => radiusSum(s.element, s.element) ?? 0);
    const free = radii.reduce((m, r) => Math.max(m, r), 0) + BOND_TOLERANCE;
    const reach = (this.options.bond ?? []).reduce(
      (m, p) => Math.max(m, p.below ?? free),
      this.units.length ? free : 0,
    );
    return { reach, of: (i, j) => this.limit(i, j) };
  }

  private limit(i: number, j: number): number {
    const usual = this.usual(i, j);
    const asked = (this.options.bond ?? []).filter((p) => this.matches(p, i, j)).map((p) => p.below ?? usual);
    const together = this.units.some((u) => u.has(i) && u.has(j));
    return Math.max(0, ...asked, together ? usual : 0);
  }

  private usual(i: number, j: number): number {
    const sum = radiusSum(this.crystal.sites[i]!.element, this.crystal.sites[j]!.element);
    return sum === null ? 0 : sum + BOND_TOLERANCE;
  }

  /** Changes the verdicts of a table that the rules have filled. */
  apply(table: ContactTable): void {
    table.contacts.forEach((contact, k) => {
      const [i, j] = [table.atoms[contact.first]!.site, table.atoms[contact.second]!.site];
      const within = (p: BondPattern) => this.inRange(p, i, j, contact.distance);
      if (this.options.bond?.some(within)) table.rules[k] = "asked for";
      if (this.options.noBond?.some((p) => this.matches(p, i, j) && !isOutside(p, contact.distance))) {
        table.cut(k, "asked");
      }
      if (this.units.some((u) => u.has(i) !== u.has(j))) table.cut(k, "asked");
      else if (this.units.some((u) => u.has(i)) && this.belongTogether(i, j, contact.distance)) {
        table.rules[k] ??= "asked for";
      }
    });
  }

  private inRange(p: BondPattern, i: number, j: number, distance: number): boolean {
    if (!this.matches(p, i, j) || isOutside(p, distance)) return false;
    return p.below !== null || distance <= this.usual(i, j);
  }

  private belongTogether(i: number, j: number, distance: number): boolean {
    const bothHydrogen = isHydrogen(this.crystal.sites[i]!.element) && isHydrogen(this.crystal.sites[j]!.element);
    return !bothHydrogen && distance <= this.usual(i, j);
  }

  private matches(p: BondPattern, i: number, j: number): boolean {
    const [a, b] = p.ends;
    return (this.names(a, i) && this.names(b, j)) || (this.names(a, j) && this.names(b, i));
  }

  private names(name: string, site: number): boolean {
    const { label, element: symbol } = this.crystal.sites[site]!;
    if (name === "H" && isHydrogen(symbol)) return true;
    return name === "*" || (element(name) ? symbol === name : label === name);
  }

  private requireKnown(name: string, text: string): void {
    if (name === "*" || this.crystal.sites.some((_, i) => this.names(name, i))) return;
    const labels = this.crystal.sites.slice(0, 12).map((s) => s.label);
    throw new InputProblem(
      "bond-name-unknown",
      `"${name}" in "${text}" is neither an element of this structure nor the label of a site`,
      null,
      `labels are ${labels.join(", ")}${this.crystal.sites.length > 12 ? ", ..." : ""}`,
    );
  }
}

function isOutside(p: BondPattern, distance: number): boolean {
  return (p.above !== null && distance <= p.above) || (p.below !== null && distance >= p.below);
}
