import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { directionVector, type Vec3 } from "../../lib/structure/index.ts";
import { crystalTensors, polariseAnswer, rotationTable } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";

/** Values of the letters of a crystal's tensors. */
type Letters = Readonly<Record<string, number>>;
/** Intensity from cosine and sine of the angle. */
type Law = (c: number, s: number, l: Letters) => number;

interface Case {
  readonly crystal: string;
  /** Direction of the light and of the polarisation at angle 0; lattice rows. */
  readonly about: Vec3;
  readonly zero: Vec3;
  /** Closed forms by species, parallel and crossed; worked out on paper from e . R . e' with e = (c, s). */
  readonly laws: Readonly<Record<string, readonly [parallel: Law, crossed: Law]>>;
}

const double = (c: number, s: number) => [c * c - s * s, 2 * s * c] as const; // of twice the angle
const none: Law = () => 0;
const diagonal = (at0: string, at90: string): readonly [Law, Law] => [
  (c, s, l) => (l[at0]! * c * c + l[at90]! * s * s) ** 2,
  (c, s, l) => ((l[at90]! - l[at0]!) * s * c) ** 2,
];
const shear = (letter: string): readonly [Law, Law] => [
  (c, s, l) => (l[letter]! * double(c, s)[1]) ** 2,
  (c, s, l) => (l[letter]! * double(c, s)[0]) ** 2,
];
const constant = (parallel: (l: Letters) => number, crossed: (l: Letters) => number): readonly [Law, Law] => [
  (_c, _s, l) => parallel(l),
  (_c, _s, l) => crossed(l),
];
const zero = () => 0;

const CASES: readonly Case[] = [
  {
    crystal: "calcite",
    about: [0, 0, 1],
    zero: [1, 0, 0],
    laws: {
      A1g: constant((l) => l["a"]! ** 2, zero),
      Eg: constant(
        (l) => l["c"]! ** 2,
        (l) => l["c"]! ** 2,
      ),
    },
  },
  {
    crystal: "calcite", // light along x = a, from y to z: only the partner with yy and yz shows
    about: [1, 0, 0],
    zero: [1, 2, 0],
    laws: {
      A1g: diagonal("a", "b"),
      Eg: [
        (c, s, l) => (-l["c"]! * c * c + l["d"]! * double(c, s)[1]) ** 2,
        (c, s, l) => (l["c"]! * s * c + l["d"]! * double(c, s)[0]) ** 2,
      ],
    },
  },
  {
    crystal: "rutile",
    about: [0, 0, 1],
    zero: [1, 0, 0],
    laws: {
      A1g: constant((l) => l["a"]! ** 2, zero),
      B1g: [(c, s, l) => (l["c"]! * double(c, s)[0]) ** 2, (c, s, l) => (l["c"]! * double(c, s)[1]) ** 2],
      B2g: shear("d"),
      Eg: [none, none],
    },
  },
  {
    crystal: "aragonite",
    about: [0, 0, 1],
    zero: [1, 0, 0],
    laws: { Ag: diagonal("a", "b"), B1g: shear("d"), B2g: [none, none], B3g: [none, none] },
  },
  {
    crystal: "gypsum", // light along b, from z (c*) towards x
    about: [0, 1, 0],
    zero: [0, 0, 0], // replaced by c*, which is no row
    laws: {
      Ag: [
        (c, s, l) => (l["d"]! * c * c + l["b"]! * double(c, s)[1] + l["a"]! * s * s) ** 2,
        (c, s, l) => ((l["a"]! - l["d"]!) * s * c + l["b"]! * double(c, s)[0]) ** 2,
      ],
      Bg: [none, none],
    },
  },
  {
    crystal: "spinel",
    about: [0, 0, 1],
    zero: [1, 0, 0],
    laws: {
      A1g: constant((l) => l["a"]! ** 2, zero),
      Eg: [
        (c, s, l) => l["b"]! ** 2 * (1 + 3 * double(c, s)[0] ** 2),
        (c, s, l) => 3 * (l["b"]! * double(c, s)[1]) ** 2,
      ],
      T2g: shear("c"),
    },
  },
  {
    crystal: "spinel", // a cubic crystal looks isotropic along a threefold axis
    about: [1, 1, 1],
    zero: [1, -1, 0],
    laws: {
      A1g: constant((l) => l["a"]! ** 2, zero),
      Eg: constant(
        (l) => l["b"]! ** 2,
        (l) => l["b"]! ** 2,
      ),
      T2g: constant(
        (l) => l["c"]! ** 2,
        (l) => (2 / 3) * l["c"]! ** 2,
      ),
    },
  },
];

