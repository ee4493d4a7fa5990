// Practices, people, how they sign in.
import { sql } from 'drizzle-orm';
import { check, index, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id, instant, userId } from './columns';

export const practices = pgTable('practices', {
  id: id(),
  name: text('name').notNull(),
  createdAt: createdAt(),
});

/** A person; belongs to no practice by itself, so that one address serves in several. */
export const users = pgTable(
  'users',
  {
    id: text('id').primaryKey(),
    name: text('name').notNull(),
    email: text('email').notNull(),
    passwordHash: text('password_hash').notNull(),
    units: text('units', { enum: ['si', 'us'] })
      .notNull()
      .default('si'),
    createdAt: createdAt(),
  },
  (t) => [
    uniqueIndex('users_email_key').on(t.email),
    check('users_email_lower', sql`${t.email} = lower(${t.email})`),
    check('users_units_known', sql`${t.units} in ('si', 'us')`),
  ],
);

export const memberships = pgTable(
  'memberships',
  {
    practiceId: uuid('practice_id')
      .notNull()
      .references(() => practices.id, { onDelete: 'cascade' }),
    userId: userId()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    role: text('role', { enum: ['administrator', 'member', 'client'] }).notNull(),
    joinedAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.practiceId, t.userId] }),
    index('memberships_user_idx').on(t.userId),
    check('memberships_role_known', sql`${t.role} in ('administrator', 'member', 'client')`),
  ],
);

export const invitations = pgTable(
  'invitations',
  {
    id: id(),
    practiceId: uuid('practice_id')
      .notNull()
      .references(() => practices.id, { onDelete: 'cascade' }),
    email: text('email').notNull(),
    role: text('role', { enum: ['administrator', 'member', 'client'] }).notNull(),
    tokenHash: text('token_hash').notNull(),
    invitedBy: userId('invited_by')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    createdAt: createdAt(),
    expiresAt: instant('expires_at').notNull(),
    acceptedAt: instant('accepted_at'),
  },
  (t) => [
    uniqueIndex('invitations_token_key').on(t.tokenHash),
    index('invitations_practice_idx').on(t.practiceId),
    check('invitations_role_known', sql`${t.role} in ('administrator', 'member', 'client')`),
  ],
);

/** Shape asked for by the session library: text id, user_id, expires_at; the rest is ours. */
export const sessions = pgTable(
  'sessions',
  {
    id: text('id').primaryKey(),
    userId: userId()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    expiresAt: timestamp('expires_at', { withTimezone: true, mode: 'date' }).notNull(),
    practiceId: uuid('practice_id')
      .notNull()
      .references(() => practices.id, { onDelete: 'cascade' }),
    /** What the session list shows; the id itself is the secret and never leaves the cookie. */
    publicId: uuid('public_id')
      .notNull()
      .default(sql`gen_random_uuid()`),
    userAgent: text('user_agent').notNull().default(''),
    address: text('address').notNull().default(''),
    createdAt: createdAt(),
    lastSeenAt: instant('last_seen_at').notNull().defaultNow(),
  },
  (t) => [index('sessions_user_idx').on(t.userId)],
);

export const passwordResets = pgTable(
  'password_resets',
  {
    tokenHash: text('token_hash').primaryKey(),
    userId: userId()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    createdAt: createdAt(),
    expiresAt: instant('expires_at').notNull(),
    usedAt: instant('used_at'),
  },
  (t) => [index('password_resets_user_idx').on(t.userId)],
);

export const apiTokens = pgTable(
  'api_tokens',
  {
    id: id(),
    practiceId: uuid('practice_id')
      .notNull()
      .references(() => practices.id, { onDelete: 'cascade' }),
    userId: userId()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    prefix: text('prefix').notNull(),
    tokenHash: text('token_hash').notNull(),
    scopes: text('scopes').array().notNull(),
    createdAt: createdAt(),
    expiresAt: instant('expires_at').notNull(),
    lastUsedAt: instant('last_used_at'),
    revokedAt: instant('revoked_at'),
  },
  (t) => [
    uniqueIndex('api_tokens_token_key').on(t.tokenHash),
    index('api_tokens_practice_idx').on(t.practiceId),
    check('api_tokens_scopes_known', sql`${t.scopes} <@ array['sections:read', 'sections:write', 'solve']`),
  ],
);
