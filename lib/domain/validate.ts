// The one door for section documents: whatever comes in, every problem comes back at once, each with its place.
import { findJsonFault } from './find-json-fault';
import type { Issue } from './issue';
import { sectionLimits } from './limits';
import { lintSection } from './lint/lint-section';
import type { SectionDocument } from './section';
import { checkConditions } from './validate-conditions';
import { checkGeometry } from './validate-geometry';
import { checkReferences } from './validate-references';
import { readShape } from './validate-shape';

/** What was read. */
export interface ReadOutcome {
  /** Null where any issue is a stop: nothing half-read is ever solved. */
  readonly document: SectionDocument | null;
  /** The document where its shape alone is right, for screens that let an engineer go on editing. */
  readonly draft: SectionDocument | null;
  readonly issues: Issue[];
  /** What was read, before defaults were filled in and unknown fields left out: the hash in a result is of this. */
  readonly source: unknown;
}

/**
 * Reads a section document.
 *
 * @param value - Anything, as parsed from JSON.
 * @returns The document with defaults filled in, and every problem found.
 */
export function readSection(value: unknown): ReadOutcome {
  const shape = readShape(value);
  if (!shape.document) return { document: null, draft: null, issues: shape.issues, source: value };
  const document = shape.document;
  const issues = [
    ...shape.issues,
    ...checkSize(document),
    ...checkReferences(document),
    ...checkGeometry(document),
  ];
  if (!issues.some((issue) => issue.severity === 'stop' && issue.code !== 'unknown-level'))
    issues.push(...checkConditions(document));
  const isSound = !issues.some((issue) => issue.severity === 'stop');
  if (isSound) issues.push(...lintSection(document));
  return { document: isSound ? document : null, draft: document, issues, source: value };
}

/**
 * Reads a section document from its JSON text.
 *
 * @param text - JSON, with or without a byte order mark.
 * @returns As {@link readSection}; text that is not JSON gives one issue with line and column.
 */
export function parseSectionText(text: string): ReadOutcome {
  if (text.length > sectionLimits.bytes) {
    const message = `The document has ${text.length} characters; the limit is ${sectionLimits.bytes}.`;
    return refuse('too-large', message);
  }
  const body = text.startsWith('\uFEFF') ? text.slice(1) : text;
  try {
    return readSection(JSON.parse(body));
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
    return refuse('not-json', `This is not JSON${placeInText(body)}.`);
  }
}

function refuse(code: string, message: string): ReadOutcome {
  const issues: Issue[] = [{ code, severity: 'stop', pointer: '', message }];
  return { document: null, draft: null, issues, source: undefined };
}

/** Says where the text stops being JSON. */
function placeInText(text: string): string {
  if (text.trim() === '') return ': it is empty';
  const fault = findJsonFault(text);
  if (fault >= text.length) return ': it ends too early';
  const before = text.slice(0, fault).split('\n');
  return `: something is wrong at line ${before.length}, column ${before.at(-1)!.length + 1}`;
}

function checkSize(document: SectionDocument): Issue[] {
  const lines = [...document.barriers, ...document.drains, ...document.edges];
  const points =
    document.zones.reduce(
      (sum, zone) => sum + zone.outline.length + (zone.holes ?? []).reduce((s, hole) => s + hole.length, 0),
      0,
    ) +
    lines.reduce((sum, line) => sum + line.path.length, 0) +
    document.structures.reduce((sum, structure) => sum + structure.base.length, 0);
  if (points <= sectionLimits.totalPoints) return [];
  const message = `The section has ${points} points; the limit is ${sectionLimits.totalPoints}. Simplify outlines that carry more points than the ground is known to.`;
  return [{ code: 'too-many-points', severity: 'stop', pointer: '', message }];
}
