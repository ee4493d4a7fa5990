'use client';
import { parse } from 'papaparse';
import { useState } from 'react';
import { readPoints } from '@/components/editor/kernels/table-edits';
import { useScore } from '@/components/editor/state/score-context';
import { Button } from '@/components/ui/button';
import type { Point } from '@/lib/domain/section';
import { toShown, unitName } from '@/lib/domain/units';
import { writeLevel } from '../write-number';
import { NumberField } from './number-field';

interface PointsCellProps {
  /** Whose points, in words. */
  readonly label: string;
  readonly points: readonly Point[];
  readonly least: number;
  readonly onCommit: (points: Point[]) => void;
}

/** The points of an outline or a path: a grid on demand, which takes rows pasted from a spreadsheet. */
export function PointsCell({ label, points, least, onCommit }: PointsCellProps) {
  const mayChange = useScore((state) => state.detail.mayChange);
  const units = useScore((state) => state.units);
  const [message, setMessage] = useState('');
  const replace = (index: number, axis: 0 | 1) => (value: number | undefined) => {
    if (value === undefined) return;
    onCommit(
      points.map((point, i) => (i !== index ? point : axis === 0 ? [value, point[1]] : [point[0], value])),
    );
  };
  const paste = (event: React.ClipboardEvent): void => {
    const text = event.clipboardData.getData('text');
    if (!mayChange || !/[\t\n]/.test(text)) return;
    event.preventDefault();
    const delimiter = ['\t', ';'].find((mark) => text.includes(mark)) ?? ',';
    const { data } = parse<string[]>(text, { delimiter, skipEmptyLines: true });
    // between commas a third column may be a decimal comma: 1,5,2,3 is not the point (1, 5)
    const isAmbiguous = delimiter === ',' && data.some((row) => row.length > 2);
    const read = isAmbiguous ? null : readPoints(data, 1 / toShown(1, 'length', units));
    if (!read) {
      setMessage('Paste rows of two numbers, chainage and elevation.');
      return;
    }
    setMessage('');
    // rows go in from the cell pasted into, as in a spreadsheet; what stands below them stays
    const row = (event.target as Element).closest('tr')?.dataset.point;
    const from = row === undefined ? points.length : Number(row);
    onCommit([...points.slice(0, from), ...read, ...points.slice(from + read.length)]);
  };
  return (
    <details onPaste={paste}>
      <summary className="min-h-6 text-action underline decoration-action/40 underline-offset-4">
        <span className="sr-only">{label}: </span>
        {points.length} points, {writeLevel(toShown(points[0]![0], 'length', units))},{' '}
        {writeLevel(toShown(points[0]![1], 'length', units))} …
      </summary>
      <table className="mt-1">
        <caption className="text-left text-[0.8125rem] text-secondary">
          {mayChange ? 'Rows of two columns copied from a spreadsheet may be pasted into any cell.' : label}
        </caption>
        <thead>
          <tr className="text-left text-[0.8125rem] text-secondary">
            <th scope="col">Chainage, {unitName('length', units)}</th>
            <th scope="col">Elevation, {unitName('length', units)}</th>
            <th scope="col">
              <span className="sr-only">Remove</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {points.map((point, index) => (
            <tr key={index} data-point={index}>
              <td className="py-0.5 pr-2">
                <NumberField
                  label={`${label}, point ${index + 1}, chainage`}
                  quantity="length"
                  value={point[0]}
                  onCommit={replace(index, 0)}
                />
              </td>
              <td className="py-0.5 pr-2">
                <NumberField
                  label={`${label}, point ${index + 1}, elevation`}
                  quantity="length"
                  value={point[1]}
                  onCommit={replace(index, 1)}
                />
              </td>
              <td>
                {mayChange && points.length > least && (
                  <Button
                    look="quiet"
                    aria-label={`Remove point ${index + 1} of ${label}`}
                    onClick={() => onCommit(points.filter((_, i) => i !== index))}
                  >
                    Remove
                  </Button>
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {mayChange && (
        <Button
          look="quiet"
          onClick={() => {
            const [a, b] = [points.at(-2)!, points.at(-1)!];
            onCommit([...points, [2 * b[0] - a[0], 2 * b[1] - a[1]]]);
          }}
        >
          Add a point to {label}
        </Button>
      )}
      {message && (
        <p role="alert" className="text-[0.8125rem] text-attention">
          {message}
        </p>
      )}
    </details>
  );
}
