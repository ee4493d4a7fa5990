// What lies where it should: outlines, barriers, drains, edges, bases, piezometers.
import { describeObject, describePoint, placeOf, pointerTo } from './describe';
import {
  createGround,
  distanceToSegment,
  type Ground,
  isInRing,
  pathSegments,
  ringArea,
  ringSegments,
} from './ground';
import type { Issue } from './issue';
import type { Point, SectionDocument } from './section';

/**
 * Checks the geometry of a section.
 *
 * @param document - Of the right shape.
 * @returns The findings. Places within 1e-6 of the section's size count as the same.
 */
export function checkGeometry(document: SectionDocument): Issue[] {
  const ground = createGround(document);
  const rings = checkRings(document, ground);
  // what lies on the ground can only be judged where the ground is sound
  if (rings.some((issue) => issue.severity === 'stop')) return rings;
  return [
    ...rings,
    ...checkAxis(document, ground),
    ...checkLines(document, ground),
    ...checkPoints(document, ground),
  ];
}

function checkRings(document: SectionDocument, ground: Ground): Issue[] {
  return document.zones.flatMap((zone, index): Issue[] => {
    const who = describeObject('zones', index, zone);
    const at = (pointer: string, ring: readonly Point[], what: string): Issue[] => {
      const fault = ringFault(ring, ground.snap);
      if (!fault) return [];
      return [
        {
          code: fault.code,
          severity: 'stop',
          pointer,
          message: `${who}: ${what} ${fault.words}`,
          at: placeOf(fault.at),
          subject: zone.id,
        },
      ];
    };
    const issues = at(pointerTo('zones', index, 'outline'), zone.outline, 'the outline');
    zone.holes?.forEach((hole, k) => {
      const pointer = pointerTo('zones', index, 'holes', k);
      issues.push(...at(pointer, hole, `hole ${k + 1}`));
      const outside = hole.find(
        ([x, y]) =>
          !isInRing(zone.outline, x, y) &&
          !ringSegments(zone.outline).some(([a, b]) => distanceToSegment(x, y, a, b) <= ground.snap),
      );
      if (outside) {
        const message = `${who}: hole ${k + 1} leaves the outline at ${describePoint(outside)}; a hole must lie inside.`;
        issues.push({
          code: 'hole-outside',
          severity: 'stop',
          pointer,
          message,
          at: placeOf(outside),
          subject: zone.id,
        });
      }
    });
    return issues;
  });
}

interface RingFault {
  readonly code: string;
  readonly words: string;
  readonly at: Point;
}

function ringFault(ring: readonly Point[], snap: number): RingFault | null {
  const segments = ringSegments(ring);
  for (let i = 0; i < segments.length; i++) {
    for (let j = i + 1; j < segments.length; j++) {
      const place = crossing(
        segments[i]!,
        segments[j]!,
        j === i + 1 || (i === 0 && j === segments.length - 1),
        snap,
      );
      if (place) {
        const words = `crosses itself at ${describePoint(place)}; reorder or move its points.`;
        return { code: 'outline-crosses-itself', words, at: place };
      }
    }
  }
  if (Math.abs(ringArea(ring)) <= snap * perimeter(ring)) {
    return {
      code: 'outline-empty',
      words: `encloses no area; it needs at least three points that are not in line.`,
      at: ring[0]!,
    };
  }
  return null;
}

function perimeter(ring: readonly Point[]): number {
  return ringSegments(ring).reduce((sum, [a, b]) => sum + Math.hypot(b[0] - a[0], b[1] - a[1]), 0);
}

/** Twice the signed area of a triangle, positive anticlockwise. */
function orient(p: Point, q: Point, r: Point): number {
  return (q[0] - p[0]) * (r[1] - p[1]) - (r[0] - p[0]) * (q[1] - p[1]);
}

