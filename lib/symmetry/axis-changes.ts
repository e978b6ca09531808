import { equal, IDENTITY, type IntMat3, multiply } from "../algebra/index.ts";
import type { CrystalFamily } from "./geometric-class.ts";

const changes = new Map<CrystalFamily, readonly IntMat3[]>();

/**
 * Right-handed changes of basis (columns: new axes) between conventional cells of one lattice: the rotations of the
 * holohedry, with exchanges of axes for orthorhombic cells; for monoclinic cells all changes of the cell in the plane
 * with entries -1, 0, 1, which reach every choice of cell and glide vector. The identity comes first.
 */
export function axisChanges(family: CrystalFamily): readonly IntMat3[] {
  const known = changes.get(family);
  if (known) return known;
  const fresh = [IDENTITY, ...generate(family).filter((N) => !equal(N, IDENTITY))];
  changes.set(family, fresh);
  return fresh;
}

function generate(family: CrystalFamily): IntMat3[] {
  switch (family) {
    case "triclinic":
      return [];
    case "monoclinic":
      return planeChanges();
    case "tetragonal":
      return closure([0, -1, 0, 1, 0, 0, 0, 0, 1], [1, 0, 0, 0, -1, 0, 0, 0, -1]);
    case "hexagonal":
      return closure([1, -1, 0, 1, 0, 0, 0, 0, 1], [0, 1, 0, 1, 0, 0, 0, 0, -1]);
    default:
      return closure([0, -1, 0, 1, 0, 0, 0, 0, 1], [0, 0, 1, 1, 0, 0, 0, 1, 0]);
  }
}

function planeChanges(): IntMat3[] {
  const found: IntMat3[] = [];
  const entries = [-1, 0, 1];
  for (const p of entries) {
    for (const q of entries) {
      for (const r of entries) {
        for (const s of entries) {
          const det = p * s - q * r;
          if (Math.abs(det) === 1) found.push([p, 0, q, 0, det, 0, r, 0, s]);
        }
      }
    }
  }
  return found;
}

function closure(...generators: IntMat3[]): IntMat3[] {
  const found: IntMat3[] = [IDENTITY];
  for (let i = 0; i < found.length; i++) {
    for (const g of generators) {
      const product = multiply(found[i]!, g);
      if (!found.some((m) => equal(m, product))) found.push(product);
    }
  }
  return found;
}
