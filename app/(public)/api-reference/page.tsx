import type { Metadata } from 'next';
import { PageFrame, PageHead, Passage } from '@/components/layout/page-frame';
import { openApiDocument } from '@/lib/server/openapi';
import { publicAddress } from '@/lib/server/env';
import type { ReferenceShape } from './_components/openapi-shape';
import { OperationEntry } from './_components/operation-entry';
import { SchemaEntry } from './_components/schema-entry';

export const metadata: Metadata = { title: 'API reference' };

export default function ApiReferencePage() {
  const reference = openApiDocument() as unknown as ReferenceShape;
  const address = publicAddress();
  const operations = Object.entries(reference.paths ?? {}).flatMap(([path, methods]) =>
    Object.entries(methods).map(([method, operation]) => ({ path, method, operation })),
  );
  return (
    <PageFrame>
      <PageHead
        title="API reference"
        lead={reference.info.description}
        over={`Version ${reference.info.version}`}
        actions={
          <a href="/api/openapi.json" className="text-link">
            OpenAPI 3.1 document
          </a>
        }
      />
      <Passage title="Keys" aside="Made by the practice’s administrator.">
        <p className="max-w-[66ch]">
          Send a token with every request as <code>Authorization: Bearer …</code>. Numbers are SI. An error is
          an RFC 9457 problem document with a sentence and, where the section itself is at fault, a JSON
          Pointer to each place.
        </p>
      </Passage>
      <Passage title="Operations">
        {operations.map((entry) => (
          <OperationEntry key={`${entry.method}${entry.path}`} address={address} {...entry} />
        ))}
      </Passage>
      <Passage title="Schemas">
        {Object.entries(reference.components?.schemas ?? {}).map(([name, schema]) => (
          <SchemaEntry key={name} name={name} schema={schema} />
        ))}
      </Passage>
    </PageFrame>
  );
}
