import { sql } from 'drizzle-orm';
import { text, timestamp, uuid } from 'drizzle-orm/pg-core';

export const id = () =>
  uuid('id')
    .primaryKey()
    .default(sql`gen_random_uuid()`);
export const createdAt = () => timestamp('created_at', { withTimezone: true }).notNull().defaultNow();
export const instant = (name: string) => timestamp(name, { withTimezone: true });
export const userId = (name = 'user_id') => text(name);
