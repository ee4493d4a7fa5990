'use client';
import type { ReactNode } from 'react';
import { type Camera, toScreenX, toScreenY } from '@/components/editor/kernels/camera';
import { type ObjectKind, useObjectSelection } from './use-object-selection';
import { useScore } from '@/components/editor/state/score-context';
import type { Lines, SituationFields } from '@/lib/analysis/fields';
import { describeObject } from '@/lib/domain/describe';
import type { Point, SectionDocument, Situation } from '@/lib/domain/section';
import { levelOf } from '@/lib/domain/validate-conditions';
import { action, ink, secondary, water } from './palette';
import { writeLevel } from './write-number';

/** Everything drawn in ink over the painted fields: outlines, walls, water, labels. */
export function SectionDrawing({ camera, fields }: { camera: Camera; fields: SituationFields | null }) {
  const document = useScore((state) => state.document);
  const situationId = useScore((state) => state.situationId);
  const situation = document.situations.find(({ id }) => id === situationId);
  const pathOf = (points: readonly Point[], isClosed = false): string =>
    points
      .map(
        ([x, y], i) =>
          `${i ? 'L' : 'M'}${toScreenX(camera, x).toFixed(1)} ${toScreenY(camera, y).toFixed(1)}`,
      )
      .join('') + (isClosed ? 'Z' : '');
  return (
    <g fill="none" strokeLinejoin="round">
      {document.zones.map((zone, index) => (
        <SelectablePath
          key={zone.id}
          kind="zones"
          index={index}
          d={pathOf(zone.outline, true)}
          width={0.9}
          color={ink}
          opacity={0.55}
        />
      ))}
      {situation && <WaterLines document={document} situation={situation} camera={camera} />}
      {document.edges.map((edge, index) => (
        <SelectablePath
          key={edge.id}
          kind="edges"
          index={index}
          d={pathOf(edge.path)}
          width={2}
          color={water}
        />
      ))}
      {document.structures.map((structure, index) => (
        <SelectablePath
          key={structure.id}
          kind="structures"
          index={index}
          d={pathOf(structure.base)}
          width={5}
          color={secondary}
        />
      ))}
      {document.drains.map((drain, index) => (
        <SelectablePath
          key={drain.id}
          kind="drains"
          index={index}
          d={pathOf(drain.path)}
          width={2.5}
          color={water}
          dashes="5 4"
        />
      ))}
      {document.barriers.map((barrier, index) => (
        <SelectablePath
          key={barrier.id}
          kind="barriers"
          index={index}
          d={pathOf(barrier.path)}
          width={4}
          color={ink}
          {...(barrier.conductance > 0 ? { dashes: '9 2' } : {})}
        />
      ))}
      <ZoneNames document={document} camera={camera} />
      {fields && <HeadLabels lines={fields.equipotentials} camera={camera} />}
      {document.piezometers.map((piezometer, index) => (
        <Piezometer
          key={piezometer.id}
          index={index}
          camera={camera}
          at={piezometer.at}
          name={piezometer.name ?? piezometer.id}
        />
      ))}
    </g>
  );
}

interface SelectablePathProps {
  readonly kind: ObjectKind;
  readonly index: number;
  readonly d: string;
  readonly width: number;
  readonly color: string;
  readonly dashes?: string;
  readonly opacity?: number;
}

/** A line of the drawing with a wider one under it that takes the pointer. */
function SelectablePath({ kind, index, d, width, color, dashes, opacity = 1 }: SelectablePathProps) {
  const { isSelected, select } = useObjectSelection(kind, index);
  return (
    <g>
      {isSelected && (
        <path d={d} stroke={action} strokeOpacity={0.35} strokeWidth={width + 7} strokeLinecap="round" />
      )}
      <path d={d} stroke={color} strokeWidth={width} strokeDasharray={dashes} strokeOpacity={opacity} />
      <path
        d={d}
        stroke="transparent"
        strokeWidth={Math.max(14, width + 8)}
        className="cursor-pointer"
        pointerEvents="stroke"
        onClick={select}
      />
    </g>
  );
}

/** Still water over every edge that stands below its level; the level is written at the line's outer end. */
function WaterLines({
  document,
  situation,
  camera,
}: {
  document: SectionDocument;
  situation: Situation;
  camera: Camera;
}) {
  const drawn: ReactNode[] = [];
  const labelled = new Set<string>();
  document.edges.forEach((edge, index) => {
    const level = levelOf(edge.condition, situation);
    if (level === null || edge.condition.type !== 'water') return;
    const xs = edge.path.map(([x]) => x);
    const [from, to] = [Math.min(...xs), Math.max(...xs)];
    const y = toScreenY(camera, level);
    const [x1, x2] = [toScreenX(camera, from), toScreenX(camera, to)];
    if (x2 - x1 < 2) return;
    const isLeft = from + to < 2 * camera.left + camera.width / camera.scale;
    const key = `${isLeft}${level.toFixed(3)}`;
    const name =
      typeof edge.condition.level === 'string' ? edge.condition.level : describeObject('edges', index, edge);
    const bed = edge.path.map(([x, yy]) => `${toScreenX(camera, x)} ${toScreenY(camera, yy)}`).join('L');
    drawn.push(
      <g key={edge.id} className="pointer-events-none">
        <path d={`M${bed}L${x2} ${y}L${x1} ${y}Z`} fill={water} fillOpacity={0.13} />
        <line x1={x1} x2={x2} y1={y} y2={y} stroke={water} strokeWidth={1.2} />
        {!labelled.has(key) && (
          <Label
            x={isLeft ? Math.max(6, x1 + 6) : Math.min(camera.width - 6, x2 - 6)}
            y={y - 6}
            anchor={isLeft ? 'start' : 'end'}
            color={water}
            text={`${name} ${writeLevel(level)}`}
          />
        )}
      </g>,
    );
    labelled.add(key);
  });
  return <>{drawn}</>;
}

