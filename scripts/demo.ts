// The people of the demonstration: an invented practice. Their passwords are printed at every start, so they are no secrets.
import type { PracticeRole } from '@/lib/domain/dto';

export interface DemoPerson {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly password: string;
  readonly role: PracticeRole;
  /** What they do, for the list that npm start prints. */
  readonly part: string;
}

export const demoPractice = {
  id: '5b1c8f0e-6f0a-4d7e-9a55-0d3c1f6a2e01',
  name: 'Marlow Reach Engineering',
} as const;

export const demoPeople = {
  author: {
    id: 'demo-anneke-brandt',
    name: 'Anneke Brandt',
    email: 'anneke.brandt@marlowreach.example',
    password: 'heron wades at low water',
    role: 'administrator',
    part: 'administrator of the practice, author of both projects',
  },
  checker: {
    id: 'demo-tomas-okafor',
    name: 'Tomas Okafor',
    email: 'tomas.okafor@marlowreach.example',
    password: 'gravel bar below the weir',
    role: 'member',
    part: 'checker of both projects',
  },
  client: {
    id: 'demo-rosalind-pike',
    name: 'Rosalind Pike',
    email: 'rosalind.pike@aldernwater.example',
    password: 'seven gates on the canal',
    role: 'client',
    part: 'client; sees what is issued, and no drafts',
  },
} as const satisfies Record<string, DemoPerson>;
