// Refusals of a section as RFC 9457 problem documents: the same words at the command line, in the API and on the screen.
import type { Issue } from '@/lib/domain/issue';
import type { Problem } from '@/lib/domain/problem';
import { type ErrorCode, errorRow } from '@/lib/errors';

/** Makes a problem document from a code of the error table. */
export function problemOf(code: ErrorCode, detail: string, errors: Problem['errors'] = []): Problem {
  const { status, title } = errorRow(code);
  return { type: `/problems/${code}`, title, status, detail, errors };
}

/** Findings about the text itself, which is then no section document at all. */
const kinds: Record<string, ErrorCode> = { 'not-json': 'invalid-input', 'too-large': 'too-large' };

/** Makes the problem document of a section that does not stand: every stop with its pointer. */
export function problemOfIssues(issues: readonly Issue[]): Problem {
  const stops = issues.filter((issue) => issue.severity === 'stop');
  const detail =
    stops.length === 1
      ? stops[0]!.message
      : `${stops.length} things need mending; the first: ${stops[0]!.message}`;
  return problemOf(
    kinds[stops[0]?.code ?? ''] ?? 'invalid-section',
    detail,
    stops.map(({ pointer, message }) => ({ pointer, detail: message })),
  );
}
