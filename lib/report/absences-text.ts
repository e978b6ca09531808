import type { AbsencesAnswer, CandidateAnswer, ConditionTest, LaueAnswer } from "../audit/index.ts";
import { formatNumber } from "./format-number.ts";
import { type Column, textTable, wrapText } from "./table.ts";

const right = { align: "right" } as const;
const WIDTH = 110;

/** The whole answer of `absences` below its heading. */
export function absencesText(answer: AbsencesAnswer): string {
  return [
    reflectionsText(answer),
    verdictText(answer),
    ...(answer.conditions.length > 0 ? [conditionTable(answer.conditions)] : []),
    ...(answer.violations.length > 0 ? [violationTable(answer)] : []),
    laueText(answer),
    statisticsText(answer),
    latticeText(answer),
    ...(answer.possible.length > 0 ? [possibleText(answer.possible)] : []),
    candidatesText(answer),
  ].join("\n\n");
}

function reflectionsText({ reflections: r }: AbsencesAnswer): string {
  const uncertainties = r.uncertainties === "listed" ? "" : "; no uncertainties, 5 % of the mean intensity is assumed";
  const lines = [
    `reflections: ${r.source}; ${r.quantity} (${r.quantityFrom})${uncertainties}`,
    `${r.listed} listed, ${r.used} used, ${r.unique} after merging`,
  ];
  if (r.matrix) lines.push(`indices h,k,l changed to ${r.matrix}, from ${r.matrixSource}: ${r.matrixWhy}`);
  else if (r.matrixWhy) lines.push(`indices used as listed, although the file holds a matrix: ${r.matrixWhy}`);
  return lines.map((line) => wrapText(line, WIDTH, "  ")).join("\n");
}

const VERDICTS: Readonly<Record<AbsencesAnswer["verdict"], string>> = {
  met: "the absences agree with the declared group",
  violated: "the absences contradict the declared group",
  undecided: "the absences neither support nor contradict the declared group for sure",
  "not tested": "the list holds no reflection that the declared group forbids; they were probably removed from it",
  "no conditions": "the declared group has no reflection conditions, so absences cannot contradict it",
  "no group": "no group is declared",
};

function verdictText({ verdict, tested, rInt }: AbsencesAnswer): string {
  const counts = `${tested.absent} of ${tested.reflections} merged reflections are forbidden, ${tested.violations} of these are above 3 s.u.`;
  const merging = rInt === null ? "" : `; equivalents agree within R = ${formatNumber(rInt, 3)}`;
  const advice =
    verdict === "violated" ? "\nif the indices belong to another cell, --matrix changes them to this one" : "";
  return verdict === "no group" ? VERDICTS[verdict] : `verdict: ${VERDICTS[verdict]}\n${counts}${merging}${advice}`;
}

const TEST_COLUMNS: readonly Column[] = [
  { heading: "reflections" },
  { heading: "condition" },
  { heading: "in list", ...right },
  { heading: "forbidden", ...right },
  { heading: "<F²/s>", ...right },
  { heading: "median", ...right },
  { heading: "share of mean", ...right },
  { heading: "above 3s", ...right },
  { heading: "ln odds", ...right },
  { heading: "verdict" },
  { heading: "from" },
];

function conditionTable(conditions: readonly ConditionTest[]): string {
  const rows = conditions.map((c) => {
    const [first, ...others] = testCells(c);
    return [c.implied ? `(${first})` : first!, ...others];
  });
  const implied = conditions.some((c) => c.implied) ? "\n(in parentheses: implied by the others)" : "";
  return `${textTable(TEST_COLUMNS, rows)}${implied}\nln odds: of the forbidden reflections being present rather than absent; beyond 5 either way is very strong`;
}

function testCells(c: ConditionTest): string[] {
  const shown = (x: number | null, decimals: number) => (x === null ? "" : formatNumber(x, decimals));
  return [
    c.reflections,
    c.condition,
    String(c.tested),
    String(c.forbidden),
    shown(c.meanOverSigma, 2),
    shown(c.medianOverSigma, 2),
    shown(c.meanShare, 3),
    c.forbidden > 0 ? String(c.above) : "",
    c.forbidden > 0 ? formatNumber(c.evidence, 1) : "",
    c.verdict + (c.systematicallyWeak && c.verdict !== "violated" ? ", but weak intensity throughout" : ""),
    c.cause,
  ];
}

