import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { crystalClasses, molecularGroup } from "../../lib/representation/index.ts";
import {
  apply3,
  type Crystal,
  cellOfMetric,
  crystalOf,
  metricOf,
  unit3,
  type Vec3,
} from "../../lib/structure/index.ts";
import { settingOperations, settingsOf, spaceGroup } from "../../lib/symmetry/index.ts";
import {
  type CrystalTensors,
  crystalTensors,
  intensityOf,
  polariseAnswer,
  scatteringOf,
} from "../../lib/vibrations/index.ts";
import { atom, fixture, invariantMetric } from "../support/crystals.ts";
import { problemOf } from "../support/problem-of.ts";

/** The first symmorphic space-group type of each of the 32 crystal classes, by class. */
const TYPES: Readonly<Record<string, number>> = {
  ...{ "1": 1, "-1": 2, "2": 3, m: 6, "2/m": 10, "222": 16, mm2: 25, mmm: 47, "4": 75, "-4": 81, "4/m": 83 },
  ...{ "422": 89, "4mm": 99, "-42m": 111, "4/mmm": 123, "3": 143, "-3": 147, "32": 149, "3m": 156, "-3m": 162 },
  ...{ "6": 168, "-6": 174, "6/m": 175, "622": 177, "6mm": 183, "-6m2": 187, "6/mmm": 191 },
  ...{ "23": 195, "m-3": 200, "432": 207, "-43m": 215, "m-3m": 221 },
};

function crystalOfType(number: number): Crystal {
  const group = spaceGroup(settingOperations(settingsOf(number)[0]!));
  const metric = metricOf(cellOfMetric(invariantMetric(group, [1, 2, 3])));
  return crystalOf({ name: `type ${number}`, metric, group, sites: [atom("Si", "Si", [0.11, 0.23, 0.37])] });
}

const tensors = new Map<string, CrystalTensors>();
function tensorsOf(name: string): CrystalTensors {
  const found = tensors.get(name) ?? crystalTensors(crystalOfType(TYPES[name]!));
  tensors.set(name, found);
  return found;
}

const classes = fc.constantFrom(...Object.keys(TYPES)).map((name) => ({ name, ...tensorsOf(name) }));
const number = fc.double({ min: -2, max: 2, noNaN: true });
const letters = fc.array(number, { minLength: 24, maxLength: 24 });
const direction = fc
  .tuple(number, number, number)
  .filter((v) => Math.hypot(...v) > 0.1)
  .map((v) => unit3(v));
const angle = fc.double({ min: 0, max: 2 * Math.PI, noNaN: true });

/** Intensity of every Raman species for two polarisations, in the order of the species. */
function intensities(
  t: CrystalTensors,
  values: readonly number[],
  ei: Vec3,
  es: Vec3,
  q: Vec3 | null = null,
): number[] {
  const found = scatteringOf(t, { text: "", ki: [0, 0, 1], ei, es, ks: [0, 0, -1], q });
  let used = 0;
  return t.raman.map((form) => {
    const own = form.letters.map(() => values[used++]!);
    const seen = found.find((s) => s.form.label === form.label);
    return seen ? intensityOf(seen, own) : 0;
  });
}

function expectClose(found: readonly number[], expected: readonly number[]): void {
  expect(found).toHaveLength(expected.length);
  found.forEach((e, i) => {
    expect(e).toBeCloseTo(expected[i]!, 8);
  });
}

const aboutZ = (v: Vec3, phi: number): Vec3 => {
  const [c, s] = [Math.cos(phi), Math.sin(phi)];
  return [c * v[0] - s * v[1], s * v[0] + c * v[1], v[2]];
};

