import { describe, expect, it } from 'vitest';
import { multiply } from './csc-matrix';
import { readMatrixMarket } from './matrix-market';

const header = '%%MatrixMarket matrix coordinate real symmetric';

describe('Matrix Market', () => {
  it('reads a symmetric matrix whatever the order of its entries, upper ones too', () => {
    // A = [[4, -1, 0], [-1, 5, -2.5e-1], [0, -2.5e-1, 6]]
    const outcome = readMatrixMarket(
      `${header}\n% a comment\n3 3 5\n3 2 -2.5e-1\n1 1 4\n\n2 2 5\n1 2 -1\n3 3 6\n`,
    );
    expect(outcome.status).toBe('read');
    if (outcome.status !== 'read') return;
    const { matrix } = outcome;
    expect([...matrix.columnPointers]).toEqual([0, 2, 4, 5]);
    expect([...matrix.rowIndices]).toEqual([0, 1, 1, 2, 2]);
    const product = new Float64Array(3);
    multiply(matrix, Float64Array.of(1, 2, 3), product);
    expect([...product]).toEqual([2, 8.25, 17.5]);
  });

  it('takes carriage returns, a header in any case and integers', () => {
    const outcome = readMatrixMarket(
      '%%matrixmarket MATRIX Coordinate Integer Symmetric\r\n1 1 1\r\n1 1 7\r\n',
    );
    expect(outcome.status === 'read' && [...outcome.matrix.values]).toEqual([7]);
  });

  it.each([
    ['', 'not-symmetric-real-coordinate', 1],
    ['%%MatrixMarket matrix coordinate real general\n1 1 1\n1 1 1', 'not-symmetric-real-coordinate', 1],
    [`${header}\n2 3 1\n1 1 1`, 'bad-size', 2],
    [`${header}\n1 1 2\n1 1 1`, 'bad-entry', 3],
    [`${header}\n1 1 1\n1 1 x`, 'bad-entry', 3],
    [`${header}\n1 1 1\n2 1 1`, 'bad-entry', 3],
    [`${header}\n1 1 1\n1 1 1\n1 1 1`, 'bad-entry', 4],
    [`${header}\n2 2 1\n1 1 1`, 'missing-diagonal', 1],
    [`${header}\n2 2 4\n1 1 1\n2 1 3\n1 2 3\n2 2 1`, 'duplicate-entry', 1],
  ])('refuses %j', (text, reason, line) => {
    expect(readMatrixMarket(text)).toEqual({ status: 'refused', reason, line });
  });
});
