import { defineMethods, defineRoute } from '@/lib/server/define-route';
import { getProjects } from '@/lib/server/section-api';

export const { GET, POST, PUT, PATCH, DELETE } = defineMethods({
  GET: defineRoute({ scope: 'sections:read' }, getProjects),
});
