import { determinant, type IntMat3, trace } from "../algebra/index.ts";

/**
 * Characters of tensors built from the vector representation, for one rotation matrix of finite order in any basis.
 * All follow from trace t and determinant d: with e2 = d t (eigenvalues lie on the unit circle and come in conjugate
 * pairs), Newton's identities give the traces of the powers, tr W^2 = t^2 - 2 d t and tr W^3 = t^3 - 3 d t^2 + 3 d.
 * Source: I. Schur's theory of symmetrised powers, as in E. Bright Wilson, J. C. Decius and P. C. Cross, Molecular
 * Vibrations (1955), section 7-3.
 */

/** Polar vector (translation, dipole). */
export function vectorCharacter(W: IntMat3): number {
  return trace(W);
}

/** Axial vector (rotation, magnetic moment). */
export function axialCharacter(W: IntMat3): number {
  return determinant(W) * trace(W) + 0;
}

/** Symmetric tensor of second rank (polarizability), 6 components. */
export function symmetricSquareCharacter(W: IntMat3): number {
  return symmetricSquareOf(trace(W), determinant(W));
}

/** Totally symmetric tensor of third rank, 10 components. */
export function symmetricCubeCharacter(W: IntMat3): number {
  return symmetricCubeOf(trace(W), determinant(W));
}

/** Tensor of third rank symmetric in its last two indices (hyperpolarizability near a resonance), 18 components. */
export function hyperRamanGeneralCharacter(W: IntMat3): number {
  return trace(W) * symmetricSquareCharacter(W) + 0;
}

/** Symmetric square from trace and determinant of an orthogonal 3x3 matrix. */
export function symmetricSquareOf(t: number, d: number): number {
  return t * t - d * t;
}

/** Symmetric cube from trace and determinant of an orthogonal 3x3 matrix. */
export function symmetricCubeOf(t: number, d: number): number {
  const p2 = t * t - 2 * d * t;
  const p3 = t * t * t - 3 * d * t * t + 3 * d;
  return (t * t * t + 3 * t * p2 + 2 * p3) / 6;
}
