import { cellOfItems, type Deposition, pointOf } from "./deposition.ts";
import { imagesOf, type PlainOperation, plainOperation, type Triple } from "./plain-crystal.ts";
import { pick, type Random } from "./slip.ts";

/** Names, numbers and Hall symbols of frequent groups; one of another type is put in. */
const OTHERS = [
  { name: "P 21/c", number: "14", hall: "-P 2ybc", system: "monoclinic" },
  { name: "C 2/c", number: "15", hall: "-C 2yc", system: "monoclinic" },
  { name: "P b c a", number: "61", hall: "-P 2ac 2ab", system: "orthorhombic" },
  { name: "P n m a", number: "62", hall: "-P 2ac 2n", system: "orthorhombic" },
  { name: "P 42/m n m", number: "136", hall: "-P 4n 2n", system: "tetragonal" },
  { name: "R -3 m", number: "166", hall: '-R 3 2"', system: "trigonal" },
  { name: "P 63/m m c", number: "194", hall: "-P 6c 2c", system: "hexagonal" },
  { name: "F m -3 m", number: "225", hall: "-F 4 2 3", system: "cubic" },
] as const;

export function otherGroup(field: keyof (typeof OTHERS)[number]) {
  return (_text: string, random: Random, d: Deposition) => {
    const number = d.items["_space_group_IT_number"];
    const system = d.items["_space_group_crystal_system"];
    const list = OTHERS.filter((o) => o.number !== number && (field !== "system" || o.system !== system));
    // a trigonal group in hexagonal axes may be called hexagonal
    const named = list.filter((o) => !(field === "system" && system === "trigonal" && o.system === "hexagonal"));
    return pick(named, random)![field];
  };
}

/** Names of one type in two settings. */
const SETTINGS: Readonly<Record<string, readonly string[]>> = {
  "14": ["P 21/c", "P 21/n", "P 21/a"],
  "15": ["C 2/c", "I 2/a"],
  "62": ["P n m a", "P b n m", "P m c n"],
  "63": ["C m c m", "A m m a", "B b m m"],
};

export function otherSetting(text: string, random: Random, d: Deposition): string | null {
  const names = SETTINGS[d.items["_space_group_IT_number"]!] ?? [];
  const plain = (name: string) => name.replace(/\s|1(?= )/g, "");
  return pick(
    names.filter((n) => plain(n) !== plain(text)),
    random,
  );
}

/** A random operation but the identity, as its place in the list. */
function somewhere(d: Deposition, random: Random): number | null {
  const others = d.operations.flatMap((text, i) => (/^x,\s*y,\s*z$/.test(text) ? [] : [i]));
  return pick(others, random);
}

export function operationSign(d: Deposition, random: Random): Deposition | null {
  const i = somewhere(d, random);
  if (i === null) return null;
  const parts = d.operations[i]!.split(",");
  const at = Math.floor(3 * random());
  const part = parts[at]!.trim();
  parts[at] = /^-[xyz]/.test(part)
    ? part.slice(1)
    : /^[xyz]/.test(part)
      ? `-${part}`
      : part.replace(/([+-])(?=[xyz])/, flip);
  if (parts.join() === d.operations[i]) return null;
  d.operations[i] = parts.join();
  return d;
}

const flip = (sign: string) => (sign === "-" ? "+" : "-");

export function operationFraction(d: Deposition, random: Random): Deposition | null {
  const i = somewhere(d, random);
  if (i === null) return null;
  const text = d.operations[i]!;
  d.operations[i] = text.includes("1/2") ? text.replace(/[+-]?1\/2[+-]?(?=[xyz]|,|$)/, "") : text.replace(",", "+1/2,");
  return d.operations[i] === text ? null : d;
}

function inverted(a: PlainOperation): boolean {
  return (
    a.W[0]! * (a.W[4]! * a.W[8]! - a.W[5]! * a.W[7]!) -
      a.W[1]! * (a.W[3]! * a.W[8]! - a.W[5]! * a.W[6]!) +
      a.W[2]! * (a.W[3]! * a.W[7]! - a.W[4]! * a.W[6]!) <
    0
  );
}

