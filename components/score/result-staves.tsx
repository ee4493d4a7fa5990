'use client';
import { useMemo, type ReactNode } from 'react';
import { type Camera, toScreenX } from '@/components/editor/kernels/camera';
import { useScore } from '@/components/editor/state/score-context';
import type { ExitResult, SituationResult } from '@/lib/domain/result';
import { action, attention, ink, secondary } from './palette';
import { type Series, Stave } from './stave';
import { writeLevel, writeSignificant } from './write-number';

/** The results under the section on its own axis; one that has nothing to say is absent. */
export function ResultStaves({ camera, hairline }: { camera: Camera; hairline: number | null }) {
  const answer = useScore((state) => state.answer);
  const situationId = useScore((state) => state.situationId);
  const isCurrent = useScore(
    (state) => state.answer?.document === state.document && state.refusal?.document !== state.document,
  );
  const isRefused = useScore((state) => state.refusal?.document === state.document);
  const result = answer?.result.situations.find(({ id }) => id === situationId);
  if (!result || isRefused) return null;
  return (
    <div className={isCurrent ? undefined : 'opacity-50'}>
      <PressureStave result={result} camera={camera} hairline={hairline} />
      <GradientStave result={result} camera={camera} hairline={hairline} />
      <FluxStave result={result} camera={camera} hairline={hairline} />
      <ReadingsStave result={result} camera={camera} />
    </div>
  );
}

interface StaveProps {
  readonly result: SituationResult;
  readonly camera: Camera;
  readonly hairline: number | null;
}

function PressureStave({ result, camera, hairline }: StaveProps) {
  const series = useMemo<Series[]>(
    () =>
      result.structures
        .filter(({ profile }) => profile.length > 1)
        .map(({ id, profile, upliftForce }) => ({
          key: id,
          color: ink,
          isFilled: true,
          points: profile.map(({ at, pressure }) => [at[0], pressure]),
          label: `uplift ${writeSignificant(upliftForce, 3)} ${result.discharge.unit === 'm3/s' ? 'kN' : 'kN/m'}`,
        })),
    [result],
  );
  if (series.length === 0) return null;
  return (
    <Stave
      title="Pressure under the base"
      unit="kPa"
      series={series}
      camera={camera}
      hairline={hairline}
      isDownward
    />
  );
}

/** Faces that look upward; a far side that the water leaves through has no place on this axis. */
function groundFaces(exit: readonly ExitResult[]): ExitResult[] {
  return exit.filter(({ profile }) => {
    const xs = profile.map(({ at }) => at[0]);
    const ys = profile.map(({ at }) => at[1]);
    return Math.max(...xs) - Math.min(...xs) > 0.5 * (Math.max(...ys) - Math.min(...ys));
  });
}

function GradientStave({ result, camera, hairline }: StaveProps) {
  const series = useMemo<Series[]>(
    () =>
      groundFaces(result.exit).flatMap(({ edge, max, profile }): Series[] => {
        // beside a singular point the curve has no end: it is cut at a height that leaves the rest readable
        const cap = max.unbounded ? 2.5 * max.averaged : Infinity;
        return [
          {
            key: edge,
            color: ink,
            points: profile.flatMap(({ at, gradient }) =>
              gradient === null ? [] : [[at[0], Math.min(gradient, cap)] as [number, number]],
            ),
            label: max.unbounded
              ? `unbounded at ${writeLevel(max.at[0])}; ${writeSignificant(max.averaged, 2)} averaged over ${writeSignificant(max.averagingLength, 2)} m`
              : `steepest ${writeSignificant(max.gradient ?? 0, 3)} at ${writeLevel(max.at[0])}`,
          },
        ];
      }),
    [result],
  );
  const critical = useMemo(() => {
    const values = result.checks.flatMap(({ working }) =>
      working.filter(({ symbol }) => symbol === 'i_c').map(({ value }) => value),
    );
    return values.length > 0 ? Math.min(...values) : null;
  }, [result]);
  if (series.length === 0) return null;
  const limit =
    critical === null
      ? {}
      : { limit: { value: critical, label: `critical ${writeSignificant(critical, 3)}` } };
  return (
    <Stave
      title="Outward gradient at the exit"
      unit="–"
      series={series}
      camera={camera}
      hairline={hairline}
      {...limit}
    />
  );
}

