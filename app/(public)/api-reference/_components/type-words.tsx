import { Fragment } from 'react';
import { type SchemaShape, typeOf } from './openapi-shape';

/** A schema's type in words, with the names of other schemas linked to their entries. */
export function TypeWords({ schema }: { schema: SchemaShape }) {
  const parts = typeOf(schema).split(/(\[\w+\])/);
  return (
    <>
      {parts.map((part, index) => {
        const name = /^\[(\w+)\]$/.exec(part)?.[1];
        return name ? (
          <a key={index} href={`#schema-${name}`} className="text-link">
            {name}
          </a>
        ) : (
          <Fragment key={index}>{part}</Fragment>
        );
      })}
    </>
  );
}
