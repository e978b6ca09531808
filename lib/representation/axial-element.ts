/** An element of an axial group by what it does along and around the principal axis. */
export interface AxialElement {
  /** Rotation in the plane perpendicular to the axis, in units of a full turn / turns; 0 where `reflects`. */
  readonly turn: number;
  /** The axis is reversed. */
  readonly flips: boolean;
  /** The plane perpendicular to the axis is mapped with reversed handedness. */
  readonly reflects: boolean;
}
