/**
 * Dense and sparse kernels over one linear memory, in WebAssembly SIMD. Compiled by
 * `scripts/lib/kernels.mjs`; `../scriptKernels.ts` does the same in JavaScript, operation by
 * operation, so that both give the same bits. What each one computes is said in `../Kernels.ts`.
 *
 * Panels are packed in tiles of four rows: column k of a tile holds its four rows side by side.
 */

/** Zeros for so many bytes, a multiple of 16: short stretches, for which a bulk operation costs more. */
function clear(at: usize, bytes: usize): void {
  const end = at + bytes;
  const zero = f64x2.splat(0);
  for (; at < end; at += 16) v128.store(at, zero);
}

/** C −= L Wᵀ over 4 × 4:  C[c][r] −= Σ_k L[k][r] · W[k][c], k ascending. */
function subtractBlock(L: usize, W: usize, length: i32, C: usize): void {
  let c00 = f64x2.splat(0);
  let c01 = f64x2.splat(0);
  let c10 = f64x2.splat(0);
  let c11 = f64x2.splat(0);
  let c20 = f64x2.splat(0);
  let c21 = f64x2.splat(0);
  let c30 = f64x2.splat(0);
  let c31 = f64x2.splat(0);
  const end = L + ((<usize>length) << 5);
  while (L < end) {
    const l0 = v128.load(L);
    const l1 = v128.load(L, 16);
    const w0 = v128.load64_splat(W);
    c00 = f64x2.add(c00, f64x2.mul(l0, w0));
    c01 = f64x2.add(c01, f64x2.mul(l1, w0));
    const w1 = v128.load64_splat(W, 8);
    c10 = f64x2.add(c10, f64x2.mul(l0, w1));
    c11 = f64x2.add(c11, f64x2.mul(l1, w1));
    const w2 = v128.load64_splat(W, 16);
    c20 = f64x2.add(c20, f64x2.mul(l0, w2));
    c21 = f64x2.add(c21, f64x2.mul(l1, w2));
    const w3 = v128.load64_splat(W, 24);
    c30 = f64x2.add(c30, f64x2.mul(l0, w3));
    c31 = f64x2.add(c31, f64x2.mul(l1, w3));
    L += 32;
    W += 32;
  }
  v128.store(C, f64x2.sub(v128.load(C), c00));
  v128.store(C, f64x2.sub(v128.load(C, 16), c01), 16);
  v128.store(C, f64x2.sub(v128.load(C, 32), c10), 32);
  v128.store(C, f64x2.sub(v128.load(C, 48), c11), 48);
  v128.store(C, f64x2.sub(v128.load(C, 64), c20), 64);
  v128.store(C, f64x2.sub(v128.load(C, 80), c21), 80);
  v128.store(C, f64x2.sub(v128.load(C, 96), c30), 96);
  v128.store(C, f64x2.sub(v128.load(C, 112), c31), 112);
}

/** W[k] = d_k L[k] over the four rows of a tile. */
function scaledTile(L: usize, pivots: usize, length: i32, W: usize): void {
  for (let k: i32 = 0; k < length; k++) {
    const d = v128.load64_splat(pivots);
    v128.store(W, f64x2.mul(d, v128.load(L)));
    v128.store(W, f64x2.mul(d, v128.load(L, 16)), 16);
    pivots += 8;
    L += 32;
    W += 32;
  }
}

