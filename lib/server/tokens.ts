import 'server-only';
import { withPractice, withScope } from '@/db/client';
import { findToken, insertToken, revokeTokenRow, selectTokens, touchToken } from '@/db/queries/library';
import { findMembership, findUser } from '@/db/queries/people';
import { hashSecret, makeSecret } from '@/lib/auth';
import type { Actor, TokenScope, TokenSummary } from '@/lib/domain/dto';
import { AppError } from '@/lib/errors';
import { record } from './audit';
import { authorize } from './authorize';
import { requireId } from './require-id';

const mark = 'uf_';
const day = 24 * 3600 * 1000;

export async function listTokens(actor: Actor): Promise<TokenSummary[]> {
  authorize(actor, 'tokens.manage');
  const { practiceId } = actor;
  const rows = await withPractice(practiceId, (tx) => selectTokens(tx, { practiceId }));
  return rows.map(({ scopes, createdAt, expiresAt, lastUsedAt, ...row }) => ({
    ...row,
    scopes: scopes as TokenScope[],
    createdAt: createdAt.toISOString(),
    expiresAt: expiresAt.toISOString(),
    lastUsedAt: lastUsedAt?.toISOString() ?? null,
  }));
}

/** Makes a token. The answer is the only place where it ever stands in full; its hash is what is kept. */
export async function createToken(
  actor: Actor,
  { name, scopes, days }: { name: string; scopes: TokenScope[]; days: number },
): Promise<{ token: string }> {
  authorize(actor, 'tokens.manage');
  const { practiceId, userId } = actor;
  const token = mark + makeSecret();
  const expiresAt = new Date(Date.now() + days * day);
  await withPractice(practiceId, async (tx) => {
    const prefix = token.slice(0, mark.length + 6);
    await insertToken(tx, {
      practiceId,
      userId,
      name,
      prefix,
      tokenHash: hashSecret(token),
      scopes,
      expiresAt,
    });
    await record(tx, actor, { action: 'token.created', subject: name, detail: scopes.join(', ') });
  });
  return { token };
}

export async function revokeToken(actor: Actor, id: string): Promise<void> {
  authorize(actor, 'tokens.manage');
  const { practiceId } = actor;
  await withPractice(practiceId, async (tx) => {
    const revoked = await revokeTokenRow(tx, { practiceId, id: requireId(id) });
    if (!revoked) throw new AppError('not-found');
    await record(tx, actor, { action: 'token.revoked', subject: revoked.name });
  });
}

export interface TokenBearer {
  readonly actor: Actor;
  readonly tokenId: string;
  readonly scopes: readonly TokenScope[];
}

/** Whom a token acts for: its maker, with the role they have now. Null once it was revoked, has run out, or they left. */
export async function bearerOf(token: string): Promise<TokenBearer | null> {
  if (!token.startsWith(mark) || token.length > 100) return null;
  const tokenHash = hashSecret(token);
  const found = await withScope({ tokenHash }, (tx) => findToken(tx, { tokenHash }));
  if (!found) return null;
  const { practiceId, userId } = found;
  return withPractice(practiceId, async (tx) => {
    const membership = await findMembership(tx, { practiceId, userId });
    const user = await findUser(tx, { userId });
    if (!membership || !user) return null;
    await touchToken(tx, { practiceId, id: found.id });
    const { role, practiceName } = membership;
    const { name, email, units } = user;
    const actor: Actor = { userId, name, email, units, practiceId, practiceName, role };
    return { actor, tokenId: found.id, scopes: found.scopes as TokenScope[] };
  });
}
