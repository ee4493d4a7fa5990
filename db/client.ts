import 'server-only';
import { sql } from 'drizzle-orm';
import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import { Pool } from 'pg';
import * as schema from './schema';

export type Database = NodePgDatabase<typeof schema>;
/** A transaction, in which the practice is set. */
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0];

// on globalThis: Next.js evaluates modules once per bundle, and one pool a process is the point
const shared = globalThis as unknown as { underfallPool?: Pool; underfallDatabase?: Database };

/** The pool; made on first use, since `next build` imports this module without a database. */
export function pool(): Pool {
  if (!shared.underfallPool) {
    const connectionString = process.env.DATABASE_URL;
    if (!connectionString) throw new RangeError('DATABASE_URL is not set');
    const made = new Pool({ connectionString, max: 12, connectionTimeoutMillis: 5000 });
    // an idle client's error would end the process where nobody listens; the next query reports it
    made.on('error', () => {});
    made.on('connect', (client) => client.on('error', () => {}));
    shared.underfallPool = made;
  }
  return shared.underfallPool;
}

/** The database outside any practice: people, sign-in sessions, password resets. Tenant tables show nothing here. */
export function database(): Database {
  shared.underfallDatabase ??= drizzle(pool(), { schema });
  return shared.underfallDatabase;
}

/** What a transaction may see besides the tables without a tenant. */
export interface Scope {
  readonly practiceId?: string;
  readonly userId?: string;
  readonly tokenHash?: string;
}

/** Runs a transaction with its scope set for row-level security; the settings end with it. */
export function withScope<T>(
  { practiceId = '', userId = '', tokenHash = '' }: Scope,
  run: (tx: Transaction) => Promise<T>,
): Promise<T> {
  return database().transaction(async (tx) => {
    await tx.execute(
      sql`select set_config('app.practice', ${practiceId}, true), set_config('app.user', ${userId}, true), set_config('app.token', ${tokenHash}, true)`,
    );
    return run(tx);
  });
}

/** Runs a transaction within one practice. */
export function withPractice<T>(practiceId: string, run: (tx: Transaction) => Promise<T>): Promise<T> {
  return withScope({ practiceId }, run);
}
