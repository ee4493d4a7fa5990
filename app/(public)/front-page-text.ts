/** What the product does today; a line moves in here when the thing itself is there, not before. */
export const whatItDoes = [
  {
    title: 'A question first',
    text: 'Every section opens with the sentence it has to answer: is the six-metre wall deep enough at design flood? The drawing, the water levels and the numbers stand under that question and nothing else.',
  },
  {
    title: 'Bounds, not digits',
    text: 'Between two water levels, confined discharge is computed twice: once from above by the energy of the heads, once from below by the stream function. The truth for the drawn section lies between. Where theory makes a gradient infinite, as at the end of a flat base without a cutoff, no point value is given, only the average over a stated length.',
  },
  {
    title: 'The hand method beside it',
    text: 'Uplift, heave, exit gradient and creep are each set against a criterion your practice adopted, with its source, and with the hand calculation laid out line by line next to the numerical answer. A criterion is applied only to the quantity it was defined for.',
  },
  {
    title: 'The wall moves, the answer follows',
    text: 'Drag the tip of a wall and read the discharge, the uplift and the exit gradient as it goes down. Layers, lenses, anisotropy at any angle, leaky walls, drains: all as a drawing and as a table that takes numbers from a spreadsheet.',
  },
  {
    title: 'Open to your own programs',
    text: 'One JSON document holds a section. The same document goes through the browser, the web API with its bearer tokens, and a command line that works without a network.',
  },
] as const;

/** What it does not do, said before anyone relies on it. */
export const whatItDoesNot = [
  'Only fully submerged (confined) sections are solved so far; a section that needs a free surface is refused with a sentence, not guessed at.',
  'Flow is steady and laminar. A flood of a few days is computed as if it lasted.',
  'Plane or axisymmetric sections; no flow around the ends of a structure.',
  'Stability of slopes, settlement, erosion through openings and earthquakes are other questions, and are not answered here.',
] as const;