export function eliminatePanel(
  panel: usize,
  columns: i32,
  tiles: i32,
  pivots: usize,
  scale: usize,
  tolerance: f64,
  work: usize,
): i32 {
  const stride = (<usize>columns) << 5;
  for (let j: i32 = 0; j < columns; j += 4) {
    const tile = panel + <usize>(j >> 2) * stride;
    scaledTile(tile, pivots, j, work);
    const D = tile + ((<usize>j) << 5);
    subtractBlock(tile, work, j, D);
    const at = pivots + ((<usize>j) << 3);
    const size = scale + ((<usize>j) << 3);

    const d0 = load<f64>(D);
    store<f64>(at, d0);
    if (!(Math.abs(d0) > tolerance * load<f64>(size))) return j;
    const i0 = 1 / d0;
    const a10 = load<f64>(D, 8);
    const a20 = load<f64>(D, 16);
    const a30 = load<f64>(D, 24);
    const l10 = a10 * i0;
    const l20 = a20 * i0;
    const l30 = a30 * i0;
    store<f64>(D, l10, 8);
    store<f64>(D, l20, 16);
    store<f64>(D, l30, 24);

    const d1 = load<f64>(D, 40) - a10 * l10;
    store<f64>(at, d1, 8);
    if (!(Math.abs(d1) > tolerance * load<f64>(size, 8))) return j + 1;
    const i1 = 1 / d1;
    const a21 = load<f64>(D, 48) - a20 * l10;
    const a31 = load<f64>(D, 56) - a30 * l10;
    const l21 = a21 * i1;
    const l31 = a31 * i1;
    store<f64>(D, l21, 48);
    store<f64>(D, l31, 56);

    const d2 = load<f64>(D, 80) - a20 * l20 - a21 * l21;
    store<f64>(at, d2, 16);
    if (!(Math.abs(d2) > tolerance * load<f64>(size, 16))) return j + 2;
    const i2 = 1 / d2;
    const a32 = load<f64>(D, 88) - a30 * l20 - a31 * l21;
    const l32 = a32 * i2;
    store<f64>(D, l32, 88);

    const d3 = load<f64>(D, 120) - a30 * l30 - a31 * l31 - a32 * l32;
    store<f64>(at, d3, 24);
    if (!(Math.abs(d3) > tolerance * load<f64>(size, 24))) return j + 3;
    const i3 = 1 / d3;

    const vl10 = f64x2.splat(l10);
    const vl20 = f64x2.splat(l20);
    const vl30 = f64x2.splat(l30);
    const vl21 = f64x2.splat(l21);
    const vl31 = f64x2.splat(l31);
    const vl32 = f64x2.splat(l32);
    for (let i: i32 = (j >> 2) + 1; i < tiles; i++) {
      const row = panel + <usize>i * stride;
      const C = row + ((<usize>j) << 5);
      subtractBlock(row, work, j, C);
      for (let half: usize = 0; half < 32; half += 16) {
        const at0 = C + half;
        const x0 = v128.load(at0);
        const x1 = f64x2.sub(v128.load(at0, 32), f64x2.mul(x0, vl10));
        const x2 = f64x2.sub(
          f64x2.sub(v128.load(at0, 64), f64x2.mul(x0, vl20)),
          f64x2.mul(x1, vl21),
        );
        const x3 = f64x2.sub(
          f64x2.sub(f64x2.sub(v128.load(at0, 96), f64x2.mul(x0, vl30)), f64x2.mul(x1, vl31)),
          f64x2.mul(x2, vl32),
        );
        v128.store(at0, f64x2.mul(x0, f64x2.splat(i0)));
        v128.store(at0, f64x2.mul(x1, f64x2.splat(i1)), 32);
        v128.store(at0, f64x2.mul(x2, f64x2.splat(i2)), 64);
        v128.store(at0, f64x2.mul(x3, f64x2.splat(i3)), 96);
      }
    }
  }
  return -1;
}

export function subtractUpdate(
  update: usize,
  below: usize,
  columns: i32,
  tiles: i32,
  pivots: usize,
  work: usize,
): void {
  const stride = (<usize>columns) << 5;
  for (let j: i32 = 0; j < tiles; j++) {
    scaledTile(below + <usize>j * stride, pivots, columns, work);
    for (let i = j; i < tiles; i++) {
      const C = update + ((<usize>(((i * (i + 1)) >> 1) + j)) << 7);
      subtractBlock(below + <usize>i * stride, work, columns, C);
    }
  }
}

export function extendAdd(
  update: usize,
  rows: i32,
  relative: usize,
  panel: usize,
  columns: i32,
  target: usize,
): void {
  let split: i32 = 0;
  while (split < rows && load<i32>(relative + ((<usize>split) << 2)) < columns) split++;
  const stride = (<usize>columns) << 5;
  for (let a: i32 = 0; a < rows; a++) {
    const ra = load<i32>(relative + ((<usize>a) << 2));
    const ia = a >> 2;
    const from = update + ((<usize>((ia * (ia + 1)) >> 1)) << 7) + ((<usize>(a & 3)) << 3);
    const own = panel + <usize>(ra >> 2) * stride + ((<usize>(ra & 3)) << 3);
    const inPanel = a < split ? a + 1 : split;
    let b: i32 = 0;
    for (; b < inPanel; b++) {
      const at = own + ((<usize>load<i32>(relative + ((<usize>b) << 2))) << 5);
      store<f64>(at, load<f64>(at) + load<f64>(from + ((<usize>b) << 5)));
    }
    if (b > a) continue;
    const r = ra - columns;
    const i = r >> 2;
    const row = target + ((<usize>((i * (i + 1)) >> 1)) << 7) + ((<usize>(r & 3)) << 3);
    for (; b <= a; b++) {
      const rb = load<i32>(relative + ((<usize>b) << 2)) - columns;
      const at = row + ((<usize>rb) << 5);
      store<f64>(at, load<f64>(at) + load<f64>(from + ((<usize>b) << 5)));
    }
  }
}

