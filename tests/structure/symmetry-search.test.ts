import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { inverseRatMat } from "../../lib/algebra/index.ts";
import {
  apply3,
  type Crystal,
  crystalOf,
  lengthOf,
  type Mat3,
  metricOf,
  type SymmetriseAnswer,
  symmetriseAnswer,
  type Vec3,
} from "../../lib/structure/index.ts";
import {
  parseOperation,
  parseTransformation,
  settingOperations,
  settingsOf,
  spaceGroup,
} from "../../lib/symmetry/index.ts";
import { countOperations } from "../oracle/symmetry-search.ts";
import { atom, crystalOfText, fixture } from "../support/crystals.ts";
import { type Disguise, disguised, randomNumbers, randomStructure } from "../support/random-structures.ts";

const TYPES = Array.from({ length: 230 }, (_, i) => i + 1);

/** Types whose disguised structure comes back as another, with what it came back as. */
function mistaken(disguise: (number: number) => Disguise): string[] {
  return TYPES.flatMap((number) => {
    const random = randomNumbers(1000 * number + 7);
    const answer = symmetriseAnswer(disguised(randomStructure(number, random), disguise(number), random));
    const { found } = answer;
    if (found.number === number && found.settingName === "reference") return [];
    return [`${number}: ${found.number}, setting ${found.settingName}`];
  });
}

describe("structures of all 230 types, listed in P 1 in a random cell with a random origin", () => {
  it("come back as their type, enantiomorphs told apart", () => {
    expect(mistaken(() => ({ multiple: [1, 1, 1], noise: 0, steps: 4 }))).toEqual([]);
  }, 120_000);

  it("come back as their type with noise of 0.01 A", () => {
    expect(mistaken(() => ({ multiple: [1, 1, 1], noise: 0.01, steps: 4 }))).toEqual([]);
  }, 120_000);

  it("come back as their type from a larger cell, with noise", () => {
    const multiples = [
      [2, 1, 1],
      [1, 3, 1],
      [1, 1, 4],
      [2, 1, 2],
    ] as const;
    // groups with many operations keep the smallest multiple, for time
    const choice = (number: number) => (number < 140 ? multiples[number % 4]! : multiples[0]);
    expect(mistaken((number) => ({ multiple: choice(number), noise: 0.01, steps: 2 }))).toEqual([]);
  }, 240_000);
});

/** Largest distance, angstrom, from an atom of the file to the nearest of the symmetrised structure; labels ignored. */
function farthest(given: Crystal, answer: SymmetriseAnswer): number {
  const { P, p } = parseTransformation(`${answer.transformation.P};${answer.transformation.p}`);
  const back = inverseRatMat(P);
  const toAnswer = back.n.map((e) => e / back.d) as unknown as Mat3;
  const [a, b, c, alpha, beta, gamma] = answer.cell;
  const metric = metricOf({ a, b, c, alpha, beta, gamma });
  const images = answer.sites.flatMap((s) =>
    answer.found.operations.map((xyz) => {
      const { W, w } = parseOperation(xyz);
      const x = apply3(W, s.position);
      return { element: s.element, x: x.map((e, i) => e + w.n[i]! / w.d) as unknown as Vec3 };
    }),
  );
  return given.sites
    .flatMap((s) => s.images.map((i) => ({ element: s.element, x: i.position })))
    .reduce((worst, { element, x }) => {
      const at = apply3(toAnswer, x.map((e, i) => e - answer.originShift[i]! - p.n[i]! / p.d) as unknown as Vec3);
      const nearest = images.reduce((best, image) => {
        if (image.element !== element) return best;
        const d = at.map((e, i) => e - image.x[i]!);
        return Math.min(best, lengthOf(metric, d.map((e) => e - Math.round(e)) as unknown as Vec3));
      }, Number.POSITIVE_INFINITY);
      return Math.max(worst, nearest);
    }, 0);
}

