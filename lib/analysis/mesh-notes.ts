// What the mesher finds, in words.
import { describeNumber, describeObject, describePoint, pointerTo } from '@/lib/domain/describe';
import type { Issue } from '@/lib/domain/issue';
import type { SectionDocument } from '@/lib/domain/section';
import type { GeometryFinding, GeometryFindingCode } from '@/solver';

const lists = {
  region: 'zones',
  barrier: 'barriers',
  drain: 'drains',
  edge: 'edges',
  base: 'structures',
} as const;
const fields = { region: 'outline', barrier: 'path', drain: 'path', edge: 'path', base: 'base' } as const;

interface Words {
  readonly severity: Issue['severity'];
  readonly say: (who: string, where: string, value: number) => string;
}

const words: Record<GeometryFindingCode, Words> = {
  'region-crosses-itself': {
    severity: 'stop',
    say: (who, where) => `${who}: the outline crosses itself at ${where}; reorder or move its points.`,
  },
  'region-empty': {
    severity: 'stop',
    say: (who, where) => `${who}: the outline at ${where} encloses no area.`,
  },
  'edge-off-outline': {
    severity: 'stop',
    say: (who, where) =>
      `${who} at ${where} is not on the outline of the ground; move its points onto the outline.`,
  },
  'barrier-outside': {
    severity: 'stop',
    say: (who, where) => `${who} at ${where} lies outside the ground; shorten it or extend the zones.`,
  },
  'drain-outside': {
    severity: 'stop',
    say: (who, where) => `${who} at ${where} lies outside the ground; move it into the ground.`,
  },
  'base-off-outline': {
    severity: 'stop',
    say: (who, where) =>
      `${who} at ${where} does not touch the ground; a base runs along the outline of the ground.`,
  },
  'too-fine': {
    severity: 'stop',
    say: (_who, where) =>
      `The section has details too small for its size near ${where}: no mesh of reasonable size can follow them. Simplify the drawing there.`,
  },
  'near-gap': {
    severity: 'check',
    say: (who, where, value) =>
      `${who}: a gap of ${describeNumber(value)} m at ${where} looks as if it was meant to be closed; water can pass or is held up there. Join the points or confirm the gap.`,
  },
  'element-limit': {
    severity: 'check',
    say: () =>
      'The mesh reached the limit on elements before the stated tolerance; the error figures say how far it came. Simplify far-off detail to spend elements where they matter.',
  },
  'small-angle': {
    severity: 'note',
    say: (who, where, value) =>
      `${who}: the drawing itself has an angle of ${describeNumber(Math.round(value * 10) / 10)}° at ${where}; results within a few centimetres of it are rough.`,
  },
  'ground-in-pieces': {
    severity: 'note',
    say: (_who, _where, value) =>
      `The ground is in ${value} pieces between which no water can pass. That is right for a wall down to rock; otherwise look for a gap between zones.`,
  },
};

/** Words a finding of the mesher about a section. */
export function noteOf(document: SectionDocument, { code, at, line, value }: GeometryFinding): Issue {
  const { severity, say } = words[code];
  const list = line ? lists[line.kind] : null;
  const object = line && list ? document[list][line.index] : undefined;
  const who = line && list && object ? describeObject(list, line.index, object) : 'The section';
  return {
    code,
    severity,
    pointer: line && list ? pointerTo(list, line.index, fields[line.kind]) : '',
    message: say(who, describePoint(at), value ?? 0),
    at: [at[0], at[1]],
    ...(object ? { subject: object.id } : {}),
  };
}
