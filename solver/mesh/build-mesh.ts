// From a section's geometry to a graded conforming mesh.
import type { SectionGeometry } from '../problem';
import type { Ground } from './ground';
import { prepareGround } from './ground';
import { collectLines } from './lines';
import type { Mesh } from './mesh';
import type { GeometryFinding, MeshOptions, MeshOutcome } from './outcome';
import { findMinAngle } from './quality';
import { refineGround } from './refine';
import { SizeField } from './size-field';
import { listSizeSources } from './size-sources';
import { buildTopology } from './topology';

export type { GeometryFinding, GeometryFindingCode, LineKind, MeshOptions, MeshOutcome } from './outcome';

/** Growth of the element size per metre of distance at size factor 1; it shrinks with the sizes, so that halving quarters. */
const slope = 0.4;
/** Largest element relative to the ground's mean thickness. */
const ceilingRatio = 1 / 3;

/**
 * Meshes a section: arranges its lines, triangulates, refines towards singular points, splits nodes along barriers.
 *
 * @param geometry - Regions, barriers, drains, edges and bases, metres.
 * @param options - Element order, density, limit.
 * @returns The mesh with remarks, or the findings that forbid one. Never throws, whatever the geometry.
 */
export function buildMesh(geometry: SectionGeometry, options: MeshOptions): MeshOutcome {
  let factor = options.sizeFactor;
  for (let attempt = 0; attempt < 12; attempt++) {
    const { ground, findings } = prepareGround(geometry);
    if (!ground) return { status: 'refused', findings };
    const field = buildField(ground, options, factor);
    const floor = attempt < 4 ? ground.snap : Math.sqrt(measureGround(ground).area / options.maxElements);
    const refined = refineGround(ground, field, { maxTriangles: options.maxElements, floor });
    if (!refined) {
      factor *= 1.5;
      continue;
    }
    const limited: GeometryFinding = { code: 'element-limit', at: [ground.x[0], ground.y[0]], value: factor };
    const remarks = factor === options.sizeFactor ? findings : [...findings, limited];
    return { status: 'meshed', mesh: assembleMesh(ground, options.order), findings: remarks };
  }
  return { status: 'refused', findings: [{ code: 'too-fine', at: geometry.regions[0].outline[0] }] };
}

function buildField(ground: Ground, { refineAt = [] }: MeshOptions, factor: number): SizeField {
  const { area, width, height } = measureGround(ground);
  const ceiling = ceilingRatio * Math.min(area / width, area / height);
  const sources = listSizeSources(ground, ceiling).map(({ x, y, size }) => ({ x, y, size: size * factor }));
  return new SizeField([...sources, ...refineAt], slope * Math.min(factor, 1.5), ceiling * factor);
}

function measureGround({ mesh }: Ground): { area: number; width: number; height: number } {
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
  return { area, width: right - left, height: top - bottom };
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
