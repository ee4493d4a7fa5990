// Ground is told by texture, drawn as small repeating tiles in ink on paper; after the general rule that coarser ground has coarser marks.
import { ink, paper } from './palette';

export const textureNames = ['sand', 'gravel', 'silt', 'clay', 'rock'] as const;
export type TextureName = (typeof textureNames)[number];

/** The texture of a material: its own, or the next of the list by its place. */
export function textureOf(hatch: string | undefined, index: number): TextureName {
  return textureNames.find((name) => name === hatch) ?? textureNames[index % textureNames.length]!;
}

type Mark = (context: CanvasRenderingContext2D) => void;

const dot =
  (x: number, y: number, r: number): Mark =>
  (c) => {
    c.beginPath();
    c.arc(x, y, r, 0, 7);
    c.fill();
  };
const ring =
  (x: number, y: number, r: number): Mark =>
  (c) => {
    c.beginPath();
    c.ellipse(x, y, r * 1.25, r, 0.4, 0, 7);
    c.stroke();
  };
const dash =
  (x: number, y: number, dx: number, dy: number): Mark =>
  (c) => {
    c.beginPath();
    c.moveTo(x, y);
    c.lineTo(x + dx, y + dy);
    c.stroke();
  };

const marks: Record<TextureName, { size: number; draw: Mark[] }> = {
  sand: {
    size: 18,
    draw: [
      dot(3, 4, 0.8),
      dot(11, 2, 0.7),
      dot(7, 10, 0.9),
      dot(15, 9, 0.7),
      dot(3, 15, 0.7),
      dot(12, 15, 0.8),
    ],
  },
  gravel: {
    size: 26,
    draw: [
      ring(6, 6, 2.4),
      ring(18, 10, 3),
      ring(8, 19, 2.8),
      dot(14, 3, 0.8),
      dot(22, 20, 0.8),
      dot(2, 13, 0.7),
      dot(15, 22, 0.7),
    ],
  },
  silt: {
    size: 20,
    draw: [
      dash(2, 4, 5, 0),
      dash(12, 8, 5, 0),
      dash(5, 14, 5, 0),
      dot(15, 3, 0.7),
      dot(3, 10, 0.7),
      dot(15, 17, 0.7),
    ],
  },
  clay: { size: 16, draw: [dash(1, 4, 9, 0), dash(7, 12, 9, 0)] },
  rock: {
    size: 28,
    draw: [dash(3, 10, 7, -7), dash(16, 8, 6, 6), dash(6, 24, 6, -6), dash(18, 25, 7, -5), dash(3, 10, 5, 2)],
  },
};

/** Makes the repeating pattern of a texture for a canvas. */
export function makePattern(
  context: CanvasRenderingContext2D,
  name: TextureName,
  ratio: number,
): CanvasPattern | string {
  const { size, draw } = marks[name];
  const tile = document.createElement('canvas');
  tile.width = tile.height = Math.round(size * ratio);
  const c = tile.getContext('2d');
  if (!c) return paper;
  c.scale(tile.width / size, tile.height / size);
  c.fillStyle = paper;
  c.fillRect(0, 0, size, size);
  c.fillStyle = c.strokeStyle = ink;
  c.globalAlpha = 0.5;
  c.lineWidth = 0.8;
  for (const mark of draw) mark(c);
  return context.createPattern(tile, 'repeat') ?? paper;
}
