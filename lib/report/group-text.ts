import type { GroupAnswer, WyckoffAnswer } from "../symmetry/index.ts";
import { groupName } from "./heading.ts";
import { textTable, wrapText } from "./table.ts";

const WIDTH = 110;

/** The whole answer of `group` for a person. @param named false where the heading has named the group already */
export function groupText(answer: GroupAnswer, named = true): string {
  const parts = [subject(answer, named), operationTable(answer), conditionTable(answer), wyckoffTable(answer)];
  if (answer.letterExchanges.length > 0) parts.push(exchangeText(answer));
  return parts.join("\n\n");
}

function subject({ spaceGroup: g }: GroupAnswer, named: boolean): string {
  const lines = named ? [`space group ${groupName({ ...g, operations: g.operations })}`] : [];
  if (g.symbols)
    lines.push(`symbols: short ${g.symbols.short}; full ${g.symbols.full}; extended ${g.symbols.extended}`);
  lines.push(
    `Hall symbol ${g.hall}`,
    `${g.crystalSystem}, crystal class ${g.pointGroup.hermannMauguin} (${g.pointGroup.schoenflies}), Laue class ${g.laueClass}, Bravais type ${g.bravaisType}, arithmetic class ${g.arithmeticClass}`,
    traits(g).join(", "),
  );
  return lines.map((line) => wrapText(line, WIDTH, "    ")).join("\n");
}

type Described = GroupAnswer["spaceGroup"];

function traits(g: Described): string[] {
  const polar = g.polarDirections.map((d) => `[${d.join(d.some((e) => Math.abs(e) > 9) ? " " : "")}]`);
  return [
    g.centrosymmetric ? "centrosymmetric" : "without inversion",
    g.symmorphic ? "symmorphic" : "not symmorphic",
    g.sohncke ? "Sohncke type (chiral crystals may have it)" : "not a Sohncke type",
    polar.length > 0 ? `polar, directions spanned by ${polar.join(", ")}` : "not polar",
    ...(g.enantiomorph === null ? [] : [`enantiomorphic with No. ${g.enantiomorph}`]),
  ];
}

function operationTable({ meanings, spaceGroup }: GroupAnswer): string {
  const rows = meanings.map((m) => [m.meaning, m.xyz]);
  const centrings = spaceGroup.centrings.map((t) => `(${t})+`).join("  ");
  const head = spaceGroup.centrings.length > 1 ? `Operations, each with ${centrings}` : "Operations";
  return `${head}\n${textTable([{ heading: "what it is" }, { heading: "image of x,y,z" }], rows)}`;
}

function conditionTable({ spaceGroup: { conditions } }: GroupAnswer): string {
  if (conditions.length === 0) return "Reflection conditions: none";
  const rows = conditions.map((c) => [c.reflections, c.condition, c.implied ? `follows; ${c.cause}` : c.cause]);
  return `Reflection conditions\n${textTable([{ heading: "for" }, { heading: "present only if" }, { heading: "because of" }], rows)}`;
}

function wyckoffTable({ spaceGroup: { wyckoff } }: GroupAnswer): string {
  const rows = wyckoff.flatMap(wyckoffRows);
  const columns = [
    { heading: "" },
    { heading: "site symmetry" },
    { heading: "coordinates" },
    { heading: "extra conditions" },
  ];
  return `Wyckoff positions\n${textTable(columns, rows)}`;
}

/** Letters mean something only up to these changes, so a comparison of two structures must allow for them. */
function exchangeText({ letterExchanges }: GroupAnswer): string {
  const rows = letterExchanges.map(({ change, letters, anyCell }) => [
    change,
    Object.entries(letters)
      .map(([from, to]) => `${from}->${to}`)
      .join(" "),
    anyCell ? "" : "only in a cell with these axes alike",
  ]);
  const columns = [{ heading: "axes;origin" }, { heading: "letters" }, { heading: "" }];
  return `Choices of the reference setting that exchange letters\n${textTable(columns, rows)}`;
}

/** Coordinates of a position on as many lines as they need. */
function wyckoffRows(w: WyckoffAnswer): string[][] {
  const lines = wrapText(w.coordinates.join("  "), 70).split("\n");
  return lines.map((line, i) => [
    i === 0 ? `${w.multiplicity}${w.letter}` : "",
    i === 0 ? `${w.siteSymmetry} (${w.schoenflies})` : "",
    line,
    i === 0 ? w.conditions.join("; ") : "",
  ]);
}
