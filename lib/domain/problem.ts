/** An RFC 9457 problem document, the one shape of every refusal: command line, API, forms. */
export interface Problem {
  /** URI reference naming the kind: `/problems/invalid-section`. */
  type: string;
  title: string;
  detail: string;
  /** HTTP status where it travels over HTTP. */
  status?: number;
  errors?: { pointer: string; detail: string }[];
}
