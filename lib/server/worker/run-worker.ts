// The worker process: takes jobs from the queue in PostgreSQL. Any number of them may run, on any number of machines.
import { makeWorkerUtils, parseCronItems, type Runner, run, type TaskList } from 'graphile-worker';
import { createTransport } from 'nodemailer';
import { Pool } from 'pg';
import { z } from 'zod';
import { database } from '@/db/client';
import { sweepExpired } from '@/db/queries/people';
import { env } from '../env';
import { log } from '../log';
import { deliverMail } from '../mail/deliver';

/** Held by the process that may free the jobs of dead workers. */
const guardLock = 471_100;
const mailJob = z.object({ practiceId: z.uuid(), mailId: z.uuid() });

export interface RunningWorker {
  /** Ends when the worker does. */
  readonly ended: Promise<void>;
  stop(): Promise<void>;
}

export interface WorkerOptions {
  /** The owner's connection: the queue's tables are not the application's. */
  readonly queueUrl: string;
  readonly smtpUrl: string;
}

/** Starts taking jobs. */
export async function startWorker({ queueUrl, smtpUrl }: WorkerOptions): Promise<RunningWorker> {
  const queue = new Pool({ connectionString: queueUrl, max: 4 });
  queue.on('error', () => {}); // an idle client's error would end the process; the next query reports it
  queue.on('connect', (client) => client.on('error', () => {}));
  const transport = createTransport(smtpUrl);
  const tasks: TaskList = {
    'send-mail': async (payload, { job }) => {
      const sent = await deliverMail(mailJob.parse(payload), { transport, address: env().MAIL_FROM });
      log.info({ job: job.id, sent }, 'mail');
    },
    sweep: async () => {
      await sweepExpired(database());
      log.info('swept');
    },
  };
  const guard = await freeDeadJobs(queue);
  const runner = await run({
    pgPool: queue,
    taskList: tasks,
    concurrency: 2,
    pollInterval: 2000,
    parsedCronItems: parseCronItems([{ task: 'sweep', match: '17 3 * * *' }]),
    noHandleSignals: true, // its own handler ends the process before the pools are closed
    preset: {
      // by default the "job done" query is fired and forgotten, so that a job that ends during a shutdown stays locked
      worker: { completeJobBatchDelay: 0, failJobBatchDelay: 0, gracefulShutdownAbortTimeout: 20_000 },
    },
  });
  return {
    ended: runner.promise,
    stop: () => stopAll(runner, { queue, guard, transport }),
  };
}

async function stopAll(
  runner: Runner,
  { queue, guard, transport }: { queue: Pool; guard: { release(): void }; transport: { close(): void } },
): Promise<void> {
  await runner.stop();
  transport.close();
  guard.release();
  await queue.end();
}

/**
 * A killed worker leaves its jobs locked for hours. Whoever holds the guard lock is the first worker of this database, so
 * every lock it finds is a dead one's. The lock goes with its connection.
 */
async function freeDeadJobs(queue: Pool): Promise<{ release(): void }> {
  const guard = await queue.connect();
  const { rows } = await guard.query<{ isFirst: boolean }>('select pg_try_advisory_lock($1) as "isFirst"', [
    guardLock,
  ]);
  if (!rows[0]?.isFirst) return guard;
  const locked = await queue.query<{ locked_by: string }>(
    'select distinct locked_by from graphile_worker.jobs where locked_by is not null',
  );
  if (locked.rows.length > 0) {
    const utils = await makeWorkerUtils({ pgPool: queue });
    await utils.forceUnlockWorkers(locked.rows.map(({ locked_by }) => locked_by));
    await utils.release();
    log.warn({ freed: locked.rows.length }, 'freed the jobs of dead workers');
  }
  return guard;
}
