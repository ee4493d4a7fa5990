// Element sides along the input lines.
import type { ArrangedLine } from './arrange';
import type { Ground } from './ground';
import type { BarrierSides, LineSides, Mesh } from './mesh';
import type { LineKind } from './outcome';
import type { Topology } from './topology';

/** Sides on one segment, in order from its start: those to its left and those to its right, with their extent. */
interface SegmentSides {
  /** 3 e + s */
  readonly left: number[];
  readonly right: number[];
}

/** One side of a line under construction. */
interface Piece {
  readonly side: number;
  readonly direction: 1 | -1;
  readonly from: number;
  readonly to: number;
}

/**
 * Finds the element sides along every input line and the outline.
 *
 * Edges, bases on the outline and drains on the outline: the one side that is ground. Drains inside the ground: the
 * side to the left of the path; but both, left before right, where a barrier runs along the drain, since the nodes
 * differ there. Bases inside the ground: both, left before right. Barriers: both faces of each inner part, the
 * faces' sides in the same order; a part that two barriers share belongs to the less conductive one.
 *
 * @param topology - Elements with the segments on their sides.
 * @param ground - The lines as chains of segments.
 * @returns The line fields of the mesh.
 */
export function collectLines(
  topology: Topology,
  ground: Ground,
): Pick<Mesh, 'edges' | 'barriers' | 'drains' | 'bases' | 'outline'> {
  const sides = listSegmentSides(topology, ground);
  const pieces = new PieceFinder(topology, ground, sides);
  const ofKind = (kind: LineKind): ArrangedLine[] => ground.lines.filter((line) => line.kind === kind);
  const doubled = (s: number): boolean => ground.left[s] >= 0 && ground.right[s] >= 0;
  const single = (line: ArrangedLine): LineSides => packLine(pieces.along(line, () => false));
  return {
    edges: ofKind('edge').map(single),
    drains: ofKind('drain').map((line) =>
      packLine(pieces.along(line, (s) => doubled(s) && ground.barrierOn[s] >= 0)),
    ),
    bases: ofKind('base').map((line) => packLine(pieces.along(line, doubled))),
    barriers: ofKind('barrier').map((line) => pieces.faces(line)),
    outline: packLine(traceOutline(topology, ground)),
  };
}

function listSegmentSides(topology: Topology, ground: Ground): SegmentSides[] {
  const { elementCount, sideSegments, cornerVertices } = topology;
  const lists: SegmentSides[] = ground.starts.map(() => ({ left: [], right: [] }));
  const { x, y } = ground.mesh;
  const places = new Map<number, number>();
  for (let side = 0; side < 3 * elementCount; side++) {
    const s = sideSegments[side];
    if (s < 0) continue;
    const [a, b] = [ground.starts[s], ground.ends[s]];
    const v = cornerVertices[side];
    const w = cornerVertices[side % 3 === 2 ? side - 2 : side + 1];
    const along = (n: number): number => (x[n] - x[a]) * (x[b] - x[a]) + (y[n] - y[a]) * (y[b] - y[a]);
    places.set(side, along(v) + along(w));
    (along(w) > along(v) ? lists[s].left : lists[s].right).push(side);
  }
  const byPlace = (p: number, q: number): number => places.get(p)! - places.get(q)!;
  for (const { left, right } of lists) {
    left.sort(byPlace);
    right.sort(byPlace);
  }
  return lists;
}

class PieceFinder {
  readonly #topology: Topology;
  readonly #ground: Ground;
  readonly #sides: readonly SegmentSides[];

  constructor(topology: Topology, ground: Ground, sides: readonly SegmentSides[]) {
    this.#topology = topology;
    this.#ground = ground;
    this.#sides = sides;
  }

  // Pieces along a line: left of the path where ground, else right; both where asked.
  along(line: ArrangedLine, both: (segment: number) => boolean): Piece[] {
    return line.segments.flatMap((s, i) => {
      if (s < 0) return [];
      const left = this.#face(line, i, 'left');
      if (left.length > 0 && !both(s)) return left;
      const right = this.#face(line, i, 'right');
      return left.length > 0 ? left.flatMap((piece, k) => [piece, right[k]]) : right;
    });
  }

