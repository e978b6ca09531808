import { scaledErfc } from "./error-function.ts";

/**
 * Density of a measured intensity whose true value follows Wilson's acentric distribution, with normal errors.
 * @param value measured F^2
 * @param sigma its standard uncertainty, positive
 * @param mean of the true values, positive
 * Source: S. French and K. Wilson, Acta Cryst. A34 (1978) 517; A. J. C. Wilson, Acta Cryst. 2 (1949) 318.
 */
export function acentricDensity(value: number, sigma: number, mean: number): number {
  const x = (sigma / mean - value / sigma) / Math.SQRT2;
  // exp(x^2) erfc(x) would overflow for strong reflections, whose density is that without errors
  if (x < -5) return Math.exp((sigma * sigma) / (2 * mean * mean) - value / mean) / mean;
  return (Math.exp(-0.5 * (value / sigma) ** 2) * scaledErfc(x)) / (2 * mean);
}

/** Steps of the integral over amplitudes, and its range in standard uncertainties of the amplitude. */
const STEPS = 24;
const RANGE = 5;

/** The same for the centric distribution: the amplitude is normal, and the integral over it is taken numerically. */
export function centricDensity(value: number, sigma: number, mean: number): number {
  // integrate over u = sqrt(J) where both factors matter
  const nearest = Math.sqrt(Math.max(0, value));
  const width = Math.min(Math.sqrt(sigma), sigma / (2 * nearest || Number.MIN_VALUE));
  const low = Math.max(0, nearest - RANGE * width);
  const high = low > 0 ? nearest + RANGE * width : Math.min(nearest + RANGE * width, (RANGE + 1) * Math.sqrt(mean));
  const step = (high - low) / STEPS;
  let sum = 0;
  for (let i = 0; i < STEPS; i++) {
    const u = low + (i + 0.5) * step;
    sum += Math.exp((-u * u) / (2 * mean) - 0.5 * ((value - u * u) / sigma) ** 2);
  }
  return (2 * sum * step) / (Math.sqrt(2 * Math.PI * mean) * sigma * Math.sqrt(2 * Math.PI));
}