export function forwardSweep(count: i32, table: usize, rows: usize, x: usize): void {
  for (let s: i32 = 0; s < count; s++) {
    const own = x + ((<usize>load<u32>(table)) << 3);
    const columns = load<i32>(table, 4);
    const below = load<i32>(table, 8);
    let row = rows + ((<usize>load<u32>(table, 12)) << 2);
    let tile = <usize>load<u32>(table, 16);
    table += 20;
    const stride = (<usize>columns) << 5;
    for (let j: i32 = 0; j < columns; j += 4) {
      let even0 = f64x2.splat(0);
      let even1 = f64x2.splat(0);
      let odd0 = f64x2.splat(0);
      let odd1 = f64x2.splat(0);
      for (let k: i32 = 0; k < j; k += 2) {
        const L = tile + ((<usize>k) << 5);
        const xe = v128.load64_splat(own + ((<usize>k) << 3));
        const xo = v128.load64_splat(own + ((<usize>k) << 3), 8);
        even0 = f64x2.add(even0, f64x2.mul(v128.load(L), xe));
        even1 = f64x2.add(even1, f64x2.mul(v128.load(L, 16), xe));
        odd0 = f64x2.add(odd0, f64x2.mul(v128.load(L, 32), xo));
        odd1 = f64x2.add(odd1, f64x2.mul(v128.load(L, 48), xo));
      }
      const sum0 = f64x2.add(even0, odd0);
      const sum1 = f64x2.add(even1, odd1);
      const at = own + ((<usize>j) << 3);
      const D = tile + ((<usize>j) << 5);
      const x0 = load<f64>(at) - f64x2.extract_lane(sum0, 0);
      const x1 = load<f64>(at, 8) - f64x2.extract_lane(sum0, 1) - load<f64>(D, 8) * x0;
      const x2 =
        load<f64>(at, 16) -
        f64x2.extract_lane(sum1, 0) -
        load<f64>(D, 16) * x0 -
        load<f64>(D, 48) * x1;
      const x3 =
        load<f64>(at, 24) -
        f64x2.extract_lane(sum1, 1) -
        load<f64>(D, 24) * x0 -
        load<f64>(D, 56) * x1 -
        load<f64>(D, 88) * x2;
      store<f64>(at, x0);
      store<f64>(at, x1, 8);
      store<f64>(at, x2, 16);
      store<f64>(at, x3, 24);
      tile += stride;
    }
    for (let i: i32 = 0; i < below; i++) {
      let even0 = f64x2.splat(0);
      let even1 = f64x2.splat(0);
      let odd0 = f64x2.splat(0);
      let odd1 = f64x2.splat(0);
      let at = own;
      const end = tile + stride;
      while (tile < end) {
        const xe = v128.load64_splat(at);
        const xo = v128.load64_splat(at, 8);
        even0 = f64x2.add(even0, f64x2.mul(v128.load(tile), xe));
        even1 = f64x2.add(even1, f64x2.mul(v128.load(tile, 16), xe));
        odd0 = f64x2.add(odd0, f64x2.mul(v128.load(tile, 32), xo));
        odd1 = f64x2.add(odd1, f64x2.mul(v128.load(tile, 48), xo));
        at += 16;
        tile += 64;
      }
      const sum0 = f64x2.add(even0, odd0);
      const sum1 = f64x2.add(even1, odd1);
      const at0 = x + ((<usize>load<u32>(row)) << 3);
      const at1 = x + ((<usize>load<u32>(row, 4)) << 3);
      const at2 = x + ((<usize>load<u32>(row, 8)) << 3);
      const at3 = x + ((<usize>load<u32>(row, 12)) << 3);
      store<f64>(at0, load<f64>(at0) - f64x2.extract_lane(sum0, 0));
      store<f64>(at1, load<f64>(at1) - f64x2.extract_lane(sum0, 1));
      store<f64>(at2, load<f64>(at2) - f64x2.extract_lane(sum1, 0));
      store<f64>(at3, load<f64>(at3) - f64x2.extract_lane(sum1, 1));
      row += 16;
    }
  }
}