  // Both faces of a barrier's inner parts; a part walked twice counts once.
  faces(line: ArrangedLine): BarrierSides {
    const { left, right, barrierOn } = this.#ground;
    const seen = new Set<number>();
    const inner = line.segments.map((s) => {
      const own = s >= 0 && left[s] >= 0 && right[s] >= 0 && barrierOn[s] === line.index && !seen.has(s);
      seen.add(s);
      return own;
    });
    const face = (which: 'left' | 'right'): LineSides =>
      packLine(inner.flatMap((own, i) => (own ? this.#face(line, i, which) : [])));
    return { left: face('left'), right: face('right') };
  }

  // Sides of the line's i-th segment that lie to one hand of the path.
  #face(line: ArrangedLine, i: number, hand: 'left' | 'right'): Piece[] {
    const { starts, ends, mesh } = this.#ground;
    const { cornerVertices } = this.#topology;
    const s = line.segments[i];
    const forward = line.vertices[i] === starts[s];
    const list = this.#sides[s][forward === (hand === 'left') ? 'left' : 'right'];
    const [a, b] = [starts[s], ends[s]];
    const [dx, dy] = [mesh.x[b] - mesh.x[a], mesh.y[b] - mesh.y[a]];
    const span = line.distances[i + 1] - line.distances[i];
    const distanceAt = (v: number): number => {
      if (v === line.vertices[i]) return line.distances[i];
      if (v === line.vertices[i + 1]) return line.distances[i + 1];
      const t = ((mesh.x[v] - mesh.x[a]) * dx + (mesh.y[v] - mesh.y[a]) * dy) / (dx * dx + dy * dy);
      return line.distances[i] + (forward ? t : 1 - t) * span;
    };
    const pieces = list.map((side): Piece => {
      const v = cornerVertices[side];
      const w = cornerVertices[side % 3 === 2 ? side - 2 : side + 1];
      return hand === 'left'
        ? { side, direction: 1, from: distanceAt(v), to: distanceAt(w) }
        : { side, direction: -1, from: distanceAt(w), to: distanceAt(v) };
    });
    return forward ? pieces : pieces.reverse();
  }
}

function packLine(pieces: readonly Piece[]): LineSides {
  return {
    elements: Int32Array.from(pieces, ({ side }) => (side / 3) | 0),
    sides: Int32Array.from(pieces, ({ side }) => side % 3),
    directions: Int8Array.from(pieces, ({ direction }) => direction),
    distances: Float64Array.from(pieces.flatMap(({ from, to }) => [from, to])),
  };
}

// The outline walked with the ground to the left, ring after ring; distances run on from ring to ring.
function traceOutline(topology: Topology, ground: Ground): Piece[] {
  const { elementCount, cornerVertices, sideSegments } = topology;
  const { x, y } = ground.mesh;
  const startingAt = new Map<number, number[]>();
  for (let side = 0; side < 3 * elementCount; side++) {
    const s = sideSegments[side];
    if (s < 0 || (ground.left[s] >= 0 && ground.right[s] >= 0)) continue;
    const list = startingAt.get(cornerVertices[side]);
    if (list) list.push(side);
    else startingAt.set(cornerVertices[side], [side]);
  }
  const pieces: Piece[] = [];
  let distance = 0;
  for (const first of startingAt.values()) {
    for (let side = first.shift(); side !== undefined;) {
      const v = cornerVertices[side];
      const w = cornerVertices[side % 3 === 2 ? side - 2 : side + 1];
      const to = distance + Math.hypot(x[w] - x[v], y[w] - y[v]);
      pieces.push({ side, direction: 1, from: distance, to });
      distance = to;
      side = startingAt.get(w)?.shift() ?? first.shift();
    }
  }
  return pieces;
}