/** Where two segments of a ring meet when they must not; neighbours may share their end but not turn back on each other. */
function crossing(
  [a, b]: [Point, Point],
  [c, d]: [Point, Point],
  isNeighbour: boolean,
  snap: number,
): Point | null {
  if (isNeighbour) return null;
  const o1 = orient(a, b, c);
  const o2 = orient(a, b, d);
  const o3 = orient(c, d, a);
  const o4 = orient(c, d, b);
  if (o1 > 0 !== o2 > 0 && o3 > 0 !== o4 > 0 && o1 !== o2 && o3 !== o4 && o1 * o2 < 0 && o3 * o4 < 0) {
    const t = o3 / (o3 - o4);
    const place: Point = [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])];
    // meeting within the snap distance of an end is touching, which the arrangement closes
    const isTouch = [a, b, c, d].some(([x, y]) => Math.hypot(x - place[0], y - place[1]) <= 2 * snap);
    return isTouch ? null : place;
  }
  return null;
}

function checkAxis(document: SectionDocument, ground: Ground): Issue[] {
  if (document.geometry !== 'axisymmetric') return [];
  return document.zones.flatMap((zone, index): Issue[] => {
    const left = zone.outline.find(([x]) => x < -ground.snap);
    if (!left) return [];
    const message = `${describeObject('zones', index, zone)} reaches x = ${describePoint(left)}; in an axisymmetric section x is the radius and must not be negative.`;
    return [
      {
        code: 'negative-radius',
        severity: 'stop',
        pointer: pointerTo('zones', index, 'outline'),
        message,
        at: placeOf(left),
        subject: zone.id,
      },
    ];
  });
}

interface LineRule {
  readonly list: 'barriers' | 'drains' | 'edges' | 'structures';
  readonly field: 'path' | 'base';
  readonly code: string;
  /** Whether a piece with this ground on its sides is in order. */
  readonly isRight: (left: boolean, right: boolean) => boolean;
  readonly words: string;
}

const lineRules: readonly LineRule[] = [
  {
    list: 'barriers',
    field: 'path',
    code: 'barrier-outside',
    isRight: (left, right) => left || right,
    words:
      'lies outside the ground; a barrier runs inside the ground or along its outline. Shorten it or extend the zones.',
  },
  {
    list: 'drains',
    field: 'path',
    code: 'drain-outside',
    isRight: (left, right) => left || right,
    words: 'lies outside the ground; move it into the ground.',
  },
  {
    list: 'edges',
    field: 'path',
    code: 'edge-off-outline',
    isRight: (left, right) => left !== right,
    words:
      'is not on the outline of the ground; an edge runs along the outline, with ground on one side and none on the other. Move its points onto the outline.',
  },
  {
    list: 'structures',
    field: 'base',
    code: 'base-off-ground',
    isRight: (left, right) => left || right,
    words: 'does not touch the ground; a base runs along the outline of the ground.',
  },
];

function checkLines(document: SectionDocument, ground: Ground): Issue[] {
  return lineRules.flatMap(({ list, field, code, isRight, words }) =>
    document[list].flatMap((object, index): Issue[] => {
      const path = field === 'base' ? (object as { base: Point[] }).base : (object as { path: Point[] }).path;
      const who = describeObject(list, index, object);
      const pointer = pointerTo(list, index, field);
      const pieces = pathSegments(path).flatMap(([a, b]) => ground.along(a, b));
      if (pieces.length === 0) {
        const message = `${who}: all points of its ${field} are the same; give it a length.`;
        return [
          {
            code: 'line-without-length',
            severity: 'stop',
            pointer,
            message,
            at: placeOf(path[0]!),
            subject: object.id,
          },
        ];
      }
      const wrong = pieces.find((piece) => !isRight(piece.left, piece.right));
      if (!wrong) return [];
      const message = `${who} at ${describePoint(wrong.middle)} ${words}`;
      return [{ code, severity: 'stop', pointer, message, at: placeOf(wrong.middle), subject: object.id }];
    }),
  );
}

function checkPoints(document: SectionDocument, ground: Ground): Issue[] {
  return document.piezometers.flatMap((piezometer, index): Issue[] => {
    const [x, y] = piezometer.at;
    if (ground.isInside(x, y)) return [];
    const message = `${describeObject('piezometers', index, piezometer)} at ${describePoint(piezometer.at)} lies outside the ground; move its tip into a zone.`;
    return [
      {
        code: 'piezometer-outside',
        severity: 'stop',
        pointer: pointerTo('piezometers', index, 'at'),
        message,
        at: placeOf(piezometer.at),
        subject: piezometer.id,
      },
    ];
  });
}
