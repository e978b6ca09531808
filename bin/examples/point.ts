import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: "sitefold point C3v",
  output: `
point group C3v (3m), order 6
functions and tensors: x, y, z of the standard orientation: z along the principal axis

    E  2C₃  3σv
A₁  1    1    1
A₂  1    1   -1
E   2   -1    0

axes: 2C₃ z
planes, by their normals: 3σv y (0.866, 0.5, 0) (0.866, -0.5, 0)

species  vectors  rotations  quadratic functions      first order      hyper-Raman
A₁       z                   x²+y², z²                infrared, Raman  yes
A₂                Rz                                  silent           yes
E        (x, y)   (Ry, -Rx)  (x²-y², -2xy), (xz, yz)  infrared, Raman  yes
`,
};
