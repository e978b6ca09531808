import { acentricDensity } from "./wilson-density.ts";

/**
 * Share of forbidden reflections that may be raised to ordinary intensity: by multiple diffraction (M. Renninger,
 * Z. Phys. 106 (1937) 141), harmonics of the wavelength or an intruding twin domain. It bounds what a single reflection
 * says against a condition to a factor 10, so that three at least are needed to upset one. Dimensionless.
 */
export const RAISED_SHARE = 0.1;

/**
 * What may remain of a forbidden reflection, as a share of the mean intensity: harmonics give some thousandths of a
 * strong reflection. Dimensionless.
 */
const REMAINDER = 0.003;

/**
 * Present reflections follow Wilson's acentric distribution about the mean of the shell or, where heavy atoms sit at
 * special positions, about a tenth or a hundredth of it; shares of the three. Dimensionless.
 */
const PRESENT = [
  { share: 0.7, scale: 1 },
  { share: 0.2, scale: 0.1 },
  { share: 0.1, scale: 0.01 },
] as const;

/**
 * Natural logarithm of how much likelier a value is if its reflection is present than if it is forbidden.
 * @param value F^2
 * @param sigma standard uncertainty of the value, positive
 * @param mean mean F^2 of present reflections at this resolution, positive
 * Sources: A. J. Markvardsen, W. I. F. David, J. C. Johnson and K. Shankland, Acta Cryst. A57 (2001) 47 (likelihood of
 * extinction symbols); S. French and K. Wilson, Acta Cryst. A34 (1978) 517 (Wilson's distribution with errors).
 */
export function presenceEvidence(value: number, sigma: number, mean: number): number {
  const present = PRESENT.reduce(
    (sum, { share, scale }) => sum + share * acentricDensity(value, sigma, scale * mean),
    0,
  );
  const width = Math.hypot(sigma, REMAINDER * mean);
  const absent = Math.exp(-0.5 * (value / width) ** 2) / (width * Math.sqrt(2 * Math.PI));
  const forbidden = (1 - RAISED_SHARE) * absent + RAISED_SHARE * present;
  // far below zero both vanish: an outlier of that kind says nothing
  return forbidden > 0 ? Math.log(present / forbidden) : 0;
}

/** Density of a measured value if all that is known of its reflection is the mean intensity at its resolution. */
export function presentDensity(value: number, sigma: number, mean: number): number {
  return PRESENT.reduce((sum, { share, scale }) => sum + share * acentricDensity(value, sigma, scale * mean), 0);
}

/** Odds of 150 to 1 are very strong evidence; natural logarithm. R. E. Kass, A. E. Raftery, J. Am. Stat. Assoc. 90 (1995) 773. */
export const STRONG_EVIDENCE = Math.log(150);
