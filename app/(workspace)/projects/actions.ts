'use server';

import { revalidatePath } from 'next/cache';
import { appointmentForm, projectForm, renameProjectForm } from '@/lib/domain/forms';
import { paths } from '@/lib/paths';
import { defineAction } from '@/lib/server/define-action';
import * as projects from '@/lib/server/projects';

export const createProject = defineAction(projectForm, async ({ input, actor }) => {
  const { id } = await projects.createProject(actor, input);
  revalidatePath(paths.projects());
  return { id };
});

export const renameProject = defineAction(renameProjectForm, async ({ input, actor }) => {
  await projects.renameProject(actor, input);
  revalidatePath(paths.project(input.projectId));
});

export const appoint = defineAction(appointmentForm, async ({ input, actor }) => {
  await projects.appoint(actor, input);
  revalidatePath(paths.project(input.projectId));
});

export const removeAppointment = defineAction(appointmentForm, async ({ input, actor }) => {
  await projects.removeAppointment(actor, input);
  revalidatePath(paths.project(input.projectId));
});
