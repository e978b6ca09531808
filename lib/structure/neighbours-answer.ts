import type { CifBlock } from "../cif/index.ts";
import { InputProblem } from "../problem.ts";
import { formatOperation } from "../symmetry/index.ts";
import { isHydrogen } from "./bond-class.ts";
import { BondValences } from "./bond-valence-sums.ts";
import type { LatticeAtom } from "./cell-atoms.ts";
import { type CellUncertainties, cellUncertainties } from "./cell-uncertainty.ts";
import { cellContents } from "./composition.ts";
import type { Crystal } from "./crystal.ts";
import { element } from "./elements.ts";
import { statedFormula } from "./formula-units.ts";
import { type FoundHydrogenBond, HydrogenBonds } from "./hydrogen-bonds.ts";
import { latticeKey, NeighbourAtoms } from "./neighbour-atoms.ts";
import { type NeighbourChoice, NeighbourLists } from "./neighbour-choice.ts";
import type { SiteNeighbours } from "./neighbour-description.ts";
import { atomDomains } from "./neighbour-domains.ts";
import { type MeasuredQuantity, NeighbourMeasures } from "./neighbour-measures.ts";
import { oxidationStates } from "./oxidation-states.ts";
import { type SiteContext, siteNeighbours } from "./site-neighbours.ts";
import { type TorsionRow, torsionRows } from "./torsion-rows.ts";
import { codeList } from "./written-operations.ts";

/** An atom by its label and symmetry code. */
export interface CodedAtom {
  readonly label: string;
  readonly code: string | null;
}

/** A hydrogen bond; its donor stands as listed, and has the code of the identity. */
export interface HydrogenBond {
  readonly donor: CodedAtom;
  /** Null where the file does not place the hydrogen atom. */
  readonly hydrogen: CodedAtom | null;
  readonly acceptor: CodedAtom;
  readonly donorHydrogen: MeasuredQuantity | null;
  readonly hydrogenAcceptor: MeasuredQuantity | null;
  readonly donorAcceptor: MeasuredQuantity;
  /** Degrees. */
  readonly angle: MeasuredQuantity | null;
  /** Equivalent bonds of the donor. */
  readonly count: number;
}

export interface NeighboursAnswer {
  /** Which atoms count as neighbours; the distance, angstrom, of `within`, and the count of `nearest`. */
  readonly choice: {
    readonly kind: NeighbourChoice["kind"];
    readonly distance: number | null;
    readonly count: number | null;
  };
  /** What the numbers in codes mean: those of the file's list, or of this one. */
  readonly numbering: "file" | "here";
  readonly operations: readonly { readonly number: string; readonly xyz: string }[];
  /** Which of the file's numbers have uncertainties. */
  readonly uncertainties: { readonly cell: boolean; readonly coordinates: boolean };
  readonly sites: readonly SiteNeighbours[];
  readonly hydrogenBonds: readonly HydrogenBond[];
  /** Whether the file lacks hydrogen of its formula. */
  readonly hydrogenMissing: boolean;
  readonly torsions: readonly TorsionRow[];
}

export interface NeighboursOptions {
  /** The block that the crystal was read from: uncertainties of the cell, numbers of operations, oxidation numbers. */
  readonly block?: CifBlock;
  /** Default `shell`. */
  readonly choice?: NeighbourChoice;
  /** Elements or labels of the centres; all by default. */
  readonly sites?: readonly string[];
  /** Elements or labels of the neighbours; all by default. */
  readonly neighbours?: readonly string[];
  /** Angles at every site. */
  readonly angles?: boolean;
  /** Torsion angles along bonds. */
  readonly torsions?: boolean;
  /** Hydrogen bonds of carbon too. */
  readonly weak?: boolean;
}

/**
 * Neighbours of every site with symmetry codes, distances and uncertainties, coordination numbers and shapes, bond
 * valences, and hydrogen bonds.
 * @throws InputProblem `neighbour-name-unknown`, `neighbour-choice-impossible`
 * @example
 * ```ts
 * const rutile = composedCrystal(parseSiteTable("group 136\ncell a=4.59 c=2.96\nTi 2a\nO 4f x=0.305"));
 * const [titanium] = neighboursAnswer(rutile).sites;
 * titanium!.coordination; // 6
 * titanium!.neighbours.map((n) => n.distance.toFixed(3)); // ["1.947", "1.947", "1.947", "1.947", "1.980", "1.980"]
 * ```
 */
