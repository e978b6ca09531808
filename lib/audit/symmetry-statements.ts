import type { SymmetryDisagreement } from "../structure/index.ts";
import { type AuditInput, statedText } from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";

const BY_OPERATIONS =
  "The group in use is that of the listed operations; where there are none, that of the Hall symbol, the name, the number.";

const NAME: Criterion = {
  id: "group-name",
  severity: "contradiction",
  criterion: `The Hermann-Mauguin name belongs to another of the 230 types than the group in use. ${BY_OPERATIONS}`,
  source: "International Tables for Crystallography A (2016), chapter 1.4: names and operations of the 230 types.",
  advice: "Correct the name, or the list of operations if lines were lost or added.",
};

const NAME_SETTING: Criterion = {
  id: "group-name-setting",
  severity: "doubt",
  criterion:
    "The Hermann-Mauguin name is of the right type, but its axes, cell or origin are not those of the operations in use " +
    "(the standard name over permuted axes, or a centred name over a primitive cell).",
  source: "International Tables for Crystallography A (2016), chapter 1.5: settings and their symbols.",
  advice: "Programs that read the name build another structure; write the name of the setting in use.",
};

const NUMBER: Criterion = {
  id: "group-number",
  severity: "contradiction",
  criterion: `The space-group number is not that of the group in use. ${BY_OPERATIONS}`,
  source: "International Tables for Crystallography A: numbers of the 230 types.",
  advice: "Correct the number, or the statement it disagrees with.",
};

const HALL: Criterion = {
  id: "hall-symbol",
  severity: "contradiction",
  criterion:
    "The operations that the Hall symbol generates are not those in use; a Hall symbol fixes axes and origin as well.",
  source: "S. R. Hall, Acta Crystallographica A37 (1981) 517-525.",
  advice: "Correct the symbol, or the list of operations if its origin or axes are not the intended ones.",
};

const UNREADABLE: Criterion = {
  id: "symmetry-unreadable",
  severity: "doubt",
  criterion: "A symbol, name or number of the space group cannot be read, so that it could not be compared.",
  source:
    "International Tables for Crystallography A (2016), chapter 1.4; B (2010), section A1.4.2.3 for Hall symbols.",
  advice: "Write the symbol with its blanks, such as P 21/c or -P 2ybc.",
};

const SYSTEM: Criterion = {
  id: "crystal-system",
  severity: "contradiction",
  criterion:
    "The crystal system stated is not that of the group in use. Trigonal groups may be called hexagonal (by their axes) " +
    "or rhombohedral.",
  source: "International Tables for Crystallography A (2016), section 1.3.4.4: crystal systems by point group.",
  advice: "The system follows from the operations, not from the shape of the cell; correct the word or the group.",
};

export const criteria: readonly Criterion[] = [NAME, NAME_SETTING, NUMBER, HALL, UNREADABLE, SYSTEM];

/** Do operations, Hall symbol, name, number and crystal system mean the same group? */
export function check(input: AuditInput): Finding[] {
  const { symmetry } = input;
  if (!symmetry) return unreadable(input);
  return [...symmetry.disagreements.map((d) => disagreement(input, d)), ...system(input)];
}

/** Without a group in use nothing can be compared; the statement that could not be read is what to correct. */
function unreadable({ declared, obstacles, place }: AuditInput): Finding[] {
  const statements = [declared.hall, declared.hermannMauguin, declared.schoenflies, declared.number];
  return obstacles.flatMap(({ message, span }) => {
    const said = statements.find((s) => s && span && s.span.start === span.start);
    if (!said) return [];
    return [
      finding(UNREADABLE, place(said.name, said.span), message, {
        stated: { what: said.name, value: said.text },
        against: { what: "needed", value: "a symbol, name or number of one of the 230 types" },
      }),
    ];
  });
}

function criterionFor({ kind, level }: SymmetryDisagreement): Criterion {
  if (level === "unreadable") return UNREADABLE;
  if (kind === "hall") return HALL;
  if (kind === "number") return NUMBER;
  return level === "setting" ? NAME_SETTING : NAME;
}

function disagreement(input: AuditInput, d: SymmetryDisagreement): Finding {
  const { identified, source } = input.symmetry!;
  const { number, hermannMauguin, hall } = identified.summary;
  const { name, text, span } = d.declared;
  return finding(criterionFor(d), input.place(name, span), d.message, {
    stated: { what: name, value: text },
    against: { what: SOURCE_NAMES[source], value: `No. ${number}, ${hermannMauguin}, ${hall}` },
  });
}

const SOURCE_NAMES = {
  operations: "the operations listed",
  hall: "the Hall symbol",
  name: "the Hermann-Mauguin name",
  number: "the space-group number",
} as const;

/** Words a file may use for each system besides its own. */
const ALSO: Readonly<Record<string, readonly string[]>> = { trigonal: ["hexagonal", "rhombohedral"] };

function system(input: AuditInput): Finding[] {
  const stated = statedText(input, "_space_group.crystal_system");
  if (!stated) return [];
  const { crystalSystem, number, hermannMauguin } = input.symmetry!.identified.summary;
  const word = stated.text.toLowerCase();
  const known = ["triclinic", "monoclinic", "orthorhombic", "tetragonal", "trigonal", "hexagonal", "cubic"];
  if (![...known, "rhombohedral"].includes(word)) return [];
  if (word === crystalSystem || ALSO[crystalSystem]?.includes(word)) return [];
  const message = `the crystal system stated is ${word}, but No. ${number}, ${hermannMauguin}, is ${crystalSystem}`;
  return [
    finding(SYSTEM, input.place(stated.name, stated.span), message, {
      stated: { what: stated.name, value: stated.text },
      against: { what: SOURCE_NAMES[input.symmetry!.source], value: crystalSystem },
    }),
  ];
}
