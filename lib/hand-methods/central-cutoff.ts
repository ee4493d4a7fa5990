// A flat floor with one wall in its middle, on a layer of finite depth: exact, since two type III fragments meet on a symmetry line.
import { computed, given, type HandCalculation } from './calculation';
import { formFactor } from './fragments';

/** A floor with a wall in its middle. */
export interface CentralCutoff {
  /** Half width of the floor b, m. */
  readonly halfWidth: number;
  /** Wall below the floor s, m. */
  readonly embedment: number;
  readonly thickness: number;
  readonly head: number;
  readonly permeability: number;
}

/**
 * Computes the discharge under a floor with a wall in its middle, `q = kH/2Φ`.
 *
 * @param floor - Half width, embedment, thickness, head and permeability.
 * @returns The calculation laid out; no exit gradient, which theory makes infinite at the floor's end.
 * @throws {HandMethodError} `outside-definition` unless the wall ends inside the layer.
 * @source Pavlovsky (1922); Harr (1962), sec. 5–3 and ch. 6 (from memory; derived anew).
 */
export function computeCentralCutoff(
  floor: CentralCutoff,
): HandCalculation<{ discharge: number; formFactor: number }> {
  const { halfWidth, embedment, thickness, head, permeability } = floor;
  const phi = formFactor({ type: 'III', floor: halfWidth, embedment, thickness });
  const discharge = (permeability * head) / (2 * phi);
  return {
    title: 'Floor with a central cutoff',
    values: { discharge, formFactor: phi },
    working: [
      given('b', 'floor on each side of the wall', halfWidth, 'm'),
      given('s', 'wall below the floor', embedment, 'm'),
      given('T', 'thickness of the layer', thickness, 'm'),
      given('H', 'head lost', head, 'm'),
      given('k', 'permeability', permeability, 'm/s'),
      computed(
        'Φ',
        'form factor of one half, type III',
        'K / K′, m = cos(π s / 2T) √(tanh²(π b / 2T) + tan²(π s / 2T))',
        phi,
        '',
      ),
      computed('q', 'discharge', 'k H / (2 Φ)', discharge, 'm³/s per m'),
    ],
    source: 'Pavlovsky (1922); Harr (1962), Groundwater and Seepage, sec. 5–3 and ch. 6 (from memory)',
    range: 'Floor on the surface of one uniform layer on a level impervious base, far ends remote.',
    isInRange: true,
  };
}
