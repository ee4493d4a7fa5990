// Document → solver problem: ids to indices, degrees to radians, levels to heads.
import { describeNumber, describeObject, describePoint, pointerTo } from '@/lib/domain/describe';
import type { Issue } from '@/lib/domain/issue';
import type { Problem } from '@/lib/domain/problem';
import type { Condition as DocumentCondition, Point, SectionDocument, Situation } from '@/lib/domain/section';
import { levelOf } from '@/lib/domain/validate-conditions';
import { errorRow } from '@/lib/errors';
import type { Condition, Medium, SectionGeometry, SituationConditions } from '@/solver';
import { problemOf } from './problems';

/** Takes the geometry of a section as the mesh needs it. */
export function buildGeometry(document: SectionDocument): SectionGeometry {
  const materialIndex = new Map(document.materials.map((material, index) => [material.id, index]));
  return {
    kind: document.geometry,
    regions: document.zones.map((zone) => ({
      outline: zone.outline,
      holes: zone.holes ?? [],
      material: materialIndex.get(zone.material)!,
    })),
    barriers: document.barriers.map(({ path, conductance }) => ({ path, conductance })),
    drains: document.drains.map(({ path }) => path),
    edges: document.edges.map(({ path }) => path),
    bases: document.structures.map(({ base }) => base),
  };
}

/** Takes the permeabilities of a section. */
export function buildMedium(document: SectionDocument): Medium {
  return {
    conductivities: document.materials.map(({ kMajor, kMinor, angle }) => ({
      kMajor,
      kMinor,
      angle: (angle * Math.PI) / 180,
    })),
    conductances: document.barriers.map(({ conductance }) => conductance),
  };
}

/** The conditions of one situation, or why it cannot be solved as confined flow. */
export type ConditionsOutcome =
  | { readonly status: 'confined'; readonly conditions: SituationConditions }
  | { readonly status: 'refused'; readonly problem: Problem };

/** Turns the document's conditions into heads and fluxes for one situation. */
export function buildConditions(document: SectionDocument, situation: Situation): ConditionsOutcome {
  const dry: Issue[] = [];
  const convert = (list: 'edges' | 'drains'): Condition[] =>
    document[list].map((line, index) => {
      const where = {
        pointer: pointerTo(list, index, 'condition'),
        subject: line.id,
        who: describeObject(list, index, line),
      };
      const words = dryness(line.condition, line.path, situation);
      if (words)
        dry.push({
          code: 'needs-free-surface',
          severity: 'stop',
          pointer: where.pointer,
          message: `${where.who} ${words}`,
          subject: where.subject,
        });
      return toSolver(line.condition, situation);
    });
  const conditions = { edges: convert('edges'), drains: convert('drains') };
  if (dry.length === 0) return { status: 'confined', conditions };
  const { sentence } = errorRow('needs-free-surface');
  const errors = dry.map(({ pointer, message }) => ({ pointer, detail: message }));
  const named = `In situation “${situation.name ?? situation.id}”: ${dry[0]!.message}`;
  return { status: 'refused', problem: problemOf('needs-free-surface', `${sentence} ${named}`, errors) };
}

function toSolver(condition: DocumentCondition, situation: Situation): Condition {
  if (condition.type === 'flux') return { type: 'flux', rate: condition.rate };
  const level = levelOf(condition, situation);
  return level === null ? { type: 'impervious' } : { type: 'head', head: level };
}

/** Why ground along a line can be unsaturated; null where it stays under water. */
function dryness(condition: DocumentCondition, path: readonly Point[], situation: Situation): string | null {
  if (condition.type === 'seepage') return 'is a seepage face.';
  const level = levelOf(condition, situation);
  if (level === null) return null;
  const top = path.reduce((highest, point) => (point[1] > highest[1] ? point : highest));
  // levels and elevations are typed in decimals: what differs by less is how a decimal is stored
  if (level >= top[1] - 1e-9 * Math.max(1, Math.abs(top[1]))) return null;
  const above = `rises to ${describePoint(top)}, above its level of ${describeNumber(level)} m`;
  return condition.type === 'water'
    ? `${above}, so part of it is dry.`
    : `${above}, so the ground there is not under pressure.`;
}