describe("the symmetrised structure", () => {
  const sample = [1, 2, 5, 14, 19, 33, 43, 61, 76, 88, 122, 146, 148, 152, 167, 178, 198, 205, 214, 220];

  it.each(sample)("of type %i is the structure given, in the cell and about the origin it names", (number) => {
    const random = randomNumbers(number);
    const original = randomStructure(number, random);
    for (const noise of [0, 0.01]) {
      const given = disguised(original, { multiple: [2, 1, 1], noise, steps: 2 }, random);
      const answer = symmetriseAnswer(given);
      expect(farthest(given, answer)).toBeLessThan(2.5 * noise + 1e-6);
      expect(answer.moved.largest).toBeLessThan(2.5 * noise + 1e-6);
      expect(answer.sites).toHaveLength(original.sites.length);
      expect(answer.sites.flatMap((s) => s.labels)).toHaveLength(given.sites.length);
    }
  });

  it.each([4, 15, 20, 62, 100, 144, 166, 197])("of type %i can stay in the cell given", (number) => {
    const random = randomNumbers(number);
    const given = disguised(randomStructure(number, random), { multiple: [1, 1, 1], noise: 0, steps: 3 }, random);
    const answer = symmetriseAnswer(given, { cell: "given" });
    expect(answer.found.number).toBe(number);
    expect(answer.transformation).toEqual({ P: "a,b,c", p: "0,0,0" });
    expect(farthest(given, answer)).toBeLessThan(1e-6);
  });

  it("has axes in their conventional order", () => {
    for (const number of [2, 3, 14, 15, 16, 19, 23, 47, 69]) {
      const random = randomNumbers(number);
      const given = disguised(randomStructure(number, random), { multiple: [1, 1, 1], noise: 0, steps: 4 }, random);
      const [a, b, c, , beta] = symmetriseAnswer(given).cell;
      if (number >= 16) expect([a, b, c]).toEqual([a, b, c].sort((x, y) => x - y));
      else if (number >= 3) expect(beta).toBeGreaterThanOrEqual(90);
    }
  });
});

describe("the operations found", () => {
  it("are as many as a search through all pairs finds", () => {
    for (const number of [1, 2, 4, 19, 29, 75, 81, 113, 143, 157, 164, 195]) {
      const random = randomNumbers(number);
      const given = disguised(randomStructure(number, random), { multiple: [1, 1, 2], noise: 0, steps: 0 }, random);
      const { metric, sites } = given;
      const points = sites.map((s) => s.symmetry.point);
      const elements = sites.map((s) => s.element!);
      const answer = symmetriseAnswer(given);
      // the cell given is two primitive cells
      const expected = countOperations({ metric, points, elements }, 0.01);
      const kept = answer.operations.filter((a) => !/\/\d+[xyz]/.test(a.inGivenCell));
      expect(2 * kept.length).toBe(expected);
    }
  });

  it("carry their displacement: an atom moved by 0.06 A breaks what moves it, unless that is allowed", () => {
    const cell = { a: 6, b: 7, c: 8, alpha: 90, beta: 90, gamma: 90 };
    const p = (x: number, y: number, z: number): Vec3 => [x, y, z];
    const sites = [
      atom("Cu1", "Cu", p(0.1, 0.2, 0.3)),
      atom("Cu2", "Cu", p(0.9, 0.8, 0.7)),
      atom("O1", "O", p(0.3, 0.1, 0.4)),
      atom("O2", "O", p(0.7 + 0.01, 0.9, 0.6)),
      atom("S1", "S", p(0.25, 0.35, 0.45)),
      atom("S2", "S", p(0.75, 0.65, 0.55)),
    ];
    const given = crystalOf({ name: "x", metric: metricOf(cell), group: spaceGroup([]), sites });
    const tight = symmetriseAnswer(given, { tolerance: 0.03 });
    expect(tight.found.number).toBe(1);
    expect(tight.additional).toHaveLength(1);
    // the best centre lies 0.01 A off, so the pair O misses by 0.04 A, the other two by 0.02 A
    expect(tight.additional[0]).toMatchObject({ xyz: "-x,-y,-z" });
    expect(tight.additional[0]!.largest).toBeCloseTo(0.04, 6);
    expect(tight.additional[0]!.mean).toBeCloseTo((0.04 + 0.02 + 0.02) / 3, 6);
    expect(tight.higher.map((h) => h.number)).toEqual([2]);
    const loose = symmetriseAnswer(given, { tolerance: 0.05 });
    expect(loose.found.number).toBe(2);
    expect(loose.operations[1]).toMatchObject({ declared: false });
    expect(loose.operations[1]!.largest).toBeCloseTo(0.04, 6);
    expect(loose.moved.largest).toBeCloseTo(0.02, 6);
  });

  it("of a fixture are the declared ones, and nothing else", () => {
    for (const name of ["calcite", "gypsum-i2a", "alpha-quartz", "spinel", "epsomite", "scheelite-origin-1"]) {
      const crystal = fixture(name);
      const answer = symmetriseAnswer(crystal, { cell: "given" });
      expect(answer.index).toBe(1);
      expect(answer.operations.every((a) => a.declared)).toBe(true);
      expect(answer.notKept).toEqual([]);
      expect(answer.translations).toEqual([]);
      expect(answer.originShift).toEqual([0, 0, 0]);
      expect([...answer.found.operations].sort()).toEqual([...answer.declared.operations].sort());
      answer.sites.forEach((s, i) => {
        s.position.forEach((e, k) => {
          expect(e).toBeCloseTo(crystal.sites[i]!.symmetry.point[k]!, 9);
        });
      });
    }
  });
});