export function neighboursAnswer(crystal: Crystal, options: NeighboursOptions = {}): NeighboursAnswer {
  const { block = null, choice = { kind: "shell" }, angles = false } = options;
  requirePossible(choice);
  const isCentre = named(crystal, options.sites);
  const isNeighbour = named(crystal, options.neighbours);
  const source = new NeighbourAtoms(crystal);
  const lists = new NeighbourLists(source);
  const measures = new NeighbourMeasures(source, block ? cellUncertainties(block) : NO_UNCERTAINTIES);
  const codes = codeList(source.crystal, block);
  const chosen = lists.choose(choice, isNeighbour);
  const shells =
    choice.kind === "shell" && !options.neighbours?.length ? chosen : lists.choose({ kind: "shell" }, () => true);
  const valences = new BondValences(source, shells, oxidationStates(block, crystal.sites));
  const context: SiteContext = {
    source,
    measures,
    codes,
    valences,
    formatOperation: (there) => formatOperation(source.operationTo(there)),
    withAngles: angles,
  };
  const asked = crystal.sites.flatMap((_, i) => (source.sharing[i]!.includes(i) && isCentre(i) ? [i] : []));
  const hydrogenMissing = lacksHydrogen(crystal, block);
  const bonds = new HydrogenBonds(source, lists, measures);
  const found = bonds.find({ weak: options.weak ?? false, incomplete: hydrogenMissing }, shells);
  return {
    choice: {
      kind: choice.kind,
      distance: choice.kind === "within" ? choice.distance : null,
      count: choice.kind === "nearest" ? choice.count : null,
    },
    numbering: codes.numbering,
    operations: codes.operations,
    uncertainties: { cell: measures.propagation.ofCell, coordinates: measures.propagation.ofSites },
    sites: describedSites(context, lists, chosen, asked),
    hydrogenBonds: found.flatMap((h) => (isAsked(source, h, isCentre) ? [codedBond(context, h)] : [])),
    hydrogenMissing,
    torsions: options.torsions ? torsionRows(context, lists, isCentre) : [],
  };
}

const NO_UNCERTAINTIES: CellUncertainties = [null, null, null, null, null, null];

function requirePossible(choice: NeighbourChoice): void {
  const refuse = (what: string, hint: string) => new InputProblem("neighbour-choice-impossible", what, null, hint);
  if (choice.kind === "within" && !(choice.distance > 0 && choice.distance <= FARTHEST_ASKED))
    throw refuse(`no neighbours can be looked for within ${choice.distance} angstrom`, `give up to ${FARTHEST_ASKED}`);
  if (choice.kind === "nearest" && !(Number.isInteger(choice.count) && choice.count > 0 && choice.count <= MOST_ASKED))
    throw refuse(`${choice.count} is no number of nearest neighbours`, `give a whole number from 1 to ${MOST_ASKED}`);
}

/** Beyond, lists say nothing of coordination; angstrom. */
const FARTHEST_ASKED = 20;
const MOST_ASKED = 100;

/** Whether a site is meant by a list of elements and labels; all are by an empty one. */
function named({ sites }: Crystal, names: readonly string[] = []): (site: number) => boolean {
  if (names.length === 0) return () => true;
  const means = (name: string, site: number) => {
    const { label, element: symbol } = sites[site]!;
    return label === name || (element(name) !== null && (symbol === name || (name === "H" && isHydrogen(symbol))));
  };
  for (const name of names) {
    if (sites.some((_, i) => means(name, i))) continue;
    const labels = sites.slice(0, 12).map((s) => s.label);
    throw new InputProblem(
      "neighbour-name-unknown",
      `"${name}" is neither an element of this structure nor the label of a site`,
      null,
      `labels are ${labels.join(", ")}${sites.length > 12 ? ", ..." : ""}`,
    );
  }
  return (site) => names.some((name) => means(name, site));
}

function describedSites(
  context: SiteContext,
  lists: NeighbourLists,
  chosen: ReturnType<NeighbourLists["choose"]>,
  asked: readonly number[],
): SiteNeighbours[] {
  const { source } = context;
  const centres = [...new Set(asked.map((i) => source.sharing[i]![0]!))].filter((i) => chosen.has(i));
  const { domains, near } = atomDomains(source, lists, centres);
  const ends = lists.shellEnds();
  const bonds = lists.choose({ kind: "bonds" }, () => true);
  return asked.flatMap((site) => {
    const centre = source.sharing[site]![0]!;
    const list = chosen.get(centre);
    if (!list) return [];
    const domain = domains.get(centre) ?? null;
    return siteNeighbours(context, site, {
      chosen: list,
      bonds: bonds.get(centre)!.length,
      end: ends.get(centre) ?? null,
      shares: domain && ((n) => domain.shares.get(latticeKey(n)) ?? 0),
      solidAngleNumber: domain && domain.total / domain.largest,
      near: near(centre),
    });
  });
}

/** Whether the formula has more hydrogen than the sites; false where there is no formula. */
function lacksHydrogen(crystal: Crystal, block: CifBlock | null): boolean {
  const formula = block && statedFormula(block);
  if (!formula) return false;
  const share = (counts: ReadonlyMap<string, number>) => {
    let [hydrogen, others] = [0, 0];
    for (const [symbol, n] of counts) {
      if (isHydrogen(symbol)) hydrogen += n;
      else others += n;
    }
    return others > 0 ? hydrogen / others : 0;
  };
  return share(formula) > 1.05 * share(cellContents(crystal.sites)) + 1e-6;
}

function isAsked({ atoms }: NeighbourAtoms, h: FoundHydrogenBond, isCentre: (site: number) => boolean): boolean {
  return [h.donor, h.hydrogen, h.acceptor].some((a) => a !== null && isCentre(atoms[a.atom]!.site));
}

function codedBond({ source, codes }: SiteContext, h: FoundHydrogenBond): HydrogenBond {
  const coded = (there: LatticeAtom): CodedAtom => {
    const { operation, cells } = source.origin(there);
    return { label: source.crystal.sites[source.atoms[there.atom]!.site]!.label, code: codes.code(operation, cells) };
  };
  return {
    ...h,
    donor: coded(h.donor),
    hydrogen: h.hydrogen && coded(h.hydrogen),
    acceptor: coded(h.acceptor),
  };
}
