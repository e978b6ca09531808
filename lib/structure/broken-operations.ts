import { RAT_IDENTITY } from "../algebra/index.ts";
import { formatOperation, type Operation, transformPoint } from "../symmetry/index.ts";
import { atomSet, speciesName } from "./atom-set.ts";
import type { AtomSite } from "./atom-site.ts";
import type { Crystal } from "./crystal.ts";
import { NearestAtom } from "./nearest-atom.ts";
import { FARTHEST_DISPLACEMENT } from "./symmetry-search.ts";

/** A declared operation that the listed atoms do not obey. */
export interface BrokenOperation {
  readonly xyz: string;
  /** Largest distance from an image to the listed atom next to it, up to FARTHEST_DISPLACEMENT; angstrom. */
  readonly largest: number;
  /** Atoms whose image lies farther than the tolerance from a listed atom of the kind. */
  readonly displaced: readonly string[];
  /** Atoms whose image has no listed atom of the kind next to it. */
  readonly unmatched: readonly string[];
}

export interface ListedCell {
  /** Whether the list holds the whole cell rather than an asymmetric unit: only then is an operation said to be broken. */
  readonly wholeCell: boolean;
  /** Share of images, other than the atom itself, that have a listed atom next to them; null where there are none. */
  readonly share: number | null;
  readonly broken: readonly BrokenOperation[];
}

/** Of a list of the whole cell most images are listed; of an asymmetric unit hardly any. */
const WHOLE_SHARE = 0.5;

/**
 * Compares the rows of an atom list with each other under the declared operations: in a list of the whole cell every
 * operation must carry listed atoms onto listed atoms.
 * @param listed rows as read, none folded into another
 * @param tolerance angstrom
 */
export function brokenOperations(
  crystal: Crystal,
  listed: readonly AtomSite[],
  tolerance: number = crystal.tolerance,
): ListedCell {
  const rows = new ListedRows(crystal, listed, tolerance);
  const compared = crystal.group.operations.slice(1).map((a) => rows.compare(a));
  const { images, matched } = rows;
  const share = images > 0 ? matched / images : null;
  const wholeCell = share === null || share >= WHOLE_SHARE;
  const broken = compared
    .filter((b) => b.displaced.length + b.unmatched.length > 0)
    .sort((a, b) => b.unmatched.length - a.unmatched.length || b.largest - a.largest);
  return { wholeCell, share, broken: wholeCell ? broken : [] };
}

class ListedRows {
  /** Images of rows other than the row itself, and those that fell next to a row. */
  images = 0;
  matched = 0;
  private readonly listed: readonly AtomSite[];
  private readonly kinds: Int32Array;
  private readonly nearest: NearestAtom;
  private readonly tolerance: number;

  constructor({ metric }: Crystal, listed: readonly AtomSite[], tolerance: number) {
    const names = listed.map(speciesName);
    const kinds = new Map([...new Set(names)].map((name, i) => [name, i]));
    this.listed = listed;
    this.tolerance = tolerance;
    this.kinds = Int32Array.from(names, (name) => kinds.get(name)!);
    const points = listed.map((row) => row.position);
    this.nearest = new NearestAtom(atomSet(metric, RAT_IDENTITY, points, this.kinds), FARTHEST_DISPLACEMENT);
  }

  compare(a: Operation): BrokenOperation {
    const displaced: string[] = [];
    const unmatched: string[] = [];
    let largest = 0;
    this.listed.forEach(({ label, position }, k) => {
      const [x, y, z] = transformPoint(a, position);
      const j = this.nearest.find(x, y, z, this.kinds[k]!);
      if (j !== k) this.images++;
      if (j < 0) {
        unmatched.push(label);
        return;
      }
      if (j !== k) this.matched++;
      largest = Math.max(largest, this.nearest.distance);
      if (this.nearest.distance > this.tolerance) displaced.push(label);
    });
    return { xyz: formatOperation(a), largest, displaced, unmatched };
  }
}
