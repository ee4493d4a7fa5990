import { describe, expect, it } from 'vitest';
import { boundsOf, typeOf } from './openapi-shape';

describe('typeOf', () => {
  it.each([
    [{ $ref: '#/components/schemas/Section' }, '[Section]'],
    [{ type: 'array', items: { type: 'number' } }, 'list of number'],
    [{ oneOf: [{ type: 'string' }, { type: 'number' }] }, 'string or number'],
    [{ enum: ['plane', 'axisymmetric'] }, '"plane" | "axisymmetric"'],
    [{ prefixItems: [{ type: 'number' }, { type: 'number' }] }, '(number, number)'],
    [{ type: 'object', additionalProperties: { type: 'number' } }, 'map of number'],
  ])('says %j as %s', (schema, words) => expect(typeOf(schema)).toBe(words));
});

describe('boundsOf', () => {
  it('says limits and the value taken otherwise', () =>
    expect(boundsOf({ exclusiveMinimum: 0, maximum: 1000, default: 1 })).toBe(
      'more than 0, at most 1000, otherwise 1',
    ));
});
