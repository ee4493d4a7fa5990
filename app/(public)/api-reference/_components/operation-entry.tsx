import { Cell, HeadCell, RowHead, Table } from '@/components/ui/table';
import { boundsOf, joinRemarks, type OperationShape, type SchemaShape } from './openapi-shape';
import { TypeWords } from './type-words';

interface OperationEntryProps {
  method: string;
  path: string;
  operation: OperationShape;
  address: string;
}

/** One operation: what it does, what it takes, what it answers, and how to try it. */
export function OperationEntry({ method, path, operation, address }: OperationEntryProps) {
  const { summary, description, parameters = [], requestBody, responses = {} } = operation;
  const bodies = Object.values(requestBody?.content ?? {});
  const body = bodies[0]?.schema;
  return (
    <article className="grid gap-4 border-b border-rule py-6 first:pt-0 last:border-b-0">
      <div className="grid gap-1">
        <h3 className="text-lg font-semibold">{summary ?? path}</h3>
        <p>
          <code className="text-[0.9375rem] break-all">
            <strong>{method.toUpperCase()}</strong> {path}
          </code>
        </p>
        {description && <p className="max-w-[66ch]">{description}</p>}
      </div>
      {parameters.length > 0 && (
        <Table caption={`Parameters of ${method.toUpperCase()} ${path}`}>
          <thead>
            <tr>
              <HeadCell>Parameter</HeadCell>
              <HeadCell>In</HeadCell>
              <HeadCell>Type</HeadCell>
              <HeadCell>Meaning</HeadCell>
            </tr>
          </thead>
          <tbody>
            {parameters.map((parameter) => (
              <tr key={`${parameter.in}${parameter.name}`}>
                <RowHead>
                  <code>{parameter.name}</code>
                </RowHead>
                <Cell>{parameter.in}</Cell>
                <Cell>{parameter.schema && <TypeWords schema={parameter.schema} />}</Cell>
                <Cell>
                  {joinRemarks(
                    parameter.required ? 'required' : undefined,
                    parameter.description,
                    parameter.schema && boundsOf(parameter.schema),
                  )}
                </Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
      {body && (
        <p>
          Takes <TypeWords schema={body} /> as JSON.
        </p>
      )}
      <ul className="grid gap-1" aria-label={`Answers of ${method.toUpperCase()} ${path}`}>
        {Object.entries(responses).map(([status, response]) => {
          const [content] = Object.values(response.content ?? {});
          return (
            <li key={status} className="grid grid-cols-[3.5rem_minmax(0,1fr)]">
              <span className="figures font-medium">{status}</span>
              <span>
                {response.description}
                {content?.schema && (
                  <>
                    {': '}
                    <TypeWords schema={content.schema} />
                  </>
                )}
              </span>
            </li>
          );
        })}
      </ul>
      <pre
        className="overflow-x-auto border border-rule bg-paper p-3 text-sm"
        tabIndex={0}
        role="region"
        aria-label={`Example for ${method.toUpperCase()} ${path}`}
      >
        {exampleCall({ method, path, body, address })}
      </pre>
    </article>
  );
}

interface ExampleCall {
  method: string;
  path: string;
  body: SchemaShape | undefined;
  address: string;
}

function exampleCall({ method, path, body, address }: ExampleCall): string {
  const filled = path.replace(
    /\{(\w+)\}/g,
    (_, name: string) => `$${name.replace(/([A-Z])/g, '_$1').toUpperCase()}`,
  );
  const lines = [
    `curl ${method === 'get' ? '' : `-X ${method.toUpperCase()} `}"${address}${filled}"`,
    `  -H "Authorization: Bearer $TOKEN"`,
  ];
  if (method === 'put') lines.push(`  -H 'If-Match: "3"'`);
  if (body) lines.push(`  -H "Content-Type: application/json"`, '  --data @section.json');
  return lines.join(' \\\n');
}
