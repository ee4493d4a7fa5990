// From a section's geometry to a graded conforming mesh.
import type { SectionGeometry } from '../problem';
import type { Ground } from './ground';
import { prepareGround } from './ground';
import { collectLines } from './lines';
import type { Mesh } from './mesh';
import type { MeshOptions, MeshOutcome } from './outcome';
import { findMinAngle } from './quality';
import { remarkOnGround, remarkOnPieces } from './remarks';
import { refineGround } from './refine';
import { smoothMesh } from './smooth';
import type { SizeSource } from './size-field';
import { FarField } from './far-field';
import type { SizeSources } from './size-sources';
import { listSizeSources } from './size-sources';
import { buildTopology } from './topology';

export type { MeshOptions, MeshOutcome } from './outcome';

/** Growth of the element size per metre of distance at size factor 1; it shrinks with the sizes, so that halving quarters. */
const slope = 0.4;
/** Largest elements near disturbances and far from them, relative to the ground's mean thickness. */
const nearRatio = 1 / 3;
const farRatio = 0.8;
const maxAttempts = 10;
/** The curve order holds no more. */
const hardLimit = 8_000_000;

/**
 * Meshes a section: arranges its lines, triangulates, refines towards singular points, splits nodes along barriers.
 *
 * @param geometry - Regions, barriers, drains, edges and bases, metres.
 * @param options - Element order, density, limit.
 * @returns The mesh with remarks, or the findings that forbid one. Never throws, whatever the geometry.
 */
export function buildMesh(geometry: SectionGeometry, options: MeshOptions): MeshOutcome {
  const first = prepareGround(geometry);
  if (!first.ground) return { status: 'refused', findings: first.findings };
  const extent = measureGround(first.ground);
  const sources = listSizeSources(first.ground, farRatio * extent.thickness);
  const remarks = remarkOnGround(first.ground);
  let ground: Ground | null = first.ground;
  let factor = options.sizeFactor > 0 ? Math.min(options.sizeFactor, 1e3) : 1;
  const maxTriangles = options.maxElements >= 1 ? Math.min(options.maxElements, hardLimit) : 1;
  for (let attempt = 0; attempt < maxAttempts && ground; attempt++) {
    // Last, thin places keep their narrow triangles: better a poor mesh with a remark than none.
    const floor = attempt < 3 ? ground.snap : 2 ** (attempt - 4) * Math.sqrt(extent.area / maxTriangles);
    const field = buildField(sources, extent.thickness, { options, factor, floor });
    const refined = refineGround(ground, field, { maxTriangles, floor });
    if (refined.status === 'refined') {
      smoothMesh(ground.mesh, refined.segmentOf, 2);
      const mesh = assembleMesh(ground, options.order);
      const findings = [...remarks, ...remarkOnPieces(mesh, geometry)];
      if (attempt > 0)
        findings.push({ code: 'element-limit', at: [ground.x[0], ground.y[0]], value: factor });
      return { status: 'meshed', mesh, findings };
    }
    const excess = Math.sqrt(refined.estimate / maxTriangles);
    factor *= Math.min(Math.max(1.1 * excess, 1.2), 6);
    ground = prepareGround(geometry).ground; // the refinement has used up the first
  }
  return { status: 'refused', findings: [{ code: 'too-fine', at: geometry.regions[0].outline[0] }] };
}

interface Density {
  readonly options: MeshOptions;
  readonly factor: number;
  readonly floor: number;
}

function buildField(
  { corners, thin, forced }: SizeSources,
  thickness: number,
  { options, factor, floor }: Density,
): FarField {
  const clip = ({ x, y, size }: SizeSource): SizeSource => ({ x, y, size: Math.max(size, floor) });
  const scaled = [...corners, ...thin].map(({ x, y, size }) => clip({ x, y, size: size * factor }));
  const asked = [...forced, ...(options.refineAt ?? [])]
    .filter(({ x, y }) => Number.isFinite(x) && Number.isFinite(y))
    .map(clip);
  return new FarField([...scaled, ...asked], corners, slope * Math.min(factor, 1.5), {
    near: nearRatio * thickness * factor,
    far: farRatio * thickness * factor,
    reach: thickness,
  });
}

// Area, metres squared, and mean thickness across the longer extent, metres.
function measureGround({ mesh }: Ground): { area: number; thickness: number } {
  let area = 0;
  let [left, right, bottom, top] = [Infinity, -Infinity, Infinity, -Infinity];
  const { x, y, corners } = mesh;
  for (let t = 0; t < mesh.triangleCount; t++) {
    const [a, b, c] = [corners[3 * t], corners[3 * t + 1], corners[3 * t + 2]];
    area += ((x[b] - x[a]) * (y[c] - y[a]) - (y[b] - y[a]) * (x[c] - x[a])) / 2;
    for (const v of [a, b, c]) {
      left = Math.min(left, x[v]);
      right = Math.max(right, x[v]);
      bottom = Math.min(bottom, y[v]);
      top = Math.max(top, y[v]);
    }
  }
  return { area, thickness: area / Math.max(right - left, top - bottom) };
}

function assembleMesh(ground: Ground, order: 1 | 2): Mesh {
  const topology = buildTopology(ground.mesh, ground, order);
  const { nodeCount, elementCount, coordinates, elements, elementMaterials, neighbours } = topology;
  return {
    order,
    nodeCount,
    elementCount,
    coordinates,
    elements,
    elementMaterials,
    neighbours,
    ...collectLines(topology, ground),
    minAngle: findMinAngle(coordinates, elements, order === 1 ? 3 : 6),
  };
}