export function backSweep(last: i32, table: usize, rows: usize, x: usize, work: usize): void {
  for (let s: i32 = last; s >= 0; s--) {
    const entry = table + <usize>s * 20;
    const own = x + ((<usize>load<u32>(entry)) << 3);
    const columns = load<i32>(entry, 4);
    const below = load<i32>(entry, 8);
    let row = rows + ((<usize>load<u32>(entry, 12)) << 2);
    const panel = <usize>load<u32>(entry, 16);
    const stride = (<usize>columns) << 5;
    clear(work, (<usize>columns) << 4);
    let tile = panel + <usize>(columns >> 2) * stride;
    let i: i32 = 0;
    for (; i + 1 < below; i += 2) {
      const xr0 = f64x2(
        load<f64>(x + ((<usize>load<u32>(row)) << 3)),
        load<f64>(x + ((<usize>load<u32>(row, 4)) << 3)),
      );
      const xr1 = f64x2(
        load<f64>(x + ((<usize>load<u32>(row, 8)) << 3)),
        load<f64>(x + ((<usize>load<u32>(row, 12)) << 3)),
      );
      const xr2 = f64x2(
        load<f64>(x + ((<usize>load<u32>(row, 16)) << 3)),
        load<f64>(x + ((<usize>load<u32>(row, 20)) << 3)),
      );
      const xr3 = f64x2(
        load<f64>(x + ((<usize>load<u32>(row, 24)) << 3)),
        load<f64>(x + ((<usize>load<u32>(row, 28)) << 3)),
      );
      row += 32;
      let t = work;
      const end = tile + stride;
      while (tile < end) {
        const next = tile + stride;
        let sum = v128.load(t);
        sum = f64x2.add(sum, f64x2.mul(v128.load(tile), xr0));
        sum = f64x2.add(sum, f64x2.mul(v128.load(tile, 16), xr1));
        sum = f64x2.add(sum, f64x2.mul(v128.load(next), xr2));
        sum = f64x2.add(sum, f64x2.mul(v128.load(next, 16), xr3));
        v128.store(t, sum);
        t += 16;
        tile += 32;
      }
      tile += stride;
    }
    if (i < below) {
      const xr0 = f64x2(
        load<f64>(x + ((<usize>load<u32>(row)) << 3)),
        load<f64>(x + ((<usize>load<u32>(row, 4)) << 3)),
      );
      const xr1 = f64x2(
        load<f64>(x + ((<usize>load<u32>(row, 8)) << 3)),
        load<f64>(x + ((<usize>load<u32>(row, 12)) << 3)),
      );
      addTransposed(tile, columns, xr0, xr1, work);
    }
    for (let j: i32 = columns - 4; j >= 0; j -= 4) {
      const at = own + ((<usize>j) << 3);
      const sums = work + ((<usize>j) << 4);
      tile = panel + <usize>(j >> 2) * stride;
      const D = tile + ((<usize>j) << 5);
      const x3 = load<f64>(at, 24) - (load<f64>(sums, 48) + load<f64>(sums, 56));
      const x2 =
        load<f64>(at, 16) - (load<f64>(sums, 32) + load<f64>(sums, 40)) - load<f64>(D, 88) * x3;
      const x1 =
        load<f64>(at, 8) -
        (load<f64>(sums, 16) + load<f64>(sums, 24)) -
        load<f64>(D, 48) * x2 -
        load<f64>(D, 56) * x3;
      const x0 =
        load<f64>(at) -
        (load<f64>(sums) + load<f64>(sums, 8)) -
        load<f64>(D, 8) * x1 -
        load<f64>(D, 16) * x2 -
        load<f64>(D, 24) * x3;
      store<f64>(at, x0);
      store<f64>(at, x1, 8);
      store<f64>(at, x2, 16);
      store<f64>(at, x3, 24);
      addTransposed(tile, j, f64x2(x0, x1), f64x2(x2, x3), work);
    }
  }
}

/** work[k] += L[k]ᵀ x over the four rows of a tile, in two lanes. */
function addTransposed(tile: usize, length: i32, x0: v128, x1: v128, work: usize): void {
  const end = tile + ((<usize>length) << 5);
  while (tile < end) {
    let sum = v128.load(work);
    sum = f64x2.add(sum, f64x2.mul(v128.load(tile), x0));
    sum = f64x2.add(sum, f64x2.mul(v128.load(tile, 16), x1));
    v128.store(work, sum);
    work += 16;
    tile += 32;
  }
}

export function gather(length: i32, index: usize, x: usize, y: usize): void {
  for (let k: i32 = 0; k < length; k++) {
    const i = load<i32>(index);
    store<f64>(y, i < 0 ? 0 : load<f64>(x + ((<usize>i) << 3)));
    index += 4;
    y += 8;
  }
}

export function scatter(length: i32, index: usize, y: usize, x: usize): void {
  for (let k: i32 = 0; k < length; k++) {
    const i = load<i32>(index);
    if (i >= 0) store<f64>(x + ((<usize>i) << 3), load<f64>(y));
    index += 4;
    y += 8;
  }
}

export function divide(length: i32, d: usize, x: usize): void {
  for (let k: i32 = 0; k < length; k += 2) {
    v128.store(x, f64x2.div(v128.load(x), v128.load(d)));
    d += 16;
    x += 16;
  }
}

export function multiplySparse(
  n: i32,
  colPtr: usize,
  rowIdx: usize,
  values: usize,
  x: usize,
  y: usize,
): void {
  let p = load<i32>(colPtr);
  for (let j: i32 = 0; j < n; j++) {
    const xj = load<f64>(x + ((<usize>j) << 3));
    let sum: f64 = 0;
    const end = load<i32>(colPtr + ((<usize>(j + 1)) << 2));
    for (; p < end; p++) {
      const i = load<i32>(rowIdx + ((<usize>p) << 2));
      const a = load<f64>(values + ((<usize>p) << 3));
      if (i == j) {
        sum += a * xj;
      } else {
        const at = y + ((<usize>i) << 3);
        store<f64>(at, load<f64>(at) + a * xj);
        sum += a * load<f64>(x + ((<usize>i) << 3));
      }
    }
    const at = y + ((<usize>j) << 3);
    store<f64>(at, load<f64>(at) + sum);
  }
}

/** Columns `from` … `from + width − 1` (fewer than four) of one row of Y, one number at a time. */
function multiplyRest(
  f: usize,
  length: usize,
  g: usize,
  width: i32,
  y: usize,
  accumulate: bool,
): void {
  for (let r: i32 = 0; r < width; r++) {
    let sum = accumulate ? load<f64>(y) : 0;
    let at = g + ((<usize>r) << 3);
    for (let q: usize = 0; q < length; q += 8) {
      sum += load<f64>(at) * load<f64>(f + q);
      at += 32;
    }
    store<f64>(y, sum);
    y += 8;
  }
}

