import { formatOperation } from "../symmetry/index.ts";
import type { Crystal } from "./crystal.ts";

/** One atom of the cell; fractional coordinates in [0, 1). */
export interface Position {
  readonly label: string;
  readonly element: string | null;
  readonly occupancy: number;
  readonly x: number;
  readonly y: number;
  readonly z: number;
  /** The operation of the group that carries the listed atom here, `-x,y+1/2,-z`. */
  readonly operation: string;
}

export interface PositionsAnswer {
  readonly positions: readonly Position[];
  readonly count: number;
}

/** Every atom of the cell, site by site in the order of the file, image by image in the order of the operations. */
export function positionsAnswer(crystal: Crystal): PositionsAnswer {
  const operations = crystal.group.operations.map(formatOperation);
  const positions = crystal.sites.flatMap((site) =>
    site.images.map(({ position, operation }) => ({
      label: site.label,
      element: site.element,
      occupancy: site.occupancy,
      x: position[0],
      y: position[1],
      z: position[2],
      operation: operations[operation]!,
    })),
  );
  return { positions, count: positions.length };
}