const halite = (group: string, atoms: string) => `data_x
_cell_length_a 5.6402
_cell_length_b 5.6402
_cell_length_c 5.6402
_cell_angle_alpha 90
_cell_angle_beta 90
_cell_angle_gamma 90
_space_group_name_H-M_alt '${group}'
loop_
_atom_site_label
_atom_site_type_symbol
_atom_site_fract_x
_atom_site_fract_y
_atom_site_fract_z
_atom_site_occupancy
${atoms}
`;

describe("a structure declared too low", () => {
  it("rock salt in P m -3 m misses its centring, told as translations", () => {
    const atoms = "Na1 Na 0 0 0 1\nNa2 Na 0.5 0.5 0 1\nCl1 Cl 0.5 0.5 0.5 1\nCl2 Cl 0.5 0 0 1";
    const answer = symmetriseAnswer(crystalOfText(halite("P m -3 m", atoms)));
    expect(answer.found.number).toBe(225);
    expect(answer.index).toBe(4);
    const faces = ["0,1/2,1/2", "1/2,0,1/2", "1/2,1/2,0"];
    expect(new Set(answer.translations.map((t) => t.vector)).size).toBe(2); // two of the three generate them
    for (const { vector } of answer.translations) expect(faces).toContain(vector);
    expect(answer.operations.every((a) => a.declared)).toBe(true);
    expect(answer.sites.map((s) => s.labels)).toEqual([
      ["Na1", "Na2"],
      ["Cl1", "Cl2"],
    ]);
  });

  it("atoms of other occupancy are other atoms", () => {
    const atoms = "Na1 Na 0 0 0 1\nNa2 Na 0.5 0.5 0 0.5\nCl1 Cl 0.5 0.5 0.5 1\nCl2 Cl 0.5 0 0 1";
    expect(symmetriseAnswer(crystalOfText(halite("P m -3 m", atoms))).found.number).toBe(221);
  });

  it("keeps the origin where the declared group fixes it", () => {
    fc.assert(
      fc.property(
        fc.constantFrom(14, 15, 61, 62, 88, 148, 205, 227),
        fc.integer({ min: 1, max: 1e6 }),
        (number, seed) => {
          const random = randomNumbers(seed);
          const whole = randomStructure(number, random);
          // declared in P -1 only, about the same centre, which origin choice 2 and the others have at 0
          const sites = whole.sites.flatMap((s) =>
            s.images.map((image, k) => ({ ...s, label: `${s.label}-${k}`, position: image.position })),
          );
          const group = spaceGroup(settingOperations(settingsOf(2)[0]!));
          const given = crystalOf({ name: "x", metric: whole.metric, group, sites });
          const answer = symmetriseAnswer(given, { cell: "given" });
          expect(answer.found.number).toBe(number);
          expect(Math.hypot(...answer.originShift)).toBe(0);
          expect(answer.notKept).toEqual([]);
          expect([...answer.found.operations].sort()).toEqual([...whole.identified.summary.operations].sort());
        },
      ),
      { numRuns: 12 },
    );
  });

  it("is told which groups a larger tolerance and a strained cell would allow", () => {
    const { found, higher, additional } = symmetriseAnswer(fixture("barium-titanate"));
    expect(found.number).toBe(99);
    expect(higher.map((h) => h.number)).toEqual([123, 221]); // the second only with strain
    expect(higher.map((h) => h.strain > 0.005)).toEqual([false, true]);
    expect(additional.every((a) => a.largest > 0 && a.strain < 0.03)).toBe(true);
  });

  it("refuses the cell given where the symmetry does not keep it", () => {
    const random = randomNumbers(3);
    const given = disguised(randomStructure(221, random), { multiple: [2, 1, 1], noise: 0, steps: 0 }, random);
    expect(() => symmetriseAnswer(given, { cell: "given" })).toThrow(/conventional|integer/);
  });
});
