import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { correlations, molecularGroup } from "../../lib/representation/index.ts";
import {
  apply3,
  type Mat3,
  molecularSymmetry,
  molecularUnits,
  multiply3,
  type ShapedUnit,
  shapeTolerance,
  type UnitAtom,
  type Vec3,
} from "../../lib/structure/index.ts";
import { fixture } from "../support/crystals.ts";

const NAMES = (
  "C1 Cs Ci C2 C3 C4 C5 C6 C7 C8 C2v C3v C4v C5v C6v C7v C2h C3h C4h C5h C6h S4 S6 S8 S10 D2 D3 D4 D5 D6 D7 " +
  "D2h D3h D4h D5h D6h D7h D8h D2d D3d D4d D5d D6d T Td Th O Oh I Ih"
).split(" ");

const TRIVIAL: Pick<ShapedUnit, "site"> = {
  site: {
    operations: [{ W: [1, 0, 0, 0, 1, 0, 0, 0, 1], w: { n: [0, 0, 0], d: 1 } }],
    matrices: [[1, 0, 0, 0, 1, 0, 0, 0, 1]],
    permutations: [],
  },
};

/** A unit of given atoms; the site operations are those given by matrices, the identity by default. */
function unitOf(elements: readonly string[], places: readonly Vec3[], site: readonly Mat3[] = []): ShapedUnit {
  const n = places.length;
  const mean = (i: number) => places.reduce((s, p) => s + p[i]! / n, 0);
  const centroid: Vec3 = [mean(0), mean(1), mean(2)];
  const atoms = places.map((cartesian, i): UnitAtom => {
    const label = `${elements[i]}${i + 1}`;
    const shift = [0, 0, 0] as const;
    return { site: i, label, element: elements[i]!, occupancy: 1, image: 0, shift, fractional: cartesian, cartesian };
  });
  const matrices = site.length > 0 ? site : TRIVIAL.site.matrices;
  const relative = places.map((p): Vec3 => [p[0] - centroid[0], p[1] - centroid[1], p[2] - centroid[2]]);
  const permutations = matrices.map((m) =>
    relative.map((p) => {
      const image = apply3(m, p);
      return relative.findIndex((q) => distance(image, q) < 1e-6);
    }),
  );
  const operations = matrices.map(() => TRIVIAL.site.operations[0]!);
  return {
    atoms,
    bonds: [],
    centroid: { fractional: centroid, cartesian: centroid },
    site: { operations, matrices, permutations },
  };
}

function distance(a: Vec3, b: Vec3): number {
  return Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
}

function worst(a: Mat3, b: Mat3): number {
  return Math.max(...a.map((e, i) => Math.abs(e - b[i]!)));
}

function transposed(m: Mat3): Mat3 {
  return [m[0], m[3], m[6], m[1], m[4], m[7], m[2], m[5], m[8]];
}

const unitInterval = fc.double({ min: 0, max: 1, noNaN: true });

/** Rotations by unit quaternions. */
const rotation: fc.Arbitrary<Mat3> = fc.tuple(unitInterval, unitInterval, unitInterval).map(([a, b, c]): Mat3 => {
  const [p, q] = [2 * Math.PI * b, 2 * Math.PI * c];
  const [w, x] = [Math.sqrt(1 - a) * Math.sin(p), Math.sqrt(1 - a) * Math.cos(p)];
  const [y, z] = [Math.sqrt(a) * Math.sin(q), Math.sqrt(a) * Math.cos(q)];
  return [
    1 - 2 * (y * y + z * z),
    2 * (x * y - w * z),
    2 * (x * z + w * y),
    2 * (x * y + w * z),
    1 - 2 * (x * x + z * z),
    2 * (y * z - w * x),
    2 * (x * z - w * y),
    2 * (y * z + w * x),
    1 - 2 * (x * x + y * y),
  ];
});

const noise = fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 30, maxLength: 30 });

/**
 * Two general orbits of different elements, so that the molecule has the group and no more; far from the planes of all
 * groups, so that no two atoms come as near as the noise.
 */
const SEEDS: readonly (readonly [string, Vec3])[] = [
  ["C", [2.83, 0.47, 1.29]],
  ["N", [3.55, 1.62, 2.41]],
];

