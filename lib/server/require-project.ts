import 'server-only';
import type { Transaction } from '@/db/client';
import { findProject, rolesOn } from '@/db/queries/work';
import type { Actor } from '@/lib/domain/dto';
import { AppError } from '@/lib/errors';
import { may } from './authorize';
import { requireId } from './require-id';

/** A project with the actor's appointments on it; one the actor may not see is not there. */
export async function requireProject(tx: Transaction, actor: Actor, id: string) {
  const { practiceId, userId } = actor;
  const projectId = requireId(id);
  const project = await findProject(tx, { practiceId, projectId });
  const own = await rolesOn(tx, { practiceId, projectId, userId });
  if (!project || !may(actor, 'project.read', own)) throw new AppError('not-found');
  return { ...project, own };
}
