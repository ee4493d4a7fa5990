// Brings the database up to date as its owner: our migrations, then the job queue's own schema.
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import { runMigrations } from 'graphile-worker';
import { Pool } from 'pg';

const connectionString = process.env.DATABASE_OWNER_URL;
if (!connectionString) {
  console.error('DATABASE_OWNER_URL is not set; npm start sets it, .env.example shows its form.');
  process.exit(2);
}
const pool = new Pool({ connectionString, max: 2 });
pool.on('error', () => {});
pool.on('connect', (client) => client.on('error', () => {}));
await migrate(drizzle(pool), { migrationsFolder: 'db/migrations' });
await runMigrations({ pgPool: pool });
await pool.end();
