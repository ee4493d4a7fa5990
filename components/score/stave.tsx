'use client';
import { ticks } from 'd3';
import { type Camera, toScreenX } from '@/components/editor/kernels/camera';
import { attention, rule, secondary } from './palette';
import { writeSignificant } from './write-number';

/** One curve of a stave. */
export interface Series {
  readonly key: string;
  readonly color: string;
  /** Chainage and value, in order along the line. */
  readonly points: readonly (readonly [number, number])[];
  /** What it comes to, in words and numbers. */
  readonly label: string;
  readonly isFilled?: boolean;
}

interface StaveProps {
  readonly title: string;
  readonly unit: string;
  readonly series: readonly Series[];
  readonly camera: Camera;
  readonly hairline: number | null;
  /** Values grow downward, as pressure under a base is drawn. */
  readonly isDownward?: boolean;
  readonly limit?: { readonly value: number; readonly label: string };
}

const height = 92;
const pad = 8;

/** A result strip on the section's axis. */
export function Stave({ title, unit, series, camera, hairline, isDownward = false, limit }: StaveProps) {
  const most = Math.max(...series.flatMap(({ points }) => points.map(([, v]) => v)), 1e-12);
  // a limit far above the curve would flatten it; then it is only said
  const isLimitShown = limit !== undefined && limit.value <= 4 * most;
  const top = isLimitShown ? Math.max(most, limit.value) * 1.08 : most * 1.08;
  const yOf = (value: number): number => {
    const t = value / top;
    return isDownward ? pad + t * (height - 2 * pad) : height - pad - t * (height - 2 * pad);
  };
  const zero = yOf(0);
  const readings = hairline === null ? [] : series.flatMap((s) => valueAt(s, hairline) ?? []);
  return (
    <figure className="border-t border-rule pt-1">
      <figcaption className="flex flex-wrap items-baseline gap-x-3 text-[0.875rem]">
        <span className="font-medium">{title}</span>
        <span className="text-secondary">{unit}</span>
        {series.map(({ key, label }) => (
          <span key={key} className="figures">
            {label}
          </span>
        ))}
        {limit && !isLimitShown && <span className="figures text-secondary">{limit.label}</span>}
        {readings.length > 0 && (
          <span className="figures ml-auto font-medium">
            {readings.map((v) => writeSignificant(v, 3)).join(' · ')}
          </span>
        )}
      </figcaption>
      <svg
        width={camera.width}
        height={height}
        role="img"
        aria-label={`${title}: ${series.map(({ label }) => label).join('; ')}`}
      >
        {ticks(0, top, 2).map((tick) => (
          <g key={tick}>
            <line
              x1={0}
              x2={camera.width}
              y1={yOf(tick)}
              y2={yOf(tick)}
              stroke={rule}
              strokeWidth={tick === 0 ? 1 : 0.6}
            />
            <text x={2} y={yOf(tick) - 3} fontSize={11} fill={secondary} className="figures">
              {tick === 0 ? '' : writeSignificant(tick, 2)}
            </text>
          </g>
        ))}
        {series.map((s) => (
          <Curve key={s.key} series={s} camera={camera} yOf={yOf} zero={zero} />
        ))}
        {isLimitShown && (
          <g>
            <line
              x1={0}
              x2={camera.width}
              y1={yOf(limit.value)}
              y2={yOf(limit.value)}
              stroke={attention}
              strokeWidth={1.2}
            />
            <text
              x={camera.width - 4}
              y={yOf(limit.value) + 13}
              fontSize={12}
              fill={attention}
              textAnchor="end"
              className="figures"
            >
              {limit.label}
            </text>
          </g>
        )}
        {hairline !== null && (
          <line
            x1={toScreenX(camera, hairline)}
            x2={toScreenX(camera, hairline)}
            y1={0}
            y2={height}
            stroke="#17263a"
            strokeOpacity={0.35}
          />
        )}
      </svg>
    </figure>
  );
}

interface CurveProps {
  readonly series: Series;
  readonly camera: Camera;
  readonly yOf: (value: number) => number;
  readonly zero: number;
}

function Curve({ series, camera, yOf, zero }: CurveProps) {
  const { points, color, isFilled } = series;
  if (points.length === 0) return null;
  const line = points
    .map(([x, v], i) => `${i ? 'L' : 'M'}${toScreenX(camera, x).toFixed(1)} ${yOf(v).toFixed(1)}`)
    .join('');
  const close = `L${toScreenX(camera, points.at(-1)![0]).toFixed(1)} ${zero}L${toScreenX(camera, points[0]![0]).toFixed(1)} ${zero}Z`;
  return (
    <>
      {isFilled && <path d={line + close} fill={color} fillOpacity={0.1} />}
      <path d={line} fill="none" stroke={color} strokeWidth={1.6} strokeLinejoin="round" />
    </>
  );
}

/** The curve's value at a chainage, where it passes there. */
function valueAt({ points }: Series, x: number): number | null {
  for (let i = 1; i < points.length; i++) {
    const [a, b] = [points[i - 1]!, points[i]!];
    if ((a[0] - x) * (b[0] - x) > 0 || a[0] === b[0]) continue;
    return a[1] + ((x - a[0]) / (b[0] - a[0])) * (b[1] - a[1]);
  }
  return null;
}