/** The rotations alone are a group; the centre is forgotten, and with it every mirror and glide plane. */
export function centreLost(d: Deposition): Deposition | null {
  const proper = d.operations.filter((text) => !inverted(plainOperation(text)));
  if (proper.length === d.operations.length || proper.length === 1) return null;
  d.operations = proper;
  return d;
}

export function operationLost(d: Deposition, random: Random): Deposition | null {
  const i = somewhere(d, random);
  if (i === null || d.operations.length === 2) return null; // the identity alone is a group, of another name
  d.operations.splice(i, 1);
  return d;
}

/** All atoms moved by one vector while the operations stay. */
export function originShifted(d: Deposition): Deposition | null {
  const shift: Triple = [0.0712, 0.0431, 0.0937];
  for (const atom of d.atoms) {
    pointOf(atom).forEach((e, i) => {
      atom[(["x", "y", "z"] as const)[i]!] = (e + shift[i]!).toFixed(4);
    });
  }
  return d.operations.length > 1 ? d : null;
}

/** The cell twice as long along c, the atoms of both halves listed, nothing else of the file touched but volume and Z. */
export function doubledCell(d: Deposition): Deposition | null {
  const p1 = copyInP1(d);
  if (!p1) return null;
  const { items } = p1;
  const c = Number.parseFloat(items["_cell_length_c"]!);
  items["_cell_length_c"] = (2 * c).toFixed(4);
  items["_cell_volume"] = cellOfItems(items).volume.toFixed(2);
  items["_cell_formula_units_Z"] = String(2 * Number(items["_cell_formula_units_Z"]));
  items["_exptl_crystal_F_000"] = String(2 * Number(items["_exptl_crystal_F_000"]));
  p1.atoms = p1.atoms.flatMap((a) => {
    const z = Number.parseFloat(a.z) / 2;
    return [
      { ...a, z: z.toFixed(6) },
      { ...a, label: `${a.label}B`, z: (z + 0.5).toFixed(6) },
    ];
  });
  return p1;
}

/** Everything that speaks of the group or the measurement is made that of P 1, and every atom of the cell is listed. */
export function copyInP1(d: Deposition): Deposition | null {
  const cell = cellOfItems(d.items);
  const operations = d.operations.map(plainOperation);
  if (operations.length === 1) return null;
  d.atoms = d.atoms.flatMap((atom) =>
    imagesOf(cell, operations, pointOf(atom)).map((p, i) => {
      const [x, y, z] = p.map((e) => e.toFixed(6)) as [string, string, string];
      return {
        ...atom,
        label: `${atom.label}x${i + 1}`,
        x,
        y,
        z,
        multiplicity: "1",
        order: "1",
        letter: "a",
        uiso: "?",
      };
    }),
  );
  d.operations = ["x,y,z"];
  const kept = Object.entries(d.items).filter(([name]) => !/^_(?:diffrn|reflns|refine)/.test(name));
  const group = { "_space_group_name_H-M_alt": "P 1", _space_group_IT_number: "1", _space_group_name_Hall: "P 1" };
  d.items = { ...Object.fromEntries(kept), ...group, _space_group_crystal_system: "triclinic" };
  return { ...d, tensors: [], bonds: [], angles: [] };
}

/** The lengths of two axes that differ, in each other's place. */
export function exchangedAxes(d: Deposition): Deposition | null {
  const { items } = d;
  const [a, b, c] = ["a", "b", "c"].map((x) => items[`_cell_length_${x}`]!) as [string, string, string];
  if (Math.abs(Number.parseFloat(a) / Number.parseFloat(c) - 1) > 0.02) {
    items["_cell_length_a"] = c;
    items["_cell_length_c"] = a;
  } else if (Math.abs(Number.parseFloat(a) / Number.parseFloat(b) - 1) > 0.02) {
    items["_cell_length_a"] = b;
    items["_cell_length_b"] = a;
  } else return null;
  return d;
}
