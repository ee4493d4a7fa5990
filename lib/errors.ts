/** Every failure a person can meet: its status, its title and the sentence shown. Nobody else writes either. */
const table = {
  'not-found': {
    status: 404,
    title: 'Not found',
    sentence: 'There is nothing here, or it is not yours to see.',
  },
  unauthenticated: { status: 401, title: 'Sign in first', sentence: 'Sign in to go on.' },
  forbidden: {
    status: 403,
    title: 'Not permitted',
    sentence: 'Your role on this project does not allow that.',
  },
  'invalid-input': {
    status: 400,
    title: 'Some input needs mending',
    sentence: 'Please mend what is marked and send again.',
  },
  'invalid-section': {
    status: 422,
    title: 'The section needs mending',
    sentence: 'The section document has errors; each is listed with its place.',
  },
  'needs-free-surface': {
    status: 422,
    title: 'This section needs a free surface',
    sentence:
      'Part of this ground can drain, so the water surface in it is part of the answer. Only fully submerged (confined) sections are solved so far.',
  },
  unsolvable: {
    status: 422,
    title: 'The section cannot be solved',
    sentence: 'No answer exists for the section as drawn.',
  },
  conflict: {
    status: 409,
    title: 'Changed meanwhile',
    sentence: 'Somebody else changed this meanwhile. Both versions are kept; choose which goes on.',
  },
  'precondition-failed': {
    status: 412,
    title: 'Changed meanwhile',
    sentence: 'The section changed since you read it. Read it again and repeat your change.',
  },
  'precondition-required': {
    status: 428,
    title: 'State the version',
    sentence: 'Send If-Match with the ETag you read, so that nobody’s change is lost.',
  },
  'method-not-allowed': {
    status: 405,
    title: 'Not that method',
    sentence: 'That method is not available here; Allow names those that are.',
  },
  'unsupported-media': { status: 415, title: 'JSON only', sentence: 'Send the body as application/json.' },
  'too-large': { status: 413, title: 'Too large', sentence: 'That is larger than the stated limit.' },
  'too-many': {
    status: 429,
    title: 'Too many requests',
    sentence: 'Too many tries in a short time. Wait a little and try again.',
  },
  timeout: {
    status: 504,
    title: 'Out of time',
    sentence: 'The solve took longer than the stated limit and was stopped.',
  },
  busy: { status: 503, title: 'Busy', sentence: 'The service is busy. Nothing was lost; try again shortly.' },
  unavailable: {
    status: 503,
    title: 'Out of reach',
    sentence:
      'The database cannot be reached. Nothing typed is lost; it will be kept when the connection is back.',
  },
  internal: {
    status: 500,
    title: 'Something failed on our side',
    sentence: 'Something failed on our side. It has been recorded.',
  },
} as const satisfies Record<string, { status: number; title: string; sentence: string }>;

export type ErrorCode = keyof typeof table;

/** A failure with a code from the table; `message` and `cause` go to the log, the sentence to the person. */
export class AppError extends Error {
  override readonly name = 'AppError';

  constructor(
    readonly code: ErrorCode,
    message?: string,
    readonly details: {
      fields?: Record<string, string>;
      errors?: { pointer: string; detail: string }[];
      sentence?: string;
      /** Seconds after which another try makes sense. */
      retryAfter?: number;
    } = {},
    options?: ErrorOptions,
  ) {
    super(message ?? table[code].sentence, options);
  }
}

/** The row of the table for a code. */
export function errorRow(code: ErrorCode): { status: number; title: string; sentence: string } {
  return table[code];
}
