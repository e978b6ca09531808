import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: "sitefold modes fixtures/calcite.cif",
  output: `
fixtures/calcite.cif, block calcite
space group R -3 c (No. 167, D3d^6), reference setting
...
10 vibrating atoms in the primitive cell: 2 CaCO3
...
factor group -3m1 (D3d); labels in the axes of the file: x along [100], y along [120], z along [001]; C2'
    along [100] [010] [110]; sigma_d normal to [100] [010] [110]

Γ(total) = A₁g + 3A₂g + 4Eg + 2A₁u + 4A₂u + 6Eu: 30 modes
Γ(acoustic) = A₂u + Eu: 3 modes
Γ(optic) = A₁g(R) + 3A₂g + 4Eg(R) + 2A₁u + 3A₂u(IR) + 5Eu(IR): 18 bands from 27 modes
Γ(Raman) = A₁g + 4Eg: 5 bands
Γ(infrared) = 3A₂u + 5Eu: 8 bands
Γ(silent) = 3A₂g + 2A₁u: 5 bands
Γ(silent, but hyper-Raman active) = 2A₁u: 2 bands
...
species  dim  total  acoustic  optic  first order  hyper-Raman
A₁g        1      1         0      1  Raman        no
A₂g        1      3         0      3  silent       no
Eg         2      4         0      4  Raman        no
A₁u        1      2         0      2  silent       yes
A₂u        1      4         1      3  infrared     yes
Eu         2      6         1      5  infrared     yes

site  position  symmetry   atoms  displacement in the site group  A₁g  A₂g  Eg  A₁u  A₂u  Eu  reaches
Ca1   6b        -3. (C3i)      2  Au + Eu                           .    .   .    1    1   2  IR
C1    6a        32 (D3)        2  A₂ + E                            .    1   1    .    1   1  R,IR
O1    18e       .2 (C2)        6  A + 2B                            1    2   3    1    2   3  R,IR
no Raman active mode moves Ca1
...
`,
};
