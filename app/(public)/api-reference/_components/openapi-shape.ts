// As much of OpenAPI 3.1 as the reference page reads.

/** A JSON Schema, or a reference to one by name. */
export interface SchemaShape {
  $ref?: string;
  type?: string | string[];
  description?: string;
  enum?: unknown[];
  const?: unknown;
  default?: unknown;
  format?: string;
  minimum?: number;
  maximum?: number;
  exclusiveMinimum?: number;
  exclusiveMaximum?: number;
  minLength?: number;
  maxLength?: number;
  minItems?: number;
  maxItems?: number;
  items?: SchemaShape;
  prefixItems?: SchemaShape[];
  properties?: Record<string, SchemaShape>;
  required?: string[];
  additionalProperties?: SchemaShape | boolean;
  oneOf?: SchemaShape[];
  anyOf?: SchemaShape[];
  allOf?: SchemaShape[];
}

interface BodyShape {
  description?: string;
  content?: Record<string, { schema?: SchemaShape }>;
}

export interface ParameterShape {
  name: string;
  in: string;
  required?: boolean;
  description?: string;
  schema?: SchemaShape;
}

export interface OperationShape {
  summary?: string;
  description?: string;
  parameters?: ParameterShape[];
  requestBody?: BodyShape;
  responses?: Record<string, BodyShape>;
  security?: Record<string, string[]>[];
}

export interface ReferenceShape {
  info: { title: string; version: string; description?: string };
  paths?: Record<string, Record<string, OperationShape>>;
  components?: { schemas?: Record<string, SchemaShape> };
}

/** The last part of a `$ref`. */
export function refName(ref: string): string {
  return ref.slice(ref.lastIndexOf('/') + 1);
}

/** The bounds of a schema in words, such as `more than 0, at most 1000`. */
export function boundsOf(schema: SchemaShape): string {
  const words = [
    schema.exclusiveMinimum !== undefined && `more than ${schema.exclusiveMinimum}`,
    schema.minimum !== undefined && `at least ${schema.minimum}`,
    schema.exclusiveMaximum !== undefined && `less than ${schema.exclusiveMaximum}`,
    schema.maximum !== undefined && `at most ${schema.maximum}`,
    schema.minLength !== undefined && schema.minLength > 0 && `at least ${schema.minLength} characters`,
    schema.maxLength !== undefined && `at most ${schema.maxLength} characters`,
    schema.minItems !== undefined && schema.minItems > 0 && `at least ${schema.minItems} entries`,
    schema.maxItems !== undefined && `at most ${schema.maxItems} entries`,
    schema.default !== undefined && `otherwise ${JSON.stringify(schema.default)}`,
  ];
  return words.filter(Boolean).join(', ');
}

/** The type of a schema in words; names of other schemas are given in square brackets for the page to link. */
export function typeOf(schema: SchemaShape): string {
  if (schema.$ref) return `[${refName(schema.$ref)}]`;
  if (schema.const !== undefined) return JSON.stringify(schema.const);
  if (schema.enum) return schema.enum.map((value) => JSON.stringify(value)).join(' | ');
  const choices = schema.oneOf ?? schema.anyOf;
  if (choices) return choices.map(typeOf).join(' or ');
  if (schema.allOf) return schema.allOf.map(typeOf).join(' and ');
  if (schema.prefixItems) return `(${schema.prefixItems.map(typeOf).join(', ')})`;
  if (schema.items) return `list of ${typeOf(schema.items)}`;
  if (typeof schema.additionalProperties === 'object') return `map of ${typeOf(schema.additionalProperties)}`;
  if (schema.properties) {
    const names = Object.keys(schema.properties);
    return `object with ${names.join(', ')}`;
  }
  return Array.isArray(schema.type) ? schema.type.join(' or ') : (schema.type ?? 'any');
}

/** Remarks on a field as one line: each without its full stop, set apart by semicolons. */
export function joinRemarks(...remarks: (string | undefined)[]): string {
  return remarks
    .filter(Boolean)
    .map((remark) => remark!.replace(/\.$/, ''))
    .join('; ');
}
