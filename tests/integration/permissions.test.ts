// Every function of lib/server that takes an actor: who may, who may not, and somebody of another practice.
import { beforeAll, describe, expect, test } from 'vitest';
import { withPractice } from '@/db/client';
import { insertAppointment } from '@/db/queries/work';
import type { Actor } from '@/lib/domain/dto';
import { AppError } from '@/lib/errors';
import { listAuditEvents } from '@/lib/server/audit';
import { listCriteria, removeCriterion, saveCriterion } from '@/lib/server/criteria';
import { readDesk } from '@/lib/server/desk';
import { listMaterials, removeMaterial, saveMaterial } from '@/lib/server/materials';
import {
  changeRole,
  invite,
  listInvitations,
  listMembers,
  removeMember,
  revokeInvitation,
} from '@/lib/server/people';
import {
  appoint,
  createProject,
  getProject,
  listProjects,
  removeAppointment,
  renameProject,
} from '@/lib/server/projects';
import { createSection, deleteSection, getSection, listSections, saveSection } from '@/lib/server/sections';
import { createToken, listTokens, revokeToken } from '@/lib/server/tokens';
import { addMember, makePractice, sampleSection, type TestPractice, unique } from './support/practice';

type Who = 'administrator' | 'author' | 'checker' | 'approver' | 'bystander' | 'client' | 'stranger';
const everyone: Who[] = ['administrator', 'author', 'checker', 'approver', 'bystander', 'client', 'stranger'];
const members: Who[] = ['administrator', 'author', 'checker', 'approver', 'bystander'];
const nobodyHasThis = '00000000-0000-4000-8000-000000000000';

interface Row {
  readonly name: string;
  readonly call: (actor: Actor, at: TestPractice) => Promise<unknown>;
  /** Whose call is let in. */
  readonly may: readonly Who[];
  /** What the others get; `stranger` always gets not-found where something of ours is named. */
  readonly refusal: Partial<Record<Who, 'forbidden' | 'not-found'>>;
  /** A stranger may call it in their own practice, where it touches nothing of ours. */
  readonly ownPractice?: boolean;
  /** The call names something that does not exist, so that being let in ends in not-found. */
  readonly namesNothing?: boolean;
}

const forbidden = (...who: Who[]) => Object.fromEntries(who.map((one) => [one, 'forbidden' as const]));
const hidden = (...who: Who[]) => Object.fromEntries(who.map((one) => [one, 'not-found' as const]));
const notAdministrators: Who[] = ['author', 'checker', 'approver', 'bystander', 'client', 'stranger'];

const project = { name: 'Weir', client: '', description: '' };
const criterion = {
  id: '',
  quantity: 'flotation' as const,
  required: 1.1,
  title: 'A',
  source: 'B',
  soil: '',
};
const material = {
  id: '',
  name: 'Silt',
  kMajor: 1e-6,
  kMinor: 1e-7,
  kSource: 'judgement' as const,
  note: '',
};

