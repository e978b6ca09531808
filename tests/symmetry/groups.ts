/**
 * Generators of some space groups as International Tables for Crystallography A selects them (from memory), with the
 * number of operations modulo the cell: order of the point group times number of centrings.
 */
export const GROUPS = {
  P1: { generators: [], order: 1 },
  "P21/c": { generators: ["-x,y+1/2,-z+1/2", "-x,-y,-z"], order: 4 },
  Pnma: { generators: ["-x+1/2,-y,z+1/2", "-x,y+1/2,-z", "-x,-y,-z"], order: 8 },
  "I41/a": { generators: ["x+1/2,y+1/2,z+1/2", "-x+1/2,-y,z+1/2", "-y+3/4,x+1/4,z+1/4", "-x,-y,-z"], order: 16 },
  "R-3c, hexagonal axes": {
    generators: ["x+2/3,y+1/3,z+1/3", "-y,x-y,z", "y,x,-z+1/2", "-x,-y,-z"],
    order: 36,
  },
  "R-3c, rhombohedral axes": { generators: ["z,x,y", "-z+1/2,-y+1/2,-x+1/2", "-x,-y,-z"], order: 12 },
  "P63/mmc": { generators: ["-y,x-y,z", "-x,-y,z+1/2", "y,x,-z", "-x,-y,-z"], order: 24 },
  P213: { generators: ["-x+1/2,-y,z+1/2", "-x,y+1/2,-z+1/2", "z,x,y"], order: 12 },
  "Fd-3m": {
    generators: [
      "x,y+1/2,z+1/2",
      "x+1/2,y,z+1/2",
      "-x+3/4,-y+1/4,z+1/2",
      "-x+1/4,y+1/2,-z+3/4",
      "z,x,y",
      "y+3/4,x+1/4,-z+1/2",
      "-x,-y,-z",
    ],
    order: 192,
  },
  "Ia-3d": {
    generators: ["x+1/2,y+1/2,z+1/2", "-x+1/2,-y,z+1/2", "-x,y+1/2,-z+1/2", "z,x,y", "y+3/4,x+1/4,-z+1/4", "-x,-y,-z"],
    order: 96,
  },
} as const satisfies Record<string, { generators: readonly string[]; order: number }>;