export function multiplyBatch(
  count: i32,
  F: usize,
  strideF: usize,
  inputs: i32,
  G: usize,
  outputs: i32,
  Y: usize,
  strideY: usize,
  accumulate: bool,
): void {
  const length = (<usize>inputs) << 3;
  let m: i32 = 0;
  for (; m + 3 < count; m += 4) {
    let g = G;
    let y0 = Y + <usize>m * strideY;
    const first = F + <usize>m * strideF;
    const end = first + length;
    let p: i32 = 0;
    for (; p + 3 < outputs; p += 4) {
      const y1 = y0 + strideY;
      const y2 = y1 + strideY;
      const y3 = y2 + strideY;
      let c00 = f64x2.splat(0);
      let c01 = f64x2.splat(0);
      let c10 = f64x2.splat(0);
      let c11 = f64x2.splat(0);
      let c20 = f64x2.splat(0);
      let c21 = f64x2.splat(0);
      let c30 = f64x2.splat(0);
      let c31 = f64x2.splat(0);
      if (accumulate) {
        c00 = v128.load(y0);
        c01 = v128.load(y0, 16);
        c10 = v128.load(y1);
        c11 = v128.load(y1, 16);
        c20 = v128.load(y2);
        c21 = v128.load(y2, 16);
        c30 = v128.load(y3);
        c31 = v128.load(y3, 16);
      }
      let f0 = first;
      let f1 = f0 + strideF;
      let f2 = f1 + strideF;
      let f3 = f2 + strideF;
      while (f0 < end) {
        const g0 = v128.load(g);
        const g1 = v128.load(g, 16);
        const s0 = v128.load64_splat(f0);
        c00 = f64x2.add(c00, f64x2.mul(g0, s0));
        c01 = f64x2.add(c01, f64x2.mul(g1, s0));
        const s1 = v128.load64_splat(f1);
        c10 = f64x2.add(c10, f64x2.mul(g0, s1));
        c11 = f64x2.add(c11, f64x2.mul(g1, s1));
        const s2 = v128.load64_splat(f2);
        c20 = f64x2.add(c20, f64x2.mul(g0, s2));
        c21 = f64x2.add(c21, f64x2.mul(g1, s2));
        const s3 = v128.load64_splat(f3);
        c30 = f64x2.add(c30, f64x2.mul(g0, s3));
        c31 = f64x2.add(c31, f64x2.mul(g1, s3));
        g += 32;
        f0 += 8;
        f1 += 8;
        f2 += 8;
        f3 += 8;
      }
      v128.store(y0, c00);
      v128.store(y0, c01, 16);
      v128.store(y1, c10);
      v128.store(y1, c11, 16);
      v128.store(y2, c20);
      v128.store(y2, c21, 16);
      v128.store(y3, c30);
      v128.store(y3, c31, 16);
      y0 += 32;
    }
    const width = outputs - p;
    if (width == 2) {
      const y1 = y0 + strideY;
      const y2 = y1 + strideY;
      const y3 = y2 + strideY;
      let c0 = f64x2.splat(0);
      let c1 = f64x2.splat(0);
      let c2 = f64x2.splat(0);
      let c3 = f64x2.splat(0);
      if (accumulate) {
        c0 = v128.load(y0);
        c1 = v128.load(y1);
        c2 = v128.load(y2);
        c3 = v128.load(y3);
      }
      let f0 = first;
      let f1 = f0 + strideF;
      let f2 = f1 + strideF;
      let f3 = f2 + strideF;
      while (f0 < end) {
        const g0 = v128.load(g);
        c0 = f64x2.add(c0, f64x2.mul(g0, v128.load64_splat(f0)));
        c1 = f64x2.add(c1, f64x2.mul(g0, v128.load64_splat(f1)));
        c2 = f64x2.add(c2, f64x2.mul(g0, v128.load64_splat(f2)));
        c3 = f64x2.add(c3, f64x2.mul(g0, v128.load64_splat(f3)));
        g += 32;
        f0 += 8;
        f1 += 8;
        f2 += 8;
        f3 += 8;
      }
      v128.store(y0, c0);
      v128.store(y1, c1);
      v128.store(y2, c2);
      v128.store(y3, c3);
    } else if (width > 0) {
      let f = first;
      for (let i = 0; i < 4; i++) {
        multiplyRest(f, length, g, width, y0, accumulate);
        f += strideF;
        y0 += strideY;
      }
    }
  }
  for (; m < count; m++) {
    let g = G;
    let y = Y + <usize>m * strideY;
    const first = F + <usize>m * strideF;
    const end = first + length;
    let p: i32 = 0;
    for (; p + 3 < outputs; p += 4) {
      let c0 = f64x2.splat(0);
      let c1 = f64x2.splat(0);
      if (accumulate) {
        c0 = v128.load(y);
        c1 = v128.load(y, 16);
      }
      for (let f = first; f < end; f += 8) {
        const s = v128.load64_splat(f);
        c0 = f64x2.add(c0, f64x2.mul(v128.load(g), s));
        c1 = f64x2.add(c1, f64x2.mul(v128.load(g, 16), s));
        g += 32;
      }
      v128.store(y, c0);
      v128.store(y, c1, 16);
      y += 32;
    }
    multiplyRest(first, length, g, outputs - p, y, accumulate);
  }
}

