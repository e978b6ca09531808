import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  crystalClasses,
  matrixEntries,
  type PointGroupTable,
  pointGroupTable,
  type TensorForm,
} from "../../lib/representation/index.ts";
import { NONE, OTHERS, type Published, readLoudon, type Turn, type Vector } from "./raman-tensors.data.ts";

/** Value of an entry such as `-2b`, `sqrt3 b`, `.` for given values of the letters, the first letter met first. */
function evaluate(text: string, values: Vector, met: string[]): number {
  const terms = text.match(/[+-]?[^+-]+/g) ?? [];
  return terms.reduce((sum, entry) => {
    const match = /^([+-]?)(\d*)(?:sqrt(\d))? ?([a-z])$/.exec(entry);
    if (!match) {
      expect(entry).toBe(".");
      return sum;
    }
    const [, sign, factor, root, letter = ""] = match;
    if (!met.includes(letter)) met.push(letter);
    const size = Number(factor || 1) * Math.sqrt(Number(root ?? 1)) * values[met.indexOf(letter)]!;
    return sum + (sign === "-" ? -size : size);
  }, 0);
}

/** Full tensors of the partners, for values of the letters in order of appearance. */
function tensorsOf(partners: readonly (readonly string[])[], values: Vector): number[][][] {
  const met: string[] = [];
  return partners.map((entries) => {
    const [xx, xy, xz, yy, yz, zz] = entries.map((e) => evaluate(e, values, met));
    return [
      [xx!, xy!, xz!],
      [xy!, yy!, yz!],
      [xz!, yz!, zz!],
    ];
  });
}

const dot = (a: Vector, b: Vector): number => a.reduce((sum, e, i) => sum + e * b[i]!, 0);

const amplitude = (T: readonly Vector[], incident: Vector, scattered: Vector): number =>
  dot(
    incident,
    T.map((row) => dot(row, scattered)),
  );

/** Scattered intensity, the sum over partners of (incident . tensor . scattered)^2: blind to the choice of partners. */
function intensity(tensors: readonly (readonly Vector[])[], incident: Vector, scattered: Vector): number {
  return tensors.reduce((total, T) => total + amplitude(T, incident, scattered) ** 2, 0);
}

/** The vector in Loudon's axes. */
const inLoudonAxes = (v: Vector, turn: Turn): Vector => turn.map((axis) => dot(axis, v));

const letterCount = (published: Published): number =>
  new Set(published.tensors.flat().flatMap((e) => e.replace("sqrt", "").match(/[a-z]/g) ?? [])).size;

/**
 * Values of Loudon's letters for those of ours. E of 23 and m-3 is a pair of complex species, so that two real letters
 * are free; Loudon gives the pair with one, and with it the same intensities: its square is the sum of the squares.
 */
function foldedValues(values: Vector, ours: number, published: Published): Vector {
  return ours === 2 && letterCount(published) === 1 ? [Math.hypot(values[0]!, values[1]!)] : values;
}

/** The tensor in the axes to which they were turned. */
const turned = (T: readonly Vector[], turn: Turn): number[][] =>
  NONE.map((ei) => NONE.map((es) => amplitude(T, inLoudonAxes(ei, turn), inLoudonAxes(es, turn))));

/** Values of our letters that give a tensor: those at the places where a letter stands alone. */
function readOff(form: TensorForm, T: readonly Vector[]): Vector {
  const rows = matrixEntries(form.partners[0]!.entries);
  return form.letters.map((letter) => {
    const i = rows.findIndex((row) => row.includes(letter));
    return T[i]![rows[i]!.indexOf(letter)]!;
  });
}

const PUBLISHED = readLoudon();
const CASES = [
  ...[...PUBLISHED.keys()].map((symbol) => [symbol, symbol, "no turn", NONE] as const),
  ...OTHERS.map((c) => c),
].flatMap(([symbol, loudon, words, turn]) =>
  PUBLISHED.get(loudon)!.map((published) => ({ symbol, loudon, words, turn, published, label: published.label })),
);

const tables = new Map<string, PointGroupTable>();
function tableOf(symbol: string): PointGroupTable {
  const found = tables.get(symbol) ?? pointGroupTable(symbol);
  tables.set(symbol, found);
  return found;
}

const integers = (length: number) =>
  fc.array(fc.integer({ min: -9, max: 9 }), { minLength: length, maxLength: length });
const vector = integers(3);

/** Tensor that goes with a dipole along n: the sum over partners of (n . dipole) times the Raman tensor. */
function coupled(dipoles: readonly Vector[], tensors: readonly (readonly Vector[])[], n: Vector): number[][] {
  return [0, 1, 2].map((i) =>
    [0, 1, 2].map((j) => dipoles.reduce((s, p, k) => s + dot(p, n) * tensors[k]![i]![j]!, 0)),
  );
}

function axisOf(text: string): Vector {
  const sign = text.startsWith("-") ? -1 : 1;
  return ["x", "y", "z"].map((a) => (text.endsWith(a) ? sign : 0));
}