describe("intensities by species, summed over partners", () => {
  it("are the same after every operation of the crystal, in all 32 classes", () => {
    expect(Object.keys(TYPES).sort()).toEqual([...crystalClasses().values()].map((c) => c.hermannMauguin).sort());
    fc.assert(
      fc.property(classes, letters, direction, direction, (t, values, ei, es) => {
        const expected = intensities(t, values, ei, es);
        for (const M of t.frame.matrices) expectClose(intensities(t, values, apply3(M, ei), apply3(M, es)), expected);
      }),
      { numRuns: 150 },
    );
  });

  it("are the same with incident and scattered light exchanged", () => {
    fc.assert(
      fc.property(classes, letters, direction, direction, (t, values, ei, es) => {
        expectClose(intensities(t, values, es, ei), intensities(t, values, ei, es));
      }),
    );
  });

  it("do not change while a trigonal or hexagonal crystal turns about z in light along z", () => {
    const turning = fc.constantFrom("3", "-3", "32", "3m", "-3m", "6", "-6", "6/m", "622", "6mm", "-6m2", "6/mmm");
    fc.assert(
      fc.property(turning, letters, angle, angle, angle, (name, values, a, b, phi) => {
        const t = tensorsOf(name);
        const [ei, es] = [aboutZ([1, 0, 0], a), aboutZ([1, 0, 0], b)];
        expectClose(intensities(t, values, aboutZ(ei, phi), aboutZ(es, phi)), intensities(t, values, ei, es));
      }),
    );
  });

  it("of hexagonal classes do not change about z in any geometry; those of other classes do", () => {
    const turned = (name: string, values: readonly number[], ei: Vec3, es: Vec3, phi: number) => {
      const t = tensorsOf(name);
      return [intensities(t, values, aboutZ(ei, phi), aboutZ(es, phi)), intensities(t, values, ei, es)] as const;
    };
    const hexagonal = fc.constantFrom("6", "-6", "6/m", "622", "6mm", "-6m2", "6/mmm");
    fc.assert(
      fc.property(hexagonal, letters, direction, direction, angle, (name, values, ei, es, phi) => {
        expectClose(...turned(name, values, ei, es, phi));
      }),
    );
    const ones = new Array<number>(24).fill(1);
    for (const name of ["3", "-3m", "4", "4/mmm", "222", "m-3m"]) {
      const [after, before] = turned(name, ones, [0, 1, 0], unit3([0.3, 0.5, 0.8]), 0.4);
      expect(Math.max(...after.map((e, i) => Math.abs(e - before[i]!))), name).toBeGreaterThan(0.01);
    }
  });

  it("of a powder are depolarised by 3/4, but for the totally symmetric species, and there by less", () => {
    // the mean over the 60 rotations of an icosahedron is that over all rotations for a tensor of rank 4
    const rotations = molecularGroup("I").elements;
    const mean = (t: CrystalTensors, values: readonly number[], es: Vec3) => {
      const sums = rotations.map((R) => intensities(t, values, apply3(R, [1, 0, 0]), apply3(R, es)));
      return t.raman.map((_, i) => sums.reduce((s, list) => s + list[i]!, 0) / rotations.length);
    };
    fc.assert(
      fc.property(classes, letters, (t, values) => {
        const [parallel, crossed] = [mean(t, values, [1, 0, 0]), mean(t, values, [0, 1, 0])];
        t.raman.forEach(({ irrep }, i) => {
          const total = t.group.irreps[irrep]!.characters.every((c) => c === 1);
          if (total) expect(crossed[i]!).toBeLessThanOrEqual(0.75 * parallel[i]! + 1e-9);
          else expect(crossed[i]!).toBeCloseTo(0.75 * parallel[i]!, 9);
        });
      }),
      { numRuns: 60 },
    );
  });

  it.each(Object.keys(TYPES))("of class %s come from tensors with six components in all", (name) => {
    const { raman, group, dipoles } = tensorsOf(name);
    const components = (forms: typeof raman) =>
      forms.reduce((s, f) => s + (f.letters.length * f.partners.length) / group.irreps[f.irrep]!.norm, 0);
    expect([components(raman), components(dipoles)]).toEqual([6, 3]);
  });
});

