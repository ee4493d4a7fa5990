import 'server-only';
import { type Transaction, withPractice } from '@/db/client';
import { deleteCriterion, selectCriteria, upsertCriterion } from '@/db/queries/library';
import { exampleCriteria } from '@/lib/checks';
import { type Criterion, criterionSchema } from '@/lib/domain/criteria';
import type { Actor } from '@/lib/domain/dto';
import { AppError } from '@/lib/errors';
import { record } from './audit';
import { authorize } from './authorize';

/** The criteria a practice has adopted. */
export async function listCriteria(actor: Actor): Promise<Criterion[]> {
  authorize(actor, 'criteria.list');
  return withPractice(actor.practiceId, (tx) => readCriteria(tx, actor.practiceId));
}

async function readCriteria(tx: Transaction, practiceId: string): Promise<Criterion[]> {
  const rows = await selectCriteria(tx, { practiceId });
  return rows.map(({ soil, isExample, adoptedAt, approvedBy, ...row }) =>
    criterionSchema.parse({
      ...row,
      example: isExample,
      ...(soil ? { soil } : {}),
      ...(adoptedAt ? { adopted: adoptedAt.toISOString().slice(0, 10) } : {}),
      ...(approvedBy ? { approvedBy } : {}),
    }),
  );
}

/** What a section is held against: what was adopted, and the shipped examples for quantities nothing was adopted for. */
export async function readCriteriaInEffect(tx: Transaction, practiceId: string): Promise<Criterion[]> {
  const adopted = await readCriteria(tx, practiceId);
  const settled = new Set(adopted.map(({ quantity }) => quantity));
  return [...adopted, ...exampleCriteria.filter(({ quantity }) => !settled.has(quantity))];
}

/** The same for an actor, outside a transaction; a solve takes them without the right to read the library. */
export function listCriteriaInEffect({ practiceId }: Actor): Promise<Criterion[]> {
  return withPractice(practiceId, (tx) => readCriteriaInEffect(tx, practiceId));
}

export interface CriterionInput {
  /** Empty for a new one; an example's id adopts it. */
  readonly id: string;
  readonly quantity: Criterion['quantity'];
  readonly required: number;
  readonly title: string;
  readonly source: string;
  readonly soil: string;
}

export async function saveCriterion(
  actor: Actor,
  { id, soil, ...input }: CriterionInput,
): Promise<{ id: string }> {
  authorize(actor, 'criteria.manage');
  const { practiceId, userId } = actor;
  const criterion: Criterion = {
    ...input,
    id: id || crypto.randomUUID(),
    example: false,
    ...(soil ? { soil } : {}),
  };
  await withPractice(practiceId, async (tx) => {
    await upsertCriterion(tx, { practiceId, criterion, userId });
    const detail = `${criterion.quantity} at least ${criterion.required}; ${criterion.source}`;
    await record(tx, actor, { action: 'criterion.saved', subject: criterion.title, detail });
  });
  return { id: criterion.id };
}

export async function removeCriterion(actor: Actor, id: string): Promise<void> {
  authorize(actor, 'criteria.manage');
  const { practiceId } = actor;
  await withPractice(practiceId, async (tx) => {
    const removed = await deleteCriterion(tx, { practiceId, id });
    if (!removed) throw new AppError('not-found');
    await record(tx, actor, { action: 'criterion.removed', subject: removed.title });
  });
}
