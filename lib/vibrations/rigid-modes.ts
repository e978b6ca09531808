import { determinant, trace } from "../algebra/index.ts";
import { decompose, type LinearSpecies, linearCharacter, linearSpecies, subduceBy } from "../representation/index.ts";
import {
  cross3,
  type FiniteSymmetry,
  type LinearSymmetry,
  type MolecularSymmetry,
  type MolecularUnit,
  minus3,
  unit3,
  type Vec3,
} from "../structure/index.ts";
import { along } from "./bond-coordinates.ts";
import { countsOf, type SpeciesCounts } from "./species-counts.ts";
import type { UnitCorrelation } from "./unit-correlation.ts";

/** Librations of one species of the free unit. */
export interface LibrationAnswer {
  /** Of water: `twist` about its twofold axis, `rock` in its plane, `wag` out of it; of others `libration`. */
  readonly name: "twist" | "rock" | "wag" | "libration";
  /** Species of the rotation of the free unit. */
  readonly species: string;
  readonly count: number;
  readonly site: readonly number[];
  readonly factorGroup: readonly number[];
}

/** Species of the translations and rotations of the free unit, and its librations one species at a time. */
export interface RigidModes {
  readonly translations: SpeciesCounts;
  readonly rotations: SpeciesCounts;
  readonly librations: readonly LibrationAnswer[];
}

export function rigidModes(
  unit: Pick<MolecularUnit, "atoms">,
  symmetry: MolecularSymmetry,
  correlation: UnitCorrelation,
): RigidModes {
  return symmetry.kind === "finite" ? finiteModes(unit, symmetry, correlation) : linearModes(symmetry, correlation);
}

function toFactorGroup({ siteToFactorGroup }: UnitCorrelation, site: readonly number[]): number[] {
  const [first = []] = siteToFactorGroup;
  return first.map((_, f) => site.reduce((sum, n, i) => sum + n * siteToFactorGroup[i]![f]!, 0));
}

function finiteModes(
  unit: Pick<MolecularUnit, "atoms">,
  symmetry: FiniteSymmetry,
  correlation: UnitCorrelation,
): RigidModes {
  const { group } = symmetry;
  const rotations = decompose(
    group,
    group.elements.map((R) => Math.sign(determinant(R)) * trace(R)),
  );
  const down = subduceBy(group, correlation.siteGroup, symmetry.siteElements);
  const names = waterRotations(unit, symmetry);
  const librations = group.irreps.flatMap((irrep, i): LibrationAnswer[] => {
    if (rotations[i] === 0) return [];
    const site = down[i]!;
    const name = names.get(irrep.label) ?? "libration";
    const factorGroup = toFactorGroup(correlation, site);
    return [{ name, species: irrep.label, count: rotations[i]!, site, factorGroup }];
  });
  return {
    translations: countsOf(group.irreps, decompose(group, group.elements.map(trace))),
    rotations: countsOf(group.irreps, rotations),
    librations,
  };
}

/** Names of the rotations of water by species; empty for other units, and where its shape shows no C2v. */
function waterRotations(
  { atoms }: Pick<MolecularUnit, "atoms">,
  { schoenflies, matrices, group, idealised }: FiniteSymmetry,
): Map<string, LibrationAnswer["name"]> {
  const elements = atoms.map((a) => (a.element === "D" || a.element === "T" ? "H" : a.element));
  if (schoenflies !== "C2v" || [...elements].sort().join("") !== "HHO") return new Map();
  const [o, h] = [idealised[elements.indexOf("O")]!, idealised.filter((_, k) => elements[k] === "H")];
  const [u, v] = h.map((x) => minus3(x, o)) as [Vec3, Vec3];
  const axis = unit3(minus3(u, minus3([0, 0, 0], v)));
  const normal = unit3(cross3(u, v));
  const label = (n: Vec3) => {
    const counts = decompose(
      group,
      matrices.map((R) => Math.round(Math.sign(determinant(R)) * along(R, n))),
    );
    return group.irreps[counts.indexOf(1)]!.label;
  };
  return new Map([
    [label(axis), "twist"],
    [label(normal), "rock"],
    [label(cross3(normal, axis)), "wag"],
  ]);
}

/** A linear unit turns about two axes across it; its translations are along and across. */
function linearModes({ schoenflies, siteReverses }: LinearSymmetry, correlation: UnitCorrelation): RigidModes {
  const isCentred = schoenflies === "Dinfh";
  const species = (lambda: number, parity: 1 | -1): LinearSpecies =>
    linearSpecies(schoenflies, lambda, isCentred ? parity : 0);
  const turning = species(1, 1);
  const { siteGroup } = correlation;
  const site = decompose(
    siteGroup,
    siteGroup.elements.map((W, i) => linearCharacter(turning, W, siteReverses[i]!)),
  );
  const one = { name: "libration", species: turning.label, count: 1, site } as const;
  return {
    translations: { [species(0, -1).label]: 1, [species(1, -1).label]: 1 },
    rotations: { [turning.label]: 1 },
    librations: [{ ...one, factorGroup: toFactorGroup(correlation, site) }],
  };
}
