// Whether water can get in and out, and whether the conditions agree where they meet.
import { describeNumber, describeObject, describePoint, placeOf, pointerTo } from './describe';
import { createGround, distanceToPath, pathSegments } from './ground';
import type { Issue } from './issue';
import type { Condition, Point, SectionDocument, Situation } from './section';

/**
 * Reads the level of a condition in a situation.
 *
 * @param condition - With a level, by name or as a number.
 * @param situation - States the levels by name.
 * @returns Metres, or null where the condition has no level or the situation does not state it.
 */
export function levelOf(condition: Condition, situation: Pick<Situation, 'levels'>): number | null {
  if (!('level' in condition)) return null;
  return typeof condition.level === 'number' ? condition.level : (situation.levels[condition.level] ?? null);
}

/**
 * Checks the conditions of a section.
 *
 * @param document - Of the right shape, with sound geometry.
 * @returns The findings.
 */
export function checkConditions(document: SectionDocument): Issue[] {
  return [...checkWays(document), ...checkOverlaps(document), ...checkMeetings(document)];
}

function checkWays(document: SectionDocument): Issue[] {
  const lines = [...document.edges, ...document.drains];
  const open = lines.filter(({ condition }) => ['water', 'head', 'seepage'].includes(condition.type));
  const fluxes = lines.filter(({ condition }) => condition.type === 'flux' && condition.rate !== 0);
  if (open.length === 0) {
    const message =
      'Water has no way in or out: no edge or drain carries a water level, a head or a seepage face, and whatever no edge names is impervious. Add the edges where water stands.';
    return [{ code: 'no-way-in-or-out', severity: 'stop', pointer: '/edges', message }];
  }
  if (open.length + fluxes.length < 2) {
    const message = `Water has only one way, ${lineName(document, open[0]!.id)}: nothing can flow. Add the edge where it enters or leaves.`;
    return [{ code: 'no-way-in-or-out', severity: 'stop', pointer: '/edges', message, subject: open[0]!.id }];
  }
  return [];
}

function lineName(document: SectionDocument, id: string): string {
  const edge = document.edges.findIndex((candidate) => candidate.id === id);
  if (edge >= 0) return describeObject('edges', edge, document.edges[edge]).toLowerCase();
  const drain = document.drains.findIndex((candidate) => candidate.id === id);
  return describeObject('drains', drain, document.drains[drain]).toLowerCase();
}

/** A stretch of outline can carry one condition only. */
function checkOverlaps(document: SectionDocument): Issue[] {
  const { snap } = createGround(document);
  return document.edges.flatMap((edge, index): Issue[] => {
    for (let other = 0; other < index; other++) {
      const place = overlap(edge.path, document.edges[other]!.path, snap);
      if (!place) continue;
      const who = describeObject('edges', index, edge);
      const whom = describeObject('edges', other, document.edges[other]);
      const message = `${who} and ${whom} claim the same stretch of outline near ${describePoint(place)}; let one end where the other begins.`;
      return [
        {
          code: 'edges-overlap',
          severity: 'stop',
          pointer: pointerTo('edges', index, 'path'),
          message,
          at: placeOf(place),
          subject: edge.id,
        },
      ];
    }
    return [];
  });
}

/** A point inside a stretch that two paths share; null where they share at most points. */
function overlap(first: readonly Point[], second: readonly Point[], snap: number): Point | null {
  for (const [a, b] of pathSegments(first)) {
    const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
    if (length <= snap) continue;
    const cuts = [0, 1];
    for (const [x, y] of second) {
      const t = ((x - a[0]) * (b[0] - a[0]) + (y - a[1]) * (b[1] - a[1])) / (length * length);
      if (t > 0 && t < 1) cuts.push(t);
    }
    cuts.sort((u, v) => u - v);
    for (let i = 0; i + 1 < cuts.length; i++) {
      if ((cuts[i + 1]! - cuts[i]!) * length <= 4 * snap) continue;
      const t = (cuts[i]! + cuts[i + 1]!) / 2;
      const place: Point = [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])];
      if (distanceToPath(place[0], place[1], second) <= 2 * snap) return place;
    }
  }
  return null;
}

/** Two different heads in one point would mean an infinite flow between them, unless a barrier parts them there. */
function checkMeetings(document: SectionDocument): Issue[] {
  const { snap } = createGround(document);
  const lines = [
    ...document.edges.map((line, index) => ({ ...line, list: 'edges' as const, index })),
    ...document.drains.map((line, index) => ({ ...line, list: 'drains' as const, index })),
  ].filter(({ condition }) => 'level' in condition);
  const issues: Issue[] = [];
  for (let i = 0; i < lines.length; i++) {
    for (let j = 0; j < i; j++) {
      const place = meeting(lines[i]!.path, lines[j]!.path, snap);
      if (
        !place ||
        document.barriers.some((barrier) => distanceToPath(place[0], place[1], barrier.path) <= 2 * snap)
      )
        continue;
      const clash = document.situations.find((situation) => {
        const a = levelOf(lines[i]!.condition, situation);
        const b = levelOf(lines[j]!.condition, situation);
        return (
          a !== null &&
          b !== null &&
          a !== b &&
          !isDryThere(lines[i]!.condition, a, place) &&
          !isDryThere(lines[j]!.condition, b, place)
        );
      });
      if (!clash) continue;
      const { list, index, condition, id } = lines[i]!;
      const who = describeObject(list, index, lines[i]);
      const whom = describeObject(lines[j]!.list, lines[j]!.index, lines[j]);
      const levels = `${describeNumber(levelOf(condition, clash)!)} m and ${describeNumber(levelOf(lines[j]!.condition, clash)!)} m`;
      const message = `${who} and ${whom} meet at ${describePoint(place)} with different heads (${levels} in “${clash.name ?? clash.id}”) and no barrier between them; part them or put a barrier there.`;
      issues.push({
        code: 'heads-meet',
        severity: 'stop',
        pointer: pointerTo(list, index, 'path'),
        message,
        at: placeOf(place),
        subject: id,
      });
    }
  }
  return issues;
}

/** Above its level a water edge carries no head. */
function isDryThere(condition: Condition, level: number, [, y]: Point): boolean {
  return condition.type === 'water' && y > level;
}

function meeting(first: readonly Point[], second: readonly Point[], snap: number): Point | null {
  return (
    first.find(([x, y]) => distanceToPath(x, y, second) <= 2 * snap) ??
    second.find(([x, y]) => distanceToPath(x, y, first) <= 2 * snap) ??
    null
  );
}
