/** Where the points of one member begin among all points, and how many they are. */
export interface MemberPoints {
  readonly id: string;
  readonly first: number;
  readonly count: number;
}

/** Mode shapes at every node and division point of a frame, φᵀMφ = 1. */
export interface ModeShapes {
  /** Node ids; point i is node i, in document order. */
  readonly nodes: readonly string[];
  /** Stations of every member from start to end, arms and joints taken into account. */
  readonly members: readonly MemberPoints[];
  readonly points: number;
  readonly modes: number;
  /** Undeformed, points × 3, global X Y Z [m]. */
  readonly positions: Float32Array;
  /** modes × points × 6: u v w rx ry rz in global axes [kg^−½, rad/m kg^−½]. */
  readonly shapes: Float32Array;
}
