import { element, readLabel, readTypeSymbol } from "../structure/index.ts";
import { atomRows } from "./atom-rows.ts";
import { type AuditInput, rowText } from "./audit-input.ts";
import { type Criterion, count, type Finding, finding, some } from "./finding.ts";

const REPEATED: Criterion = {
  id: "label-repeated",
  severity: "doubt",
  criterion: "Two rows of the atom list have one label.",
  source: "IUCr core CIF dictionary, _atom_site.label: the key of the list.",
  advice: "Number the atoms; displacement tensors and listed distances cannot be told apart otherwise.",
};

const ELEMENT: Criterion = {
  id: "label-element",
  severity: "doubt",
  criterion:
    "The label of an atom begins with the symbol of another element than its type symbol, the other being in the structure too.",
  source: "IUCr core CIF dictionary, _atom_site.label: its first component is the type symbol.",
  advice: "Correct whichever is wrong; programs that lack type symbols read the label.",
};

const UNKNOWN: Criterion = {
  id: "element-unknown",
  severity: "doubt",
  criterion: "No element can be read from the type symbol or the label of an atom.",
  source: "IUCr core CIF dictionary, _atom_site.type_symbol.",
  advice: "Add _atom_site_type_symbol.",
};

export const criteria: readonly Criterion[] = [REPEATED, ELEMENT, UNKNOWN];

/** Are labels unique, and of the element they name? */
export function check(input: AuditInput): Finding[] {
  return [...repeated(input), ...elements(input), ...unknown(input)];
}

function repeated(input: AuditInput): Finding[] {
  const twice = input.atoms.flatMap((a) => {
    const label = /^(.*)#(\d+)$/.exec(a.label);
    return label ? [{ atom: a, label: label[1]! }] : [];
  });
  const [first] = twice;
  if (!first) return [];
  const names = [...new Set(twice.map((t) => t.label))];
  const message = `${count(names.length, "label")} used for more than one row: ${some(names)}`;
  return [
    finding(REPEATED, input.place("_atom_site_label", first.atom.span), message, {
      stated: { what: "_atom_site_label", value: first.label },
      against: { what: "rows with it", value: 1 + twice.filter((t) => t.label === first.label).length },
      ...(names.length > 1 ? { also: names.slice(1) } : {}),
    }),
  ];
}

function elements(input: AuditInput): Finding[] {
  const rows = atomRows(input);
  const present = new Set(rows.map((r) => r.atom.element ?? ""));
  const odd = rows.flatMap(({ atom, loop, row }) => {
    const type = rowText(loop, row, "_atom_site.type_symbol");
    const read = type && readTypeSymbol(type.text, present);
    // only a label made of a whole symbol and a number says an element; OW1, CA, HN2 are names
    const letters = /^([A-Z][a-z]?)\d/.exec(atom.label)?.[1];
    const named = letters && element(letters) ? readLabel(letters)!.element : null;
    if (!type || !read || !named || named === read.element || !present.has(named)) return [];
    return [{ atom, type, named }];
  });
  const [first, ...rest] = odd;
  if (!first) return [];
  const others = rest.map((o) => o.atom.label);
  const message = `${first.atom.label} has the type symbol ${first.type.text}${others.length > 0 ? `; another element than in the label as well: ${some(others)}` : ""}`;
  return [
    finding(ELEMENT, input.place(first.type.name, first.type.span), message, {
      stated: { what: `${first.type.name} of ${first.atom.label}`, value: first.type.text },
      against: { what: "element in the label", value: first.named },
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}

function unknown(input: AuditInput): Finding[] {
  const [first, ...rest] = input.atoms.filter((a) => a.element === null);
  if (!first) return [];
  const others = rest.map((a) => a.label);
  const message = `no element can be read for ${some([first.label, ...others])}`;
  return [
    finding(UNKNOWN, input.place("_atom_site_label", first.span), message, {
      stated: { what: "label", value: first.label },
      against: { what: "type symbol", value: first.typeSymbol ?? "none" },
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}
