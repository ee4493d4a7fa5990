// The ground as a planar graph: arrangement, painted, without the segments that nothing needs.
import { signedArea } from '../geometry/polygon';
import type { SectionGeometry } from '../problem';
import type { ArrangedLine, Arrangement } from './arrange';
import { arrangeLines, measureSection } from './arrange';
import { classifyTriangles, collectRings, removeOutside } from './classify';
import { findSide, triangulate } from './delaunay';
import type { GeometryFinding, GeometryFindingCode } from './outcome';
import { findSelfCrossings } from './self-crossing';
import type { Triangulation } from './triangulation';

/** What the refinement and the bookkeeping of lines need to know of a section. */
export interface Ground {
  /** Larger extent, metres. */
  readonly size: number;
  readonly snap: number;
  readonly x: readonly number[];
  readonly y: readonly number[];
  /** Ends of each needed segment. */
  readonly starts: readonly number[];
  readonly ends: readonly number[];
  /** Material to the left and right of each segment, walking from start to end; −1 outside. */
  readonly left: readonly number[];
  readonly right: readonly number[];
  /** Barrier on each segment, −1 where none; of several, the least conductive. */
  readonly barrierOn: readonly number[];
  /** Edge on each segment, −1 where none. */
  readonly edgeOn: readonly number[];
  /** Drain on each segment, −1 where none. */
  readonly drainOn: readonly number[];
  /** The input lines as chains of needed segments; regions left out. */
  readonly lines: readonly ArrangedLine[];
  /** Constrained Delaunay triangulation of the ground, materials set, nothing outside. */
  readonly mesh: Triangulation;
}

/** The ground, or why there is none. */
export interface GroundOutcome {
  readonly ground: Ground | null;
  readonly findings: GeometryFinding[];
}

/**
 * Arranges and paints a section.
 *
 * @param geometry - The section, metres.
 * @returns The ground, or null with at least one finding that refuses it.
 */
export function prepareGround(geometry: SectionGeometry): GroundOutcome {
  const refuse = (...findings: GeometryFinding[]): GroundOutcome => ({ ground: null, findings });
  const size = measureSection(geometry);
  const wrong = findUnusable(geometry, size);
  if (wrong.length > 0) return refuse(...wrong);
  const arrangement = arrangeLines(geometry, size);
  const somewhere = geometry.regions[0].outline[0];
  if (!arrangement) return refuse({ code: 'too-fine', at: somewhere });
  const broken = findBrokenRegions(arrangement);
  if (broken.length > 0) return refuse(...broken);
  const materials = geometry.regions.map(({ material }) => material);
  const regions = collectRings(arrangement, materials);
  const coarse = triangulate(arrangement);
  if (!coarse) return refuse({ code: 'too-fine', at: somewhere });
  classifyTriangles(coarse, regions, arrangement.x.length);
  const sides = readSides(coarse, arrangement);
  const misplaced = findMisplaced(arrangement, sides);
  if (misplaced.length > 0) return refuse(...misplaced);
  const graph = keepNeeded(arrangement, sides, geometry);
  if (graph.starts.length === 0) return refuse({ code: 'region-empty', at: somewhere });
  const mesh = graph.starts.length === arrangement.starts.length ? coarse : triangulate(graph);
  if (!mesh) return refuse({ code: 'too-fine', at: somewhere });
  if (mesh !== coarse) classifyTriangles(mesh, regions, graph.x.length);
  removeOutside(mesh);
  if (mesh.triangleCount === 0) return refuse({ code: 'region-empty', at: somewhere });
  return { ground: { ...graph, size, snap: arrangement.snap, mesh }, findings: [] };
}

// Coordinates that are no numbers, no regions, no extent.
function findUnusable(geometry: SectionGeometry, size: number): GeometryFinding[] {
  if (geometry.regions.length === 0) return [{ code: 'region-empty', at: [0, 0] }];
  const paths = [
    ...geometry.regions.flatMap(({ outline, holes }) => [outline, ...holes]),
    ...geometry.barriers.map(({ path }) => path),
    ...geometry.drains,
    ...geometry.edges,
    ...geometry.bases,
  ];
  const sound = paths.every((path) => path.every(([x, y]) => Math.abs(x) < 1e12 && Math.abs(y) < 1e12));
  if (!sound) return [{ code: 'too-fine', at: [0, 0] }];
  const empty = geometry.regions.findIndex(({ outline }) => outline.length < 3);
  if (empty >= 0 || !(size > 1e-12)) {
    const index = Math.max(empty, 0);
    const at = geometry.regions[index].outline[0] ?? [0, 0];
    return [{ code: 'region-empty', at, line: { kind: 'region', index } }];
  }
  return [];
}