function violationTable({ violations, tested }: AbsencesAnswer): string {
  const columns: Column[] = [
    { heading: "h", ...right },
    { heading: "k", ...right },
    { heading: "l", ...right },
    { heading: "F²", ...right },
    { heading: "s.u.", ...right },
    { heading: "F²/s.u.", ...right },
    { heading: "share of mean", ...right },
    { heading: "forbidden by" },
  ];
  const rows = violations.map((v) => [
    String(v.h),
    String(v.k),
    String(v.l),
    formatNumber(v.value, 2),
    formatNumber(v.sigma, 2),
    formatNumber(v.value / v.sigma, 1),
    formatNumber(v.share, 3),
    v.condition,
  ]);
  const more = tested.violations - violations.length;
  return `strongest forbidden reflections${more > 0 ? ` (${more} more above 3 s.u.)` : ""}\n${textTable(columns, rows)}`;
}

/** Laue classes shown: the chosen one, and others up to this many. */
const SHOWN_CLASSES = 12;

function laueText({ laueClasses, laueLimit, rBase, declaredLaueClass }: AbsencesAnswer): string {
  if (laueClasses.every((c) => c.compared === 0)) {
    return `no reflection is listed together with an equivalent, so Laue classes cannot be tested; ${laueClasses.find((c) => c.chosen)!.laueClass} is the highest that the cell allows`;
  }
  const columns: Column[] = [
    { heading: "Laue class" },
    { heading: "R of equivalents", ...right },
    { heading: "worst rotation", ...right },
    { heading: "values", ...right },
    { heading: "" },
  ];
  const shown = laueClasses.filter((c, i) => c.chosen || i < SHOWN_CLASSES);
  const r = (x: number | null) => (x === null ? "untested" : formatNumber(x, 3));
  const row = (c: LaueAnswer) => [
    c.laueClass,
    r(c.rInt),
    c.laueClass === "-1" ? "" : r(c.rWorst),
    String(c.compared),
    c.chosen ? "chosen" : c.accepted ? "possible" : "refused",
  ];
  const more = laueClasses.length - shown.length;
  const note = `Friedel mates and uncertainties let ${formatNumber(rBase, 3)} expect; a rotation is refused above ${formatNumber(laueLimit, 3)}, unrelated intensities give 0.5`;
  const chosen = laueClasses.find((c) => c.chosen)!.laueClass;
  const other =
    declaredLaueClass === null || declaredLaueClass === chosen
      ? ""
      : `\nthe declared group has Laue class ${declaredLaueClass}, the intensities ${chosen}; twins can show a higher class than their domains`;
  return `${textTable(columns, shown.map(row))}${more > 0 ? `\n${more} more orientations of lower classes` : ""}\n${note}${other}`;
}

function statisticsText({ statistics: s }: AbsencesAnswer): string {
  if (s.meanDeviation === null) return `<|E²-1|>: too few reflections in general position (${s.reflections})`;
  const value = `${formatNumber(s.meanDeviation, 3)} ± ${formatNumber(s.standardError ?? 0, 3)}`;
  const twin = s.verdict === "below acentric" ? ", as twins by merohedry give (0.541)" : "";
  return `<|E²-1|> = ${value} from ${s.reflections} reflections; expected ${s.expectedCentric} centric, ${s.expectedAcentric} acentric: ${s.verdict}${twin}`;
}

function latticeText({ centring, candidateCell }: AbsencesAnswer): string {
  const { letter, translations } = centring;
  const others = translations.filter((t) => t !== "0,0,0");
  const lattice = `lattice shown by the absences: ${letter ?? "not conventional"}${others.length > 0 ? ` (${others.join("; ")})` : ""}`;
  if (candidateCell.P === "a,b,c") return lattice;
  const cell = candidateCell.cell.map((x, i) => formatNumber(x, i < 3 ? 4 : 2)).join(" ");
  return `${lattice}\ncell of the groups below: (a,b,c) = (a,b,c) of the file times ${candidateCell.P}: ${cell}`;
}

function possibleText(possible: readonly ConditionTest[]): string {
  return `conditions of other elements possible in this Laue class\n${textTable(TEST_COLUMNS, possible.map(testCells))}`;
}

function candidatesText({ candidates, extinctionSymbol }: AbsencesAnswer): string {
  const columns: Column[] = [
    { heading: "No.", ...right },
    { heading: "group" },
    { heading: "extinction symbol" },
    { heading: "centre" },
    { heading: "absences", ...right },
    { heading: "class", ...right },
    { heading: "|E²-1|", ...right },
    { heading: "ln odds", ...right },
    { heading: "" },
  ];
  const row = (c: CandidateAnswer) => [
    String(c.number),
    c.hermannMauguin,
    c.extinctionSymbol,
    c.centrosymmetric ? "yes" : "no",
    formatNumber(c.absenceEvidence, 1),
    formatNumber(c.classEvidence, 1),
    formatNumber(c.centricityEvidence, 1),
    formatNumber(c.evidence, 1),
    c.declared ? "declared" : "",
  ];
  return `groups that fit, extinction symbol ${extinctionSymbol}\n${textTable(columns, candidates.map(row))}\nln odds: of each part, and together against the best group`;
}