function molecule(name: string): { elements: string[]; places: Vec3[] } {
  const group = molecularGroup(name);
  const elements: string[] = [];
  const places: Vec3[] = [];
  const scale = name.startsWith("I") || group.order > 24 ? 3 : 2;
  for (const [element, seed] of SEEDS) {
    for (const m of group.elements) {
      elements.push(element);
      places.push(apply3(m, [scale * seed[0], scale * seed[1], scale * seed[2]]));
    }
  }
  if (group.order === 1) {
    elements.push("O", "F");
    places.push([0, 0, 0], [-2, 5, 1]);
  } else if (group.order === 2) {
    // four atoms alone would have more symmetry
    for (const m of group.elements) {
      elements.push("O");
      places.push(apply3(m, [-4.1, 1.9, 3.3]));
    }
  }
  return { elements, places };
}

describe("molecularSymmetry", () => {
  test.each(NAMES)("recognises %s in any orientation and under noise", (name) => {
    const { elements, places } = molecule(name);
    fc.assert(
      fc.property(rotation, noise, (R, shifts) => {
        const moved = places.map((p, k): Vec3 => {
          const q = apply3(R, p);
          const s = (i: number) => 0.03 * shifts[(3 * k + i + (k % 7)) % shifts.length]!;
          return [q[0] + s(0), q[1] + s(1), q[2] + s(2)];
        });
        const found = molecularSymmetry(unitOf(elements, moved));
        expect(found.schoenflies).toBe(name);
        expect(found.deviation.largest).toBeLessThanOrEqual(0.1);
        expect(found.deviation.mean).toBeLessThanOrEqual(found.deviation.largest);
      }),
      { numRuns: places.length > 100 ? 2 : 6 },
    );
  });

  test.each(NAMES)(
    "gives matrices of %s that multiply, match the standard frame and carry atoms onto atoms",
    (name) => {
      const { elements, places } = molecule(name);
      fc.assert(
        fc.property(rotation, (R) => {
          const moved = places.map((p) => apply3(R, p));
          const unit = unitOf(elements, moved);
          const found = molecularSymmetry(unit);
          if (found.kind !== "finite") throw new Error("not finite");
          const centre = unit.centroid.cartesian;
          const { group, frame } = found;
          expect(worst(multiply3(frame, transposed(frame)), [1, 0, 0, 0, 1, 0, 0, 0, 1])).toBeLessThan(1e-12);
          found.matrices.forEach((m, i) => {
            expect(worst(multiply3(frame, multiply3(m, transposed(frame))), group.elements[i]!)).toBeLessThan(1e-12);
            moved.forEach((p, k) => {
              const image = apply3(m, [p[0] - centre[0], p[1] - centre[1], p[2] - centre[2]]);
              const target = moved[found.permutations[i]![k]!]!;
              expect(
                distance(image, [target[0] - centre[0], target[1] - centre[1], target[2] - centre[2]]),
              ).toBeLessThan(1e-8);
            });
          });
          expect(found.deviation.largest).toBeLessThan(1e-8);
        }),
        { numRuns: places.length > 100 ? 1 : 3 },
      );
    },
  );
});

/** Mean of a set of displacements over the images under a group, so that moved atoms obey it exactly. */
function obeying(matrices: readonly Mat3[], places: readonly Vec3[], shifts: readonly number[]): Vec3[] {
  const moved = places.map((p, k): Vec3 => {
    const s = (i: number) => 0.05 * shifts[(3 * k + i + (k % 7)) % shifts.length]!;
    return [p[0] + s(0), p[1] + s(1), p[2] + s(2)];
  });
  return places.map((p): Vec3 => {
    const sum = [0, 0, 0];
    for (const m of matrices) {
      const image = apply3(m, p);
      const k = places.findIndex((q) => distance(q, image) < 1e-6);
      const back = apply3(transposed(m), moved[k]!);
      for (let i = 0; i < 3; i++) sum[i]! += back[i]! / matrices.length;
    }
    return sum as unknown as Vec3;
  });
}

