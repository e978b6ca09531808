import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: "sitefold absences fixtures/reflections/thenardite.cif",
  output: `
fixtures/reflections/thenardite.cif, block thenardite
space group F d d d (No. 70, D2h^24), reference setting
...
reflections: the loop of _refln_F_squared_meas; F^2 (data name)
850 listed, 850 used, 109 after merging

verdict: the absences agree with the declared group
339 of 425 merged reflections are forbidden, 11 of these are above 3 s.u.; equivalents agree within R = 0.027

reflections  condition       in list  forbidden  <F²/s>  median  share of mean  above 3s  ln odds  verdict  from
hkl          h+k,h+l,k+l=2n      425        316    0.56    0.26          0.002         9   -808.2  met      centring 0,1/2,1/2
0kl          k+l=4n, k,l=2n       61         53    1.00    0.26          0.003         4   -125.5  met      glide plane d: -x,y+1/4,z+1/4
h0l          h+l=4n, h,l=2n       49         43    1.17    0.45          0.004         3   -104.1  met      glide plane d: x+1/4,-y,z+1/4
hk0          h+k=4n, h,k=2n       98         86    0.65    0.26          0.002         3   -210.2  met      glide plane d: x+1/4,y+1/4,-z
(h00)        h=4n                  9          7    0.43    0.26          0.001         0    -17.5  met      glide plane d: x+1/4,y+1/4,-z
(0k0)        k=4n                 11          9    1.49    0.26          0.005         1    -17.4  met      glide plane d: x+1/4,y+1/4,-z
(00l)        l=4n                  5          4    5.22    0.51          0.019         1     -6.1  met      glide plane d: -x,y+1/4,z+1/4
(in parentheses: implied by the others)
ln odds: of the forbidden reflections being present rather than absent; beyond 5 either way is very strong
...
groups that fit, extinction symbol F d d d
No.  group    extinction symbol  centre  absences  class  |E²-1|  ln odds
 70  F d d d  F d d d            yes         58.9    0.0     0.0      0.0  declared
 43  F 2 d d  F - d d            no          47.5    0.0    -0.5    -11.8
 43  F d 2 d  F d - d            no          43.2    0.0    -0.5    -16.1
ln odds: of each part, and together against the best group
`,
};
