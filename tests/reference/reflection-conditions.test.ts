import { describe, expect, it } from "vitest";
import type { IntVec3 } from "../../lib/algebra/index.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";
import {
  independentConditions,
  isSystematicallyAbsent,
  meetsConditions,
  reflectionConditions,
} from "../../lib/symmetry/reflection-conditions.ts";
import { specialConditions } from "../../lib/symmetry/special-reflection-conditions.ts";
import { wyckoffPositions } from "../../lib/symmetry/wyckoff-positions.ts";

/*
 * Reflection conditions as printed for the reference settings in International Tables for Crystallography A (2016),
 * chapter 2.3, written down from memory: `number|class: condition; class: condition`.
 */
const GENERAL = `
4|0k0: k=2n
7|h0l: l=2n; 00l: l=2n
9|hkl: h+k=2n; h0l: h,l=2n; 0kl: k=2n; hk0: h+k=2n; 0k0: k=2n; h00: h=2n; 00l: l=2n
14|h0l: l=2n; 0k0: k=2n; 00l: l=2n
15|hkl: h+k=2n; h0l: h,l=2n; 0kl: k=2n; hk0: h+k=2n; 0k0: k=2n; h00: h=2n; 00l: l=2n
17|00l: l=2n
18|h00: h=2n; 0k0: k=2n
19|h00: h=2n; 0k0: k=2n; 00l: l=2n
20|hkl: h+k=2n; 0kl: k=2n; h0l: h=2n; hk0: h+k=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
29|0kl: l=2n; h0l: h=2n; h00: h=2n; 00l: l=2n
33|0kl: k+l=2n; h0l: h=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
36|hkl: h+k=2n; 0kl: k=2n; h0l: h,l=2n; hk0: h+k=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
41|hkl: k+l=2n; 0kl: k,l=2n; h0l: h,l=2n; hk0: k=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
43|hkl: h+k,h+l,k+l=2n; 0kl: k+l=4n, k,l=2n; h0l: h+l=4n, h,l=2n; hk0: h,k=2n; h00: h=4n; 0k0: k=4n; 00l: l=4n
45|hkl: h+k+l=2n; 0kl: k,l=2n; h0l: h,l=2n; hk0: h+k=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
52|0kl: k+l=2n; h0l: h+l=2n; hk0: h=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
56|0kl: l=2n; h0l: l=2n; hk0: h+k=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
57|0kl: k=2n; h0l: l=2n; 0k0: k=2n; 00l: l=2n
58|0kl: k+l=2n; h0l: h+l=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
60|0kl: k=2n; h0l: l=2n; hk0: h+k=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
61|0kl: k=2n; h0l: l=2n; hk0: h=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
62|0kl: k+l=2n; hk0: h=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
63|hkl: h+k=2n; 0kl: k=2n; h0l: h,l=2n; hk0: h+k=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
64|hkl: h+k=2n; 0kl: k=2n; h0l: h,l=2n; hk0: h,k=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
70|hkl: h+k,h+l,k+l=2n; 0kl: k+l=4n, k,l=2n; h0l: h+l=4n, h,l=2n; hk0: h+k=4n, h,k=2n; h00: h=4n; 0k0: k=4n; 00l: l=4n
72|hkl: h+k+l=2n; 0kl: k,l=2n; h0l: h,l=2n; hk0: h+k=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
73|hkl: h+k+l=2n; 0kl: k,l=2n; h0l: h,l=2n; hk0: h,k=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
74|hkl: h+k+l=2n; 0kl: k+l=2n; h0l: h+l=2n; hk0: h,k=2n; h00: h=2n; 0k0: k=2n; 00l: l=2n
76|00l: l=4n
86|hk0: h+k=2n; 00l: l=2n; h00: h=2n
88|hkl: h+k+l=2n; hk0: h,k=2n; 0kl: k+l=2n; hhl: l=2n; 00l: l=4n; h00: h=2n; h-h0: h=2n
92|00l: l=4n; h00: h=2n
96|00l: l=4n; h00: h=2n
98|hkl: h+k+l=2n; hk0: h+k=2n; 0kl: k+l=2n; hhl: l=2n; 00l: l=4n; h00: h=2n
110|hkl: h+k+l=2n; hk0: h+k=2n; 0kl: k,l=2n; hhl: 2h+l=4n; 00l: l=4n; h00: h=2n; h-h0: h=2n
114|hhl: l=2n; 00l: l=2n; h00: h=2n
122|hkl: h+k+l=2n; hk0: h+k=2n; 0kl: k+l=2n; hhl: 2h+l=4n; 00l: l=4n; h00: h=2n; h-h0: h=2n
130|hk0: h+k=2n; 0kl: l=2n; hhl: l=2n; 00l: l=2n; h00: h=2n
136|0kl: k+l=2n; 00l: l=2n; h00: h=2n
137|hk0: h+k=2n; hhl: l=2n; 00l: l=2n; h00: h=2n
141|hkl: h+k+l=2n; hk0: h,k=2n; 0kl: k+l=2n; hhl: 2h+l=4n; 00l: l=4n; h00: h=2n; h-h0: h=2n
142|hkl: h+k+l=2n; hk0: h,k=2n; 0kl: k,l=2n; hhl: 2h+l=4n; 00l: l=4n; h00: h=2n; h-h0: h=2n
144|000l: l=3n
148|hkil: -h+k+l=3n; hki0: -h+k=3n; hh(-2h)l: l=3n; h-h0l: h+l=3n; 000l: l=3n; h-h00: h=3n
161|hkil: -h+k+l=3n; hki0: -h+k=3n; hh(-2h)l: l=3n; h-h0l: h+l=3n, l=2n; 000l: l=6n; h-h00: h=3n
167|hkil: -h+k+l=3n; hki0: -h+k=3n; hh(-2h)l: l=3n; h-h0l: h+l=3n, l=2n; 000l: l=6n; h-h00: h=3n
169|000l: l=6n
173|000l: l=2n
180|000l: l=3n
185|h-h0l: l=2n; 000l: l=2n
192|hh(-2h)l: l=2n; h-h0l: l=2n; 000l: l=2n
194|hh(-2h)l: l=2n; 000l: l=2n
198|h00: h=2n
203|hkl: h+k,h+l,k+l=2n; 0kl: k+l=4n, k,l=2n; h00: h=4n
205|0kl: k=2n; h00: h=2n
206|hkl: h+k+l=2n; 0kl: k,l=2n; hhl: l=2n; h00: h=2n
212|h00: h=4n
214|hkl: h+k+l=2n; 0kl: k+l=2n; hhl: l=2n; h00: h=4n
218|hhl: l=2n; h00: h=2n
220|hkl: h+k+l=2n; 0kl: k+l=2n; hhl: 2h+l=4n; h00: h=4n
222|0kl: k+l=2n; hhl: l=2n; h00: h=2n
223|hhl: l=2n; h00: h=2n
226|hkl: h+k,h+l,k+l=2n; 0kl: k,l=2n; hhl: h,l=2n; h00: h=2n
227|hkl: h+k,h+l,k+l=2n; 0kl: k+l=4n, k,l=2n; hhl: h+l=2n; h00: h=4n
228|hkl: h+k,h+l,k+l=2n; 0kl: k+l=4n, k,l=2n; hhl: h,l=2n; h00: h=4n
230|hkl: h+k+l=2n; 0kl: k,l=2n; hhl: 2h+l=4n; h00: h=4n
`;

