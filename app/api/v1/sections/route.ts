import { defineMethods, defineRoute } from '@/lib/server/define-route';
import { getSections, postSection } from '@/lib/server/section-api';

export const { GET, POST, PUT, PATCH, DELETE } = defineMethods({
  GET: defineRoute({ scope: 'sections:read' }, getSections),
  POST: defineRoute({ scope: 'sections:write' }, postSection),
});
