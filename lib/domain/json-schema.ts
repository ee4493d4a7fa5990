// The published JSON Schemas (draft 2020-12) of the two documents, made from the schemas the code itself reads with.
import { z } from 'zod';
import { resultSchema } from './result-schema';
import { sectionSchema } from './section';

/**
 * The JSON Schema of the section document, as written by its authors: what has a default may be left out.
 *
 * @returns A JSON Schema; rules that a schema cannot say (ids that exist, geometry) are the server's to check.
 */
export function sectionJsonSchema(): object {
  return z.toJSONSchema(sectionSchema, { io: 'input' });
}

/**
 * The JSON Schema of the result document.
 *
 * @returns A JSON Schema.
 */
export function resultJsonSchema(): object {
  return z.toJSONSchema(resultSchema, {
    io: 'output',
    // later versions may add optional fields; a reader of today must not refuse them
    override: ({ jsonSchema }) => {
      if (jsonSchema.additionalProperties === false) delete jsonSchema.additionalProperties;
    },
  });
}
