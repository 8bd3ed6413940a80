/**
 * Version of what the solver computes. A stored result is reused only for the same version, so it changes with every
 * change that can move a number or a name in a summary.
 */
export const SOLVER_VERSION = '2.1.0';
