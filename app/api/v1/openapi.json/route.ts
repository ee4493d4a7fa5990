import { defineMethods, definePublicRoute, json } from '@/lib/server/define-route';
import { openApiDocument } from '@/lib/server/openapi';

export const dynamic = 'force-dynamic';

export const { GET, POST, PUT, PATCH, DELETE } = defineMethods({
  GET: definePublicRoute(() =>
    json(openApiDocument(), { headers: { 'cache-control': 'public, max-age=300' } }),
  ),
});
