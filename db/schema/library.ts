// What belongs to a practice as a whole: materials, criteria, its log and its mail.
import { sql } from 'drizzle-orm';
import {
  bigint,
  boolean,
  check,
  doublePrecision,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uuid,
  varchar,
} from 'drizzle-orm/pg-core';
import type { Material } from '@/lib/domain/section';
import { createdAt, id, instant, userId } from './columns';
import { practices, users } from './people';

const practiceId = () =>
  uuid('practice_id')
    .notNull()
    .references(() => practices.id, { onDelete: 'cascade' });

export const materials = pgTable(
  'materials',
  {
    id: id(),
    practiceId: practiceId(),
    material: jsonb('material').$type<Material>().notNull(),
    note: text('note').notNull().default(''),
    createdAt: createdAt(),
  },
  (t) => [index('materials_practice_idx').on(t.practiceId)],
);

export const criteria = pgTable(
  'criteria',
  {
    practiceId: practiceId(),
    /** Of an adopted example the example's own id. */
    id: text('id').notNull(),
    quantity: text('quantity').notNull(),
    required: doublePrecision('required').notNull(),
    title: text('title').notNull(),
    source: text('source').notNull(),
    soil: text('soil').notNull().default(''),
    isExample: boolean('is_example').notNull().default(false),
    adoptedAt: instant('adopted_at'),
    approvedBy: userId('approved_by').references(() => users.id, { onDelete: 'set null' }),
  },
  (t) => [
    primaryKey({ columns: [t.practiceId, t.id] }),
    check('criteria_required_positive', sql`${t.required} > 0`),
  ],
);

/** Append-only: a trigger refuses update, delete and truncate to everyone. */
export const auditEvents = pgTable(
  'audit_events',
  {
    id: bigint('id', { mode: 'bigint' }).primaryKey().generatedAlwaysAsIdentity(),
    practiceId: uuid('practice_id').notNull(),
    at: createdAt(),
    actorId: userId('actor_id'),
    actorName: text('actor_name').notNull(),
    action: text('action').notNull(),
    subject: text('subject').notNull().default(''),
    detail: text('detail').notNull().default(''),
  },
  (t) => [index('audit_events_practice_idx').on(t.practiceId, t.id)],
);

/** Written in the transaction of the event, sent by the worker. The payload is emptied once sent, since it may hold a link. */
export const outboxMails = pgTable(
  'outbox_mails',
  {
    id: id(),
    practiceId: practiceId(),
    template: text('template').notNull(),
    recipient: text('recipient').notNull(),
    payload: jsonb('payload').$type<Record<string, string>>().notNull(),
    createdAt: createdAt(),
    sentAt: instant('sent_at'),
    attempts: integer('attempts').notNull().default(0),
    lastError: text('last_error').notNull().default(''),
  },
  (t) => [
    index('outbox_mails_open_idx')
      .on(t.practiceId)
      .where(sql`${t.sentAt} is null`),
  ],
);

/** Counters of the rate limiter, which asks for these names. */
export const rateLimits = pgTable('rate_limits', {
  key: varchar('key', { length: 255 }).primaryKey(),
  points: integer('points').notNull().default(0),
  expire: bigint('expire', { mode: 'number' }),
});
