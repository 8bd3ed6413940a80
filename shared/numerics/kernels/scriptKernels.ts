import type { Kernels } from './Kernels.ts';

/** Where the numbers are; read anew on every call, since the memory may have grown. */
export interface MemoryViews {
  readonly f64: Float64Array;
  readonly i32: Int32Array;
}

/** 4 × 4 block, two columns at a time: eight sums fit the registers of common processors. */
function subtractBlock(f: Float64Array, L: number, W: number, length: number, C: number): void {
  for (let c = 0; c < 4; c += 2) {
    let a0 = 0;
    let a1 = 0;
    let a2 = 0;
    let a3 = 0;
    let b0 = 0;
    let b1 = 0;
    let b2 = 0;
    let b3 = 0;
    for (let k = 0, l = L, w = W + c; k < length; k++, l += 4, w += 4) {
      const w0 = f[w]!;
      const w1 = f[w + 1]!;
      const l0 = f[l]!;
      const l1 = f[l + 1]!;
      const l2 = f[l + 2]!;
      const l3 = f[l + 3]!;
      a0 += l0 * w0;
      a1 += l1 * w0;
      a2 += l2 * w0;
      a3 += l3 * w0;
      b0 += l0 * w1;
      b1 += l1 * w1;
      b2 += l2 * w1;
      b3 += l3 * w1;
    }
    const at = C + 4 * c;
    f[at]! -= a0;
    f[at + 1]! -= a1;
    f[at + 2]! -= a2;
    f[at + 3]! -= a3;
    f[at + 4]! -= b0;
    f[at + 5]! -= b1;
    f[at + 6]! -= b2;
    f[at + 7]! -= b3;
  }
}

function scaledTile(f: Float64Array, L: number, pivots: number, length: number, W: number): void {
  for (let k = 0, at = 0; k < length; k++, at += 4) {
    const d = f[pivots + k]!;
    f[W + at] = d * f[L + at]!;
    f[W + at + 1] = d * f[L + at + 1]!;
    f[W + at + 2] = d * f[L + at + 2]!;
    f[W + at + 3] = d * f[L + at + 3]!;
  }
}

/** sums[0…3] of the rows of one tile: even and odd columns apart, then together. */
function tileTimes(
  f: Float64Array,
  tile: number,
  own: number,
  length: number,
  sums: Float64Array,
): void {
  let e0 = 0;
  let e1 = 0;
  let e2 = 0;
  let e3 = 0;
  let o0 = 0;
  let o1 = 0;
  let o2 = 0;
  let o3 = 0;
  for (let k = 0, l = tile; k < length; k += 2, l += 8) {
    const xe = f[own + k]!;
    const xo = f[own + k + 1]!;
    e0 += f[l]! * xe;
    e1 += f[l + 1]! * xe;
    e2 += f[l + 2]! * xe;
    e3 += f[l + 3]! * xe;
    o0 += f[l + 4]! * xo;
    o1 += f[l + 5]! * xo;
    o2 += f[l + 6]! * xo;
    o3 += f[l + 7]! * xo;
  }
  sums[0] = e0 + o0;
  sums[1] = e1 + o1;
  sums[2] = e2 + o2;
  sums[3] = e3 + o3;
}

/** work[2k], work[2k + 1] += the lanes of L[k]ᵀ x. */
function addTransposed(
  f: Float64Array,
  tile: number,
  length: number,
  x0: number,
  x1: number,
  x2: number,
  x3: number,
  work: number,
): void {
  for (let k = 0, l = tile, t = work; k < length; k++, l += 4, t += 2) {
    f[t] = f[t]! + f[l]! * x0 + f[l + 2]! * x2;
    f[t + 1] = f[t + 1]! + f[l + 1]! * x1 + f[l + 3]! * x3;
  }
}

