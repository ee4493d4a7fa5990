'use server';

import { beginSectionForm, newSectionForm } from '@/lib/domain/forms';
import type { Issue } from '@/lib/domain/issue';
import { startingPoints } from '@/lib/domain/starting-points';
import { parseSectionText } from '@/lib/domain/validate';
import { AppError } from '@/lib/errors';
import { defineAction } from '@/lib/server/define-action';
import { createSection } from '@/lib/server/sections';

/** A section as shipped, "yours to replace" until its first change. */
export const beginSection = defineAction(beginSectionForm, async ({ input, actor }) => {
  const start = startingPoints.find(({ id }) => id === input.startingPoint);
  if (!start) throw new AppError('not-found');
  const { id } = await createSection(actor, {
    projectId: input.projectId,
    document: start.document,
    untouched: true,
  });
  return { id };
});

type Creation = { status: 'created'; id: string } | { status: 'refused'; issues: Issue[] };

/** A section from a document of the person's own, or the list of what is wrong with it. */
export const createSectionFromText = defineAction(
  newSectionForm,
  async ({ input, actor }): Promise<Creation> => {
    const { document, issues } = parseSectionText(input.text);
    if (!document) return { status: 'refused', issues: issues.filter(({ severity }) => severity === 'stop') };
    const { id } = await createSection(actor, { projectId: input.projectId, document, untouched: false });
    return { status: 'created', id };
  },
);