describe("polar species", () => {
  it("make twenty classes piezoelectric: all without inversion but 432", () => {
    for (const [name, type] of Object.entries(TYPES)) {
      const crystal = crystalOfType(type);
      const centred = crystal.group.representatives.some((g) => g.W.join() === "-1,0,0,0,-1,0,0,0,-1");
      expect(polariseAnswer(crystal).piezoelectric, name).toBe(!centred && name !== "432");
    }
  });

  it("of a uniaxial crystal are pure for every wavevector across z, and mixed in between", () => {
    const t = tensorsOf("6mm");
    const parts = (ei: Vec3, es: Vec3, q: Vec3) =>
      scatteringOf(t, { text: "", ki: q, ei, es, ks: [-q[0], -q[1], -q[2]], q }).flatMap((s) =>
        s.polar ? [`${s.form.label} ${s.polar.part}`] : [],
      );
    fc.assert(
      fc.property(angle, fc.double({ min: 0.05, max: Math.PI / 2 - 0.05, noNaN: true }), (phi, theta) => {
        const q = aboutZ([1, 0, 0], phi);
        const across = aboutZ([0, 1, 0], phi);
        expect(parts([0, 0, 1], [0, 0, 1], q)).toEqual(["A1 TO"]);
        expect(parts([0, 0, 1], across, q)).toEqual(["E1 TO"]);
        const tilted = aboutZ([Math.sin(theta), 0, Math.cos(theta)], phi);
        const upwards = aboutZ([-Math.cos(theta), 0, Math.sin(theta)], phi);
        expect(parts(upwards, upwards, tilted)).toEqual(["A1 oblique", "E1 oblique"]);
        expect(parts(across, upwards, tilted)).toEqual(["E1 TO"]); // the ordinary mode
      }),
    );
  });

  it("with a dipole that symmetry leaves free in a plane are not called LO or TO", () => {
    const answer = polariseAnswer(crystalOfType(TYPES["m"]!), { geometries: ["x(yy)-x", "y(xx)-y", "x(yz)-x"] });
    expect(answer.geometries.map((g) => g.allowed.map((a) => `${a.irrep} ${a.part}`).join())).toEqual([
      "A' undetermined",
      "A' TO",
      "A'' TO",
    ]);
  });

  it("have no LO and TO in forward scattering, where the wavevector is too short", () => {
    const [forward] = polariseAnswer(fixture("wurtzite"), { geometries: ["z(xx)z"] }).geometries;
    expect(forward!.allowed.map((a) => a.part)).toEqual([null, null]);
  });
});

describe("polarisations along the light", () => {
  const refused = (name: string, geometry: string) =>
    problemOf(() => polariseAnswer(fixture(name), { geometries: [geometry] }));

  it("are refused, with the angle", () => {
    const { code, message, hint } = refused("calcite", "z(zx)-z");
    expect(code).toBe("polarisation-longitudinal");
    expect(message).toBe(
      "z(zx)-z: incident light along z cannot be polarised along z, which lies 0.0 degrees from it instead of 90",
    );
    expect(hint).toBe("choose a polarisation perpendicular to the direction of the light");
    expect(refused("calcite", "z(xy)y").message).toContain("scattered light along y cannot be polarised along y");
    expect(refused("calcite", "[100]([010]z)-[100]").message).toContain("60.0 degrees from it instead of 90");
  });

  it("are measured against the directions of the crystal: in a monoclinic one, c is not normal to a", () => {
    expect(refused("gypsum", "[001](xy)-[001]").message).toMatch(/along x, which lies \d\d\.\d degrees/);
    const { geometries } = polariseAnswer(fixture("gypsum"), { geometries: ["(001)(xy)-(001)", "z(xy)-z"] });
    expect(geometries.map((g) => g.allowed.map((a) => a.irrep))).toEqual([["Bg"], ["Bg"]]);
  });

  it("are let pass within half a degree, as rounded indices are", () => {
    expect(polariseAnswer(fixture("zircon"), { geometries: ["z([200 0 1]y)-z"] }).geometries).toHaveLength(1);
    expect(refused("zircon", "z([50 0 1]y)-z").message).toMatch(/which lies 8[89]\.\d degrees/);
    // (104) holds b and [42-1]
    expect(polariseAnswer(fixture("calcite"), { geometries: ["(104)([010][42-1])-(104)"] }).geometries).toHaveLength(1);
  });

  it("are refused of a direction without length", () => {
    const { code, message } = refused("calcite", "[000](xy)-[000]");
    expect(code).toBe("geometry-unreadable");
    expect(message).toBe("[000] is no direction: all its indices are 0");
  });
});