const rows: Row[] = [
  {
    name: 'listMembers',
    call: (actor) => listMembers(actor),
    may: members,
    refusal: forbidden('client'),
    ownPractice: true,
  },
  {
    name: 'listInvitations',
    call: (actor) => listInvitations(actor),
    may: ['administrator'],
    refusal: forbidden(...notAdministrators),
  },
  {
    name: 'invite',
    call: (actor) => invite(actor, { email: `${unique('new')}@else.example`, role: 'member' }),
    may: ['administrator'],
    refusal: forbidden(...notAdministrators),
  },
  {
    name: 'revokeInvitation',
    namesNothing: true,
    call: (actor) => revokeInvitation(actor, nobodyHasThis),
    may: ['administrator'],
    refusal: forbidden(...notAdministrators),
  },
  {
    name: 'changeRole',
    call: (actor, { bystander }) => changeRole(actor, { userId: bystander.userId, role: 'member' }),
    may: ['administrator'],
    refusal: forbidden(...notAdministrators),
  },
  {
    name: 'removeMember',
    namesNothing: true,
    call: (actor) => removeMember(actor, { userId: 'nobody' }),
    may: ['administrator'],
    refusal: forbidden(...notAdministrators),
  },
  {
    name: 'listCriteria',
    call: (actor) => listCriteria(actor),
    may: members,
    refusal: forbidden('client'),
    ownPractice: true,
  },
  {
    name: 'saveCriterion',
    call: (actor) => saveCriterion(actor, criterion),
    may: ['administrator'],
    refusal: forbidden(...notAdministrators),
  },
  {
    name: 'removeCriterion',
    namesNothing: true,
    call: (actor) => removeCriterion(actor, 'none'),
    may: ['administrator'],
    refusal: forbidden(...notAdministrators),
  },
  {
    name: 'listMaterials',
    call: (actor) => listMaterials(actor),
    may: members,
    refusal: forbidden('client'),
    ownPractice: true,
  },
  {
    name: 'saveMaterial',
    call: (actor) => saveMaterial(actor, material),
    may: members,
    refusal: forbidden('client'),
    ownPractice: true,
  },
  {
    name: 'removeMaterial',
    namesNothing: true,
    call: (actor) => removeMaterial(actor, nobodyHasThis),
    may: members,
    refusal: { ...forbidden('client'), ...hidden('stranger') },
  },
  {
    name: 'listAuditEvents',
    call: (actor) => listAuditEvents(actor),
    may: ['administrator'],
    refusal: forbidden(...notAdministrators),
  },
  {
    name: 'listTokens',
    call: (actor) => listTokens(actor),
    may: ['administrator'],
    refusal: forbidden(...notAdministrators),
  },
  {
    name: 'createToken',
    call: (actor) => createToken(actor, { name: 'x', scopes: ['solve'], days: 1 }),
    may: ['administrator'],
    refusal: forbidden(...notAdministrators),
  },
  {
    name: 'revokeToken',
    namesNothing: true,
    call: (actor) => revokeToken(actor, nobodyHasThis),
    may: ['administrator'],
    refusal: forbidden(...notAdministrators),
  },
  {
    name: 'createProject',
    call: (actor) => createProject(actor, { ...project, number: unique('n') }),
    may: members,
    refusal: forbidden('client'),
    ownPractice: true,
  },
  {
    name: 'getProject',
    call: (actor, { projectId }) => getProject(actor, projectId),
    may: ['administrator', 'author', 'checker', 'approver', 'client'],
    refusal: hidden('bystander', 'stranger'),
  },
  {
    name: 'renameProject',
    call: (actor, { projectId }) => renameProject(actor, { ...project, projectId, number: unique('n') }),
    may: ['administrator', 'author'],
    refusal: { ...forbidden('checker', 'approver', 'client'), ...hidden('bystander', 'stranger') },
  },
  {
    name: 'appoint',
    call: (actor, { projectId, checker }) =>
      appoint(actor, { projectId, userId: checker.userId, role: 'checker' }),
    may: ['administrator'],
    refusal: { ...forbidden('author', 'checker', 'approver', 'client'), ...hidden('bystander', 'stranger') },
  },
  {
    name: 'removeAppointment',
    namesNothing: true,
    call: (actor, { projectId }) => removeAppointment(actor, { projectId, userId: 'nobody', role: 'author' }),
    may: ['administrator'],
    refusal: { ...forbidden('author', 'checker', 'approver', 'client'), ...hidden('bystander', 'stranger') },
  },
  {
    name: 'getSection',
    call: (actor, { sectionId }) => getSection(actor, sectionId),
    may: ['administrator', 'author', 'checker', 'approver'],
    refusal: hidden('bystander', 'client', 'stranger'),
  },
  {
    name: 'listSections of a project',
    call: (actor, { projectId }) => listSections(actor, { projectId }),
    may: ['administrator', 'author', 'checker', 'approver', 'client'],
    refusal: hidden('bystander', 'stranger'),
  },
  {
    name: 'createSection',
    call: (actor, { projectId }) =>
      createSection(actor, { projectId, document: sampleSection(), untouched: false }),
    may: ['administrator', 'author'], // the administrator opened the project, and so is its author
    refusal: { ...forbidden('checker', 'approver', 'client'), ...hidden('bystander', 'stranger') },
  },
  {
    name: 'saveSection',
    call: (actor, { sectionId }) =>
      saveSection(actor, { sectionId, document: sampleSection(), baseVersion: 999 }),
    may: ['administrator', 'author'],
    refusal: { ...forbidden('checker', 'approver'), ...hidden('bystander', 'client', 'stranger') },
  },
  {
    name: 'deleteSection',
    call: (actor, { sectionId }) => deleteSection(actor, { sectionId, baseVersion: 999 }),
    may: ['administrator', 'author'],
    refusal: { ...forbidden('checker', 'approver'), ...hidden('bystander', 'client', 'stranger') },
  },
];

let ours: TestPractice;
let theirs: TestPractice;

beforeAll(async () => {
  ours = await makePractice();
  theirs = await makePractice();
});

/** `done`, or the code of the refusal; anything else fails the test. */
async function outcomeOf(call: Promise<unknown>): Promise<string> {
  try {
    await call;
    return 'done';
  } catch (error) {
    if (error instanceof AppError) return error.code;
    throw error;
  }
}

