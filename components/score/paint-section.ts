// Paints ground and fields of a section on a canvas: textures in painter's order, pale head bands over them, then the lines.
import { toScreenX, toScreenY, type Camera } from '@/components/editor/kernels/camera';
import type { Lines, SituationFields } from '@/lib/analysis/fields';
import type { SectionDocument } from '@/lib/domain/section';
import { makePattern, textureOf } from './ground-textures';
import { action, headBands, ink } from './palette';

interface Scene {
  readonly zones: SectionDocument['zones'];
  readonly materials: SectionDocument['materials'];
  readonly fields: SituationFields | null;
  readonly camera: Camera;
  /** Device pixels per CSS pixel. */
  readonly ratio: number;
}

/** Paints the whole picture. */
export function paintSection(
  context: CanvasRenderingContext2D,
  { zones, materials, fields, camera, ratio }: Scene,
): void {
  context.setTransform(1, 0, 0, 1, 0, 0);
  context.clearRect(0, 0, context.canvas.width, context.canvas.height);
  paintGround(context, { zones, materials }, camera, ratio);
  if (!fields) return;
  context.setTransform(ratio, 0, 0, ratio, 0, 0);
  context.globalCompositeOperation = 'multiply';
  paintBands(context, fields, camera);
  context.globalCompositeOperation = 'source-over';
  context.lineJoin = 'round';
  paintLines(context, fields.seepagePaths, camera, ink, 0.9);
  paintLines(context, fields.equipotentials, camera, action, 1.1);
}

function paintGround(
  context: CanvasRenderingContext2D,
  { zones, materials }: Pick<SectionDocument, 'zones' | 'materials'>,
  camera: Camera,
  ratio: number,
): void {
  for (const zone of zones) {
    const index = materials.findIndex(({ id }) => id === zone.material);
    context.setTransform(ratio, 0, 0, ratio, 0, 0);
    context.beginPath();
    for (const ring of [zone.outline, ...(zone.holes ?? [])]) {
      ring.forEach(([x, y], i) => {
        if (i === 0) context.moveTo(toScreenX(camera, x), toScreenY(camera, y));
        else context.lineTo(toScreenX(camera, x), toScreenY(camera, y));
      });
      context.closePath();
    }
    // the pattern's tile is made in device pixels
    context.setTransform(1, 0, 0, 1, 0, 0);
    context.fillStyle = makePattern(context, textureOf(materials[index]?.hatch, Math.max(0, index)), ratio);
    context.fill('evenodd');
  }
}

const parts6 = [0, 3, 5, 3, 1, 4, 5, 4, 2, 3, 4, 5];
const parts3 = [0, 1, 2];

/** Pixels below which an element is filled as one flat triangle. */
const smallElement = 10;

function spanOf(coordinates: Float64Array, elements: Int32Array, base: number): number {
  const [a, b, c] = [2 * elements[base]!, 2 * elements[base + 1]!, 2 * elements[base + 2]!];
  const xs = [coordinates[a]!, coordinates[b]!, coordinates[c]!];
  const ys = [coordinates[a + 1]!, coordinates[b + 1]!, coordinates[c + 1]!];
  return Math.max(Math.max(...xs) - Math.min(...xs), Math.max(...ys) - Math.min(...ys));
}

/** Fills each part of each element band by band, cutting the triangle at the band's two levels. */
function paintBands(context: CanvasRenderingContext2D, fields: SituationFields, camera: Camera): void {
  const { coordinates, elements, heads, order, headRange } = fields;
  const [low, high] = headRange;
  const bandCount = headBands.length;
  const step = (high - low) / bandCount;
  if (!(step > 0)) return;
  const stride = order === 1 ? 3 : 6;
  const paths = headBands.map(() => new Path2D());
  const triangle = new Float64Array(9);
  for (let base = 0; base < elements.length; base += stride) {
    // an element of a few pixels shows no curve: its corners do
    const isFine = order === 2 && spanOf(coordinates, elements, base) * camera.scale > smallElement;
    const parts = isFine ? parts6 : parts3;
    for (let p = 0; p < parts.length; p += 3) {
      for (let k = 0; k < 3; k++) {
        const node = elements[base + parts[p + k]!]!;
        triangle[3 * k] = toScreenX(camera, coordinates[2 * node]!);
        triangle[3 * k + 1] = toScreenY(camera, coordinates[2 * node + 1]!);
        triangle[3 * k + 2] = (heads[node]! - low) / step;
      }
      addTriangle(triangle, paths);
    }
  }
  paths.forEach((path, band) => {
    context.fillStyle = context.strokeStyle = headBands[band]!;
    context.fill(path);
  });
}

/** Adds a triangle with values in units of bands to the paths of the bands it crosses. */
function addTriangle(triangle: Float64Array, paths: readonly Path2D[]): void {
  const values = [triangle[2]!, triangle[5]!, triangle[8]!];
  const last = paths.length - 1;
  const first = Math.max(0, Math.min(last, Math.floor(Math.min(...values))));
  const end = Math.max(0, Math.min(last, Math.ceil(Math.max(...values)) - 1));
  let polygon = Array.from(triangle);
  for (let band = first; band <= Math.max(first, end); band++) {
    let piece = polygon;
    if (band < end) {
      piece = clip(polygon, band + 1, true);
      polygon = clip(polygon, band + 1, false);
    }
    if (piece.length < 9) continue;
    const path = paths[band]!;
    path.moveTo(piece[0]!, piece[1]!);
    // filling closes each piece by itself; closing them one by one costs the browser more than all the rest
    for (let k = 3; k < piece.length; k += 3) path.lineTo(piece[k]!, piece[k + 1]!);
  }
}

/** The part of a convex polygon (x, y, value) below or above a level. */
function clip(polygon: readonly number[], level: number, keepsBelow: boolean): number[] {
  const out: number[] = [];
  for (let k = 0; k < polygon.length; k += 3) {
    const n = (k + 3) % polygon.length;
    const [x0, y0, v0] = [polygon[k]!, polygon[k + 1]!, polygon[k + 2]!];
    const [x1, y1, v1] = [polygon[n]!, polygon[n + 1]!, polygon[n + 2]!];
    const isIn = keepsBelow ? v0 <= level : v0 >= level;
    if (isIn) out.push(x0, y0, v0);
    if ((v0 - level) * (v1 - level) < 0) {
      const t = (level - v0) / (v1 - v0);
      out.push(x0 + t * (x1 - x0), y0 + t * (y1 - y0), level);
    }
  }
  return out;
}

function paintLines(
  context: CanvasRenderingContext2D,
  lines: Lines,
  camera: Camera,
  color: string,
  width: number,
): void {
  context.beginPath();
  for (let line = 0; line < lines.values.length; line++) {
    for (let k = lines.offsets[line]!; k < lines.offsets[line + 1]!; k++) {
      const x = toScreenX(camera, lines.points[2 * k]!);
      const y = toScreenY(camera, lines.points[2 * k + 1]!);
      if (k === lines.offsets[line]) context.moveTo(x, y);
      else context.lineTo(x, y);
    }
  }
  context.strokeStyle = color;
  context.lineWidth = width;
  context.stroke();
}
