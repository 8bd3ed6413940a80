/**
 * What is known of L before any number is: order of elimination, supernodes, their rows and the
 * assembly tree. It depends on the patterns alone, so one serves every shift and every edit that
 * leaves the topology as it is. Treat it as opaque and immutable.
 */
export interface SymbolicFactor {
  /** Order of the matrix. */
  readonly n: number;
  /** n: unknown of the caller eliminated at each place. */
  readonly perm: Int32Array;
  /** n: place at which each unknown of the caller is eliminated. */
  readonly place: Int32Array;
  /** Number of supernodes, numbered so that children precede their parent (postorder). */
  readonly supernodes: number;
  /** supernodes + 1: first place of each supernode. */
  readonly first: Int32Array;
  /** supernodes: parent in the assembly tree, −1 at a root. */
  readonly parent: Int32Array;
  /** supernodes + 1: offsets into `rows` and `relative`. */
  readonly rowPtr: Int32Array;
  /** Places, ascending, of the rows below each supernode's own. */
  readonly rows: Int32Array;
  /** For each of `rows`: its index in the parent's front. */
  readonly relative: Int32Array;
  /** supernodes + 1: offset of each supernode's dense panel (row by row) in the values of L. */
  readonly panelPtr: Int32Array;
  /** Largest number of values on the stack of update matrices. */
  readonly stackSize: number;
  /** Largest number of columns in one supernode. */
  readonly maxColumns: number;
  /** Where entries of a pattern go in L; remembered per pattern (keyed by its `rowIdx`). */
  readonly destinations: WeakMap<Int32Array, Int32Array>;
  /** Milliseconds by the caller's clock (0 without one). */
  readonly timing: { readonly order: number; readonly symbolic: number };
}
