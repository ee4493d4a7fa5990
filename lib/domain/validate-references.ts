// Ids that must be unique, names that must exist.
import { describeObject, pointerTo } from './describe';
import type { Issue } from './issue';
import type { SectionDocument } from './section';

const lists = [
  'materials',
  'zones',
  'barriers',
  'drains',
  'edges',
  'structures',
  'situations',
  'piezometers',
] as const;

/**
 * Checks that ids are unique and that every name points at something.
 *
 * @param document - Of the right shape.
 * @returns The findings.
 */
export function checkReferences(document: SectionDocument): Issue[] {
  return [
    ...duplicateIds(document),
    ...unknownIds(document),
    ...unknownLevels(document),
    ...oddMaterials(document),
  ];
}

function duplicateIds(document: SectionDocument): Issue[] {
  return lists.flatMap((list) => {
    const seen = new Map<string, number>();
    return document[list].flatMap((object, index): Issue[] => {
      const first = seen.get(object.id);
      seen.set(object.id, first ?? index);
      if (first === undefined) return [];
      const message = `${describeObject(list, index, object)} has the id “${object.id}” of ${list.slice(0, -1)} ${first + 1}; give it one of its own.`;
      return [
        {
          code: 'duplicate-id',
          severity: 'stop',
          pointer: pointerTo(list, index, 'id'),
          message,
          subject: object.id,
        },
      ];
    });
  });
}

function unknownIds(document: SectionDocument): Issue[] {
  const issues: Issue[] = [];
  const unknown = (pointer: string, subject: string, message: string, code: string): void => {
    issues.push({ code, severity: 'stop', pointer, message, subject });
  };
  const materials = new Set(document.materials.map((material) => material.id));
  document.zones.forEach((zone, i) => {
    if (materials.has(zone.material)) return;
    const known = [...materials].map((id) => `“${id}”`).join(', ');
    const who = describeObject('zones', i, zone);
    unknown(
      pointerTo('zones', i, 'material'),
      zone.id,
      `${who} is of material “${zone.material}”, which is not in the list; choose one of ${known}.`,
      'unknown-material',
    );
  });
  const barriers = new Set(document.barriers.map((barrier) => barrier.id));
  document.structures.forEach((structure, i) => {
    structure.barriers?.forEach((id, k) => {
      if (barriers.has(id)) return;
      const who = describeObject('structures', i, structure);
      unknown(
        pointerTo('structures', i, 'barriers', k),
        structure.id,
        `${who} names a barrier “${id}” that is not in the list.`,
        'unknown-barrier',
      );
    });
  });
  const situations = new Set(document.situations.map((situation) => situation.id));
  document.piezometers.forEach((piezometer, i) => {
    for (const id of Object.keys(piezometer.observed ?? {})) {
      if (situations.has(id)) continue;
      const who = describeObject('piezometers', i, piezometer);
      unknown(
        pointerTo('piezometers', i, 'observed', id),
        piezometer.id,
        `${who} was observed in situation “${id}”, which is not in the list.`,
        'unknown-situation',
      );
    }
  });
  return issues;
}

function unknownLevels(document: SectionDocument): Issue[] {
  return (['edges', 'drains'] as const).flatMap((list) =>
    document[list].flatMap((line, index): Issue[] => {
      const { condition } = line;
      if (!('level' in condition) || typeof condition.level === 'number') return [];
      const level = condition.level;
      const without = document.situations.filter((situation) => !Object.hasOwn(situation.levels, level));
      if (without.length === 0) return [];
      const who = describeObject(list, index, line);
      const where = without.map((situation) => `“${situation.name ?? situation.id}”`).join(', ');
      const message = `${who} takes the level “${level}”, which situation ${where} does not state; add it to its levels.`;
      return [
        {
          code: 'unknown-level',
          severity: 'stop',
          pointer: pointerTo(list, index, 'condition', 'level'),
          message,
          subject: line.id,
        },
      ];
    }),
  );
}

function oddMaterials(document: SectionDocument): Issue[] {
  return document.materials.flatMap((material, index): Issue[] => {
    const issues: Issue[] = [];
    const who = describeObject('materials', index, material);
    if (material.kRange && material.kRange.low > material.kRange.high) {
      const message = `${who}: the low end of kRange (${material.kRange.low}) is above its high end (${material.kRange.high}); swap them.`;
      issues.push({
        code: 'range-reversed',
        severity: 'stop',
        pointer: pointerTo('materials', index, 'kRange'),
        message,
        subject: material.id,
      });
    }
    if (material.kMinor > material.kMajor) {
      const message = `${who}: kMinor is larger than kMajor, so the major axis lies across the stated angle. Check that the two were not swapped.`;
      issues.push({
        code: 'axes-swapped',
        severity: 'check',
        pointer: pointerTo('materials', index, 'kMinor'),
        message,
        subject: material.id,
      });
    }
    return issues;
  });
}
