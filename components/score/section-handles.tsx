'use client';
import { useMemo, useRef, type KeyboardEvent, type PointerEvent } from 'react';
import { type Camera, toScreenX, toScreenY, toWorld } from '@/components/editor/kernels/camera';
import {
  type Handle,
  listHandles,
  moveCorner,
  restCorner,
  restTip,
  roundTo,
  stepAt,
} from '@/components/editor/kernels/move-points';
import { useScore, useScoreStore } from '@/components/editor/state/score-context';
import type { Point } from '@/lib/domain/section';
import { action, paper } from './palette';
import { writeLevel } from './write-number';

/** Distance within which a corner snaps to others, pixels. */
const reach = 7;

/** What can be taken hold of: the tip of every wall, and the corners of the selected zone. Pointer, touch and arrow keys. */
export function SectionHandles({ camera }: { camera: Camera }) {
  const document = useScore((state) => state.document);
  const mayChange = useScore((state) => state.detail.mayChange);
  const selection = useScore((state) => state.selection);
  const handles = useMemo(() => listHandles(document), [document]);
  if (!mayChange) return null;
  const zone = selection?.kind === 'zones' ? document.zones[selection.index] : undefined;
  const shown = handles.filter(
    ({ kind, at }) => kind === 'tip' || zone?.outline.some(([x, y]) => x === at[0] && y === at[1]),
  );
  return (
    <>
      {shown.map((handle) => (
        <HandleDot key={handle.key} handle={handle} others={handles} camera={camera} />
      ))}
    </>
  );
}

function HandleDot({
  handle,
  others,
  camera,
}: {
  handle: Handle;
  others: readonly Handle[];
  camera: Camera;
}) {
  const store = useScoreStore();
  const barrier = useScore(({ document }) =>
    handle.kind === 'tip' ? document.barriers[handle.barrier!] : undefined,
  );
  const drag = useRef<{ group: string; from: Point; offset: [number, number]; steps: number } | null>(null);
  const what = barrier ? `Tip of ${barrier.name ?? barrier.id}` : 'Corner';

  const moveTo = (from: Point, to: Point, group: string): Point => {
    if (to[0] === from[0] && to[1] === from[1]) return from;
    store.getState().edit(
      `${what} moved`,
      (draft) => {
        if (handle.kind === 'tip') draft.barriers[handle.barrier!]!.path[handle.point!] = to;
        else moveCorner(draft, from, to);
      },
      group,
    );
    return to;
  };
  const begin = (event: PointerEvent<SVGGElement>): void => {
    event.preventDefault();
    event.currentTarget.setPointerCapture(event.pointerId);
    event.currentTarget.focus();
    const [x, y] = worldOf(event, camera);
    drag.current = {
      group: `drag-${handle.key}-${event.timeStamp}`,
      from: handle.at,
      offset: [handle.at[0] - x, handle.at[1] - y],
      steps: 0,
    };
    store.getState().setDragging(true);
    if (handle.kind === 'tip') store.getState().select({ kind: 'barriers', index: handle.barrier! });
  };
  const move = (event: PointerEvent<SVGGElement>): void => {
    const held = drag.current;
    if (!held) return;
    const [x, y] = worldOf(event, camera);
    const wanted: Point = [x + held.offset[0], y + held.offset[1]];
    const step = stepAt(camera.scale);
    const path = barrier?.path;
    const to = path
      ? restTip(path, handle.point!, wanted, step)
      : restCorner(
          wanted,
          others.flatMap(({ key, at }) => (key === handle.key ? [] : [at])),
          reach / camera.scale,
          step,
        );
    const before = held.from;
    held.from = moveTo(before, to, held.group);
    if (held.from !== before) held.steps++;
  };
  const end = (): void => {
    drag.current = null;
    store.getState().setDragging(false);
  };
  const key = (event: KeyboardEvent): void => {
    if (event.key === 'Escape' && drag.current) {
      if (drag.current.steps > 0) store.getState().undo();
      return end();
    }
    const directions: Record<string, Point> = {
      ArrowUp: [0, 1],
      ArrowDown: [0, -1],
      ArrowLeft: [-1, 0],
      ArrowRight: [1, 0],
    };
    const direction = directions[event.key];
    if (!direction || (barrier && direction[0] !== 0)) return;
    event.preventDefault();
    const step = (event.shiftKey ? 10 : 1) * 0.1;
    const to: Point = [
      roundTo(handle.at[0] + direction[0] * step, 0.01),
      roundTo(handle.at[1] + direction[1] * step, 0.01),
    ];
    moveTo(handle.at, barrier ? restTip(barrier.path, handle.point!, to, 0.01) : to, `keys-${handle.key}`);
  };
  const [x, y] = [toScreenX(camera, handle.at[0]), toScreenY(camera, handle.at[1])];
  const common = {
    tabIndex: 0,
    className: 'cursor-grab touch-none active:cursor-grabbing',
    onPointerDown: begin,
    onPointerMove: move,
    onPointerUp: end,
    onPointerCancel: end,
    onKeyDown: key,
    onFocus: () => barrier && store.getState().select({ kind: 'barriers', index: handle.barrier! }),
  };
  const label = `${what}, elevation ${writeLevel(handle.at[1])} m. Arrow keys move it by 0.1 m, with Shift by 1 m.`;
  const dot = (
    <>
      <circle cx={x} cy={y} r={14} fill="transparent" />
      <circle cx={x} cy={y} r={barrier ? 6.5 : 5.5} fill={paper} stroke={action} strokeWidth={2.2} />
    </>
  );
  if (!barrier) {
    return (
      <g
        role="button"
        aria-label={`${what} at ${writeLevel(handle.at[0])}, ${writeLevel(handle.at[1])}. Arrow keys move it.`}
        {...common}
      >
        {dot}
      </g>
    );
  }
  return (
    <g
      role="slider"
      aria-orientation="vertical"
      aria-label={label}
      aria-valuenow={handle.at[1]}
      aria-valuetext={`${writeLevel(handle.at[1])} m`}
      {...common}
    >
      {dot}
    </g>
  );
}

function worldOf(event: PointerEvent<SVGGElement>, camera: Camera): [number, number] {
  const box = event.currentTarget.ownerSVGElement!.getBoundingClientRect();
  return toWorld(camera, event.clientX - box.left, event.clientY - box.top);
}
