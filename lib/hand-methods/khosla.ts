// Uplift at the key points of a floor with one pile on deep ground, and the corrections that combine several piles.
import { demand } from './calculation';

/** Heads at the key points, per cent of the head lost, above the downstream level. */
export interface KeyPoints {
  /** Floor and pile, upstream side (E), tip (D), floor and pile, downstream side (C). */
  readonly E: number;
  readonly D: number;
  readonly C: number;
}

const percent = (cosine: number): number => (100 / Math.PI) * Math.acos(Math.max(-1, Math.min(1, cosine)));

/**
 * Computes the key points of a pile at the downstream end of a floor, and the exit gradient.
 *
 * @param floor - Length of the floor b, m.
 * @param pile - Depth of the pile d, m.
 * @returns Key points (C is 0) and `G_E d/H = 1/(π√λ)`.
 * @source Khosla, Bose & Taylor (1936), Design of Weirs on Permeable Foundations, CBIP Publication 12; IS 6966 (Part 1):1989 (from memory; an exact map).
 */
export function keyPointsOfEndPile(floor: number, pile: number): KeyPoints & { exitGradientRatio: number } {
  demand(pile > 0 && floor >= 0, 'the pile must have a depth');
  const alpha = floor / pile;
  const lambda = (1 + Math.sqrt(1 + alpha * alpha)) / 2;
  return {
    E: percent((lambda - 2) / lambda),
    D: percent((lambda - 1) / lambda),
    C: 0,
    exitGradientRatio: 1 / (Math.PI * Math.sqrt(lambda)),
  };
}

/**
 * Computes the key points of a pile at the upstream end of a floor.
 *
 * @param floor - Length of the floor b, m.
 * @param pile - Depth of the pile d, m.
 * @returns Key points; E is 100.
 * @source Khosla, Bose & Taylor (1936), CBIP Publication 12 (from memory): the mirror of the end pile.
 */
export function keyPointsOfUpstreamPile(floor: number, pile: number): KeyPoints {
  const { E, D } = keyPointsOfEndPile(floor, pile);
  return { E: 100, D: 100 - D, C: 100 - E };
}

/**
 * Computes the key points of a pile within the floor.
 *
 * @param upstream - Floor upstream of the pile b₁, m.
 * @param downstream - Floor downstream of it b₂, m.
 * @param pile - Depth of the pile d, m.
 * @returns Key points.
 * @source Khosla, Bose & Taylor (1936), CBIP Publication 12 (from memory; an exact map).
 */
export function keyPointsOfIntermediatePile(upstream: number, downstream: number, pile: number): KeyPoints {
  demand(pile > 0, 'the pile must have a depth');
  const r1 = Math.sqrt(1 + (upstream / pile) ** 2);
  const r2 = Math.sqrt(1 + (downstream / pile) ** 2);
  const lambda = (r1 + r2) / 2;
  const lambda1 = (r1 - r2) / 2;
  return {
    E: percent((lambda1 - 1) / lambda),
    D: percent(lambda1 / lambda),
    C: percent((lambda1 + 1) / lambda),
  };
}

/**
 * Computes the correction for the interference of a neighbouring pile.
 *
 * @param other - Depth D of the interfering pile below the level of interference, m.
 * @param own - Depth d of the pile corrected, m.
 * @param distance - Between the two piles b′, m.
 * @param floor - Total length of the floor b, m.
 * @returns Per cent of head; added to points upstream of the interfering pile, taken off points downstream.
 * @source Khosla, Bose & Taylor (1936), CBIP Publication 12 (from memory): C = 19 √(D/b′) (d + D)/b.
 */
export function interferenceCorrection(other: number, own: number, distance: number, floor: number): number {
  return (19 * Math.sqrt(other / distance) * (own + other)) / floor;
}

/** Slopes of the floor H:V and their correction, per cent of head. */
const slopeCorrections = [11.2, 6.5, 4.5, 3.3, 2.8, 2.5, 2.3, 2.0] as const;

/**
 * Looks up the correction for a sloping floor.
 *
 * @param run - Horizontal to one vertical, 1 … 8.
 * @param length - Horizontal length of the slope, m.
 * @param distance - Between the piles on either side, m.
 * @returns Per cent of head, positive for a floor that falls in the direction of flow.
 * @source Khosla, Bose & Taylor (1936), CBIP Publication 12, as tabulated in textbooks (from memory).
 */
export function slopeCorrection(run: number, length: number, distance: number): number {
  demand(run >= 1 && run <= 8, 'the table covers slopes from 1:1 to 8:1');
  const low = Math.min(7, Math.floor(run));
  const [a, b] = [slopeCorrections[low - 1]!, slopeCorrections[low]!];
  return ((a + (b - a) * (run - low)) * length) / distance;
}
