// Every path of the API that is none: a problem document, never a page.
import { AppError } from '@/lib/errors';
import { errorResponse } from '@/lib/server/problem-response';

function refuse(): Response {
  const sentence = 'There is no such path in the API. /api/openapi.json lists those that are.';
  return errorResponse(new AppError('not-found', undefined, { sentence }));
}

export { refuse as DELETE, refuse as GET, refuse as PATCH, refuse as POST, refuse as PUT };