export function multiplyDiagonals(count: i32, size: i32, d: usize, x: usize, y: usize): void {
  for (let m: i32 = 0; m < count; m++) {
    for (let i: i32 = 0; i < size; i++) {
      store<f64>(y, load<f64>(d + ((<usize>i) << 3)) * load<f64>(x));
      x += 8;
      y += 8;
    }
  }
}

export function gatherEnds(count: i32, table: usize, ends: i32, x: usize, B: usize): void {
  const size = (<usize>ends) << 3;
  for (let m: i32 = 0; m < count; m++) {
    let entry = <usize>load<u32>(table, 4);
    const last = entry + ((<usize>load<u32>(table)) << 4);
    table += 24;
    clear(B, size);
    while (entry < last) {
      const at = B + <usize>load<u32>(entry, 12);
      store<f64>(at, load<f64>(at) + load<f64>(entry) * load<f64>(x + <usize>load<u32>(entry, 8)));
      entry += 16;
    }
    B += size;
  }
}

export function scatterEnds(count: i32, table: usize, ends: i32, B: usize, x: usize): void {
  const size = (<usize>ends) << 3;
  for (let m: i32 = 0; m < count; m++) {
    let entry = <usize>load<u32>(table, 4);
    const last = entry + ((<usize>load<u32>(table)) << 4);
    table += 24;
    while (entry < last) {
      const at = x + <usize>load<u32>(entry, 8);
      store<f64>(at, load<f64>(at) + load<f64>(entry) * load<f64>(B + <usize>load<u32>(entry, 12)));
      entry += 16;
    }
    B += size;
  }
}

export function addCongruent(
  count: i32,
  table: usize,
  ends: i32,
  S: usize,
  values: usize,
  scale: usize,
  magnitude: usize,
  work: usize,
): void {
  const size = (<usize>ends) << 3;
  for (let m: i32 = 0; m < count; m++) {
    const width = load<i32>(table, 8);
    const T = <usize>load<u32>(table, 12);
    let destination = <usize>load<u32>(table, 16);
    table += 24;
    for (let b: i32 = 0; b < width; b++) {
      // R = S T_b; most entries of T are zero.
      clear(work, size);
      const Tb = T + <usize>b * size;
      let sizeOfB: f64 = 0;
      for (let i: i32 = 0; i < ends; i++) {
        const t = load<f64>(Tb + ((<usize>i) << 3));
        if (t == 0) continue;
        const at = (<usize>i) << 3;
        sizeOfB += t * t * load<f64>(magnitude + at);
        const column = S + <usize>i * size;
        const vt = f64x2.splat(t);
        for (let k: usize = 0; k < size; k += 16) {
          v128.store(
            work + k,
            f64x2.add(v128.load(work + k), f64x2.mul(v128.load(column + k), vt)),
          );
        }
      }
      for (let a: i32 = b; a < width; a++) {
        let sum = f64x2.splat(0);
        const Ta = T + <usize>a * size;
        for (let k: usize = 0; k < size; k += 16) {
          sum = f64x2.add(sum, f64x2.mul(v128.load(Ta + k), v128.load(work + k)));
        }
        const at = values + ((<usize>load<u32>(destination)) << 3);
        destination += 4;
        store<f64>(at, load<f64>(at) + (f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1)));
      }
      const at = scale + ((<usize>load<u32>(destination)) << 3);
      destination += 4;
      store<f64>(at, load<f64>(at) + sizeOfB);
    }
  }
}

export function dot(n: i32, x: usize, y: usize): f64 {
  let a = f64x2.splat(0);
  let b = f64x2.splat(0);
  for (let i: i32 = 0; i < n; i += 4) {
    a = f64x2.add(a, f64x2.mul(v128.load(x), v128.load(y)));
    b = f64x2.add(b, f64x2.mul(v128.load(x, 16), v128.load(y, 16)));
    x += 32;
    y += 32;
  }
  const sum = f64x2.add(a, b);
  return f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1);
}

export function addScaled(n: i32, factor: f64, x: usize, y: usize): void {
  const f = f64x2.splat(factor);
  for (let i: i32 = 0; i < n; i += 4) {
    v128.store(y, f64x2.add(v128.load(y), f64x2.mul(f, v128.load(x))));
    v128.store(y, f64x2.add(v128.load(y, 16), f64x2.mul(f, v128.load(x, 16))), 16);
    x += 32;
    y += 32;
  }
}

export function multiply(n: i32, factor: f64, x: usize): void {
  const f = f64x2.splat(factor);
  for (let i: i32 = 0; i < n; i += 4) {
    v128.store(x, f64x2.mul(f, v128.load(x)));
    v128.store(x, f64x2.mul(f, v128.load(x, 16)), 16);
    x += 32;
  }
}

