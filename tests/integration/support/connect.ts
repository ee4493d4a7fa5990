import { Client } from 'pg';

/** Runs statements in one connection of its own, by the role whose address the variable holds. */
export async function withConnection<T>(
  variable: 'DATABASE_URL' | 'DATABASE_OWNER_URL' | 'UNDERFALL_TEST_SUPER_URL',
  run: (client: Client) => Promise<T>,
): Promise<T> {
  const client = new Client({ connectionString: process.env[variable]! });
  client.on('error', () => {});
  await client.connect();
  try {
    return await run(client);
  } finally {
    await client.end();
  }
}

export const asApplication = <T>(run: (client: Client) => Promise<T>) => withConnection('DATABASE_URL', run);
export const asOwner = <T>(run: (client: Client) => Promise<T>) => withConnection('DATABASE_OWNER_URL', run);
export const asSuperuser = <T>(run: (client: Client) => Promise<T>) =>
  withConnection('UNDERFALL_TEST_SUPER_URL', run);
