import type { CellNumbers, ReduceAnswer, SymmetricCell } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import type { HeadingData } from "./heading.ts";
import { type Column, textTable, wrapText } from "./table.ts";

const right = { align: "right" } as const;

/** Headings of the columns that hold a cell. */
const CELL_COLUMNS: readonly Column[] = [
  { heading: "a/Å", ...right },
  { heading: "b/Å", ...right },
  { heading: "c/Å", ...right },
  { heading: "alpha/°", ...right },
  { heading: "beta/°", ...right },
  { heading: "gamma/°", ...right },
];

/** The whole answer of `reduce` for a person, with what stands above it. */
export function reduceText(answer: ReduceAnswer, { source, notes }: Omit<HeadingData, "tolerance">): string {
  const head = [
    source.file + (source.block ? `, block ${source.block}` : ""),
    ...notes.map((note) => wrapText(`- ${note}`, 110, "  ")),
  ];
  return [head.join("\n"), cellTable(answer), latticeTable(answer)].join("\n\n");
}

function cellTable(answer: ReduceAnswer): string {
  const { conventional } = answer;
  const given = answer.centring ?? `${answer.centrings.length} points`;
  const rows = [
    [`given (${given})`, ...cellCells(answer.cell), formatNumber(answer.volume, 2), "a,b,c"],
    ...(
      [
        ["Niggli", answer.niggli],
        ["Delaunay", answer.delaunay],
        [`conventional (${conventional.lattice})`, conventional],
      ] as const
    ).map(([name, c]) => [name, ...cellCells(c.cell), formatNumber(c.volume, 2), c.P]),
  ];
  const columns = [
    { heading: "cell" },
    ...CELL_COLUMNS,
    { heading: "volume/Å³", ...right },
    { heading: "axes in terms of the given" },
  ];
  return textTable(columns, rows);
}

function latticeTable({ lattices, conventional, angleTolerance }: ReduceAnswer): string {
  const row = (l: SymmetricCell) => [
    l === conventional ? `${l.lattice} *` : l.lattice,
    formatNumber(l.deviation, 3),
    ...cellCells(l.cell),
    l.P,
  ];
  const columns = [
    { heading: "lattice" },
    { heading: "misses by/°", ...right },
    ...CELL_COLUMNS,
    { heading: "axes in terms of the given" },
  ];
  const head = `Symmetries of the lattice; * the highest within ${angleTolerance}°, taken as conventional`;
  return `${head}\n${textTable(columns, lattices.map(row))}`;
}

/** Lengths to four decimals, angles to three. */
export function cellCells(cell: CellNumbers): string[] {
  return cell.map((e, i) => formatNumber(e, i < 3 ? 4 : 3));
}
