import 'server-only';
import type { Actor, Desk } from '@/lib/domain/dto';
import { may } from './authorize';
import { listInvitations } from './people';
import { listProjects } from './projects';
import { listSections } from './sections';

/** What waits for the actor. A client sees the projects they are appointed to, and nothing of the drafts. */
export async function readDesk(actor: Actor): Promise<Desk> {
  const [projects, drafts, invitations] = await Promise.all([
    listProjects(actor),
    listSections(actor),
    may(actor, 'members.manage') ? listInvitations(actor) : [],
  ]);
  return { projects, drafts, invitations };
}