function FluxStave({ result, camera, hairline }: StaveProps) {
  const series = useMemo<Series[]>(() => {
    const perDay = 86_400 * 1000; // m/s → mm a day
    return groundFaces(result.exit).map(({ edge, max, profile }) => {
      const values = profile.flatMap(({ at, flux }) =>
        flux === null ? [] : [[at[0], flux * perDay] as [number, number]],
      );
      const typical = [...values].sort((a, b) => a[1] - b[1])[Math.floor(values.length * 0.9)]?.[1] ?? 0;
      const cap = max.unbounded ? 2.5 * typical : Infinity;
      const flow = -(result.discharge.byEdge[edge] ?? 0) * 1000;
      return {
        key: edge,
        color: action,
        isFilled: true,
        points: values.map(([x, v]) => [x, Math.min(v, cap)] as [number, number]),
        label: `${writeSignificant(flow, 3)} l/s in all`,
      };
    });
  }, [result]);
  if (series.length === 0) return null;
  return <Stave title="Water emerging" unit="mm a day" series={series} camera={camera} hairline={hairline} />;
}

function ReadingsStave({ result, camera }: { result: SituationResult; camera: Camera }): ReactNode {
  const document = useScore((state) => state.document);
  const readings = result.piezometers.flatMap(({ id, head, observed }) => {
    const piezometer = document.piezometers.find((p) => p.id === id);
    return head === null || observed === null || !piezometer
      ? []
      : [{ id, x: piezometer.at[0], name: piezometer.name ?? id, head, observed }];
  });
  if (readings.length === 0) return null;
  const values = readings.flatMap(({ head, observed }) => [head, observed]);
  const span = Math.max(...values) - Math.min(...values) || 1;
  const [low, high] = [Math.min(...values) - 0.3 * span, Math.max(...values) + 0.3 * span];
  const height = 84;
  const y = (value: number): number => 8 + ((high - value) / (high - low)) * (height - 16);
  return (
    <figure className="border-t border-rule pt-1">
      <figcaption className="flex flex-wrap gap-x-3 text-[0.875rem]">
        <span className="font-medium">Measured against modelled</span>
        <span className="text-secondary">head, m · filled: measured, open: modelled</span>
      </figcaption>
      <svg
        width={camera.width}
        height={height}
        role="img"
        aria-label={readings
          .map((r) => `${r.name}: measured ${writeLevel(r.observed)}, modelled ${writeLevel(r.head)} m`)
          .join('; ')}
      >
        {readings.map((reading) => {
          const x = toScreenX(camera, reading.x);
          if (x < 0 || x > camera.width) return null;
          const isEnd = x > camera.width - 150;
          return (
            <g key={reading.id}>
              <line
                x1={x}
                x2={x}
                y1={y(reading.head)}
                y2={y(reading.observed)}
                stroke={attention}
                strokeWidth={1.5}
              />
              <circle cx={x} cy={y(reading.head)} r={4} fill="#fbfaf6" stroke={ink} strokeWidth={1.6} />
              <circle cx={x} cy={y(reading.observed)} r={4} fill={ink} />
              <text
                x={isEnd ? x - 9 : x + 9}
                y={(y(reading.head) + y(reading.observed)) / 2 + 4}
                fontSize={12}
                fill={secondary}
                textAnchor={isEnd ? 'end' : 'start'}
                className="figures"
              >
                {reading.name} {writeLevel(reading.observed)} | {writeLevel(reading.head)}
              </text>
            </g>
          );
        })}
      </svg>
    </figure>
  );
}
