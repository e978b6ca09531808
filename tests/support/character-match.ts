/** A character table without names: classes by what can be measured on them, characters of physical species. */
export interface BareTable {
  /** Size, order, determinant and trace of the elements. */
  readonly classes: readonly (readonly [size: number, order: number, determinant: number, trace: number])[];
  /** For every prime that divides the order of the group, the class of the p-th powers of each class. */
  readonly powers: ReadonlyMap<number, readonly number[]>;
  /** One row per species, one value per class. */
  readonly characters: readonly (readonly number[])[];
}

/** Characters, determinants and traces are sums of roots of unity in doubles; different ones lie 0.01 or more apart. */
const rounded = (x: number): string => (Math.round(x * 1e6) / 1e6 + 0).toFixed(6);

/**
 * A way to identify the classes of two tables under which sizes, orders, traces, power maps and the set of rows agree:
 * entry k is the class of the second that class k of the first becomes. Null where there is none.
 */
export function matchTables(a: BareTable, b: BareTable): readonly number[] | null {
  if (a.classes.length !== b.classes.length || a.characters.length !== b.characters.length) return null;
  if ([...a.powers.keys()].join() !== [...b.powers.keys()].join()) return null;
  return extend(a, b, []);
}

function extend(a: BareTable, b: BareTable, chosen: readonly number[]): readonly number[] | null {
  const k = chosen.length;
  if (k === a.classes.length) return chosen;
  for (let j = 0; j < b.classes.length; j++) {
    if (chosen.includes(j)) continue;
    if (a.classes[k]!.map(rounded).join() !== b.classes[j]!.map(rounded).join()) continue;
    const next = [...chosen, j];
    if (!powersAgree(a, b, next) || !rowsAgree(a, b, next)) continue;
    const found = extend(a, b, next);
    if (found) return found;
  }
  return null;
}

function powersAgree(a: BareTable, b: BareTable, chosen: readonly number[]): boolean {
  return [...a.powers].every(([p, ours]) =>
    chosen.every((j, k) => ours[k]! >= chosen.length || chosen[ours[k]!] === b.powers.get(p)![j]),
  );
}

/** The rows, cut to the classes chosen so far, are the same list up to their order. */
function rowsAgree(a: BareTable, b: BareTable, chosen: readonly number[]): boolean {
  const cut = (rows: BareTable["characters"], columns: readonly number[]) =>
    rows.map((row) => columns.map((c) => rounded(row[c]!)).join()).sort();
  const ours = cut(
    a.characters,
    chosen.map((_, k) => k),
  );
  return ours.join(";") === cut(b.characters, chosen).join(";");
}
