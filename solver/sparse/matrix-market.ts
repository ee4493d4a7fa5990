// Reader of the Matrix Market exchange format, the part that symmetric positive definite matrices come in.
import type { CscMatrix } from './csc-matrix';

/** The matrix, or the first line that cannot be read and why. */
export type MatrixMarketOutcome =
  | { readonly status: 'read'; readonly matrix: CscMatrix }
  | {
      readonly status: 'refused';
      readonly reason:
        'not-symmetric-real-coordinate' | 'bad-size' | 'bad-entry' | 'missing-diagonal' | 'duplicate-entry';
      /** Counted from 1; the header's line where the fault is in the whole. */
      readonly line: number;
    };

type Refusal = Extract<MatrixMarketOutcome, { status: 'refused' }>;

/** Entries as they stand in the file, turned into the lower triangle. */
interface Entries {
  readonly size: number;
  readonly rows: Int32Array;
  readonly columns: Int32Array;
  readonly values: Float64Array;
}

/**
 * Reads a symmetric matrix in coordinate form.
 *
 * @param text - The file's text: `%%MatrixMarket matrix coordinate real symmetric` (or integer), indices from 1.
 * @returns The lower triangle by columns, rows ascending and the diagonal first, or the reason for refusing. Linear in the number of entries.
 * @source Boisvert, Pozo & Remington (1996), The Matrix Market Exchange Formats, NISTIR 5935 (from memory).
 */
export function readMatrixMarket(text: string): MatrixMarketOutcome {
  const lines = scanLines(text);
  const header = lines.next() ?? '';
  if (!/^%%matrixmarket\s+matrix\s+coordinate\s+(real|integer)\s+symmetric\s*$/i.test(header)) {
    return refuse('not-symmetric-real-coordinate', 1);
  }
  const entries = readEntries(lines);
  if ('status' in entries) return entries;
  return compress(entries);
}

function refuse(reason: Refusal['reason'], line: number): Refusal {
  return { status: 'refused', reason, line };
}

interface LineScanner {
  /** The next line, or null at the end. */
  next(): string | null;
  /** Number of the line that `next` gave last. */
  count(): number;
}

/** Splitting a file of a million lines at once would double its memory. */
function scanLines(text: string): LineScanner {
  let position = 0;
  let count = 0;
  return {
    next() {
      if (position >= text.length) return null;
      const end = text.indexOf('\n', position);
      const line = text.slice(position, end < 0 ? text.length : end);
      position = end < 0 ? text.length : end + 1;
      count++;
      return line;
    },
    count: () => count,
  };
}

function nextFilled(lines: LineScanner): string | null {
  for (;;) {
    const line = lines.next();
    if (line === null) return null;
    const trimmed = line.trim();
    if (trimmed !== '' && !trimmed.startsWith('%')) return trimmed;
  }
}

function readEntries(lines: LineScanner): Entries | Refusal {
  const [size, width, count, ...rest] = (nextFilled(lines) ?? '').split(/\s+/).map(Number);
  const isSize = [size, width, count].every((n) => Number.isInteger(n) && n >= 0);
  if (!isSize || size !== width || rest.length > 0) return refuse('bad-size', lines.count());
  const rows = new Int32Array(count);
  const columns = new Int32Array(count);
  const values = new Float64Array(count);
  const isIndex = (n: number): boolean => Number.isInteger(n) && n >= 1 && n <= size;
  for (let k = 0; k < count; k++) {
    const [i, j, value, ...more] = (nextFilled(lines) ?? '').split(/\s+/).map(Number);
    if (!isIndex(i) || !isIndex(j) || !Number.isFinite(value) || more.length > 0)
      return refuse('bad-entry', lines.count());
    rows[k] = Math.max(i, j) - 1;
    columns[k] = Math.min(i, j) - 1;
    values[k] = value;
  }
  if (nextFilled(lines) !== null) return refuse('bad-entry', lines.count());
  return { size, rows, columns, values };
}

/** Two passes of counting sort, by row and then by column, leave the rows of each column ascending. */
function compress({ size, rows, columns, values }: Entries): MatrixMarketOutcome {
  const byRow = sortBy(rows, size, null).places;
  const { places, start } = sortBy(columns, size, byRow);
  const rowIndices = Int32Array.from(places, (k) => rows[k]);
  for (let column = 0; column < size; column++) {
    if (start[column] === start[column + 1] || rowIndices[start[column]] !== column)
      return refuse('missing-diagonal', 1);
    for (let p = start[column] + 1; p < start[column + 1]; p++) {
      if (rowIndices[p] === rowIndices[p - 1]) return refuse('duplicate-entry', 1);
    }
  }
  return {
    status: 'read',
    matrix: { size, columnPointers: start, rowIndices, values: Float64Array.from(places, (k) => values[k]) },
  };
}

function sortBy(
  keys: Int32Array,
  size: number,
  before: Int32Array | null,
): { places: Int32Array; start: Int32Array } {
  const start = new Int32Array(size + 1);
  for (let k = 0; k < keys.length; k++) start[keys[k] + 1]++;
  for (let i = 0; i < size; i++) start[i + 1] += start[i];
  const fill = start.slice(0, size);
  const places = new Int32Array(keys.length);
  for (let n = 0; n < keys.length; n++) {
    const k = before ? before[n] : n;
    places[fill[keys[k]]++] = k;
  }
  return { places, start };
}
