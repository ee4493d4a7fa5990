'use server';
import { z } from 'zod';
import { defineAction } from '@/lib/server/define-action';
import * as sections from '@/lib/server/sections';
import type { SectionDocument } from '@/lib/domain/section';

const saveForm = z.object({
  sectionId: z.string().min(1).max(64),
  document: z.custom<SectionDocument>((value) => typeof value === 'object' && value !== null),
  baseVersion: z.number().int().positive(),
});

export const saveSection = defineAction(saveForm, ({ input, actor }) => sections.saveSection(actor, input));

export const readSection = defineAction(
  z.object({ sectionId: z.string().min(1).max(64) }),
  ({ input, actor }) => sections.getSection(actor, input.sectionId),
);