export function dots(n: i32, V: usize, stride: usize, count: i32, x: usize, result: usize): void {
  let j: i32 = 0;
  for (; j + 3 < count; j += 4) {
    let v0 = V + <usize>j * stride;
    let v1 = v0 + stride;
    let v2 = v1 + stride;
    let v3 = v2 + stride;
    let at = x;
    let a0 = f64x2.splat(0);
    let b0 = f64x2.splat(0);
    let a1 = f64x2.splat(0);
    let b1 = f64x2.splat(0);
    let a2 = f64x2.splat(0);
    let b2 = f64x2.splat(0);
    let a3 = f64x2.splat(0);
    let b3 = f64x2.splat(0);
    for (let i: i32 = 0; i < n; i += 4) {
      const xa = v128.load(at);
      const xb = v128.load(at, 16);
      a0 = f64x2.add(a0, f64x2.mul(v128.load(v0), xa));
      b0 = f64x2.add(b0, f64x2.mul(v128.load(v0, 16), xb));
      a1 = f64x2.add(a1, f64x2.mul(v128.load(v1), xa));
      b1 = f64x2.add(b1, f64x2.mul(v128.load(v1, 16), xb));
      a2 = f64x2.add(a2, f64x2.mul(v128.load(v2), xa));
      b2 = f64x2.add(b2, f64x2.mul(v128.load(v2, 16), xb));
      a3 = f64x2.add(a3, f64x2.mul(v128.load(v3), xa));
      b3 = f64x2.add(b3, f64x2.mul(v128.load(v3, 16), xb));
      at += 32;
      v0 += 32;
      v1 += 32;
      v2 += 32;
      v3 += 32;
    }
    const out = result + ((<usize>j) << 3);
    a0 = f64x2.add(a0, b0);
    a1 = f64x2.add(a1, b1);
    a2 = f64x2.add(a2, b2);
    a3 = f64x2.add(a3, b3);
    store<f64>(out, f64x2.extract_lane(a0, 0) + f64x2.extract_lane(a0, 1));
    store<f64>(out, f64x2.extract_lane(a1, 0) + f64x2.extract_lane(a1, 1), 8);
    store<f64>(out, f64x2.extract_lane(a2, 0) + f64x2.extract_lane(a2, 1), 16);
    store<f64>(out, f64x2.extract_lane(a3, 0) + f64x2.extract_lane(a3, 1), 24);
  }
  for (; j < count; j++) {
    store<f64>(result + ((<usize>j) << 3), dot(n, V + <usize>j * stride, x));
  }
}

export function subtractCombination(
  n: i32,
  V: usize,
  stride: usize,
  count: i32,
  c: usize,
  y: usize,
): void {
  let j: i32 = 0;
  for (; j + 3 < count; j += 4) {
    const at = c + ((<usize>j) << 3);
    const c0 = v128.load64_splat(at);
    const c1 = v128.load64_splat(at, 8);
    const c2 = v128.load64_splat(at, 16);
    const c3 = v128.load64_splat(at, 24);
    let v0 = V + <usize>j * stride;
    let v1 = v0 + stride;
    let v2 = v1 + stride;
    let v3 = v2 + stride;
    let out = y;
    for (let i: i32 = 0; i < n; i += 4) {
      let a = f64x2.mul(c0, v128.load(v0));
      let b = f64x2.mul(c0, v128.load(v0, 16));
      a = f64x2.add(a, f64x2.mul(c1, v128.load(v1)));
      b = f64x2.add(b, f64x2.mul(c1, v128.load(v1, 16)));
      a = f64x2.add(a, f64x2.mul(c2, v128.load(v2)));
      b = f64x2.add(b, f64x2.mul(c2, v128.load(v2, 16)));
      a = f64x2.add(a, f64x2.mul(c3, v128.load(v3)));
      b = f64x2.add(b, f64x2.mul(c3, v128.load(v3, 16)));
      v128.store(out, f64x2.sub(v128.load(out), a));
      v128.store(out, f64x2.sub(v128.load(out, 16), b), 16);
      v0 += 32;
      v1 += 32;
      v2 += 32;
      v3 += 32;
      out += 32;
    }
  }
  for (; j < count; j++) {
    addScaled(n, -load<f64>(c + ((<usize>j) << 3)), V + <usize>j * stride, y);
  }
}

