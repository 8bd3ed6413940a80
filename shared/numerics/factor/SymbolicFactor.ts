/**
 * What is known of L before any number is: order of elimination, supernodes, their rows and the
 * assembly tree. It depends on the patterns alone, so one serves every shift and every edit that
 * leaves the topology as it is. Treat it as opaque and immutable.
 *
 * A place is a position in the order of elimination. Each supernode's places are filled up to a
 * multiple of four with padding, which stands for no unknown; so are its rows, whose padding points
 * to the place `places`.
 */
export interface SymbolicFactor {
  /** Order of the matrix. */
  readonly n: number;
  /** Number of places, padding included. */
  readonly places: number;
  /** places: unknown eliminated at each place, −1 for padding. */
  readonly perm: Int32Array;
  /** n: place at which each unknown is eliminated. */
  readonly place: Int32Array;
  /** Number of supernodes, numbered so that children precede their parent (postorder). */
  readonly supernodes: number;
  /** places: supernode of each place. */
  readonly supernodeOf: Int32Array;
  /** supernodes + 1: first place of each supernode. */
  readonly first: Int32Array;
  /** supernodes: parent in the assembly tree, −1 at a root. */
  readonly parent: Int32Array;
  /** supernodes + 1: offsets into `rows` and `relative`, multiples of four. */
  readonly rowPtr: Int32Array;
  /** supernodes: rows below each supernode's own, without padding. */
  readonly rowCount: Int32Array;
  /** Places, ascending, of the rows below each supernode's own, then its padding. */
  readonly rows: Int32Array;
  /** For each of `rows` but the padding: its index in the parent's front. */
  readonly relative: Int32Array;
  /** supernodes + 1: offset of each supernode's panel of tiles in the values of L. */
  readonly panelPtr: Int32Array;
  /** Largest number of values on the stack of update matrices. */
  readonly stackSize: number;
  /** Largest number of columns in one supernode. */
  readonly maxColumns: number;
  /** Multiplications and additions that one factorisation needs, padding left out. */
  readonly operations: number;
  /** Milliseconds by the caller's clock (0 without one). */
  readonly timing: { readonly order: number; readonly symbolic: number };
}