describe("the group of the site", () => {
  const pairs = [
    ["Td", "C3v"],
    ["Td", "D2d"],
    ["Td", "S4"],
    ["D3h", "Cs"],
    ["D3h", "C3h"],
    ["Oh", "D4h"],
    ["Oh", "S6"],
    ["D6h", "Ci"],
    ["D4d", "C2"],
    ["Ih", "Th"],
    ["Ih", "S6"],
    ["D2h", "Ci"],
    ["C2v", "C1"],
  ] as const;

  test.each(pairs)("is held exactly by %s over %s, whatever the noise", (name, siteName) => {
    const { elements, places } = molecule(name);
    const whole = molecularGroup(name);
    const below = correlations(whole).filter((c) => c.subgroup.schoenflies === siteName);
    expect(below.length).toBeGreaterThan(0);
    fc.assert(
      fc.property(rotation, noise, fc.nat(), (R, shifts, pick) => {
        const { embedded } = below[pick % below.length]!;
        const site = embedded.map((i) => whole.elements[i]!);
        const distorted = obeying(site, places, shifts);
        const turned = site.map((m) => multiply3(R, multiply3(m, transposed(R))));
        const unit = unitOf(
          elements,
          distorted.map((p) => apply3(R, p)),
          turned,
        );
        const found = molecularSymmetry(unit);
        if (found.kind !== "finite") throw new Error("not finite");
        expect(found.schoenflies).toBe(name);
        found.siteElements.forEach((g, s) => {
          expect(worst(found.matrices[g]!, turned[s]!)).toBeLessThan(1e-9);
          expect(found.permutations[g]).toEqual(unit.site.permutations[s]);
        });
      }),
      { numRuns: places.length > 100 ? 2 : 8 },
    );
  });
});

describe("lowering by hand", () => {
  const { elements, places } = molecule("Td");

  test("takes the subgroup named, with its own frame", () => {
    for (const name of ["C3v", "D2d", "D2", "C2v", "S4", "Cs", "C1"]) {
      const found = molecularSymmetry(unitOf(elements, places), { lowerTo: name });
      expect(found.schoenflies).toBe(name);
      expect(found.kind === "finite" && found.group.order).toBe(molecularGroup(name).order);
    }
  });

  test("keeps the group of the site, and says what is possible where it cannot", () => {
    const { elements: Td } = molecularGroup("Td");
    const twofold = Td.filter((m) => Math.abs(m[0] + m[4] + m[8] + 1) < 1e-9).slice(0, 1);
    const unit = unitOf(elements, places, [Td[0]!, ...twofold]);
    const found = molecularSymmetry(unit, { lowerTo: "D2d" });
    expect(found.kind === "finite" && found.siteElements.every((g) => g >= 0)).toBe(true);
    const refused = () => molecularSymmetry(unit, { lowerTo: "C3v" });
    expect(refused).toThrow("C3v is no subgroup of Td");
    expect(refused).toThrow(
      expect.objectContaining({ code: "symmetry-not-below", hint: expect.stringMatching(/D2d/) }),
    );
    expect(() => molecularSymmetry(unit, { lowerTo: "X7" })).toThrow(
      expect.objectContaining({ code: "point-group-unknown" }),
    );
  });
});

