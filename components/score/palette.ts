/** Colours of drawn fields; pale, under dark labelled lines. */
export const headBands = [
  '#f7f4e5',
  '#e9ead5',
  '#d9e1c8',
  '#c7d9bd',
  '#b2d0b6',
  '#9dc8b1',
  '#87bfaf',
  '#71b6af',
  '#5dabb1',
  '#4ca0b3',
] as const;
export const ink = '#17263a';
export const action = '#0f6b5c';
export const attention = '#a4480f';
export const secondary = '#55636f';
export const rule = '#c9d1cc';
export const paper = '#fbfaf6';
export const water = '#3b7f95';
