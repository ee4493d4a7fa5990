import { beforeAll, describe, expect, test } from 'vitest';
import { AppError } from '@/lib/errors';
import type { SectionDocument } from '@/lib/domain/section';
import { listAuditEvents } from '@/lib/server/audit';
import { saveCriterion } from '@/lib/server/criteria';
import { listMaterials, saveMaterial } from '@/lib/server/materials';
import { createProject } from '@/lib/server/projects';
import { createSection, deleteSection, getSection, saveSection } from '@/lib/server/sections';
import { asSuperuser } from './support/connect';
import { makePractice, sampleSection, type TestPractice, unique } from './support/practice';

let practice: TestPractice;

beforeAll(async () => {
  practice = await makePractice();
});

async function fresh(untouched = false) {
  return createSection(practice.author, {
    projectId: practice.projectId,
    document: sampleSection(),
    untouched,
  });
}

describe('keeping sections', () => {
  test('what comes back is what was kept', async () => {
    const { id } = await fresh();
    const section = await getSection(practice.author, id);
    expect(section.document).toEqual(sampleSection());
    expect(section).toMatchObject({
      version: 1,
      mayChange: true,
      untouched: false,
      updatedBy: practice.author.name,
    });
    expect((await getSection(practice.checker, id)).mayChange).toBe(false);
  });

  test('a starting point is untouched until its first change', async () => {
    const { id } = await fresh(true);
    expect((await getSection(practice.author, id)).untouched).toBe(true);
    await saveSection(practice.author, { sectionId: id, document: sampleSection(), baseVersion: 1 });
    expect((await getSection(practice.author, id)).untouched).toBe(false);
  });

  test('of two people who change one version, the second gets the first’s, and every kept version stays', async () => {
    const { id } = await fresh();
    const { author, administrator } = practice;
    const change = (title: string): SectionDocument => ({ ...sampleSection(), title });
    const first = await saveSection(author, { sectionId: id, document: change('First'), baseVersion: 1 });
    const second = await saveSection(administrator, {
      sectionId: id,
      document: change('Second'),
      baseVersion: 1,
    });
    expect(first).toMatchObject({ status: 'saved', version: 2 });
    expect(second).toMatchObject({ status: 'conflict', current: { version: 2, title: 'First' } });
    await saveSection(administrator, { sectionId: id, document: change('Second'), baseVersion: 2 });
    const { rows } = await asSuperuser((client) =>
      client.query<{ title: string }>(
        `select document->>'title' as title from section_versions where section_id = $1 order by version`,
        [id],
      ),
    );
    expect(rows.map(({ title }) => title)).toEqual([sampleSection().title, 'First', 'Second']);
  });

  test('of twenty saves at once over one version, one is kept', async () => {
    const { id } = await fresh();
    const save = () =>
      saveSection(practice.author, { sectionId: id, document: sampleSection(), baseVersion: 1 });
    const outcomes = await Promise.all(Array.from({ length: 20 }, save));
    expect(outcomes.filter(({ status }) => status === 'saved')).toHaveLength(1);
    expect((await getSection(practice.author, id)).version).toBe(2);
  });

  test('a draft keeps what is not solvable yet', async () => {
    const { id } = await fresh();
    const broken = sampleSection();
    broken.zones[0]!.material = 'not-there-yet';
    const outcome = await saveSection(practice.author, { sectionId: id, document: broken, baseVersion: 1 });
    expect(outcome.status).toBe('saved');
    expect((await getSection(practice.author, id)).document.zones[0]!.material).toBe('not-there-yet');
  });

  test.each([
    ['nothing', null],
    ['text', 'section'],
    ['another format', { ...sampleSection(), format: 'other/1' }],
    ['no materials', { ...sampleSection(), materials: [] }],
    [
      'a coordinate that is no number',
      {
        ...sampleSection(),
        zones: [
          {
            id: 'z',
            material: 'sand',
            outline: [
              [0, 0],
              [1, 'x'],
              [1, 1],
            ],
          },
        ],
      },
    ],
  ])('%s is refused with its places', async (_what, document) => {
    const { id } = await fresh();
    const save = saveSection(practice.author, { sectionId: id, document: document as never, baseVersion: 1 });
    const error = (await save.catch((thrown: unknown) => thrown)) as AppError;
    expect(error).toBeInstanceOf(AppError);
    expect(error.code).toBe('invalid-section');
    expect(error.details.errors!.length).toBeGreaterThan(0);
    expect((await getSection(practice.author, id)).version).toBe(1);
  });

  test('deleting names the version it means', async () => {
    const { id } = await fresh();
    await saveSection(practice.author, { sectionId: id, document: sampleSection(), baseVersion: 1 });
    expect(await deleteSection(practice.author, { sectionId: id, baseVersion: 1 })).toBe(false);
    expect(await deleteSection(practice.author, { sectionId: id, baseVersion: 2 })).toBe(true);
    await expect(getSection(practice.author, id)).rejects.toMatchObject({ code: 'not-found' });
  });

  test('the log tells who did what, the newest first', async () => {
    await fresh();
    const [event] = await listAuditEvents(practice.administrator);
    expect(event).toMatchObject({
      action: 'section.created',
      actor: practice.author.name,
      subject: sampleSection().title,
    });
  });

  test('a person who goes on changing a section stands in the log once, every version stays', async () => {
    const { id } = await fresh();
    const document = { ...sampleSection(), title: unique('Kept at once') };
    for (let version = 1; version <= 5; version++) {
      await saveSection(practice.author, { sectionId: id, document, baseVersion: version });
    }
    const events = await listAuditEvents(practice.administrator);
    expect(events.filter(({ subject }) => subject === document.title)).toHaveLength(1);
    const { rowCount } = await asSuperuser((client) =>
      client.query('select 1 from section_versions where section_id = $1', [id]),
    );
    expect(rowCount).toBe(6);
  });
});

