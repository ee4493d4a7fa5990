import 'server-only';
import { sql } from 'drizzle-orm';
import { database } from '@/db/client';
import { engineVersion } from '@/lib/analysis/version';

/** That the process answers and reaches its database; throws where it does not. */
export async function checkHealth(): Promise<{ status: 'ok'; version: string }> {
  await database().execute(sql`select 1`);
  return { status: 'ok', version: engineVersion };
}
