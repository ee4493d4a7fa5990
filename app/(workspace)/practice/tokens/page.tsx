import type { Metadata } from 'next';
import Link from 'next/link';
import { orNotFound } from '@/app/_lib/or-not-found';
import { PageHead, Passage } from '@/components/layout/page-frame';
import { paths } from '@/lib/paths';
import { requireActor } from '@/lib/server/session';
import { listTokens } from '@/lib/server/tokens';
import { TokenForm } from './_components/token-form';
import { TokenTable } from './_components/token-table';

export const metadata: Metadata = { title: 'Tokens' };

export default async function TokensPage() {
  const actor = await requireActor();
  const tokens = await orNotFound(listTokens(actor));
  return (
    <>
      <PageHead
        over={actor.practiceName}
        title="Tokens"
        lead={
          <>
            Keys for programs of yours that use the{' '}
            <Link href={paths.apiReference()} className="text-link">
              web API
            </Link>
            .
          </>
        }
      />
      <Passage title="In use">
        {tokens.length > 0 ? (
          <TokenTable tokens={tokens} />
        ) : (
          <p className="text-secondary">No tokens yet.</p>
        )}
      </Passage>
      <Passage title="New token" aside="It is shown once. Only its digest is kept here.">
        <TokenForm />
      </Passage>
    </>
  );
}
