'use client';
import { useEffect, useMemo, useState, type RefObject } from 'react';
import { type Camera, type Extent, fitCamera, zoomCamera } from '@/components/editor/kernels/camera';
import type { SectionDocument, Situation } from '@/lib/domain/section';
import { levelOf } from '@/lib/domain/validate-conditions';

/** What must be on the picture: ground, walls, water levels, with air around. */
export function extentOf(document: SectionDocument, situation: Situation | undefined): Extent {
  const points = [
    ...document.zones.flatMap(({ outline }) => outline),
    ...document.barriers.flatMap(({ path }) => path),
    ...document.structures.flatMap(({ base }) => base),
  ];
  const xs = points.map(([x]) => x);
  const levels = situation
    ? document.edges.flatMap(({ condition }) => levelOf(condition, situation) ?? [])
    : [];
  const ys = [...points.map(([, y]) => y), ...levels];
  const [xMin, xMax] = [Math.min(...xs), Math.max(...xs)];
  const [yMin, yMax] = [Math.min(...ys), Math.max(...ys)];
  const air = 0.04 * Math.max(xMax - xMin, yMax - yMin);
  return { xMin: xMin - 0.4 * air, xMax: xMax + 0.4 * air, yMin: yMin - air / 2, yMax: yMax + air };
}

/** Whether two extents frame the same picture: then the view keeps its identity and nothing is painted anew. */
export function isSameExtent(a: Extent, b: Extent): boolean {
  return a.xMin === b.xMin && a.xMax === b.xMax && a.yMin === b.yMin && a.yMax === b.yMax;
}

export interface CameraHandle {
  readonly camera: Camera;
  zoom(factor: number, px?: number, py?: number): void;
  pan(dx: number, dy: number): void;
  reset(): void;
  readonly isWhole: boolean;
}

/** Least height of the ground on screen, pixels: a long section on a phone begins closer, about its walls. */
const leastGround = 150;

function focusCamera(whole: Camera, extent: Extent, focus: number): Camera {
  const ground = (extent.yMax - extent.yMin) * whole.scale;
  if (ground >= leastGround) return whole;
  const scale = (whole.scale * leastGround) / ground;
  const span = whole.width / scale;
  const left = Math.min(Math.max(focus - span / 2, extent.xMin), extent.xMax - span);
  const height = leastGround + 10;
  return { left, top: extent.yMax, scale, width: whole.width, height };
}

/** Chainage of what the section is about: its walls, else its structures. */
export function focusOf(document: SectionDocument): number {
  const points = [
    ...document.barriers.flatMap(({ path }) => path),
    ...document.structures.flatMap(({ base }) => base),
  ];
  const xs = (points.length > 0 ? points : document.zones.flatMap(({ outline }) => outline)).map(([x]) => x);
  return (Math.min(...xs) + Math.max(...xs)) / 2;
}

/** The view of the section in a container of changing width; follows the extent until the user moves closer. */
export function useCamera(
  container: RefObject<HTMLElement | null>,
  extent: Extent,
  focus: number,
): CameraHandle {
  const [size, setSize] = useState({ width: 960, maxHeight: 400 });
  const [moved, setMoved] = useState<Camera | null>(null);
  useEffect(() => {
    const element = container.current;
    if (!element) return;
    const measure = (): void => {
      const width = Math.max(240, element.clientWidth);
      setSize({ width, maxHeight: Math.max(200, Math.round(window.innerHeight * 0.5)) });
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, [container]);
  const whole = useMemo(() => fitCamera(extent, size.width, size.maxHeight, 190), [extent, size]);
  const standard = useMemo(() => focusCamera(whole, extent, focus), [whole, extent, focus]);
  const camera = useMemo(
    () => ({ ...(moved ?? standard), width: standard.width, height: standard.height }),
    [moved, standard],
  );
  return {
    camera,
    isWhole: Math.abs(camera.scale / whole.scale - 1) < 1e-3,
    zoom: (factor, px = camera.width / 2, py = camera.height / 2) => {
      const next = zoomCamera(camera, factor, px, py, whole.scale);
      setMoved(next.scale <= whole.scale * 1.001 ? whole : next);
    },
    pan: (dx, dy) =>
      setMoved({ ...camera, left: camera.left - dx / camera.scale, top: camera.top + dy / camera.scale }),
    reset: () => setMoved(whole),
  };
}