/** The kernels in JavaScript, for engines without SIMD. */
export function scriptKernels(memory: MemoryViews): Kernels {
  const sums = new Float64Array(4);

  function dot(n: number, x: number, y: number): number {
    const f = memory.f64;
    let a0 = 0;
    let a1 = 0;
    let b0 = 0;
    let b1 = 0;
    for (let i = 0, p = x >>> 3, q = y >>> 3; i < n; i += 4, p += 4, q += 4) {
      a0 += f[p]! * f[q]!;
      a1 += f[p + 1]! * f[q + 1]!;
      b0 += f[p + 2]! * f[q + 2]!;
      b1 += f[p + 3]! * f[q + 3]!;
    }
    return a0 + b0 + (a1 + b1);
  }

  function addScaled(n: number, factor: number, x: number, y: number): void {
    const f = memory.f64;
    for (let i = 0, p = x >>> 3, q = y >>> 3; i < n; i++) f[q + i]! += factor * f[p + i]!;
  }

  const kernels: Kernels = {
    eliminatePanel(panelAt, columns, tiles, pivotsAt, scaleAt, tolerance, workAt) {
      const f = memory.f64;
      const panel = panelAt >>> 3;
      const pivots = pivotsAt >>> 3;
      const scale = scaleAt >>> 3;
      const work = workAt >>> 3;
      const stride = 4 * columns;
      for (let j = 0; j < columns; j += 4) {
        const tile = panel + (j >> 2) * stride;
        scaledTile(f, tile, pivots, j, work);
        const D = tile + 4 * j;
        subtractBlock(f, tile, work, j, D);
        const d0 = f[D]!;
        f[pivots + j] = d0;
        if (!(Math.abs(d0) > tolerance * f[scale + j]!)) return j;
        const i0 = 1 / d0;
        const a10 = f[D + 1]!;
        const a20 = f[D + 2]!;
        const a30 = f[D + 3]!;
        const l10 = a10 * i0;
        const l20 = a20 * i0;
        const l30 = a30 * i0;
        f[D + 1] = l10;
        f[D + 2] = l20;
        f[D + 3] = l30;
        const d1 = f[D + 5]! - a10 * l10;
        f[pivots + j + 1] = d1;
        if (!(Math.abs(d1) > tolerance * f[scale + j + 1]!)) return j + 1;
        const i1 = 1 / d1;
        const a21 = f[D + 6]! - a20 * l10;
        const a31 = f[D + 7]! - a30 * l10;
        const l21 = a21 * i1;
        const l31 = a31 * i1;
        f[D + 6] = l21;
        f[D + 7] = l31;
        const d2 = f[D + 10]! - a20 * l20 - a21 * l21;
        f[pivots + j + 2] = d2;
        if (!(Math.abs(d2) > tolerance * f[scale + j + 2]!)) return j + 2;
        const i2 = 1 / d2;
        const a32 = f[D + 11]! - a30 * l20 - a31 * l21;
        const l32 = a32 * i2;
        f[D + 11] = l32;
        const d3 = f[D + 15]! - a30 * l30 - a31 * l31 - a32 * l32;
        f[pivots + j + 3] = d3;
        if (!(Math.abs(d3) > tolerance * f[scale + j + 3]!)) return j + 3;
        const i3 = 1 / d3;
        for (let i = (j >> 2) + 1; i < tiles; i++) {
          const row = panel + i * stride;
          const C = row + 4 * j;
          subtractBlock(f, row, work, j, C);
          for (let at = C; at < C + 4; at++) {
            const x0 = f[at]!;
            const x1 = f[at + 4]! - x0 * l10;
            const x2 = f[at + 8]! - x0 * l20 - x1 * l21;
            const x3 = f[at + 12]! - x0 * l30 - x1 * l31 - x2 * l32;
            f[at] = x0 * i0;
            f[at + 4] = x1 * i1;
            f[at + 8] = x2 * i2;
            f[at + 12] = x3 * i3;
          }
        }
      }
      return -1;
    },

    subtractUpdate(update, below, columns, tiles, pivots, work) {
      const f = memory.f64;
      const stride = 4 * columns;
      for (let j = 0; j < tiles; j++) {
        scaledTile(f, (below >>> 3) + j * stride, pivots >>> 3, columns, work >>> 3);
        for (let i = j; i < tiles; i++) {
          const C = (update >>> 3) + (((i * (i + 1)) >> 1) + j) * 16;
          subtractBlock(f, (below >>> 3) + i * stride, work >>> 3, columns, C);
        }
      }
    },

    extendAdd(update, rows, relativeAt, panel, columns, target) {
      const f = memory.f64;
      const index = memory.i32;
      const relative = relativeAt >>> 2;
      let split = 0;
      while (split < rows && index[relative + split]! < columns) split += 1;
      for (let a = 0; a < rows; a++) {
        const ra = index[relative + a]!;
        const ia = a >> 2;
        const from = (update >>> 3) + ((ia * (ia + 1)) >> 1) * 16 + (a & 3);
        const own = (panel >>> 3) + (ra >> 2) * 4 * columns + (ra & 3);
        const inPanel = a < split ? a + 1 : split;
        let b = 0;
        for (; b < inPanel; b++) f[own + 4 * index[relative + b]!]! += f[from + 4 * b]!;
        if (b > a) continue;
        const r = ra - columns;
        const i = r >> 2;
        const row = (target >>> 3) + ((i * (i + 1)) >> 1) * 16 + (r & 3);
        for (; b <= a; b++) f[row + 4 * (index[relative + b]! - columns)]! += f[from + 4 * b]!;
      }
    },

    forwardSweep(count, tableAt, rowsAt, xAt) {
      const f = memory.f64;
      const index = memory.i32;
      const x = xAt >>> 3;
      for (let s = 0, table = tableAt >>> 2; s < count; s++, table += 5) {
        const own = x + index[table]!;
        const columns = index[table + 1]!;
        const below = index[table + 2]!;
        let row = (rowsAt >>> 2) + index[table + 3]!;
        let tile = index[table + 4]! >>> 3;
        for (let j = 0; j < columns; j += 4, tile += 4 * columns) {
          tileTimes(f, tile, own, j, sums);
          const at = own + j;
          const D = tile + 4 * j;
          const x0 = f[at]! - sums[0]!;
          const x1 = f[at + 1]! - sums[1]! - f[D + 1]! * x0;
          const x2 = f[at + 2]! - sums[2]! - f[D + 2]! * x0 - f[D + 6]! * x1;
          const x3 = f[at + 3]! - sums[3]! - f[D + 3]! * x0 - f[D + 7]! * x1 - f[D + 11]! * x2;
          f[at] = x0;
          f[at + 1] = x1;
          f[at + 2] = x2;
          f[at + 3] = x3;
        }
        for (let i = 0; i < below; i++, tile += 4 * columns, row += 4) {
          tileTimes(f, tile, own, columns, sums);
          f[x + index[row]!]! -= sums[0]!;
          f[x + index[row + 1]!]! -= sums[1]!;
          f[x + index[row + 2]!]! -= sums[2]!;
          f[x + index[row + 3]!]! -= sums[3]!;
        }
      }
    },

    backSweep(last, tableAt, rowsAt, xAt, workAt) {
      const f = memory.f64;
      const index = memory.i32;
      const x = xAt >>> 3;
      const work = workAt >>> 3;
      for (let s = last; s >= 0; s--) {
        const table = (tableAt >>> 2) + 5 * s;
        const own = x + index[table]!;
        const columns = index[table + 1]!;
        const below = index[table + 2]!;
        let row = (rowsAt >>> 2) + index[table + 3]!;
        const panel = index[table + 4]! >>> 3;
        f.fill(0, work, work + 2 * columns);
        let tile = panel + columns * columns;
        for (let i = 0; i < below; i++, row += 4, tile += 4 * columns) {
          const x0 = f[x + index[row]!]!;
          const x1 = f[x + index[row + 1]!]!;
          const x2 = f[x + index[row + 2]!]!;
          const x3 = f[x + index[row + 3]!]!;
          addTransposed(f, tile, columns, x0, x1, x2, x3, work);
        }
        for (let j = columns - 4; j >= 0; j -= 4) {
          const at = own + j;
          const t = work + 2 * j;
          tile = panel + j * columns;
          const D = tile + 4 * j;
          const x3 = f[at + 3]! - (f[t + 6]! + f[t + 7]!);
          const x2 = f[at + 2]! - (f[t + 4]! + f[t + 5]!) - f[D + 11]! * x3;
          const x1 = f[at + 1]! - (f[t + 2]! + f[t + 3]!) - f[D + 6]! * x2 - f[D + 7]! * x3;
          const x0 =
            f[at]! - (f[t]! + f[t + 1]!) - f[D + 1]! * x1 - f[D + 2]! * x2 - f[D + 3]! * x3;
          f[at] = x0;
          f[at + 1] = x1;
          f[at + 2] = x2;
          f[at + 3] = x3;
          addTransposed(f, tile, j, x0, x1, x2, x3, work);
        }
      }
    },

    gather(length, indexAt, xAt, yAt) {
      const f = memory.f64;
      const index = memory.i32;
      for (let k = 0, i = indexAt >>> 2, y = yAt >>> 3; k < length; k++) {
        const from = index[i + k]!;
        f[y + k] = from < 0 ? 0 : f[(xAt >>> 3) + from]!;
      }
    },

    scatter(length, indexAt, yAt, xAt) {
      const f = memory.f64;
      const index = memory.i32;
      for (let k = 0, i = indexAt >>> 2, y = yAt >>> 3; k < length; k++) {
        const to = index[i + k]!;
        if (to >= 0) f[(xAt >>> 3) + to] = f[y + k]!;
      }
    },

    divide(length, dAt, xAt) {
      const f = memory.f64;
      for (let k = 0, d = dAt >>> 3, x = xAt >>> 3; k < length; k++) f[x + k]! /= f[d + k]!;
    },

    multiplySparse(n, colPtrAt, rowIdxAt, valuesAt, xAt, yAt) {
      const f = memory.f64;
      const index = memory.i32;
      const colPtr = colPtrAt >>> 2;
      const rowIdx = rowIdxAt >>> 2;
      const values = valuesAt >>> 3;
      const x = xAt >>> 3;
      const y = yAt >>> 3;
      for (let j = 0; j < n; j++) {
        const xj = f[x + j]!;
        let sum = 0;
        const end = index[colPtr + j + 1]!;
        for (let p = index[colPtr + j]!; p < end; p++) {
          const i = index[rowIdx + p]!;
          const a = f[values + p]!;
          if (i === j) {
            sum += a * xj;
          } else {
            f[y + i]! += a * xj;
            sum += a * f[x + i]!;
          }
        }
        f[y + j]! += sum;
      }
    },

    multiplyBatch(count, FAt, strideF, inputs, GAt, outputs, YAt, strideY, accumulate) {
      const f = memory.f64;
      const stepF = strideF >>> 3;
      const stepY = strideY >>> 3;
      // Two vectors to one reading of G: sums of four would not fit the registers.
      for (let m = 0; m < count; m += 2) {
        const F = (FAt + m * strideF) >>> 3;
        const end = F + inputs;
        let y = (YAt + m * strideY) >>> 3;
        const last = y + outputs;
        // The odd one at the end is done twice, with the same result.
        const besideF = m + 1 < count ? stepF : 0;
        const besideY = m + 1 < count ? stepY : 0;
        let g = GAt >>> 3;
        for (; y + 3 < last; y += 4) {
          const z = y + besideY;
          let s0 = 0;
          let s1 = 0;
          let s2 = 0;
          let s3 = 0;
          let t0 = 0;
          let t1 = 0;
          let t2 = 0;
          let t3 = 0;
          if (accumulate) {
            s0 = f[y]!;
            s1 = f[y + 1]!;
            s2 = f[y + 2]!;
            s3 = f[y + 3]!;
            t0 = f[z]!;
            t1 = f[z + 1]!;
            t2 = f[z + 2]!;
            t3 = f[z + 3]!;
          }
          for (let q = F; q < end; q++, g += 4) {
            const v = f[q]!;
            const w = f[q + besideF]!;
            const g0 = f[g]!;
            const g1 = f[g + 1]!;
            const g2 = f[g + 2]!;
            const g3 = f[g + 3]!;
            s0 += g0 * v;
            s1 += g1 * v;
            s2 += g2 * v;
            s3 += g3 * v;
            t0 += g0 * w;
            t1 += g1 * w;
            t2 += g2 * w;
            t3 += g3 * w;
          }
          f[y] = s0;
          f[y + 1] = s1;
          f[y + 2] = s2;
          f[y + 3] = s3;
          f[z] = t0;
          f[z + 1] = t1;
          f[z + 2] = t2;
          f[z + 3] = t3;
        }
        for (; y < last; y++, g++) {
          let s = accumulate ? f[y]! : 0;
          let t = accumulate ? f[y + besideY]! : 0;
          for (let q = F, at = g; q < end; q++, at += 4) {
            s += f[at]! * f[q]!;
            t += f[at]! * f[q + besideF]!;
          }
          f[y] = s;
          f[y + besideY] = t;
        }
      }
    },

    multiplyDiagonals(count, size, d, x, y) {
      const f = memory.f64;
      for (let m = 0, at = 0; m < count; m++) {
        for (let i = 0; i < size; i++, at++) {
          f[(y >>> 3) + at] = f[(d >>> 3) + i]! * f[(x >>> 3) + at]!;
        }
      }
    },

    gatherEnds(count, tableAt, ends, x, BAt) {
      const f = memory.f64;
      const index = memory.i32;
      for (let m = 0, table = tableAt >>> 2, B = BAt; m < count; m++, table += 6, B += 8 * ends) {
        f.fill(0, B >>> 3, (B >>> 3) + ends);
        const last = index[table + 1]! + 16 * index[table]!;
        for (let entry = index[table + 1]!; entry < last; entry += 16) {
          const from = (x + index[(entry + 8) >>> 2]!) >>> 3;
          f[(B + index[(entry + 12) >>> 2]!) >>> 3]! += f[entry >>> 3]! * f[from]!;
        }
      }
    },

    scatterEnds(count, tableAt, ends, BAt, x) {
      const f = memory.f64;
      const index = memory.i32;
      for (let m = 0, table = tableAt >>> 2, B = BAt; m < count; m++, table += 6, B += 8 * ends) {
        const last = index[table + 1]! + 16 * index[table]!;
        for (let entry = index[table + 1]!; entry < last; entry += 16) {
          const from = (B + index[(entry + 12) >>> 2]!) >>> 3;
          f[(x + index[(entry + 8) >>> 2]!) >>> 3]! += f[entry >>> 3]! * f[from]!;
        }
      }
    },

    addCongruent(count, tableAt, ends, SAt, valuesAt, scaleAt, magnitudeAt, workAt) {
      const f = memory.f64;
      const index = memory.i32;
      const S = SAt >>> 3;
      const values = valuesAt >>> 3;
      const work = workAt >>> 3;
      for (let m = 0, table = tableAt >>> 2; m < count; m++, table += 6) {
        const width = index[table + 2]!;
        const T = index[table + 3]! >>> 3;
        let destination = index[table + 4]! >>> 2;
        for (let b = 0; b < width; b++) {
          f.fill(0, work, work + ends);
          const Tb = T + b * ends;
          let sizeOfB = 0;
          for (let i = 0; i < ends; i++) {
            const t = f[Tb + i]!;
            if (t === 0) continue;
            sizeOfB += t * t * f[(magnitudeAt >>> 3) + i]!;
            const column = S + i * ends;
            for (let k = 0; k < ends; k++) f[work + k]! += f[column + k]! * t;
          }
          for (let a = b; a < width; a++) {
            const Ta = T + a * ends;
            let s0 = 0;
            let s1 = 0;
            for (let k = 0; k < ends; k += 2) {
              s0 += f[Ta + k]! * f[work + k]!;
              s1 += f[Ta + k + 1]! * f[work + k + 1]!;
            }
            f[values + index[destination++]!]! += s0 + s1;
          }
          f[(scaleAt >>> 3) + index[destination++]!]! += sizeOfB;
        }
      }
    },

    dot,
    addScaled,

    multiply(n, factor, x) {
      const f = memory.f64;
      for (let i = 0, p = x >>> 3; i < n; i++) f[p + i]! *= factor;
    },

    dots(n, V, stride, count, xAt, result) {
      const f = memory.f64;
      let j = 0;
      // Two vectors to one sweep of x: sums of four more would not fit the registers.
      for (; j + 1 < count; j += 2) {
        let v = (V + j * stride) >>> 3;
        let u = (V + (j + 1) * stride) >>> 3;
        let x = xAt >>> 3;
        let a0 = 0;
        let a1 = 0;
        let a2 = 0;
        let a3 = 0;
        let b0 = 0;
        let b1 = 0;
        let b2 = 0;
        let b3 = 0;
        for (const end = x + n; x < end; x += 4, v += 4, u += 4) {
          const x0 = f[x]!;
          const x1 = f[x + 1]!;
          const x2 = f[x + 2]!;
          const x3 = f[x + 3]!;
          a0 += f[v]! * x0;
          a1 += f[v + 1]! * x1;
          a2 += f[v + 2]! * x2;
          a3 += f[v + 3]! * x3;
          b0 += f[u]! * x0;
          b1 += f[u + 1]! * x1;
          b2 += f[u + 2]! * x2;
          b3 += f[u + 3]! * x3;
        }
        f[(result >>> 3) + j] = a0 + a2 + (a1 + a3);
        f[(result >>> 3) + j + 1] = b0 + b2 + (b1 + b3);
      }
      if (j < count) f[(result >>> 3) + j] = dot(n, V + j * stride, xAt);
    },

    subtractCombination(n, V, stride, count, c, y) {
      const f = memory.f64;
      const out = y >>> 3;
      let j = 0;
      for (; j + 3 < count; j += 4) {
        const c0 = f[(c >>> 3) + j]!;
        const c1 = f[(c >>> 3) + j + 1]!;
        const c2 = f[(c >>> 3) + j + 2]!;
        const c3 = f[(c >>> 3) + j + 3]!;
        const v0 = (V + j * stride) >>> 3;
        const v1 = (V + (j + 1) * stride) >>> 3;
        const v2 = (V + (j + 2) * stride) >>> 3;
        const v3 = (V + (j + 3) * stride) >>> 3;
        for (let i = 0; i < n; i++) {
          f[out + i]! -= c0 * f[v0 + i]! + c1 * f[v1 + i]! + c2 * f[v2 + i]! + c3 * f[v3 + i]!;
        }
      }
      for (; j < count; j++) addScaled(n, -f[(c >>> 3) + j]!, V + j * stride, y);
    },

    dotsOfTwo(n, V, stride, count, x, y, ofX, ofY) {
      kernels.dots(n, V, stride, count, x, ofX);
      kernels.dots(n, V, stride, count, y, ofY);
    },

    subtractFromTwo(n, V, stride, count, ofX, ofY, x, y) {
      kernels.subtractCombination(n, V, stride, count, ofX, x);
      kernels.subtractCombination(n, V, stride, count, ofY, y);
    },

    run(count, stepsAt, x, y) {
      const index = memory.i32;
      const base = [0, x, y];
      for (let k = 0, step = stepsAt >>> 2; k < count; k++, step += 12) {
        const kind = index[step]!;
        const chains = index[step + 1]!;
        const from = index[step + 2]! + base[index[step + 3]!]!;
        const to = index[step + 4]! + base[index[step + 5]!]!;
        const table = index[step + 6]!;
        const inputs = index[step + 7]!;
        if (kind === 0) kernels.gatherEnds(chains, table, inputs, from, to);
        else if (kind === 1) kernels.scatterEnds(chains, table, inputs, from, to);
        else if (kind === 2) kernels.multiplyDiagonals(chains, inputs, table, from, to);
        else {
          const [strideF, strideY] = [index[step + 9]!, index[step + 10]!];
          const outputs = index[step + 8]!;
          const accumulate = index[step + 11] !== 0;
          kernels.multiplyBatch(
            chains,
            from,
            strideF,
            inputs,
            table,
            outputs,
            to,
            strideY,
            accumulate,
          );
        }
      }
    },
  };
  return kernels;
}