describe("the tolerance", () => {
  /** A sulfate-like ion squeezed along z. */
  const squeezed = (by: number): ShapedUnit => {
    const h = 1.49 / Math.sqrt(3);
    const ligands: Vec3[] = [
      [h, h, h - by],
      [h, -h, by - h],
      [-h, h, by - h],
      [-h, -h, h - by],
    ];
    const unit = unitOf(["S", "O", "O", "O", "O"], [[0, 0, 0], ...ligands]);
    return {
      ...unit,
      bonds: [
        [0, 1],
        [0, 2],
        [0, 3],
        [0, 4],
      ],
    };
  };

  test("lets an XY4 ion be Td up to a quarter of an angstrom, and says how far it is off", () => {
    const found = molecularSymmetry(squeezed(0.25));
    expect(found.schoenflies).toBe("Td");
    expect(found.tolerance).toBe(0.25);
    expect(found.deviation.largest).toBeGreaterThan(0.1);
    expect(molecularSymmetry(squeezed(0.25), { tolerance: 0.1 }).schoenflies).toBe("D2d");
    expect(molecularSymmetry(squeezed(0.6)).schoenflies).toBe("D2d");
  });

  test("grows the deviation with the distortion", () => {
    const sizes = [0, 0.05, 0.1, 0.15, 0.2].map((by) => molecularSymmetry(squeezed(by)).deviation);
    for (let i = 1; i < sizes.length; i++) {
      expect(sizes[i]!.largest).toBeGreaterThan(sizes[i - 1]!.largest);
      expect(sizes[i]!.measure).toBeGreaterThan(sizes[i - 1]!.measure);
    }
    expect(sizes[0]!.largest).toBeLessThan(1e-12);
  });

  /** Pyramid of three hydrogen atoms: bond length and height of the central atom, angstrom. */
  const pyramid = (bond: number, height: number): ShapedUnit => {
    const r = Math.sqrt(bond * bond - height * height);
    const ring = [0, 1, 2].map(
      (k): Vec3 => [r * Math.cos((2 * Math.PI * k) / 3), r * Math.sin((2 * Math.PI * k) / 3), 0],
    );
    const unit = unitOf(["N", "H", "H", "H"], [[0, 0, height], ...ring]);
    return {
      ...unit,
      bonds: [
        [0, 1],
        [0, 2],
        [0, 3],
      ],
    };
  };

  test("does not flatten ammonia or the hydronium ion", () => {
    expect(molecularSymmetry(pyramid(1.02, 0.38)).schoenflies).toBe("C3v");
    expect(molecularSymmetry(pyramid(0.98, 0.3)).schoenflies).toBe("C3v");
    expect(molecularSymmetry(pyramid(1.02, 0.02)).schoenflies).toBe("D3h");
    expect(shapeTolerance(pyramid(1, 0.3))).toBeCloseTo(0.2, 12);
  });

  test("is not stretched by a molecule that has a group and its products only in part", () => {
    // one ligand of an octahedron far off: what remains is the group of the other five
    const places: Vec3[] = [
      [0, 0, 0],
      [1, 0, 0],
      [-1, 0, 0],
      [0, 1, 0],
      [0, -1, 0],
      [0, 0, 1],
      [0, 0, -1.3],
    ];
    const unit = unitOf(
      ["S", "F", "F", "F", "F", "F", "F"],
      places.map((p): Vec3 => [1.6 * p[0], 1.6 * p[1], 1.6 * p[2]]),
    );
    expect(molecularSymmetry(unit, { tolerance: 0.1 }).schoenflies).toBe("C4v");
    expect(molecularSymmetry(unit, { tolerance: 0.6 }).schoenflies).toBe("Oh");
  });
});

describe("linear molecules", () => {
  test.each([
    ["Dinfh", ["C", "O", "O"], [0, 1.16, -1.16]],
    ["Cinfv", ["C", "N", "S"], [0, 1.15, -1.65]],
    ["Cinfv", ["O", "H"], [0, 0.97]],
    ["Dinfh", ["I", "I"], [0, 2.7]],
  ] as const)("are %s: %s", (name, elements, along) => {
    fc.assert(
      fc.property(rotation, (R) => {
        const found = molecularSymmetry(
          unitOf(
            elements,
            along.map((t) => apply3(R, [0, 0, t])),
          ),
        );
        expect(found).toMatchObject({ kind: "linear", schoenflies: name });
        const axis = apply3(R, [0, 0, 1]);
        if (found.kind === "linear") expect(distance([0, 0, 0], cross(found.axis, axis))).toBeLessThan(1e-9);
      }),
    );
  });

  test("are linear for a tolerance of 0 too, where symmetry makes them so", () => {
    const unit = molecularUnits(fixture("carbon-dioxide")).units[0]!;
    expect(molecularSymmetry(unit, { tolerance: 0 }).schoenflies).toBe("Dinfh");
  });

  test("may be bent within the tolerance, and keep the site group on their axis", () => {
    const bent: Vec3[] = [
      [0, 0.06, 0],
      [0, -0.03, 1.16],
      [0, -0.03, -1.16],
    ];
    const site: Mat3[] = [
      [1, 0, 0, 0, 1, 0, 0, 0, 1],
      [1, 0, 0, 0, 1, 0, 0, 0, -1],
    ];
    const found = molecularSymmetry(unitOf(["C", "O", "O"], bent, site));
    expect(found).toMatchObject({ kind: "linear", schoenflies: "Dinfh", siteReverses: [false, true] });
    expect(found.deviation.largest).toBeCloseTo(0.06, 9);
    expect(molecularSymmetry(unitOf(["C", "O", "O"], bent, site), { tolerance: 0.02 }).schoenflies).toBe("C2v");
    expect(() => molecularSymmetry(unitOf(["C", "O", "O"], bent, site), { lowerTo: "Cinfv" })).toThrow("Cinfv");
  });
});

