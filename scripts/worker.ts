// The worker as a process, bundled to dist/worker.js by scripts/build-worker.ts.
import { pool } from '@/db/client';
import { env } from '@/lib/server/env';
import { log } from '@/lib/server/log';
import { startWorker } from '@/lib/server/worker/run-worker';

const { SMTP_URL: smtpUrl } = env();
const queueUrl = process.env.DATABASE_OWNER_URL;
if (!queueUrl) {
  console.error('DATABASE_OWNER_URL is not set; npm start sets it, .env.example shows its form.');
  process.exit(2);
}
const worker = await startWorker({ queueUrl, smtpUrl });
log.info('worker up');
let isStopping = false;
for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.on(signal, () => {
    if (isStopping) return;
    isStopping = true;
    worker
      .stop()
      .then(() => pool().end())
      .then(
        () => process.exit(0),
        (error: unknown) => {
          log.error(error, 'shutdown failed');
          process.exit(1);
        },
      );
  });
}
await worker.ended;
