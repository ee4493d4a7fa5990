import { resultJsonSchema, sectionJsonSchema } from '@/lib/domain/json-schema';
import { AppError } from '@/lib/errors';
import { defineMethods, json, type RouteHandler } from '@/lib/server/define-route';
import { errorResponse } from '@/lib/server/problem-response';

const schemas: Record<string, () => object> = {
  'section.json': sectionJsonSchema,
  'result.json': resultJsonSchema,
};

const getSchema: RouteHandler = async (_request, { params }) => {
  const make = schemas[(await params).name ?? ''];
  if (!make) return errorResponse(new AppError('not-found'));
  return json(make(), {
    headers: { 'content-type': 'application/schema+json', 'cache-control': 'public, max-age=300' },
  });
};

export const { GET, POST, PUT, PATCH, DELETE } = defineMethods({ GET: getSchema });
