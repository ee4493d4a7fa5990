import { Cell, HeadCell, RowHead, Table } from '@/components/ui/table';
import { boundsOf, joinRemarks, type SchemaShape } from './openapi-shape';
import { TypeWords } from './type-words';

/** One schema: its fields, or the choices it stands for. */
export function SchemaEntry({ name, schema }: { name: string; schema: SchemaShape }) {
  const fields = Object.entries(schema.properties ?? {});
  const required = new Set(schema.required);
  return (
    <article
      id={`schema-${name}`}
      className="grid gap-3 border-b border-rule py-6 first:pt-0 last:border-b-0"
    >
      <h3 className="text-lg font-semibold">{name}</h3>
      {schema.description && <p className="max-w-[66ch]">{schema.description}</p>}
      {fields.length === 0 ? (
        <p>
          <TypeWords schema={schema} />
        </p>
      ) : (
        <Table caption={`Fields of ${name}`}>
          <thead>
            <tr>
              <HeadCell>Field</HeadCell>
              <HeadCell>Type</HeadCell>
              <HeadCell>Meaning</HeadCell>
            </tr>
          </thead>
          <tbody>
            {fields.map(([field, shape]) => (
              <tr key={field}>
                <RowHead>
                  <code>{field}</code>
                </RowHead>
                <Cell className="min-w-40">
                  <TypeWords schema={shape} />
                </Cell>
                <Cell>
                  {joinRemarks(
                    required.has(field) ? undefined : 'optional',
                    shape.description,
                    boundsOf(shape),
                  )}
                </Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
    </article>
  );
}
