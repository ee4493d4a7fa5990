import 'server-only';
import { type Transaction, withPractice } from '@/db/client';
import { hasRecentEvent, insertAuditEvent, selectAuditEvents } from '@/db/queries/library';
import type { Actor, AuditEvent } from '@/lib/domain/dto';
import { authorize } from './authorize';

const shown = 500;

/** Writes an event in the transaction of what it tells of. */
export async function record(
  tx: Transaction,
  actor: Pick<Actor, 'practiceId' | 'userId' | 'name'>,
  event: { action: string; subject?: string; detail?: string },
): Promise<void> {
  await insertAuditEvent(tx, {
    practiceId: actor.practiceId,
    actorId: actor.userId,
    actorName: actor.name,
    ...event,
  });
}

const quietMinutes = 10;

/** Writes an event unless the same was written in the last ten minutes: a screen that keeps every change would fill the log. */
export async function recordOnce(
  tx: Transaction,
  actor: Pick<Actor, 'practiceId' | 'userId' | 'name'>,
  event: { action: string; subject: string; detail?: string },
): Promise<void> {
  const { practiceId, userId: actorId } = actor;
  const { action, subject } = event;
  if (await hasRecentEvent(tx, { practiceId, actorId, action, subject, minutes: quietMinutes })) return;
  await record(tx, actor, event);
}

/** The newest events of the practice. */
export async function listAuditEvents(actor: Actor): Promise<AuditEvent[]> {
  authorize(actor, 'audit.read');
  const { practiceId } = actor;
  const rows = await withPractice(practiceId, (tx) => selectAuditEvents(tx, { practiceId, limit: shown }));
  return rows.map(({ id, at, actorName, action, subject, detail }) => ({
    id: String(id),
    at: at.toISOString(),
    actor: actorName,
    action,
    subject,
    detail,
  }));
}
