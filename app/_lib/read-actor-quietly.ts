import type { Actor } from '@/lib/domain/dto';
import { currentActor } from '@/lib/server/session';

/** Who is signed in, for pages that need nobody: with the database away they are still read, as by a stranger. */
export async function readActorQuietly(): Promise<Actor | null> {
  try {
    return await currentActor();
  } catch {
    return null;
  }
}
