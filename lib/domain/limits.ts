// The limits of the application, in one place. README states the same figures.

/** Limits on a section document; a larger one is refused with a sentence. */
export const sectionLimits = {
  /** Bytes of the JSON text. */
  bytes: 1_000_000,
  materials: 60,
  zones: 200,
  barriers: 60,
  drains: 60,
  edges: 60,
  structures: 30,
  situations: 24,
  piezometers: 200,
  /** Points in one path or outline. */
  pathPoints: 1000,
  /** Points of the whole document. */
  totalPoints: 8000,
  /** Lists and objects within one another; the format itself needs six. */
  depth: 32,
  /** Characters of a name or title. */
  name: 200,
  /** Characters of a question, a source, a note. */
  text: 2000,
} as const;
