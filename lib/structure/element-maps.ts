import { type Cell, metricOf } from "./cell.ts";
import { type ComparedAtoms, countsOf } from "./compared-atoms.ts";
import { type Crystal, crystalOf } from "./crystal.ts";

/** What kinds of a second structure are called in the first; those that are not named keep their names. */
export type ElementMap = ReadonlyMap<string, string>;

/** Ways to let elements stand for others that are looked at. */
const MOST_MAPS = 720;

/** Every way to let the elements of the second stand for those of the first, by their shares of the atoms. */
export function elementMaps(a: ComparedAtoms, b: ComparedAtoms): ElementMap[] {
  const ours = countsOf(a.kinds);
  const theirs = countsOf(b.kinds);
  if (ours.size !== theirs.size) return [];
  let maps: ElementMap[] = [new Map()];
  for (const [kind, count] of theirs) {
    maps = maps
      .flatMap((map) => {
        const used = new Set(map.values());
        return [...ours].flatMap(([own, n]) =>
          n * b.kinds.length === count * a.kinds.length && !used.has(own) ? [new Map([...map, [kind, own]])] : [],
        );
      })
      .slice(0, MOST_MAPS);
  }
  // the same element in both stands for itself where it can
  const same = (map: ElementMap) => [...map].filter(([x, y]) => x === y).length;
  return maps.sort((x, y) => same(y) - same(x));
}

/** Scale of the second that gives both the same volume for each atom. */
export function volumeScale(a: ComparedAtoms, b: ComparedAtoms): number {
  const perAtom = ({ crystal, given }: ComparedAtoms) => crystal.metric.volume / given.length;
  return (perAtom(a) / perAtom(b)) ** (1 / 3);
}

/** The crystal with its axes multiplied. */
export function scaledCrystal(crystal: Crystal, scale: number): Crystal {
  const { a, b, c, alpha, beta, gamma } = crystal.metric.cell;
  const cell: Cell = { a: a * scale, b: b * scale, c: c * scale, alpha, beta, gamma };
  const { name, group, identified, tolerance } = crystal;
  const sites = crystal.sites.map(({ images: _, alsoListedAs: __, sharesPositionOf: ___, symmetry, ...site }) => ({
    ...site,
    position: symmetry.point,
  }));
  return crystalOf({ name, metric: metricOf(cell), group, identified, sites, tolerance });
}
