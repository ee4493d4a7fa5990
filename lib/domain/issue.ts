/** One finding about a section document: what is wrong, where, and what to do. */
export interface Issue {
  /** Stable word for tests and links, kebab-case: `unknown-material`, `outline-crosses-itself`, … */
  readonly code: string;
  /** `stop`: no number is shown. `check`: shown with a mark. `note`: for information. */
  readonly severity: 'stop' | 'check' | 'note';
  /** JSON Pointer (RFC 6901) into the document, `""` for the whole. */
  readonly pointer: string;
  /** One or two sentences an engineer understands: what, where, what to do. */
  readonly message: string;
  /** Where in the section, metres. */
  readonly at?: readonly [number, number];
  /** Id of the object concerned. */
  readonly subject?: string;
}
