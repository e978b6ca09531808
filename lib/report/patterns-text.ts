import type { AcousticAnswer, PatternAnswer, PatternSpeciesAnswer, PatternsAnswer } from "../vibrations/index.ts";
import { formatNumber } from "./format-number.ts";
import { functionText, type SpeciesWriter, speciesWriter } from "./species.ts";
import { type Column, textTable, wrapText } from "./table.ts";

const WIDTH = 110;

/** The whole answer of `patterns` for a person, below the heading. */
export function patternsText(answer: PatternsAnswer, write: SpeciesWriter = speciesWriter()): string {
  const parts = [subject(answer), atomTable(answer)];
  for (const species of answer.species) {
    const list = answer.patterns.filter((p) => p.irrep === species.label);
    if (list.length === 0) continue;
    parts.push(`${write.label(species.label)}: ${describe(species)}`);
    parts.push(...list.map((p) => patternText(p, answer, write)));
    const rigid = answer.opticOnly ? [] : answer.acoustic.filter((a) => a.irrep === species.label);
    if (rigid.length > 0) parts.push(rigid.map((a) => acousticText(a, write)).join("\n"));
  }
  if (answer.patterns.length === 0) parts.push("No pattern answers this.");
  return parts.join("\n\n");
}

function subject({ frame, factorGroup, opticOnly }: PatternsAnswer): string {
  const { hermannMauguin, schoenflies, axes } = factorGroup;
  const rigid = opticOnly ? "rigid translations are taken out" : "rigid translations are part of them";
  return [
    `displacements along x, y, z: ${frame}`,
    `factor group ${hermannMauguin} (${schoenflies})${axes ? `; labels: ${axes}` : ""}`,
    `patterns are of length 1 over the atoms of one primitive cell, without masses; ${rigid}`,
  ]
    .map((line) => wrapText(line, WIDTH, "    "))
    .join("\n");
}

function atomTable({ atoms }: PatternsAnswer): string {
  const right = { align: "right" } as const;
  const columns: Column[] = [
    { heading: "atom", ...right },
    { heading: "site" },
    { heading: "a", ...right },
    { heading: "b", ...right },
    { heading: "c", ...right },
    { heading: "made by" },
  ];
  const rows = atoms.map((a, i) => [String(i + 1), a.label, ...a.position.map((x) => formatNumber(x, 4)), a.operation]);
  return textTable(columns, rows);
}

function describe({ infrared, raman, dimension, partnersLike }: PatternSpeciesAnswer): string {
  const active = [...(infrared ? ["infrared"] : []), ...(raman ? ["Raman"] : [])].join(" and ");
  const partners =
    dimension === 1 ? "" : `, ${dimension} partners${partnersLike ? ` like ${functionText(partnersLike)}` : ""}`;
  return `${active ? `${active} active` : "silent in first order"}${partners}`;
}

function patternText(p: PatternAnswer, { atoms }: PatternsAnswer, write: SpeciesWriter): string {
  const factor = p.exact === null || p.exact.norm === 1 ? "" : `, times ${inverseRoot(p.exact.norm)}`;
  const number = p.repeats > 1 ? ` ${p.repeat} of ${p.repeats}` : "";
  const columns: Column[] = [
    { heading: "atom", align: "right" },
    { heading: "site" },
    ...p.partners.flatMap((_, q) =>
      ["x", "y", "z"].map((c): Column => ({ heading: axisHeading(p, q, c), align: "right" })),
    ),
  ];
  const rows = p.atoms.map((atom, k) => [
    String(atom + 1),
    atoms[atom]!.label,
    ...p.partners.flatMap((partner, q) =>
      [0, 1, 2].map((c) => (p.exact ? rootText(p.exact.coefficients[q]![k]![c]!) : decimal(partner[k]![c]!))),
    ),
  ]);
  return `${write.label(p.irrep)} of ${p.sites.join(", ")}${number}${factor}\n${textTable(columns, rows)}`;
}

const axisHeading = (p: PatternAnswer, q: number, c: string): string => (p.partners.length > 1 ? `${q + 1}:${c}` : c);

const rootText = (text: string): string => (text === "0" ? "." : text.replace("sqrt", "√"));

const decimal = (x: number): string => (Math.abs(x) < 5e-5 ? "." : formatNumber(x, 4));

/** `1/2`, `1/√24`. */
function inverseRoot(norm: number): string {
  const root = Math.round(Math.sqrt(norm));
  return root * root === norm ? `1/${root}` : `1/√${norm}`;
}

/** `rigid translation in Eu, along x and y: (Ti 1) + √2 (O 1), times 1/√3`. */
function acousticText({ irrep, directions, terms, exact }: AcousticAnswer, write: SpeciesWriter): string {
  const along = directions.map(axisName).join(" and ");
  const sum = terms.flatMap((t, k) => {
    const name = `${t.site} ${t.repeat}`;
    const [factor, turned] = exact?.coefficients[k] ?? [formatNumber(t.factor, 4), formatNumber(t.turned, 4)];
    return [...term(t.factor, factor!, `(${name})`), ...term(t.turned, turned!, `(${name} turned)`)];
  });
  const text = sum.join(" ").replace(/^\+ /, "");
  const scale = exact && exact.norm > 1 ? `, times ${inverseRoot(exact.norm)}` : "";
  return wrapText(`rigid translation in ${write.label(irrep)}, along ${along}: ${text}${scale}`, WIDTH, "    ");
}

/** A term with its sign in front: `- √2 (O 1)`; nothing where the factor is 0. */
function term(value: number, text: string, name: string): string[] {
  if (value === 0) return [];
  const size = rootText(text.replace("-", ""));
  return [`${value < 0 ? "-" : "+"} ${size === "1" ? "" : `${size} `}${name}`];
}

function axisName(d: readonly number[]): string {
  const k = d.findIndex((e) => Math.abs(Math.abs(e) - 1) < 1e-9);
  if (k >= 0) return `${d[k]! < 0 ? "-" : ""}${"xyz"[k]}`;
  return `(${d.map((e) => formatNumber(e, 3)).join(", ")})`;
}