function cross(a: Vec3, b: Vec3): Vec3 {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

describe("the axes, after Mulliken", () => {
  const ring = (n: number, r: number, turn = 0): Vec3[] =>
    Array.from({ length: n }, (_, k): Vec3 => {
      const a = (2 * Math.PI * k) / n + turn;
      return [r * Math.cos(a), r * Math.sin(a), 0];
    });
  const seen = (unit: ShapedUnit): Vec3[] => {
    const { frame } = molecularSymmetry(unit);
    const c = unit.centroid.cartesian;
    return unit.atoms.map(({ cartesian: p }) => apply3(frame, [p[0] - c[0], p[1] - c[1], p[2] - c[2]]));
  };

  test("put C2' of benzene and of planar XY4 through atoms", () => {
    const symbols = [..."CCCCCCHHHHHH"];
    for (const turn of [0, Math.PI / 6, 0.3]) {
      const benzene = seen(unitOf(symbols, [...ring(6, 1.39, turn), ...ring(6, 2.47, turn)]));
      expect(benzene.filter((p) => Math.hypot(p[1], p[2]) < 1e-6)).toHaveLength(4);
      const square = seen(unitOf(["Pt", "Cl", "Cl", "Cl", "Cl"], [[0, 0, 0], ...ring(4, 2.3, turn)]));
      expect(square.filter((p) => Math.hypot(p[1], p[2]) < 1e-6)).toHaveLength(3);
    }
  });

  test("put x of planar C2v and D2h molecules normal to the plane, z of ethylene along its bond", () => {
    fc.assert(
      fc.property(rotation, (R) => {
        const turned = (list: Vec3[]) => list.map((p) => apply3(R, p));
        const water = seen(
          unitOf(
            ["O", "H", "H"],
            turned([
              [0, 0, 0.1],
              [0.76, 0, -0.5],
              [-0.76, 0, -0.5],
            ]),
          ),
        );
        for (const p of water) expect(Math.abs(p[0])).toBeLessThan(1e-9);
        expect(Math.abs(water[0]![1])).toBeLessThan(1e-9);
        const arms: Vec3[] = [
          [1.23, 0.93, 0],
          [1.23, -0.93, 0],
          [-1.23, 0.93, 0],
          [-1.23, -0.93, 0],
        ];
        const ethylene = seen(unitOf([..."CCHHHH"], turned([[0.67, 0, 0], [-0.67, 0, 0], ...arms])));
        for (const p of ethylene) expect(Math.abs(p[0])).toBeLessThan(1e-9);
        expect(Math.abs(ethylene[0]![1])).toBeLessThan(1e-9);
      }),
    );
  });
});

describe("units of real crystals", () => {
  test.each([
    ["calcite", "CO3", "D3h", 0.001],
    ["aragonite", "CO3", "D3h", 0.03],
    ["nitratine", "NO3", "D3h", 0.001],
    ["gypsum", "SO4", "Td", 0.05],
    ["gypsum", "H2O", "C2v", 0.02],
    ["zircon", "SiO4", "Td", 0.2],
    ["scheelite", "WO4", "Td", 0.1],
    ["brucite", "OH", "Cinfv", 0.001],
    ["carbon-dioxide", "CO2", "Dinfh", 0.001],
    ["alpha-sulfur", "S8", "D4d", 0.05],
    ["realgar", "As4S4", "D2d", 0.1],
    ["benzene", "C6H6", "D6h", 0.05],
    ["naphthalene", "C10H8", "D2h", 0.05],
    ["hexamethylenetetramine", "C6H12N4", "Td", 0.001],
    ["beryl", "Si6O18", "D6h", 0.05],
    ["sodium-chlorate", "ClO3", "C3v", 0.001],
    ["potassium-hexachloroplatinate", "PtCl6", "Oh", 0.001],
    ["fullerene-fm-3", "C60", "Ih", 0.01],
    ["fullerene-pa-3", "C60", "Ih", 0.01],
  ])("%s: %s is %s", (name, formula, group, largest) => {
    const unit = molecularUnits(fixture(name)).units.find((u) => u.formula === formula)!;
    const found = molecularSymmetry(unit);
    expect(found.schoenflies).toBe(group);
    expect(found.deviation.largest).toBeLessThan(largest);
    if (found.kind === "linear") return;
    found.siteElements.forEach((g, s) => {
      expect(worst(found.matrices[g]!, unit.site.matrices[s]!)).toBeLessThan(1e-9);
    });
  });
});
