import { afterAll, vi } from 'vitest';

vi.mock('next/headers', async () => (await import('./support/browser')).nextHeaders);

afterAll(async () => {
  const shared = globalThis as { underfallPool?: { end(): Promise<void> } };
  await shared.underfallPool?.end();
});