describe("intensity against the angle of rotation", () => {
  it.each(CASES)("of $crystal about [$about] is the closed form", ({ crystal, about, zero, laws }) => {
    const tensors = crystalTensors(fixture(crystal));
    const k = directionVector(tensors.frame, about);
    const e: Vec3 = zero.every((i) => i === 0) ? [0, 0, 1] : directionVector(tensors.frame, zero);
    expect(tensors.raman.map((f) => f.label)).toEqual(Object.keys(laws));
    const value = fc.double({ min: -2, max: 2, noNaN: true });
    const names = tensors.raman.flatMap((f) => f.letters);
    fc.assert(
      fc.property(fc.array(value, { minLength: names.length, maxLength: names.length }), (values) => {
        const letters = new Map(names.map((n, i) => [n, values[i]!]));
        const { angles, curves } = rotationTable(tensors, k, e, letters, 15);
        expect(angles).toEqual([0, 15, 30, 45, 60, 75, 90, 105, 120, 135, 150, 165, 180]);
        for (const { label, parallel, crossed } of curves) {
          angles.forEach((degrees, i) => {
            const [c, s] = [Math.cos((degrees * Math.PI) / 180), Math.sin((degrees * Math.PI) / 180)];
            const at = laws[label]!.map((law) => law(c, s, Object.fromEntries(letters)));
            expect(parallel[i]!, `${label} at ${degrees}`).toBeCloseTo(at[0]!, 9);
            expect(crossed[i]!, `${label} crossed at ${degrees}`).toBeCloseTo(at[1]!, 9);
          });
        }
      }),
      { numRuns: 40 },
    );
  });

  it("is part of the answer, with letters of which none given is 1", () => {
    const rotation = { about: "z", zero: "x", letters: new Map([["a", 2]]), step: 45 };
    const answer = polariseAnswer(fixture("rutile"), { rotation }).rotation!;
    expect(answer.angles).toEqual([0, 45, 90, 135, 180]);
    expect([answer.about, answer.zero, answer.letters]).toEqual(["z", "x", "a=2, b=1, c=1, d=1, e=1"]);
    const rounded = answer.curves.map((c) => [c.label, c.parallel.map((e) => Math.round(e * 1e9) / 1e9)]);
    expect(rounded).toEqual([
      ["A1g", [4, 4, 4, 4, 4]],
      ["B1g", [1, 0, 1, 0, 1]],
      ["B2g", [0, 1, 0, 1, 0]],
      ["Eg", [0, 0, 0, 0, 0]],
    ]);
  });
});

describe("the polarisation at angle 0 where none is given", () => {
  const zeroAbout = (about: string, crystal = "calcite") =>
    polariseAnswer(fixture(crystal), { rotation: { about, zero: null, letters: new Map([["b", 0.2]]), step: 45 } })
      .rotation!;

  it("is the first axis across the light", () => {
    expect(["z", "x", "[110]"].map((about) => zeroAbout(about).zero)).toEqual(["x", "y", "z"]);
  });

  it("is z projected on a face that no axis lies in, and then stands across the light", () => {
    const cleavage = zeroAbout("(104)");
    expect(cleavage.zero).toBe("the projection of z");
    // calcite: c' is the short diagonal of the cleavage rhomb, and a mirror plane's trace; A1g cannot cross over there, but at 45 degrees
    const a1g = cleavage.curves.find((c) => c.label === "A1g")!;
    expect(a1g.crossed[0]).toBeCloseTo(0, 12);
    expect(a1g.crossed[1]).toBeGreaterThan(0.01);
  });
});