describe.each(rows)('$name', ({ call, may, refusal, ownPractice, namesNothing }) => {
  test.each(everyone)('%s', async (who) => {
    const actor = who === 'stranger' ? theirs.bystander : ours[who];
    const outcome = await outcomeOf(call(actor, ours));
    if (may.includes(who)) expect(outcome).toBe(namesNothing ? 'not-found' : 'done');
    else if (who === 'stranger' && ownPractice) expect(outcome).toBe('done');
    else expect(outcome).toBe(refusal[who]);
  });
});

describe('what is seen', () => {
  test('a client sees the project they are appointed to, and no draft anywhere', async () => {
    const { client, projectId } = ours;
    expect(await listSections(client)).toEqual([]);
    expect(await listSections(client, { projectId })).toEqual([]);
    const detail = await getProject(client, projectId);
    expect(detail.sections).toEqual([]);
    expect(detail.sectionCount).toBe(0);
    expect(detail.may).toEqual({ changeSections: false, appoint: false, rename: false });
    const desk = await readDesk(client);
    expect(desk.drafts).toEqual([]);
    expect(desk.invitations).toEqual([]);
    expect(desk.projects.map(({ id }) => id)).toEqual([projectId]);
    expect(desk.projects[0]!.sectionCount).toBe(0);
  });

  test('a client stays one whatever a row of appointments says', async () => {
    const { client, projectId, sectionId, id } = ours;
    const row = { practiceId: id, projectId, userId: client.userId, role: 'author' as const };
    await withPractice(id, (tx) => insertAppointment(tx, row));
    expect(await outcomeOf(getSection(client, sectionId))).toBe('not-found');
    const save = { sectionId, document: sampleSection(), baseVersion: 1 };
    expect(await outcomeOf(saveSection(client, save))).toBe('not-found');
    await removeAppointment(ours.administrator, { projectId, userId: client.userId, role: 'author' });
  });

  test('a client is appointed as client only', async () => {
    const { administrator, client, projectId } = ours;
    const call = appoint(administrator, { projectId, userId: client.userId, role: 'author' });
    expect(await outcomeOf(call)).toBe('invalid-input');
  });

  test('a stranger finds none of ours in their lists', async () => {
    const stranger = theirs.administrator;
    const projects = await listProjects(stranger);
    expect(projects.map(({ id }) => id)).toContain(theirs.projectId);
    expect(projects.map(({ id }) => id)).not.toContain(ours.projectId);
    expect((await listSections(stranger)).map(({ id }) => id)).toEqual([theirs.sectionId]);
    const emails = (await listMembers(stranger)).map(({ email }) => email);
    expect(emails).not.toContain(ours.author.email);
    const events = await listAuditEvents(stranger);
    expect(events.some(({ subject }) => subject.includes(ours.administrator.practiceName))).toBe(false);
  });

  test('a stranger of ours is not appointed by them', async () => {
    const { administrator, projectId } = theirs;
    const call = appoint(administrator, { projectId, userId: ours.author.userId, role: 'author' });
    expect(await outcomeOf(call)).toBe('invalid-input');
  });

  test('a member without an appointment sees no project', async () => {
    expect(await listProjects(await addMember(ours.administrator, 'member'))).toEqual([]);
  });

  test('a project counts its own sections', async () => {
    const projects = await listProjects(theirs.administrator);
    const counts = projects.map(({ id, sectionCount }) => [id === theirs.projectId, sectionCount]);
    expect(counts.filter(([isFirst]) => isFirst)).toEqual([[true, 1]]);
    expect(counts.filter(([isFirst, count]) => !isFirst && count !== 0)).toEqual([]);
  });

  test('someone made a client loses their appointments and the drafts with them', async () => {
    const { administrator, projectId, sectionId } = ours;
    const turned = await addMember(administrator, 'member');
    await appoint(administrator, { projectId, userId: turned.userId, role: 'author' });
    await changeRole(administrator, { userId: turned.userId, role: 'client' });
    expect(await outcomeOf(getSection({ ...turned, role: 'client' }, sectionId))).toBe('not-found');
    const { people } = await getProject(administrator, projectId);
    expect(people.map(({ userId }) => userId)).not.toContain(turned.userId);
  });

  test.each(['', 'x', '1', '../etc', nobodyHasThis, `'; drop table sections; --`])(
    'an identifier that names nothing is not found: %s',
    async (id) => {
      expect(await outcomeOf(getSection(ours.author, id))).toBe('not-found');
      expect(await outcomeOf(getProject(ours.author, id))).toBe('not-found');
      const document = sampleSection();
      expect(await outcomeOf(createSection(ours.author, { projectId: id, document, untouched: false }))).toBe(
        'not-found',
      );
    },
  );
});