function findBrokenRegions({ x, y, lines, snap }: Arrangement): GeometryFinding[] {
  const findings: GeometryFinding[] = [];
  for (const { kind, index, ring, vertices } of lines) {
    if (kind !== 'region') continue;
    const points = vertices.slice(0, -1).map((v) => [x[v], y[v]] as const);
    const line = { kind, index };
    for (const at of findSelfCrossings(vertices, x, y))
      findings.push({ code: 'region-crosses-itself', at, line });
    const area = Math.abs(signedArea(points));
    if (ring === 0 && findings.length === 0 && !(area > snap * snap)) {
      findings.push({ code: 'region-empty', at: [x[vertices[0]], y[vertices[0]]], line });
    }
  }
  return findings;
}

interface Sides {
  readonly left: Int32Array;
  readonly right: Int32Array;
}

// Material on the two sides of each segment.
function readSides(mesh: Triangulation, { starts, ends }: Arrangement): Sides {
  const left = new Int32Array(starts.length);
  const right = new Int32Array(starts.length);
  for (let s = 0; s < starts.length; s++) {
    left[s] = mesh.materials[(findSide(mesh, starts[s], ends[s]) / 3) | 0];
    right[s] = mesh.materials[(findSide(mesh, ends[s], starts[s]) / 3) | 0];
  }
  return { left, right };
}

const misplacedCodes: Record<string, GeometryFindingCode> = {
  edge: 'edge-off-outline',
  barrier: 'barrier-outside',
  drain: 'drain-outside',
  base: 'base-off-outline',
};

// Lines with a part where it cannot be; one finding a line, at the middle of its first such part.
function findMisplaced(
  { x, y, starts, ends, lines }: Arrangement,
  { left, right }: Sides,
): GeometryFinding[] {
  const findings: GeometryFinding[] = [];
  for (const { kind, index, vertices, segments } of lines) {
    if (kind === 'region') continue;
    const code = misplacedCodes[kind];
    const line = { kind, index };
    const bad = segments.find((s) => {
      const grounds = (left[s] >= 0 ? 1 : 0) + (right[s] >= 0 ? 1 : 0);
      return kind === 'edge' ? grounds !== 1 : grounds === 0;
    });
    if (bad !== undefined) {
      const at = [(x[starts[bad]] + x[ends[bad]]) / 2, (y[starts[bad]] + y[ends[bad]]) / 2] as const;
      findings.push({ code, at, line });
    } else if (segments.length === 0 && kind === 'edge') {
      const v = vertices[0];
      findings.push({ code, at: v === undefined ? [0, 0] : [x[v], y[v]], line });
    }
  }
  return findings;
}

type Graph = Omit<Ground, 'size' | 'snap' | 'mesh'>;

// Drops segments inside one material that carry no line, and vertices that no segment uses.
function keepNeeded(arrangement: Arrangement, { left, right }: Sides, geometry: SectionGeometry): Graph {
  const count = arrangement.starts.length;
  const on = { barrier: new Array<number>(count).fill(-1), edge: [], drain: [] } as Record<string, number[]>;
  on.edge = new Array<number>(count).fill(-1);
  on.drain = new Array<number>(count).fill(-1);
  const based = new Uint8Array(count);
  for (const { kind, index, segments } of arrangement.lines) {
    for (const s of segments) {
      if (kind === 'base') based[s] = 1;
      if (kind === 'region' || kind === 'base') continue;
      const other = on[kind][s];
      const tighter =
        kind === 'barrier' &&
        other >= 0 &&
        geometry.barriers[index].conductance < geometry.barriers[other].conductance;
      if (other < 0 || tighter) on[kind][s] = index;
    }
  }
  const isNeeded = (s: number): boolean =>
    left[s] !== right[s] || (left[s] >= 0 && (on.barrier[s] >= 0 || on.drain[s] >= 0 || based[s] === 1));
  const kept: number[] = [];
  const segmentTo = new Int32Array(count).fill(-1);
  for (let s = 0; s < count; s++) if (isNeeded(s)) segmentTo[s] = kept.push(s) - 1;
  const vertexTo = new Int32Array(arrangement.x.length).fill(-1);
  const whole = kept.length === count;
  const vertices: number[] = [];
  const moveVertex = (v: number): number => {
    if (vertexTo[v] < 0) vertexTo[v] = vertices.push(v) - 1;
    return vertexTo[v];
  };
  if (whole) for (let v = 0; v < vertexTo.length; v++) moveVertex(v); // keeps the coarse triangulation's numbers
  const starts = kept.map((s) => moveVertex(arrangement.starts[s]));
  const ends = kept.map((s) => moveVertex(arrangement.ends[s]));
  return {
    x: vertices.map((v) => arrangement.x[v]),
    y: vertices.map((v) => arrangement.y[v]),
    starts,
    ends,
    left: kept.map((s) => left[s]),
    right: kept.map((s) => right[s]),
    barrierOn: kept.map((s) => on.barrier[s]),
    edgeOn: kept.map((s) => on.edge[s]),
    drainOn: kept.map((s) => on.drain[s]),
    lines: arrangement.lines
      .filter(({ kind }) => kind !== 'region')
      .map((line) => ({
        ...line,
        vertices: line.vertices.map((v) => vertexTo[v]),
        segments: line.segments.map((s) => segmentTo[s]),
      })),
  };
}
