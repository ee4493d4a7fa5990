/** Stands wherever a verdict is shown. */
export const cautions = [
  'A verdict is the outcome of a calculation for a drawn section, not a statement about the ground.',
  'Local codes and the judgement of a licensed engineer decide.',
  'Where water is emerging or boiling on a real site, the site’s emergency plan comes first.',
] as const;
