import { and, asc, desc, eq, gt, isNull, sql } from 'drizzle-orm';
import type { Criterion } from '@/lib/domain/criteria';
import type { TokenScope } from '@/lib/domain/dto';
import type { Material } from '@/lib/domain/section';
import type { Transaction } from '../client';
import { apiTokens, auditEvents, criteria, materials, outboxMails, users } from '../schema';

interface InPractice {
  readonly practiceId: string;
}

export function selectCriteria(tx: Transaction, { practiceId }: InPractice) {
  return tx
    .select({
      id: criteria.id,
      quantity: criteria.quantity,
      required: criteria.required,
      title: criteria.title,
      source: criteria.source,
      soil: criteria.soil,
      isExample: criteria.isExample,
      adoptedAt: criteria.adoptedAt,
      approvedBy: users.name,
    })
    .from(criteria)
    .leftJoin(users, eq(users.id, criteria.approvedBy))
    .where(eq(criteria.practiceId, practiceId))
    .orderBy(asc(criteria.quantity), asc(criteria.required));
}

export async function upsertCriterion(
  tx: Transaction,
  { practiceId, criterion, userId }: InPractice & { criterion: Criterion; userId: string | null },
) {
  const { id, quantity, required, title, source, soil = '', example } = criterion;
  const values = {
    quantity,
    required,
    title,
    source,
    soil,
    isExample: example,
    adoptedAt: example ? null : sql`now()`,
    approvedBy: userId,
  };
  await tx
    .insert(criteria)
    .values({ practiceId, id, ...values })
    .onConflictDoUpdate({ target: [criteria.practiceId, criteria.id], set: values });
}

export async function deleteCriterion(tx: Transaction, { practiceId, id }: InPractice & { id: string }) {
  const [row] = await tx
    .delete(criteria)
    .where(and(eq(criteria.practiceId, practiceId), eq(criteria.id, id)))
    .returning({ title: criteria.title });
  return row ?? null;
}

export function selectMaterials(tx: Transaction, { practiceId }: InPractice) {
  return tx
    .select({ id: materials.id, material: materials.material, note: materials.note })
    .from(materials)
    .where(eq(materials.practiceId, practiceId))
    .orderBy(asc(sql`${materials.material}->>'name'`));
}

export async function insertMaterial(
  tx: Transaction,
  values: InPractice & { material: Material; note: string },
) {
  const [row] = await tx.insert(materials).values(values).returning({ id: materials.id });
  return row!;
}

export async function updateMaterial(
  tx: Transaction,
  { practiceId, id, ...values }: InPractice & { id: string; material: Material; note: string },
) {
  const [row] = await tx
    .update(materials)
    .set(values)
    .where(and(eq(materials.practiceId, practiceId), eq(materials.id, id)))
    .returning({ id: materials.id });
  return row ?? null;
}

export async function deleteMaterial(tx: Transaction, { practiceId, id }: InPractice & { id: string }) {
  const [row] = await tx
    .delete(materials)
    .where(and(eq(materials.practiceId, practiceId), eq(materials.id, id)))
    .returning({ id: materials.id });
  return row ?? null;
}

export interface NewAuditEvent extends InPractice {
  readonly actorId: string | null;
  readonly actorName: string;
  readonly action: string;
  readonly subject?: string;
  readonly detail?: string;
}

export async function insertAuditEvent(tx: Transaction, event: NewAuditEvent) {
  await tx.insert(auditEvents).values(event);
}

/** True where the same person did the same to the same subject within the minutes past. */
export async function hasRecentEvent(
  tx: Transaction,
  {
    practiceId,
    actorId,
    action,
    subject,
    minutes,
  }: Required<Omit<NewAuditEvent, 'actorName' | 'detail'>> & { minutes: number },
): Promise<boolean> {
  const [row] = await tx
    .select({ id: auditEvents.id })
    .from(auditEvents)
    .where(
      and(
        eq(auditEvents.practiceId, practiceId),
        eq(auditEvents.actorId, actorId ?? ''),
        eq(auditEvents.action, action),
        eq(auditEvents.subject, subject),
        gt(auditEvents.at, sql`now() - make_interval(mins => ${minutes})`),
      ),
    )
    .limit(1);
  return row !== undefined;
}

