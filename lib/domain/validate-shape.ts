// From zod's findings to sentences an engineer understands.
import type { z } from 'zod';
import { describeObject, pointerTo } from './describe';
import type { Issue } from './issue';
import { sectionLimits } from './limits';
import { type SectionDocument, sectionSchema } from './section';

/** The document where its shape is right, and what is wrong where it is not. */
export interface ShapeOutcome {
  readonly document: SectionDocument | null;
  readonly issues: Issue[];
}

/**
 * Checks the shape of a section document.
 *
 * @param value - Anything, as parsed from JSON.
 * @returns The document with its defaults, and every problem of shape; fields that the format does not know are noted.
 */
export function readShape(value: unknown): ShapeOutcome {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    const found = value === null ? 'nothing (null)' : Array.isArray(value) ? 'a list' : `a ${typeof value}`;
    const message = `A section document is a JSON object with format, title, materials, zones, edges and situations; this is ${found}.`;
    return { document: null, issues: [{ code: 'not-an-object', severity: 'stop', pointer: '', message }] };
  }
  if (isTooDeep(value)) {
    const message = `The document has lists or objects nested more than ${sectionLimits.depth} deep; a section document never needs that.`;
    return { document: null, issues: [{ code: 'too-deep', severity: 'stop', pointer: '', message }] };
  }
  const parsed = sectionSchema.safeParse(value);
  if (parsed.success) return { document: parsed.data, issues: unknownFields(value, parsed.data, []) };
  return { document: null, issues: parsed.error.issues.flatMap((issue) => wordIssue(value, issue)) };
}

/** Whether a value is nested deeper than whatever walks it later could follow. */
function isTooDeep(root: unknown): boolean {
  let layer: unknown[] = [root];
  for (let depth = 0; layer.length > 0; depth++) {
    if (depth > sectionLimits.depth) return true;
    layer = layer.flatMap((value) =>
      typeof value === 'object' && value !== null ? Object.values(value) : [],
    );
  }
  return false;
}

type ZodIssue = z.core.$ZodIssue;

function wordIssue(root: unknown, issue: ZodIssue): Issue[] {
  // a union's own sentence says what is wanted; what each alternative missed is noise, unless a single field of the chosen one is wrong
  const path = issue.path.map((part) => (typeof part === 'symbol' ? String(part) : part));
  const { subject, field } = locate(root, path);
  const problem = isMissing(root, path, issue) ? 'is missing' : wordProblem(issue);
  return [
    {
      code: isMissing(root, path, issue) ? 'missing-field' : 'invalid-field',
      severity: 'stop',
      pointer: pointerTo(...path),
      message: `${subject}: ${field} ${problem}.`,
      ...idOf(root, path),
    },
  ];
}

function wordProblem(issue: ZodIssue): string {
  const ownWords = issue.message.replace(/\.$/, '');
  if (!/^(Invalid|Too|Unrecognized|Expected)/.test(ownWords)) return ownWords;
  switch (issue.code) {
    case 'invalid_type':
      return `must be ${article(issue.expected)}`;
    case 'too_small':
      return issue.origin === 'string' ? 'must not be empty' : `must be at least ${String(issue.minimum)}`;
    case 'too_big':
      return issue.origin === 'string' || issue.origin === 'array'
        ? `may have at most ${String(issue.maximum)} ${issue.origin === 'array' ? 'entries' : 'characters'}`
        : `must be at most ${String(issue.maximum)}`;
    case 'invalid_value':
      return `must be one of ${issue.values.map((v) => `“${String(v)}”`).join(', ')}`;
    default:
      return 'is not of the expected form';
  }
}

function article(expected: string): string {
  const words: Record<string, string> = {
    array: 'a list',
    tuple: 'a point [x, y]',
    string: 'text',
    number: 'a number',
    object: 'an object',
    record: 'an object of names and numbers',
  };
  return words[expected] ?? `of the kind ${expected}`;
}

function isMissing(root: unknown, path: readonly (string | number)[], issue: ZodIssue): boolean {
  if (issue.code !== 'invalid_type' && issue.code !== 'invalid_value' && issue.code !== 'invalid_union')
    return false;
  const last = path.at(-1);
  if (typeof last !== 'string') return false;
  const holder = valueAt(root, path.slice(0, -1));
  return typeof holder === 'object' && holder !== null && !(last in holder);
}

function valueAt(root: unknown, path: readonly (string | number)[]): unknown {
  return path.reduce<unknown>(
    (value, key) =>
      typeof value === 'object' && value !== null
        ? (value as Record<string | number, unknown>)[key]
        : undefined,
    root,
  );
}

/** Splits a path into the object it is about and the field within it, in words. */
function locate(root: unknown, path: readonly (string | number)[]): { subject: string; field: string } {
  const [list, index, ...rest] = path;
  if (typeof list === 'string' && typeof index === 'number') {
    const subject = describeObject(list, index, valueAt(root, [list, index]));
    return { subject, field: rest.length > 0 ? wordField(rest) : 'this entry' };
  }
  return { subject: 'Section', field: path.length > 0 ? wordField(path) : 'the document' };
}

function wordField(path: readonly (string | number)[]): string {
  const words: string[] = [];
  path.forEach((part, i) => {
    if (typeof part === 'string') words.push(part);
    else if (i === path.length - 1 && i > 0 && typeof path[i - 1] === 'number')
      words.push(part === 0 ? 'x' : 'y');
    else words.push(`point ${part + 1}`);
  });
  return words.join(', ');
}

function idOf(root: unknown, path: readonly (string | number)[]): { subject?: string } {
  const id = (valueAt(root, path.slice(0, 2)) as { id?: unknown } | undefined)?.id;
  return path.length >= 2 && typeof id === 'string' ? { subject: id } : {};
}

/** Fields that were dropped by the schema: nothing is lost in silence. */
function unknownFields(raw: unknown, read: unknown, path: (string | number)[]): Issue[] {
  if (typeof raw !== 'object' || raw === null || typeof read !== 'object' || read === null) return [];
  return Object.entries(raw).flatMap(([key, value]): Issue[] => {
    const step = Array.isArray(raw) ? Number(key) : key;
    const at = [...path, step];
    if (!(key in read)) {
      const message = `“${key}” is not a field of the section format and was left out of account.`;
      return [{ code: 'unknown-field', severity: 'note', pointer: pointerTo(...at), message }];
    }
    return unknownFields(value, (read as Record<string, unknown>)[key], at);
  });
}
