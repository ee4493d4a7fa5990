import { defineMethods, defineRoute } from '@/lib/server/define-route';
import { postSolve } from '@/lib/server/section-api';

export const maxDuration = 60;

export const { GET, POST, PUT, PATCH, DELETE } = defineMethods({
  POST: defineRoute({ scope: 'solve', limit: 'solve' }, postSolve),
});
