// Words for places and objects of a section document, used in every sentence about it.
import type { Point } from './section';

/**
 * Names a coordinate pair.
 *
 * @param point - Metres.
 * @returns For instance `(12.4, −3)`.
 */
export function describePoint([x, y]: readonly [number, number]): string {
  return `(${describeNumber(x)}, ${describeNumber(y)})`;
}

/**
 * Writes a number with up to four decimals and a true minus.
 *
 * @param value - Any finite number.
 * @returns The text.
 */
export function describeNumber(value: number): string {
  return String(Math.round(value * 1e4) / 1e4).replace('-', '−');
}

const nouns: Record<string, string> = {
  materials: 'Material',
  zones: 'Zone',
  barriers: 'Barrier',
  drains: 'Drain',
  edges: 'Edge',
  structures: 'Structure',
  situations: 'Situation',
  piezometers: 'Piezometer',
};

/** An object as far as its name can be read, whatever else is wrong with it. */
interface Named {
  readonly id?: unknown;
  readonly name?: unknown;
}

/**
 * Names an object of a list.
 *
 * @param list - `materials`, `zones`, …
 * @param index - Its place, from 0.
 * @param object - The object, as read.
 * @returns For instance `Barrier “Sheet pile”`, or `Barrier 2` where it has neither name nor id.
 */
export function describeObject(list: string, index: number, object: unknown): string {
  const noun = nouns[list] ?? list;
  const { id, name } = (typeof object === 'object' && object !== null ? object : {}) as Named;
  const label =
    typeof name === 'string' && name !== '' ? name : typeof id === 'string' && id !== '' ? id : null;
  return label === null ? `${noun} ${index + 1}` : `${noun} “${label}”`;
}

/**
 * Writes a JSON Pointer.
 *
 * @param parts - Keys and indices from the root.
 * @returns The pointer, RFC 6901.
 */
export function pointerTo(...parts: readonly (string | number)[]): string {
  return parts.map((part) => `/${String(part).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
}

/**
 * Rounds a point for a finding.
 *
 * @param point - Metres.
 * @returns The same point as a plain pair.
 */
export function placeOf(point: Point | readonly [number, number]): [number, number] {
  return [point[0], point[1]];
}
