import fc from 'fast-check';
import { Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { assembleSymmetric, multiplySymmetric } from '#shared/numerics/sparse/SymmetricCsc.ts';
import { dense, PROPERTY, sparse, type Triplet } from './pencils.ts';

describe('assembleSymmetric', () => {
  it('folds either triangle to the lower one, sums duplicates and sorts rows', () => {
    const A = sparse(3, [
      [2, 0, 5],
      [0, 2, 7],
      [1, 1, 2],
      [0, 0, 1],
      [1, 1, 3],
      [1, 0, 4],
    ]);
    expect(Array.from(A.colPtr)).toEqual([0, 3, 4, 5]);
    expect(Array.from(A.rowIdx)).toEqual([0, 1, 2, 1, 2]);
    expect(Array.from(A.values)).toEqual([1, 4, 12, 5, 0]);
  });

  it('keeps explicit zeros: the pattern follows the topology', () => {
    expect(Array.from(sparse(2, [[1, 0, 0]]).rowIdx)).toEqual([0, 1, 1]);
  });

  it('refuses an index outside the matrix', () => {
    const one = Int32Array.of(3);
    expect(() => assembleSymmetric(3, one, one, Float64Array.of(1), 1)).toThrow(RangeError);
  });
});

describe('multiplySymmetric', () => {
  it('agrees with the dense product of ml-matrix', () => {
    const entry = fc.tuple(fc.nat(7), fc.nat(7), fc.integer({ min: -9, max: 9 }));
    fc.assert(
      fc.property(
        fc.array(entry, { maxLength: 40 }),
        fc.array(fc.integer({ min: -9, max: 9 }), { minLength: 8, maxLength: 8 }),
        (triplets: Triplet[], x) => {
          const A = sparse(8, triplets);
          const y = new Float64Array(8).fill(99);
          multiplySymmetric(A, Float64Array.from(x), y);
          const expected = dense(A).mmul(Matrix.columnVector(x)).to1DArray();
          // Whole numbers: exact but for the sign of zero.
          y.forEach((value, i) => expect(value - expected[i]!).toBe(0));
        },
      ),
      PROPERTY,
    );
  });
});
