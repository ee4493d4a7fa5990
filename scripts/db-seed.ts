// Seeds the demonstration where it is missing; what is there already stays as it is.
import { pool } from '@/db/client';
import { seedDemo } from './seed-demo';

console.log((await seedDemo()) ? 'the demonstration is in place' : 'the demonstration was there already');
await pool().end();