export function selectAuditEvents(tx: Transaction, { practiceId, limit }: InPractice & { limit: number }) {
  return tx
    .select()
    .from(auditEvents)
    .where(eq(auditEvents.practiceId, practiceId))
    .orderBy(desc(auditEvents.id))
    .limit(limit);
}

/** Writes a mail into the outbox and asks the worker to send it; both happen with the transaction or not at all. */
export async function enqueueMail(
  tx: Transaction,
  values: InPractice & { template: string; recipient: string; payload: Record<string, string> },
) {
  const [row] = await tx.insert(outboxMails).values(values).returning({ id: outboxMails.id });
  const job = JSON.stringify({ practiceId: values.practiceId, mailId: row!.id });
  await tx.execute(sql`select enqueue_job('send-mail', ${job}::json)`);
  return row!;
}

export async function findMail(tx: Transaction, { practiceId, mailId }: InPractice & { mailId: string }) {
  const [row] = await tx
    .select()
    .from(outboxMails)
    .where(
      and(eq(outboxMails.practiceId, practiceId), eq(outboxMails.id, mailId), isNull(outboxMails.sentAt)),
    )
    .for('update', { skipLocked: true });
  return row ?? null;
}

export async function markMailSent(tx: Transaction, { practiceId, mailId }: InPractice & { mailId: string }) {
  await tx
    .update(outboxMails)
    .set({ sentAt: sql`now()`, payload: {}, lastError: '' })
    .where(and(eq(outboxMails.practiceId, practiceId), eq(outboxMails.id, mailId)));
}

export async function markMailFailed(
  tx: Transaction,
  { practiceId, mailId, error }: InPractice & { mailId: string; error: string },
) {
  await tx
    .update(outboxMails)
    .set({ attempts: sql`${outboxMails.attempts} + 1`, lastError: error.slice(0, 500) })
    .where(and(eq(outboxMails.practiceId, practiceId), eq(outboxMails.id, mailId)));
}

export interface NewToken extends InPractice {
  readonly userId: string;
  readonly name: string;
  readonly prefix: string;
  readonly tokenHash: string;
  readonly scopes: TokenScope[];
  readonly expiresAt: Date;
}

export async function insertToken(tx: Transaction, values: NewToken) {
  await tx.insert(apiTokens).values(values);
}

export function selectTokens(tx: Transaction, { practiceId }: InPractice) {
  return tx
    .select({
      id: apiTokens.id,
      name: apiTokens.name,
      prefix: apiTokens.prefix,
      scopes: apiTokens.scopes,
      createdBy: users.name,
      createdAt: apiTokens.createdAt,
      expiresAt: apiTokens.expiresAt,
      lastUsedAt: apiTokens.lastUsedAt,
    })
    .from(apiTokens)
    .innerJoin(users, eq(users.id, apiTokens.userId))
    .where(and(eq(apiTokens.practiceId, practiceId), isNull(apiTokens.revokedAt)))
    .orderBy(desc(apiTokens.createdAt));
}

export async function revokeTokenRow(tx: Transaction, { practiceId, id }: InPractice & { id: string }) {
  const [row] = await tx
    .update(apiTokens)
    .set({ revokedAt: sql`now()` })
    .where(and(eq(apiTokens.practiceId, practiceId), eq(apiTokens.id, id), isNull(apiTokens.revokedAt)))
    .returning({ name: apiTokens.name });
  return row ?? null;
}

/** A living token by its hash; needs the scope of that hash. */
export async function findToken(tx: Transaction, { tokenHash }: { tokenHash: string }) {
  const [row] = await tx
    .select()
    .from(apiTokens)
    .where(
      and(
        eq(apiTokens.tokenHash, tokenHash),
        isNull(apiTokens.revokedAt),
        gt(apiTokens.expiresAt, sql`now()`),
      ),
    );
  return row ?? null;
}

export async function touchToken(tx: Transaction, { practiceId, id }: InPractice & { id: string }) {
  await tx
    .update(apiTokens)
    .set({ lastUsedAt: sql`now()` })
    .where(and(eq(apiTokens.practiceId, practiceId), eq(apiTokens.id, id)));
}
