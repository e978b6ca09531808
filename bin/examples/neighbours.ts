import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: "sitefold neighbours fixtures/calcite.cif",
  output: `
fixtures/calcite.cif, block calcite
space group R -3 c (No. 167, D3d^6), reference setting
positions closer than 0.05 Å are one position
- symmetry: the operations listed in the file

Coordination
site  occ.  CN  with   distances/Å       mean/Å  ECoN  by Ω  valence sum  shape
Ca1      1   6  CaO6   2.3598            2.3598  6.00  6.20  2.08 for 2+  octahedron 0.10
C1       1   3  CO3    1.2813            1.2813  3.00  3.40  4.02 for 4+  trigonal plane 0.00
O1       1   3  OCa2C  1.2813 to 2.3598          1.00  3.40  2.03

Ca1: CaO6, 6 neighbours; widest gap from 2.360 to 3.459 Å (O1); next atom C1 at 3.212 Å
  neighbour      d/Å       valence   Ω/%  code    operation
  O1         ×6  2.3598      0.346  16.1  14_555  -x+2/3,-y+1/3,-z+1/3
  shape: octahedron (OC-6) 0.097, trigonal prism (TPR-6) 15.926, pentagonal pyramid 29.937; volume 17.470 Å³;
    length distortion (Baur) 0.0000; quadratic elongation 1.0019, angle variance 7.10 deg² (Robinson, Gibbs,
    Ribbe)

...
neighbours: bonds, by rule, and the first shell of metals and of atoms without bonds, up to the widest gap
  between distances in sums of the covalent radii; seen from both ends
s.u.: from the cell alone, where symmetry fixes the atoms, as the file gives none of coordinates; written by
  the rule of 19
symmetry codes: number of the operation in the file's list, then 5 plus the whole cells along a, b, c
CN: neighbours listed; ECoN: effective number of Hoppe (1979); by Ω: sum of solid angles of the atom's domain
  over the largest (O'Keeffe 1979), all atoms counted
valence sum, of bonds and first shell: exp((R0 - d)/0.37 Å) with R0 of Brese and O'Keeffe (1991) from memory,
  hydrogen not counted; oxidation states those whose sums come nearest
shape: continuous shape measure (Pinsky, Avnir 1998), 0 ideal, up to 100
`,
};