describe('the library', () => {
  test('examples serve a quantity until something is adopted for it', async () => {
    const quantity = 'exit-gradient-factor';
    const before = (await getSection(practice.author, practice.sectionId)).criteria;
    expect(before.filter((one) => one.quantity === quantity).every(({ example }) => example)).toBe(true);
    const adopted = { id: '', quantity, required: 3.5, title: 'Own', source: 'Own rule', soil: '' } as const;
    await saveCriterion(practice.administrator, adopted);
    const after = (await getSection(practice.author, practice.sectionId)).criteria;
    const [only, ...more] = after.filter((one) => one.quantity === quantity);
    expect(more).toEqual([]);
    expect(only).toMatchObject({ required: 3.5, example: false, approvedBy: 'Head' });
    expect(after.some(({ example }) => example)).toBe(true);
  });

  test('a material is kept as a section could use it, and changed in place', async () => {
    const input = {
      id: '',
      name: 'Sandy alluvium ½',
      kMajor: 2e-4,
      kMinor: 5e-5,
      kSource: 'pumping-test',
      note: 'n',
    } as const;
    const { id } = await saveMaterial(practice.author, input);
    await saveMaterial(practice.author, { ...input, id, kMajor: 3e-4, saturatedUnitWeight: 20 });
    const [kept] = (await listMaterials(practice.author)).filter((row) => row.id === id);
    expect(kept!.material).toMatchObject({
      name: input.name,
      kMajor: 3e-4,
      kMinor: 5e-5,
      saturatedUnitWeight: 20,
      angle: 0,
    });
    expect(kept!.material.id).toMatch(/^[a-z0-9][a-z0-9-]*$/);
  });

  test('two projects of a practice have two numbers; another practice may use the same', async () => {
    const values = { number: unique('77'), name: 'A', client: '', description: '' };
    await createProject(practice.administrator, values);
    await expect(createProject(practice.administrator, values)).rejects.toMatchObject({
      code: 'invalid-input',
      details: { fields: { number: expect.any(String) } },
    });
    const other = await makePractice();
    await createProject(other.administrator, values);
  });
});
