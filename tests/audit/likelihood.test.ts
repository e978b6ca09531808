import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { RAISED_SHARE } from "../../lib/audit/absence-likelihood.ts";
import { scaledErfc } from "../../lib/audit/error-function.ts";
import { presenceEvidence } from "../../lib/audit/index.ts";
import { acentricDensity, centricDensity } from "../../lib/audit/wilson-density.ts";

/** Midpoint rule. */
function integral(f: (x: number) => number, from: number, to: number, steps: number): number {
  const step = (to - from) / steps;
  let sum = 0;
  for (let i = 0; i < steps; i++) sum += f(from + (i + 0.5) * step);
  return sum * step;
}

describe("scaledErfc", () => {
  it.each([0, 0.3, 1.2, 1.99, 2.01, 4, 8])("agrees at %d with its integral", (x) => {
    // exp(x^2) erfc(x) = 2/sqrt(pi) int_0^inf exp(-t^2 - 2xt) dt
    const exact = (2 / Math.sqrt(Math.PI)) * integral((t) => Math.exp(-t * t - 2 * x * t), 0, 8, 40000);
    expect(scaledErfc(x)).toBeCloseTo(exact, 7);
  });

  it("adds up to 2 exp(x^2) with its mirror image, and stays finite far out", () => {
    for (const x of [0.1, 1, 2.5]) expect(scaledErfc(x) + scaledErfc(-x)).toBeCloseTo(2 * Math.exp(x * x), 9);
    expect(scaledErfc(1e6) * 1e6 * Math.sqrt(Math.PI)).toBeCloseTo(1, 9);
  });
});

describe("Wilson's distributions with errors", () => {
  const cases: [number, number][] = [
    [0.01, 1],
    [0.2, 1],
    [1, 1],
    [3, 0.5],
  ];
  it.each(cases)("have area 1 and their mean, for an error of %d and a mean of %d", (sigma, mean) => {
    for (const density of [acentricDensity, centricDensity]) {
      const [low, high] = [-6 * sigma, 40 * mean + 6 * sigma];
      // the centric density has a sharp peak at 0
      const whole = (f: (x: number) => number) =>
        integral(f, low, 6 * sigma, 8000) + integral(f, 6 * sigma, high, 40000);
      expect(whole((x) => density(x, sigma, mean))).toBeCloseTo(1, 2);
      expect(whole((x) => x * density(x, sigma, mean))).toBeCloseTo(mean, 1);
    }
  });

  it("become the exponential density where errors vanish", () => {
    expect(acentricDensity(2, 1e-4, 1)).toBeCloseTo(Math.exp(-2), 6);
    expect(centricDensity(2, 1e-4, 1)).toBeCloseTo(Math.exp(-1) / Math.sqrt(4 * Math.PI), 4);
  });
});

describe("presenceEvidence", () => {
  const value = fc.double({ min: -20, max: 200, noNaN: true });
  const sigma = fc.double({ min: 1e-3, max: 50, noNaN: true });

  it("is bounded for a single reflection, so that a few raised ones cannot upset a condition", () => {
    fc.assert(
      fc.property(value, sigma, (v, s) => {
        const evidence = presenceEvidence(v, s, 10);
        expect(Number.isFinite(evidence)).toBe(true);
        expect(evidence).toBeLessThanOrEqual(-Math.log(RAISED_SHARE) + 1e-9);
      }),
    );
  });

  it("speaks for absence at 0 and for presence at the mean, and says little of values known badly", () => {
    expect(presenceEvidence(0, 0.05, 10)).toBeLessThan(-1);
    expect(presenceEvidence(10, 0.5, 10)).toBeGreaterThan(2);
    expect(Math.abs(presenceEvidence(5, 200, 10))).toBeLessThan(0.1);
  });

  it("does not depend on the scale", () => {
    fc.assert(
      fc.property(value, sigma, (v, s) => {
        expect(presenceEvidence(1000 * v, 1000 * s, 1e4)).toBeCloseTo(presenceEvidence(v, s, 10), 6);
      }),
    );
  });
});
