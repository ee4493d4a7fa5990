// Projects, appointments, sections and what was computed of them.
import { sql } from 'drizzle-orm';
import {
  check,
  customType,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  unique,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import type { SectionDocument } from '@/lib/domain/section';
import { createdAt, id, instant, userId } from './columns';
import { memberships, practices, users } from './people';

const bytes = customType<{ data: Buffer; driverData: Buffer }>({ dataType: () => 'bytea' });

export const projects = pgTable(
  'projects',
  {
    id: id(),
    practiceId: uuid('practice_id')
      .notNull()
      .references(() => practices.id, { onDelete: 'cascade' }),
    number: text('number').notNull(),
    name: text('name').notNull(),
    client: text('client').notNull().default(''),
    description: text('description').notNull().default(''),
    createdAt: createdAt(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  (t) => [
    uniqueIndex('projects_number_key').on(t.practiceId, t.number),
    unique('projects_practice_key').on(t.practiceId, t.id),
  ],
);

export const appointments = pgTable(
  'appointments',
  {
    practiceId: uuid('practice_id')
      .notNull()
      .references(() => practices.id, { onDelete: 'cascade' }),
    projectId: uuid('project_id').notNull(),
    userId: userId().notNull(),
    role: text('role', { enum: ['author', 'checker', 'approver', 'client'] }).notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.projectId, t.userId, t.role] }),
    index('appointments_practice_user_idx').on(t.practiceId, t.userId),
    // with the practice in the key, so that no row can point into another practice; only members are appointed
    foreignKey({
      name: 'appointments_project_fk',
      columns: [t.practiceId, t.projectId],
      foreignColumns: [projects.practiceId, projects.id],
    }).onDelete('cascade'),
    foreignKey({
      name: 'appointments_member_fk',
      columns: [t.practiceId, t.userId],
      foreignColumns: [memberships.practiceId, memberships.userId],
    }).onDelete('cascade'),
    check('appointments_role_known', sql`${t.role} in ('author', 'checker', 'approver', 'client')`),
  ],
);

export const sections = pgTable(
  'sections',
  {
    id: id(),
    practiceId: uuid('practice_id')
      .notNull()
      .references(() => practices.id, { onDelete: 'cascade' }),
    projectId: uuid('project_id').notNull(),
    title: text('title').notNull(),
    question: text('question').notNull().default(''),
    document: jsonb('document').$type<SectionDocument>().notNull(),
    /** Counts saves; a save names the version it began from. */
    version: integer('version').notNull().default(1),
    /** Still the starting point it came from. */
    isUntouched: integer('is_untouched').notNull().default(0),
    createdAt: createdAt(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
    updatedBy: userId('updated_by').references(() => users.id, { onDelete: 'set null' }),
  },
  (t) => [
    index('sections_project_idx').on(t.practiceId, t.projectId),
    unique('sections_practice_key').on(t.practiceId, t.id),
    foreignKey({
      name: 'sections_project_fk',
      columns: [t.practiceId, t.projectId],
      foreignColumns: [projects.practiceId, projects.id],
    }).onDelete('cascade'),
    check('sections_version_positive', sql`${t.version} > 0`),
  ],
);

/** Every version that was kept, so that no save loses another. */
export const sectionVersions = pgTable(
  'section_versions',
  {
    practiceId: uuid('practice_id')
      .notNull()
      .references(() => practices.id, { onDelete: 'cascade' }),
    sectionId: uuid('section_id').notNull(),
    version: integer('version').notNull(),
    document: jsonb('document').$type<SectionDocument>().notNull(),
    savedAt: createdAt(),
    savedBy: userId('saved_by').references(() => users.id, { onDelete: 'set null' }),
  },
  (t) => [
    primaryKey({ columns: [t.sectionId, t.version] }),
    foreignKey({
      name: 'section_versions_section_fk',
      columns: [t.practiceId, t.sectionId],
      foreignColumns: [sections.practiceId, sections.id],
    }).onDelete('cascade'),
  ],
);

/** Result documents by the hash of their section document, compressed. */
export const results = pgTable(
  'results',
  {
    practiceId: uuid('practice_id')
      .notNull()
      .references(() => practices.id, { onDelete: 'cascade' }),
    sectionHash: text('section_hash').notNull(),
    engineVersion: text('engine_version').notNull(),
    /** gzip of the JSON text. */
    body: bytes('body').notNull(),
    createdAt: createdAt(),
  },
  (t) => [primaryKey({ columns: [t.practiceId, t.sectionHash, t.engineVersion] })],
);