describe("Raman tensors in Loudon's table", () => {
  it("stand there for the 32 classes", () => {
    const classes = [...PUBLISHED.keys()].map((symbol) => pointGroupTable(symbol).group.schoenflies);
    expect(new Set(classes)).toEqual(new Set([...crystalClasses().values()].map((c) => c.schoenflies)));
    expect(classes).toHaveLength(32);
  });

  it.each([...PUBLISHED.keys()])("are those of all Raman species of %s", (symbol) => {
    const found = tableOf(symbol).raman.forms.map((f) => f.label);
    expect(new Set(PUBLISHED.get(symbol)!.map((p) => p.label))).toEqual(new Set(found));
  });

  it.each(CASES)("of $loudon, $label, scatter as published in every geometry of $symbol ($words)", (c) => {
    const form = tableOf(c.symbol).raman.forms.find((f) => f.label === c.label)!;
    expect(form.partners).toHaveLength(c.published.tensors.length);
    fc.assert(
      fc.property(integers(form.letters.length), vector, vector, (values, incident, scattered) => {
        const expected = tensorsOf(c.published.tensors, foldedValues(values, form.letters.length, c.published));
        const single = form.partners.length === 1;
        const found = tensorsOf(
          form.partners.map((p) => p.entries),
          single ? readOff(form, turned(expected[0]!, c.turn)) : values,
        );
        const [ei, es] = [inLoudonAxes(incident, c.turn), inLoudonAxes(scattered, c.turn)];
        expect(intensity(found, incident, scattered)).toBeCloseTo(intensity(expected, ei, es), 6);
      }),
      { numRuns: 40 },
    );
  });

  it.each(CASES)("of $loudon, $label, go with the polarisation printed beside them, in $symbol ($words)", (c) => {
    const { raman, vector: dipoles } = tableOf(c.symbol);
    const form = raman.forms.find((f) => f.label === c.label)!;
    const dipole = dipoles.forms.find((f) => f.label === c.label);
    const { polarisations, tensors } = c.published;
    expect(dipole === undefined).toBe(polarisations.length === 0);
    if (!dipole) return;
    if (tensors.length === 1) {
      // one tensor for one dipole that may lie anywhere along these axes
      const axes = polarisations[0]!.split(",").map((a) => c.turn["xyz".indexOf(a)]!.map(Math.abs));
      const free = [0, 1, 2].filter((i) => dipole.partners[0]!.coefficients[i]!.some((e) => e !== 0));
      expect(dipole.letters).toHaveLength(axes.length);
      expect(free).toEqual([0, 1, 2].filter((i) => axes.some((a) => a[i] === 1)));
      return;
    }
    // the first letter alone: the other one, in pairs of complex species, only shifts the phase of dipole and tensor
    const ours = dipole.partners.map((p) => p.coefficients.map((row) => row[0]!));
    const theirs = polarisations.map(axisOf);
    fc.assert(
      fc.property(integers(form.letters.length), vector, vector, vector, (values, n, incident, scattered) => {
        const entries = form.partners.map((p) => p.entries);
        const found = amplitude(coupled(ours, tensorsOf(entries, values), n), incident, scattered);
        const [m, ei, es] = [n, incident, scattered].map((v) => inLoudonAxes(v, c.turn)) as [Vector, Vector, Vector];
        const expected = amplitude(coupled(theirs, tensorsOf(tensors, values), m), ei, es);
        expect(Math.abs(found)).toBeCloseTo(Math.abs(expected), 6); // the sign of a mode is free
      }),
      { numRuns: 40 },
    );
  });

  it("have as many letters as published, but for E of 23 and m-3, which are pairs of complex species", () => {
    const more = [...PUBLISHED].flatMap(([symbol, list]) =>
      list.flatMap((p) => {
        const { letters } = tableOf(symbol).raman.forms.find((f) => f.label === p.label)!;
        return letters.length === letterCount(p) ? [] : [`${symbol} ${p.label} ${letters.length}`];
      }),
    );
    expect(more).toEqual(["23 E 2", "m-3 Eg 2"]);
  });

  it("of quartz (321) and of rutile-like classes read letter by letter as Loudon prints them", () => {
    const print = (symbol: string, label: string) =>
      pointGroupTable(symbol)
        .raman.forms.find((f) => f.label === label)!
        .partners.map((p) =>
          matrixEntries(p.entries)
            .map((row) => row.join(" "))
            .join("; "),
        );
    expect(print("321", "E")).toEqual(["c . .; . -c d; . d .", ". -c -d; -c . .; -d . ."]);
    expect(print("3", "E")).toEqual(["c d e; d -c f; e f .", "d -c -f; -c -d e; -f e ."]);
    expect(print("4/mmm", "B1g")).toEqual(["c . .; . -c .; . . ."]);
    expect(print("m-3m", "Eg")).toEqual(["b . .; . b .; . . -2b", "-sqrt3 b . .; . sqrt3 b .; . . ."]);
  });
});