/** `number letter|conditions`, extra conditions of special positions; the same source, from memory. */
const SPECIAL = `
14 a|hkl: k+l=2n
15 a|hkl: l=2n
15 c|hkl: k+l=2n
17 a|0kl: l=2n
17 c|h0l: l=2n
62 a|hkl: h+l,k=2n
63 a|hkl: l=2n
63 d|hkl: k,l=2n
122 a|hkl: l=2n+1 or 2h+l=4n
136 a|hkl: h+k+l=2n
136 c|hkl: h+k,l=2n
139 c|hkl: l=2n
139 f|hkl: k,l=2n
141 c|hkl: l=2n+1 or h,k=2n, h+k+l=4n
141 f|hkl: l=2n+1 or h=2n
167 b|hkil: l=2n
180 c|hkil: h=2n+1 or k=2n+1 or l=3n
194 a|hkil: l=2n
194 c|hkil: l=2n or h-k=3n+1 or h-k=3n+2
205 a|hkl: h+k,h+l,k+l=2n
225 c|hkl: h=2n
227 a|hkl: h=2n+1 or h+k+l=4n
227 c|hkl: h=2n+1 or h,k,l=4n+2 or h,k,l=4n
227 f|hkl: h=2n+1 or h+k+l=4n
229 c|hkl: k,l=2n
230 a|hkl: h,k=2n, h+k+l=4n
`;

const RANGE = 8;
const REFLECTIONS: IntVec3[] = [];
for (let h = -RANGE; h <= RANGE; h++)
  for (let k = -RANGE; k <= RANGE; k++) for (let l = -RANGE; l <= RANGE; l++) REFLECTIONS.push([h, k, l]);

