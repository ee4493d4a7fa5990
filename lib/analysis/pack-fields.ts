import type { Lines, SituationFields } from './fields';

/** Mesh and fields of the solved situations as plain JSON, for scripts; arrays keep their order and stride (fields.ts). */
export function packFields(fields: readonly SituationFields[]): object {
  return {
    format: 'underfall-fields/1',
    situations: fields.map((field) => ({
      ...field,
      coordinates: [...field.coordinates],
      elements: [...field.elements],
      elementMaterials: [...field.elementMaterials],
      heads: [...field.heads],
      cornerGradients: [...field.cornerGradients],
      streamFunction: field.streamFunction ? [...field.streamFunction] : null,
      equipotentials: packLines(field.equipotentials),
      seepagePaths: packLines(field.seepagePaths),
    })),
  };
}

function packLines({ points, offsets, values }: Lines): { value: number; points: [number, number][] }[] {
  return [...values].map((value, line) => {
    const pairs: [number, number][] = [];
    for (let k = offsets[line]!; k < offsets[line + 1]!; k++)
      pairs.push([points[2 * k]!, points[2 * k + 1]!]);
    return { value, points: pairs };
  });
}
