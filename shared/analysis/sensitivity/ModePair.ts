/** Two modes of one eigenvalue, or one mode twice; by place among the modes looked at. */
export interface ModePair {
  readonly a: number;
  readonly b: number;
  /** [rad²/s²] */
  readonly lambda: number;
}
