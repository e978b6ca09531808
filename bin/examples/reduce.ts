import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: 'sitefold reduce --cell "3.988 3.988 3.988 60 60 60"',
  output: `
cell 3.988 3.988 3.988 60 60 60

cell                  a/Å     b/Å     c/Å  alpha/°   beta/°  gamma/°  volume/Å³  axes in terms of the given
given (P)          3.9880  3.9880  3.9880   60.000   60.000   60.000      44.85  a,b,c
Niggli             3.9880  3.9880  3.9880   60.000   60.000   60.000      44.85  a,b,c
Delaunay           3.9880  3.9880  3.9880  120.000  120.000   90.000      44.85  -b,a-c,c
conventional (cF)  5.6399  5.6399  5.6399   90.000   90.000   90.000     179.40  a-b+c,a+b-c,-a+b+c

Symmetries of the lattice; * the highest within 0.1°, taken as conventional
lattice  misses by/°     a/Å     b/Å     c/Å  alpha/°  beta/°  gamma/°  axes in terms of the given
cF *           0.000  5.6399  5.6399  5.6399   90.000  90.000   90.000  a-b+c,a+b-c,-a+b+c
`,
};
