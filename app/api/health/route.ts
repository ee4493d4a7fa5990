import { defineMethods, definePublicRoute, json } from '@/lib/server/define-route';
import { checkHealth } from '@/lib/server/health';

export const dynamic = 'force-dynamic';

export const { GET, POST, PUT, PATCH, DELETE } = defineMethods({
  GET: definePublicRoute(async () => json(await checkHealth(), { headers: { 'cache-control': 'no-store' } })),
});
