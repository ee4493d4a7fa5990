'use client';

import { ConfirmButton } from '@/components/form/confirm-button';
import { Cell, HeadCell, RowHead, Table } from '@/components/ui/table';
import type { TokenSummary } from '@/lib/domain/dto';
import { formatDay } from '@/lib/format/dates';
import { scopeWords } from '@/lib/format/words';
import { revokeToken } from '../actions';

/** The tokens of the practice. */
export function TokenTable({ tokens }: { tokens: TokenSummary[] }) {
  return (
    <Table caption="Tokens">
      <thead>
        <tr>
          <HeadCell>For</HeadCell>
          <HeadCell>May</HeadCell>
          <HeadCell className="hidden md:table-cell">Made</HeadCell>
          <HeadCell className="hidden sm:table-cell">Until</HeadCell>
          <HeadCell className="hidden md:table-cell">Last used</HeadCell>
          <HeadCell>
            <span className="sr-only">Change</span>
          </HeadCell>
        </tr>
      </thead>
      <tbody>
        {tokens.map(({ id, name, prefix, scopes, createdBy, createdAt, expiresAt, lastUsedAt }) => (
          <tr key={id}>
            <RowHead>
              {name}
              <code className="block text-sm font-normal text-secondary">{prefix}…</code>
            </RowHead>
            <Cell>{scopes.map((scope) => scopeWords[scope]).join('; ')}</Cell>
            <Cell className="hidden md:table-cell">
              {formatDay(createdAt)} by {createdBy}
            </Cell>
            <Cell className="hidden sm:table-cell">{formatDay(expiresAt)}</Cell>
            <Cell className="hidden md:table-cell">{lastUsedAt ? formatDay(lastUsedAt) : 'never'}</Cell>
            <Cell className="pr-0 text-right">
              <ConfirmButton
                label="Revoke"
                accessibleLabel={`Revoke the token ${name}`}
                title={`Revoke the token “${name}”?`}
                consequence="Programs that use it are refused from the next request on."
                confirmLabel="Revoke"
                action={() => revokeToken({ id })}
              />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
