// A fresh database for one run, inside the cluster whose superuser UNDERFALL_TEST_ADMIN_URL names; dropped afterwards.
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import { runMigrations } from 'graphile-worker';
import { Client, Pool } from 'pg';
import { buildWorkers } from '../../scripts/build-worker';

function urlOf(role: string, database: string, admin: string): string {
  const url = new URL(admin);
  url.username = role;
  url.password = 'underfall';
  url.pathname = `/${database}`;
  return url.href;
}

async function withAdmin(admin: string, statement: string): Promise<void> {
  const client = new Client({ connectionString: admin });
  await client.connect();
  await client.query(statement);
  await client.end();
}

export default async function setUp(): Promise<() => Promise<void>> {
  const admin = process.env.UNDERFALL_TEST_ADMIN_URL;
  if (!admin) throw new RangeError('UNDERFALL_TEST_ADMIN_URL is not set; npm test sets it.');
  const database = `underfall_test_${process.pid}`;
  await withAdmin(admin, `create database ${database} owner underfall_owner`);
  process.env.DATABASE_URL = urlOf('underfall_app', database, admin);
  process.env.DATABASE_OWNER_URL = urlOf('underfall_owner', database, admin);
  const superUrl = new URL(admin);
  superUrl.pathname = `/${database}`;
  process.env.UNDERFALL_TEST_SUPER_URL = superUrl.href;
  process.env.UNDERFALL_URL = 'http://underfall.example';
  process.env.SMTP_URL ??= 'smtp://127.0.0.1:1';
  process.env.COOKIE_SECURE = '1';
  process.env.LOG_LEVEL = 'silent';
  const pool = new Pool({ connectionString: process.env.DATABASE_OWNER_URL, max: 2 });
  pool.on('error', () => {});
  pool.on('connect', (client) => client.on('error', () => {}));
  await migrate(drizzle(pool), { migrationsFolder: 'db/migrations' });
  await runMigrations({ pgPool: pool });
  await pool.end();
  await buildWorkers();
  return () => withAdmin(admin, `drop database ${database} with (force)`);
}
