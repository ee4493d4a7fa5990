// Writes the demonstration in one transaction: all of it, or nothing. Where the practice is there already, nothing is touched.
import { type Transaction, withPractice } from '@/db/client';
import { insertAuditEvent, insertMaterial, upsertCriterion } from '@/db/queries/library';
import { findPractice, insertMembership, insertPractice, insertUser } from '@/db/queries/people';
import { insertAppointment, insertProject, insertSection } from '@/db/queries/work';
import { hashPassword } from '@/lib/auth';
import type { Material, SectionDocument } from '@/lib/domain/section';
import { startingPoints } from '@/lib/domain/starting-points';
import { demoPeople, demoPractice } from './demo';

const practiceId = demoPractice.id;
const { author, checker, client } = demoPeople;

const projects = [
  {
    number: '26-014',
    name: 'Aldern Weir renewal',
    client: 'Aldern Water Board',
    description: 'A new sheet pile and stilling basin for a weir on sand. Invented.',
    hasClient: true,
    sections: () => [
      retitle(starting('apron-with-cutoffs'), 'Stilling basin, chainage 40'),
      retitle(starting('wall-in-ground'), 'Sheet pile, 6 m'),
      deepenPile(retitle(starting('wall-in-ground'), 'Sheet pile, 8 m'), -8),
    ],
  },
  {
    number: '26-021',
    name: 'Harrow Basin pump station',
    client: 'Harrow Drainage District',
    description: 'A pit beside a levee, and the embankment that closes the basin. Invented.',
    hasClient: false,
    sections: () => [
      retitle(starting('pit-between-walls'), 'Pump pit between walls'),
      retitle(starting('levee-with-blanket'), 'Levee at the pump station'),
      retitle(starting('zoned-embankment'), 'Closing embankment'),
    ],
  },
];

function starting(id: string): SectionDocument {
  const found = startingPoints.find((point) => point.id === id);
  if (!found) throw new RangeError(`no starting point ${id}`);
  return structuredClone(found.document);
}

function retitle(document: SectionDocument, title: string): SectionDocument {
  return { ...document, title };
}

function deepenPile(document: SectionDocument, tip: number): SectionDocument {
  const question = `Does a tip at ${tip} m change the answer?`.replace('-', '−');
  const barriers = document.barriers.map((barrier) => ({
    ...barrier,
    path: barrier.path.map(([x, y], index): [number, number] => [
      x,
      index === barrier.path.length - 1 ? tip : y,
    ]),
  }));
  return { ...document, question, barriers };
}

/** Seeds the demonstration; false where it was there. */
export async function seedDemo(): Promise<boolean> {
  const people = await Promise.all(
    [author, checker, client].map(async (person) => ({
      ...person,
      passwordHash: await hashPassword(person.password),
    })),
  );
  return withPractice(practiceId, async (tx) => {
    if (await findPractice(tx, { practiceId })) return false;
    await insertPractice(tx, demoPractice);
    for (const { id, name, email, passwordHash, role } of people) {
      await insertUser(tx, { id, name, email, passwordHash });
      await insertMembership(tx, { practiceId, userId: id, role });
    }
    for (const project of projects) await seedProject(tx, project);
    await seedLibrary(tx);
    await note(tx, 'practice.founded', demoPractice.name);
    return true;
  });
}

async function seedProject(tx: Transaction, project: (typeof projects)[number]): Promise<void> {
  const { sections, hasClient, ...values } = project;
  const created = await insertProject(tx, { practiceId, ...values });
  if (!created) throw new RangeError(`project ${values.number} is there already`);
  const projectId = created.id;
  await insertAppointment(tx, { practiceId, projectId, userId: author.id, role: 'author' });
  await insertAppointment(tx, { practiceId, projectId, userId: checker.id, role: 'checker' });
  if (hasClient) await insertAppointment(tx, { practiceId, projectId, userId: client.id, role: 'client' });
  for (const document of sections()) {
    await insertSection(tx, { practiceId, projectId, document, isUntouched: false, userId: author.id });
    await note(tx, 'section.created', document.title, values.number);
  }
}

async function seedLibrary(tx: Transaction): Promise<void> {
  const materials = new Map<string, Material>();
  for (const { document } of startingPoints)
    for (const material of document.materials) materials.set(material.id, material);
  const remark = 'From the demonstration; replace it with values of your own.';
  for (const material of materials.values()) await insertMaterial(tx, { practiceId, material, note: remark });
  const criterion = {
    id: 'office-rule-pits',
    quantity: 'heave-prism-effective' as const,
    required: 1.5,
    title: 'Temporary pits, heave of the base',
    source: 'Office rule 7 of the invented practice Marlow Reach Engineering; for the demonstration only.',
    example: false,
  };
  await upsertCriterion(tx, { practiceId, criterion, userId: author.id });
}

async function note(tx: Transaction, action: string, subject: string, detail = ''): Promise<void> {
  await insertAuditEvent(tx, {
    practiceId,
    actorId: author.id,
    actorName: author.name,
    action,
    subject,
    detail,
  });
}