interface LabelProps {
  readonly x: number;
  readonly y: number;
  readonly text: string;
  readonly color: string;
  readonly anchor?: 'start' | 'middle' | 'end';
  readonly size?: number;
}

/** Text with a halo of paper, readable over any texture. */
function Label({ x, y, text, color, anchor = 'middle', size = 12.5 }: LabelProps) {
  return (
    <text
      x={x}
      y={y}
      textAnchor={anchor}
      fontSize={size}
      fill={color}
      stroke="#fbfaf6"
      strokeWidth={3.5}
      paintOrder="stroke"
      className="figures pointer-events-none font-medium"
    >
      {text}
    </text>
  );
}

/** Names each zone where there is room: near the left end of its outline. */
function ZoneNames({ document, camera }: { document: SectionDocument; camera: Camera }) {
  return (
    <>
      {document.zones.map((zone, index) => {
        const xs = zone.outline.map(([x]) => toScreenX(camera, x));
        const left = Math.max(8, Math.min(...xs) + 8);
        const right = Math.min(camera.width - 8, Math.max(...xs) - 8);
        const at = zone.outline.reduce<{ low: number; high: number }>(
          (span, [x, y]) =>
            toScreenX(camera, x) < left + 40
              ? { low: Math.min(span.low, y), high: Math.max(span.high, y) }
              : span,
          { low: Infinity, high: -Infinity },
        );
        const ys = zone.outline.map(([, y]) => y);
        const middle =
          Number.isFinite(at.low) && at.high > at.low
            ? (at.low + at.high) / 2
            : (Math.min(...ys) + Math.max(...ys)) / 2;
        const isLens = right - left < 160;
        if (right - left < 50) return null;
        const name = zone.name ?? document.materials.find(({ id }) => id === zone.material)?.name ?? zone.id;
        return (
          <ZoneName key={zone.id} index={index}>
            <Label
              x={isLens ? (left + right) / 2 : left}
              y={toScreenY(camera, isLens ? (Math.min(...ys) + Math.max(...ys)) / 2 : middle) + 4}
              anchor={isLens ? 'middle' : 'start'}
              color={ink}
              text={name}
            />
          </ZoneName>
        );
      })}
    </>
  );
}

function ZoneName({ index, children }: { index: number; children: ReactNode }) {
  const { select } = useObjectSelection('zones', index);
  return (
    <g onClick={select} className="cursor-pointer" pointerEvents="bounding-box">
      {children}
    </g>
  );
}

/** Heads written at the lower end of their lines, where they do not cover one another. */
function HeadLabels({ lines, camera }: { lines: Lines; camera: Camera }) {
  const placed: { x: number; y: number }[] = [];
  const labels: ReactNode[] = [];
  for (let line = 0; line < lines.values.length; line++) {
    const first = lines.offsets[line]!;
    const last = lines.offsets[line + 1]! - 1;
    const ends = [first, last].map((k) => ({
      x: toScreenX(camera, lines.points[2 * k]!),
      y: toScreenY(camera, lines.points[2 * k + 1]!),
    }));
    const end = ends[0]!.y > ends[1]!.y ? ends[0]! : ends[1]!;
    const at = {
      x: Math.min(camera.width - 18, Math.max(18, end.x)),
      y: Math.min(camera.height - 5, end.y - 5),
    };
    if (
      placed.some((p) => Math.abs(p.x - at.x) < 38 && Math.abs(p.y - at.y) < 15) ||
      end.x < 0 ||
      end.x > camera.width
    )
      continue;
    placed.push(at);
    labels.push(
      <Label
        key={line}
        x={at.x}
        y={at.y}
        color={action}
        text={writeLevel(lines.values[line]!)}
        size={11.5}
      />,
    );
  }
  return <>{labels}</>;
}

function Piezometer({ index, camera, at, name }: { index: number; camera: Camera; at: Point; name: string }) {
  const { isSelected, select } = useObjectSelection('piezometers', index);
  const [x, y] = [toScreenX(camera, at[0]), toScreenY(camera, at[1])];
  return (
    <g onClick={select} className="cursor-pointer">
      <circle cx={x} cy={y} r={12} fill="transparent" />
      <circle cx={x} cy={y} r={4.5} fill="#fbfaf6" stroke={isSelected ? action : ink} strokeWidth={1.8} />
      <Label x={x + 8} y={y + 4} anchor="start" color={ink} text={name} size={11.5} />
    </g>
  );
}
