import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: "sitefold split fixtures/calcite.cif",
  output: `
fixtures/calcite.cif, block calcite
space group R -3 c (No. 167, D3d^6), reference setting
...
bonds that make units: C-O 1.281 Å (non-metals)
short enough for bonds, but taken for ions: Ca-O 2.360 Å; --bond "Ca-O<2.37" counts them

CO3 (carbonate), 2 in the primitive cell: C1 O1
  free unit D3h (atoms at most 0.000 Å from it, 0.25 Å allowed); site 32 (D3); factor group D3d
  stretches (3 C-O) A₁′ + E′; out-of-plane bends (1 C) A₂″; bends (3 O-C-O) E′, redundant A₁′
...
  motion        free      cm⁻¹  in the site  in the factor group             IR  Raman  what
  ν1            A₁′(R)    1063  A₁           A₁g(R) + A₁u                     .      1  symmetric stretch
  ν3            E′(R,IR)  1415  E            Eg(R) + Eu(IR)                   1      1  antisymmetric stretch
  ν4            E′(R,IR)   680  E            Eg(R) + Eu(IR)                   1      1  in-plane bend
  ν2            A₂″(IR)    879  A₂           A₂g + A₂u(IR)                    1      .  out-of-plane bend
  librations    A₂′ + E″        A₂ + E       A₂g + Eg(R) + A₂u(IR) + Eu(IR)
  translations  E′ + A₂″        A₂ + E       A₂g + Eg(R) + A₂u(IR) + Eu(IR)
...
Γ(internal) = A₁g(R) + A₂g + 2Eg(R) + A₁u + A₂u(IR) + 2Eu(IR)
Γ(librations) = A₂g + Eg(R) + A₂u(IR) + Eu(IR)
Γ(translations) = A₂g + Eg(R) + A₁u + 2A₂u(IR) + 3Eu(IR)
Γ(acoustic) = A₂u(IR) + Eu(IR), part of the translations
Γ(optic) = A₁g(R) + 3A₂g + 4Eg(R) + 2A₁u + 3A₂u(IR) + 5Eu(IR)
Γ(total) = A₁g(R) + 3A₂g + 4Eg(R) + 2A₁u + 4A₂u(IR) + 6Eu(IR)
(the sum over units was compared with the result atom by atom)
`,
};
