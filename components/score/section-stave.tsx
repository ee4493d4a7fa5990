'use client';
import { useEffect, useMemo, useRef } from 'react';
import { toScreenX, toScreenY } from '@/components/editor/kernels/camera';
import { useScore } from '@/components/editor/state/score-context';
import type { SituationFields } from '@/lib/analysis/fields';
import { paintSection } from './paint-section';
import { SectionDrawing } from './section-drawing';
import { SectionHandles } from './section-handles';
import type { CameraHandle } from './use-camera';

/** The top stave: ground, water, walls and the live flow net, in true scale. */
export function SectionStave({ view, hairline }: { view: CameraHandle; hairline: number | null }) {
  // the parts that are painted keep their identity while others change: a wall that moves repaints with its answer, not before
  const zones = useScore((state) => state.document.zones);
  const materials = useScore((state) => state.document.materials);
  const answer = useScore((state) => state.answer);
  const isRefused = useScore((state) => state.refusal !== null && state.refusal.document === state.document);
  const situationId = useScore((state) => state.situationId);
  const canvas = useRef<HTMLCanvasElement>(null);
  const { camera } = view;
  const fields = useMemo<SituationFields | null>(
    () => answer?.fields.find(({ situation }) => situation === situationId) ?? null,
    [answer, situationId],
  );

  useEffect(() => {
    const element = canvas.current;
    const context = element?.getContext('2d');
    if (!element || !context) return;
    const ratio = Math.min(window.devicePixelRatio || 1, 3);
    element.width = Math.round(camera.width * ratio);
    element.height = Math.round(camera.height * ratio);
    // fields of a section that no longer stands would be numbers for other inputs
    paintSection(context, { zones, materials, fields: isRefused ? null : fields, camera, ratio });
    performance.mark('underfall:drawn');
  }, [camera, zones, materials, fields, isRefused]);

  const drag = useRef<{ x: number; y: number } | null>(null);
  return (
    <div className="relative" style={{ height: camera.height }}>
      <canvas
        ref={canvas}
        className="absolute inset-0"
        style={{ width: camera.width, height: camera.height }}
        aria-hidden
      />
      <svg
        className="absolute inset-0 touch-pan-y select-none"
        width={camera.width}
        height={camera.height}
        role="group"
        aria-label="Section drawing; every part of it stands in the table view too"
        onPointerDown={(event) => {
          if (event.target !== event.currentTarget || view.isWhole) return;
          drag.current = { x: event.clientX, y: event.clientY };
          event.currentTarget.setPointerCapture(event.pointerId);
        }}
        onPointerMove={(event) => {
          if (!drag.current) return;
          view.pan(event.clientX - drag.current.x, event.clientY - drag.current.y);
          drag.current = { x: event.clientX, y: event.clientY };
        }}
        onPointerUp={() => (drag.current = null)}
      >
        <SectionDrawing camera={camera} fields={isRefused ? null : fields} />
        {hairline !== null && (
          <line
            x1={toScreenX(camera, hairline)}
            x2={toScreenX(camera, hairline)}
            y1={0}
            y2={toScreenY(camera, camera.top - camera.height / camera.scale)}
            className="pointer-events-none stroke-ink/35"
          />
        )}
        <SectionHandles camera={camera} />
      </svg>
    </div>
  );
}
