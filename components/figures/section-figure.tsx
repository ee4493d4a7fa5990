import { useId } from 'react';
import { cn } from '@/lib/cn';
import type { Material, Point, SectionDocument } from '@/lib/domain/section';
import { fitFigure, type FigureFrame, levelOf, waterOutline } from './figure-geometry';

type Texture = 'sand' | 'gravel' | 'clay' | 'silt' | 'rock' | 'plain';

const textureMarks: Record<Texture, string> = {
  sand: 'M2 3h.01M8 1.5h.01M6 7h.01M11 5h.01M1.5 9.5h.01M9.5 10.5h.01',
  gravel: 'M3 3a1.3 1.3 0 1 0 .01 0M9 8a1.6 1.6 0 1 0 .01 0M10 1.5h.01M2 9.5h.01',
  clay: 'M0 2h5M7 5.5h5M1.5 9h5',
  silt: 'M1 3h3M7 2.5h.01M8 8h3M3 9h.01',
  rock: 'M0 12L12 0M-3 3L3 -3M9 15l6-6',
  plain: '',
};

/** The texture a material is drawn with: what it says, else what its name says, else what its permeability suggests. */
function textureOf(material: Material): Texture {
  const words = `${material.hatch ?? ''} ${material.name}`.toLowerCase();
  const named = (['gravel', 'sand', 'silt', 'clay', 'rock'] as const).find((texture) =>
    words.includes(texture),
  );
  if (named) return named;
  if (/alluvi|filter|shell/.test(words)) return 'sand';
  if (/core|blanket|till|loam/.test(words)) return 'clay';
  return material.kMajor >= 1e-3 ? 'gravel' : material.kMajor >= 1e-6 ? 'sand' : 'clay';
}

/** Paler where water passes easily. */
function toneOf(material: Material): string {
  const decade = Math.log10(material.kMajor);
  return decade > -4 ? '#f4f3e8' : decade > -6 ? '#ebece0' : decade > -8 ? '#dfe3d8' : '#d2d9ce';
}

interface SectionFigureProps {
  document: SectionDocument;
  width?: number;
  maxHeight?: number;
  /** Said to a screen reader; without it the figure is decoration beside text that says the same. */
  label?: string;
  className?: string;
}

/** A section drawn small: ground by texture, walls heavy, water at the levels of its first situation. */
export function SectionFigure({
  document,
  width = 320,
  maxHeight = 170,
  label,
  className,
}: SectionFigureProps) {
  const id = useId();
  const frame = fitFigure(document, width, maxHeight);
  const materials = new Map(document.materials.map((material) => [material.id, material]));
  const textures = new Set(document.materials.map(textureOf));
  return (
    <svg
      viewBox={`0 0 ${width} ${frame.height}`}
      {...(label ? { role: 'img', 'aria-label': label } : { 'aria-hidden': true })}
      className={cn('block h-auto w-full', className)}
      fill="none"
      stroke="#17263a"
      strokeLinejoin="round"
    >
      <defs>
        {[...textures].map((texture) => (
          <pattern key={texture} id={`${id}-${texture}`} width="12" height="12" patternUnits="userSpaceOnUse">
            <path
              d={textureMarks[texture]}
              stroke="#17263a"
              strokeOpacity="0.5"
              strokeWidth="0.9"
              strokeLinecap="round"
            />
          </pattern>
        ))}
      </defs>
      {document.zones.map((zone) => {
        const material = materials.get(zone.material);
        const d = [zone.outline, ...(zone.holes ?? [])].map((ring) => `${trace(ring, frame)}Z`).join('');
        return (
          <g key={zone.id} fillRule="evenodd">
            <path d={d} fill={material ? toneOf(material) : '#ebece0'} stroke="none" />
            <path d={d} fill={material ? `url(#${id}-${textureOf(material)})` : 'none'} strokeWidth="0.8" />
          </g>
        );
      })}
      <Water document={document} frame={frame} />
      {document.structures.map((structure) => (
        <path key={structure.id} d={trace(structure.base, frame)} strokeWidth="3" />
      ))}
      {document.drains.map((drain) => (
        <path
          key={drain.id}
          d={trace(drain.path, frame)}
          stroke="#0f6b5c"
          strokeWidth="2"
          strokeDasharray="4 2.5"
        />
      ))}
      {document.barriers.map((barrier) => (
        <path key={barrier.id} d={trace(barrier.path, frame)} strokeWidth="2.6" strokeLinecap="butt" />
      ))}
      {frame.exaggeration > 1 && (
        <text x={width - 6} y={frame.height - 3} fontSize="10" textAnchor="end" fill="#55636f" stroke="none">
          heights ×{frame.exaggeration}
        </text>
      )}
    </svg>
  );
}

function Water({ document, frame }: { document: SectionDocument; frame: FigureFrame }) {
  const [situation] = document.situations;
  return document.edges.map((edge) => {
    if (edge.condition.type !== 'water') return null;
    const level = levelOf(edge.condition.level, situation);
    if (level === null) return null;
    const outline = waterOutline(edge.path, level);
    const surface = outline.filter(([, y]) => y === level);
    if (outline.length < 3) return null;
    return (
      <g key={edge.id}>
        <path d={`${trace(outline, frame)}Z`} fill="#4ca0b3" fillOpacity="0.2" stroke="none" />
        <path d={trace(surface, frame)} stroke="#0f6b5c" strokeWidth="1.1" />
      </g>
    );
  });
}

function trace(points: readonly Point[], { place }: FigureFrame): string {
  return points.map((point, index) => `${index ? 'L' : 'M'}${place(point)}`).join('');
}