interface Line {
  readonly reflections: string;
  readonly condition: string;
}

function lines(text: string): [string, Line[]][] {
  return text
    .trim()
    .split("\n")
    .map((line) => {
      const [name, rest] = line.split("|") as [string, string];
      const conditions = rest.split("; ").map((c): Line => {
        const [reflections, condition] = c.split(": ") as [string, string];
        return { reflections, condition };
      });
      return [name, conditions];
    });
}

type Test = (h: IntVec3) => boolean;
const dot = (a: IntVec3, b: IntVec3) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/** Factors of h, k and l in a sum such as `2h+l` or `-h-k`. */
function factors(text: string): IntVec3 {
  const sum: [number, number, number] = [0, 0, 0];
  for (const [, sign, factor, letter] of text.matchAll(/([+-]?)(\d*)([hkl])/g)) {
    sum["hkl".indexOf(letter!)]! += (sign === "-" ? -1 : 1) * (factor ? Number(factor) : 1);
  }
  return sum;
}

/** Whether a reflection has the indices that a class such as `h-h0l` or `hh(-2h)l` names. */
function belongs(reflections: string): Test {
  const places = [...reflections.matchAll(/\([^)]*\)|-?./g)].map((m) => m[0].replace(/[()]/g, "").replace("i", "-h-k"));
  const forms = places.map(factors);
  if (forms.length === 4) forms.splice(2, 1);
  return (h) => forms.every((f, i) => dot(f, h) === h[i]);
}

/** Reads `k+l=4n, k,l=2n` and alternatives joined by `or`. */
function satisfies(condition: string): Test {
  const alternatives = condition.split(" or ").map((alternative) =>
    [...alternative.matchAll(/([hkl0-9+,-]+)=(\d+)n(?:\+(\d+))?/g)].flatMap(([, forms, modulus, residue]) =>
      forms!
        .split(",")
        .filter((f) => f !== "")
        .map((f) => ({ form: factors(f), modulus: Number(modulus), residue: Number(residue ?? 0) })),
    ),
  );
  return (h) => alternatives.some((list) => list.every((c) => (dot(c.form, h) - c.residue) % c.modulus === 0));
}

function allowedBy(printed: readonly Line[]): Test {
  const tests = printed.map((c) => ({ inside: belongs(c.reflections), met: satisfies(c.condition) }));
  return (h) => tests.every(({ inside, met }) => !inside(h) || met(h));
}

describe("general reflection conditions", () => {
  it("are compared for at least forty types", () => expect(lines(GENERAL).length).toBeGreaterThanOrEqual(40));

  it.each(lines(GENERAL))("of type %s forbid exactly what the printed ones forbid", (number, printed) => {
    const { operations, representatives } = referenceGroup(Number(number));
    const allowed = allowedBy(printed);
    const wrong = REFLECTIONS.filter((h) => {
      const everywhere = representatives.every(({ W }) =>
        allowed([
          h[0] * W[0] + h[1] * W[3] + h[2] * W[6],
          h[0] * W[1] + h[1] * W[4] + h[2] * W[7],
          h[0] * W[2] + h[1] * W[5] + h[2] * W[8],
        ]),
      );
      return isSystematicallyAbsent(operations, h) === everywhere;
    });
    expect(wrong).toEqual([]);
  });

  it.each(lines(GENERAL))("of type %s are written as printed", (number, printed) => {
    const ours = reflectionConditions(referenceGroup(Number(number)));
    const texts = printed.map((c) => `${c.reflections}: ${c.condition}`);
    for (const c of independentConditions(ours)) expect(texts).toContain(`${c.reflections}: ${c.condition}`);
    // what is implied is printed too, on the classes that the Tables list for the system
    for (const c of ours) {
      const same = printed.find((p) => p.reflections === c.reflections);
      if (same) expect(`${c.reflections}: ${c.condition}`).toBe(`${c.reflections}: ${same.condition}`);
    }
  });
});

describe("special reflection conditions", () => {
  it.each(lines(SPECIAL))("of %s forbid exactly what the printed ones forbid", (name, printed) => {
    const [number, letter] = name.split(" ");
    const group = referenceGroup(Number(number));
    const position = wyckoffPositions(Number(number)).find((p) => p.letter === letter)!;
    const general = independentConditions(reflectionConditions(group));
    const special = specialConditions(group, position.form);
    const allowed = allowedBy(printed);
    const present = REFLECTIONS.filter((h) => meetsConditions(general, group, h));
    expect(present.filter((h) => meetsConditions(special, group, h) !== allowed(h))).toEqual([]);
  });
});