export function dotsOfTwo(
  n: i32,
  V: usize,
  stride: usize,
  count: i32,
  x: usize,
  y: usize,
  ofX: usize,
  ofY: usize,
): void {
  let j: i32 = 0;
  for (; j + 1 < count; j += 2) {
    let v0 = V + <usize>j * stride;
    let v1 = v0 + stride;
    let atX = x;
    let atY = y;
    let a0 = f64x2.splat(0);
    let b0 = f64x2.splat(0);
    let a1 = f64x2.splat(0);
    let b1 = f64x2.splat(0);
    let c0 = f64x2.splat(0);
    let d0 = f64x2.splat(0);
    let c1 = f64x2.splat(0);
    let d1 = f64x2.splat(0);
    for (let i: i32 = 0; i < n; i += 4) {
      const xa = v128.load(atX);
      const xb = v128.load(atX, 16);
      const ya = v128.load(atY);
      const yb = v128.load(atY, 16);
      const va = v128.load(v0);
      const vb = v128.load(v0, 16);
      a0 = f64x2.add(a0, f64x2.mul(va, xa));
      b0 = f64x2.add(b0, f64x2.mul(vb, xb));
      c0 = f64x2.add(c0, f64x2.mul(va, ya));
      d0 = f64x2.add(d0, f64x2.mul(vb, yb));
      const ua = v128.load(v1);
      const ub = v128.load(v1, 16);
      a1 = f64x2.add(a1, f64x2.mul(ua, xa));
      b1 = f64x2.add(b1, f64x2.mul(ub, xb));
      c1 = f64x2.add(c1, f64x2.mul(ua, ya));
      d1 = f64x2.add(d1, f64x2.mul(ub, yb));
      atX += 32;
      atY += 32;
      v0 += 32;
      v1 += 32;
    }
    const out = (<usize>j) << 3;
    a0 = f64x2.add(a0, b0);
    a1 = f64x2.add(a1, b1);
    c0 = f64x2.add(c0, d0);
    c1 = f64x2.add(c1, d1);
    store<f64>(ofX + out, f64x2.extract_lane(a0, 0) + f64x2.extract_lane(a0, 1));
    store<f64>(ofX + out, f64x2.extract_lane(a1, 0) + f64x2.extract_lane(a1, 1), 8);
    store<f64>(ofY + out, f64x2.extract_lane(c0, 0) + f64x2.extract_lane(c0, 1));
    store<f64>(ofY + out, f64x2.extract_lane(c1, 0) + f64x2.extract_lane(c1, 1), 8);
  }
  if (j < count) {
    const v = V + <usize>j * stride;
    store<f64>(ofX + ((<usize>j) << 3), dot(n, v, x));
    store<f64>(ofY + ((<usize>j) << 3), dot(n, v, y));
  }
}

export function subtractFromTwo(
  n: i32,
  V: usize,
  stride: usize,
  count: i32,
  ofX: usize,
  ofY: usize,
  x: usize,
  y: usize,
): void {
  let j: i32 = 0;
  for (; j + 3 < count; j += 4) {
    const fromX = ofX + ((<usize>j) << 3);
    const fromY = ofY + ((<usize>j) << 3);
    const c0 = v128.load64_splat(fromX);
    const c1 = v128.load64_splat(fromX, 8);
    const c2 = v128.load64_splat(fromX, 16);
    const c3 = v128.load64_splat(fromX, 24);
    const d0 = v128.load64_splat(fromY);
    const d1 = v128.load64_splat(fromY, 8);
    const d2 = v128.load64_splat(fromY, 16);
    const d3 = v128.load64_splat(fromY, 24);
    let v0 = V + <usize>j * stride;
    let v1 = v0 + stride;
    let v2 = v1 + stride;
    let v3 = v2 + stride;
    let atX = x;
    let atY = y;
    for (let i: i32 = 0; i < n; i += 2) {
      let v = v128.load(v0);
      let a = f64x2.mul(c0, v);
      let b = f64x2.mul(d0, v);
      v = v128.load(v1);
      a = f64x2.add(a, f64x2.mul(c1, v));
      b = f64x2.add(b, f64x2.mul(d1, v));
      v = v128.load(v2);
      a = f64x2.add(a, f64x2.mul(c2, v));
      b = f64x2.add(b, f64x2.mul(d2, v));
      v = v128.load(v3);
      a = f64x2.add(a, f64x2.mul(c3, v));
      b = f64x2.add(b, f64x2.mul(d3, v));
      v128.store(atX, f64x2.sub(v128.load(atX), a));
      v128.store(atY, f64x2.sub(v128.load(atY), b));
      v0 += 16;
      v1 += 16;
      v2 += 16;
      v3 += 16;
      atX += 16;
      atY += 16;
    }
  }
  for (; j < count; j++) {
    const v = V + <usize>j * stride;
    addScaled(n, -load<f64>(ofX + ((<usize>j) << 3)), v, x);
    addScaled(n, -load<f64>(ofY + ((<usize>j) << 3)), v, y);
  }
}

/** Where an address of a step counts from: the memory itself, x or y. */
function resolve(step: usize, field: usize, x: usize, y: usize): usize {
  const from = load<i32>(step + field + 4);
  return <usize>load<u32>(step + field) + (from == 0 ? 0 : from == 1 ? x : y);
}

export function run(count: i32, steps: usize, x: usize, y: usize): void {
  for (let k: i32 = 0; k < count; k++) {
    const kind = load<i32>(steps);
    const chains = load<i32>(steps, 4);
    const from = resolve(steps, 8, x, y);
    const to = resolve(steps, 16, x, y);
    const table = <usize>load<u32>(steps, 24);
    const inputs = load<i32>(steps, 28);
    const outputs = load<i32>(steps, 32);
    if (kind == 0) {
      gatherEnds(chains, table, inputs, from, to);
    } else if (kind == 1) {
      scatterEnds(chains, table, inputs, from, to);
    } else if (kind == 2) {
      multiplyDiagonals(chains, inputs, table, from, to);
    } else {
      multiplyBatch(
        chains,
        from,
        <usize>load<u32>(steps, 36),
        inputs,
        table,
        outputs,
        to,
        <usize>load<u32>(steps, 40),
        load<i32>(steps, 44) != 0,
      );
    }
    steps += 48;
  }
}
