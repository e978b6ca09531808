import type { IntVec3 } from "../algebra/index.ts";
import { type CifBlock, type CifLoop, columnName, findLoop, parseNumb, readCif } from "../cif/index.ts";
import { type IndexMatrix, matricesInText, matrixOfItems } from "./index-matrix.ts";
import { type Quantity, quantityOfValues, type Reflection, type ReflectionList } from "./reflection-list.ts";
import { readReflectionText } from "./reflection-text.ts";

/** Everything a block holds of its reflections. */
export interface FoundReflections {
  /** Loops with uncertainties first, then texts, then loops without; lists inside texts that are CIFs last. */
  readonly lists: readonly ReflectionList[];
  /** Matrices found, none of them the identity. */
  readonly matrices: readonly IndexMatrix[];
}

/** What a loop may list: value and uncertainty of a quantity, the best first. */
interface Columns {
  readonly category: "_refln" | "_diffrn_refln";
  readonly value: string;
  readonly sigma: string;
  readonly quantity: Quantity;
}

const COLUMNS: readonly Columns[] = [
  { category: "_refln", value: "F_squared_meas", sigma: "F_squared_meas_su", quantity: "F^2" },
  { category: "_refln", value: "intensity_meas", sigma: "intensity_meas_su", quantity: "F^2" },
  { category: "_refln", value: "F_meas", sigma: "F_meas_su", quantity: "F" },
  { category: "_diffrn_refln", value: "intensity_net", sigma: "intensity_net_su", quantity: "F^2" },
  { category: "_diffrn_refln", value: "counts_net", sigma: "counts_net_su", quantity: "F^2" },
];

/** A text that is a CIF with a loop of reflections. */
const CIF_OF_REFLECTIONS = /^\s*_(?:diffrn_)?refln[_.]index_h\s*$/im;

/** Finds all lists of reflections of a block and all matrices that may belong to them. */
export function findReflections(block: CifBlock): FoundReflections {
  const loops = loopLists(block);
  const texts: ReflectionList[] = [];
  const nested: ReflectionList[] = [];
  const matrices: IndexMatrix[] = [];
  for (const [name, text] of longTexts(block)) {
    const list = CIF_OF_REFLECTIONS.test(text) ? null : listOfText(text, `the text of ${name}`);
    if (list) texts.push(list);
    else if (CIF_OF_REFLECTIONS.test(text)) nested.push(...listsOfCifText(text, name));
    matrices.push(...matricesInText(text, name));
  }
  const items = matrixOfItems(block);
  if (items) matrices.push(items);
  const sure = (list: ReflectionList) => list.reflections.some((r) => r.sigma !== null);
  return { lists: [...loops.filter(sure), ...texts, ...loops.filter((l) => !sure(l)), ...nested], matrices };
}

/** The list in a text that is no CIF, or null. */
export function listOfText(text: string, source: string): ReflectionList | null {
  const found = readReflectionText(text);
  if (!found) return null;
  const notes =
    found.overlapping > 0 ? [`${found.overlapping} reflections that overlap with others of a twin were left out`] : [];
  return { kind: "text", ...quantityOfValues(found.reflections), reflections: found.reflections, source, notes };
}

/** Text values of several lines, by data name. */
function longTexts(block: CifBlock): [string, string][] {
  return block.names().flatMap((name): [string, string][] => {
    if (block.loop(name)) return [];
    const value = block.get(name);
    return value?.kind === "text" && value.text.includes("\n") ? [[name, value.text]] : [];
  });
}

/** A second whole CIF inside a text, as some depositions have it: usually the merged list of the refinement. */
function listsOfCifText(text: string, name: string): ReflectionList[] {
  const { blocks } = readCif(text).value;
  return blocks.flatMap((block) =>
    loopLists(block).map((list) => ({
      ...list,
      kind: "nested" as const,
      source: `${list.source} of the CIF in the text of ${name}`,
    })),
  );
}

function loopLists(block: CifBlock): ReflectionList[] {
  const lists: ReflectionList[] = [];
  const seen = new Set<CifLoop>();
  for (const columns of COLUMNS) {
    const loop = findLoop(block, `${columns.category}.index_h`);
    if (!loop || seen.has(loop)) continue;
    const list = listOfLoop(loop, columns);
    if (!list) continue;
    seen.add(loop);
    lists.push(list);
  }
  return lists;
}

function listOfLoop(loop: CifLoop, { category, value, sigma, quantity }: Columns): ReflectionList | null {
  const column = (item: string) => loop.columnIndex(columnName(loop, `${category}.${item}`) ?? "");
  const indices = ["index_h", "index_k", "index_l"].map(column);
  const [valueColumn, sigmaColumn] = [column(value), column(sigma)];
  if (indices.some((c) => c < 0) || valueColumn < 0) return null;
  const reflections: Reflection[] = [];
  for (let row = 0; row < loop.rowCount; row++) {
    const h = indices.map((c) => numberAt(loop, row, c)?.value ?? Number.NaN);
    const read = numberAt(loop, row, valueColumn);
    if (!read || !h.every(Number.isInteger)) continue;
    const su = sigmaColumn < 0 ? read.su : (numberAt(loop, row, sigmaColumn)?.value ?? read.su);
    reflections.push({ h: h as unknown as IntVec3, value: read.value, sigma: su });
  }
  if (reflections.length === 0) return null;
  const dropped = loop.rowCount - reflections.length;
  const notes = dropped > 0 ? [`rows without readable indices or value, left out: ${dropped}`] : [];
  const source = `the loop of ${columnName(loop, `${category}.${value}`)}`;
  const kind = category === "_refln" ? "refln" : "diffrn_refln";
  return { kind, reflections, quantity, quantityFrom: "data name", source, notes };
}

function numberAt(loop: CifLoop, row: number, column: number) {
  const value = loop.at(row, column);
  return value?.kind === "text" ? parseNumb(value.text.trim()) : null;
}
