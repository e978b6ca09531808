import type { IntMat3, IntVec3 } from "../algebra/index.ts";
import { type GeometricClass, geometricClassNames } from "./geometric-class.ts";
import { plainTriplet } from "./plain-operation.ts";
import { ARITHMETIC_CLASSES } from "./tables/arithmetic-classes.ts";

/** A point group acting on a lattice, in the axes of the reference settings. */
export interface ArithmeticClass {
  /** Centring letter of the conventional cell and oriented point group: `P mmm`, `I -4m2`, `R 321`. */
  readonly name: string;
  readonly centring: "P" | "A" | "C" | "F" | "I" | "R";
  readonly geometric: GeometricClass;
  /** Rotation parts that generate the point group, in the order in which International Tables compose them. */
  readonly generators: readonly IntMat3[];
  /** Its space-group types; translations of the generators in twelfths. */
  readonly types: readonly { readonly number: number; readonly translations: readonly IntVec3[] }[];
}

const decoded = new Map<string, ArithmeticClass>();
let byGeometric: Map<GeometricClass, string[]> | null = null;
let lineOfType: string[] | null = null;

/** The arithmetic classes (1 to 7) of a geometric class, decoded on first use. */
export function arithmeticClasses(geometric: GeometricClass): ArithmeticClass[] {
  if (!byGeometric) {
    byGeometric = new Map();
    for (const line of lines()) {
      const name = geometricOf(line);
      byGeometric.set(name, [...(byGeometric.get(name) ?? []), line]);
    }
  }
  return (byGeometric.get(geometric) ?? []).map(decode);
}

/** The arithmetic class to which a space-group type (1 to 230) belongs. */
export function arithmeticClassOf(number: number): ArithmeticClass {
  if (!lineOfType) {
    lineOfType = [];
    for (const line of lines()) {
      for (const entry of line.slice(line.lastIndexOf("|") + 1).split(" "))
        lineOfType[Number.parseInt(entry, 10)] = line;
    }
  }
  const line = lineOfType[number];
  if (line === undefined) throw new RangeError(`there is no space-group type ${number}`);
  return decode(line);
}

function lines(): string[] {
  return ARITHMETIC_CLASSES.trim().split("\n");
}

/** `312` and `321` are settings of `32`, `-4m2` of `-42m` and so on: the lattice tells them apart, not the group. */
const SAME_GEOMETRY: Readonly<Record<string, GeometricClass>> = {
  "-4m2": "-42m",
  312: "32",
  321: "32",
  "3m1": "3m",
  "31m": "3m",
  "-31m": "-3m",
  "-3m1": "-3m",
  "-62m": "-6m2",
};

function geometricOf(line: string): GeometricClass {
  const pointGroup = line.slice(2, line.indexOf("|"));
  const name = SAME_GEOMETRY[pointGroup] ?? geometricClassNames().find((g) => g === pointGroup);
  if (!name) throw new RangeError(`no geometric class "${pointGroup}"`);
  return name;
}

function decode(line: string): ArithmeticClass {
  const known = decoded.get(line);
  if (known) return known;
  const [name = "", generators = "", types = ""] = line.split("|");
  const fresh: ArithmeticClass = {
    name,
    centring: name[0] as ArithmeticClass["centring"],
    geometric: geometricOf(line),
    generators: generators ? generators.split(" ").map(rotationFromText) : [],
    types: types.split(" ").map((entry) => {
      const [number = "", translations = ""] = entry.split(":");
      return { number: Number(number), translations: translations ? translations.split(",").map(twelfths) : [] };
    }),
  };
  decoded.set(line, fresh);
  return fresh;
}

function twelfths(digits: string): IntVec3 {
  return [...digits].map((c) => Number.parseInt(c, 12)) as unknown as IntVec3;
}

/** `-y,x-y,z`: the rotation part alone. */
function rotationFromText(text: string): IntMat3 {
  const plain = plainTriplet(text);
  if (!plain) throw new RangeError(`the table of arithmetic classes has the rotation "${text}"`);
  return plain.W;
}
