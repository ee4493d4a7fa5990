import { defineMethods, defineRoute } from '@/lib/server/define-route';
import { getSectionDocument, putSectionDocument, removeSection } from '@/lib/server/section-api';

export const { GET, POST, PUT, PATCH, DELETE } = defineMethods({
  GET: defineRoute({ scope: 'sections:read' }, getSectionDocument),
  PUT: defineRoute({ scope: 'sections:write' }, putSectionDocument),
  DELETE: defineRoute({ scope: 'sections:write' }, removeSection),
});
