import 'server-only';
import { withPractice } from '@/db/client';
import { deleteMaterial, insertMaterial, selectMaterials, updateMaterial } from '@/db/queries/library';
import type { Actor, LibraryMaterial } from '@/lib/domain/dto';
import { type Material, materialSchema } from '@/lib/domain/section';
import { AppError } from '@/lib/errors';
import { record } from './audit';
import { authorize } from './authorize';
import { requireId } from './require-id';

export async function listMaterials(actor: Actor): Promise<LibraryMaterial[]> {
  authorize(actor, 'materials.list');
  const { practiceId } = actor;
  return withPractice(practiceId, (tx) => selectMaterials(tx, { practiceId }));
}

export interface MaterialInput {
  /** Empty for a new one. */
  readonly id: string;
  readonly name: string;
  readonly kMajor: number;
  readonly kMinor: number;
  readonly kSource: NonNullable<Material['kSource']>;
  readonly saturatedUnitWeight?: number | undefined;
  readonly note: string;
}

export async function saveMaterial(actor: Actor, input: MaterialInput): Promise<{ id: string }> {
  authorize(actor, 'materials.manage');
  const { practiceId } = actor;
  const { id, note, saturatedUnitWeight, ...rest } = input;
  const material = materialSchema.parse({
    ...rest,
    id: slugOf(rest.name),
    ...(saturatedUnitWeight === undefined ? {} : { saturatedUnitWeight }),
  });
  return withPractice(practiceId, async (tx) => {
    const saved = id
      ? await updateMaterial(tx, { practiceId, id: requireId(id), material, note })
      : await insertMaterial(tx, { practiceId, material, note });
    if (!saved) throw new AppError('not-found');
    await record(tx, actor, { action: 'material.saved', subject: material.name });
    return saved;
  });
}

/** An id for section documents out of a name: `Sandy alluvium` gives `sandy-alluvium`. */
function slugOf(name: string): string {
  const slug = name
    .normalize('NFKD')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60);
  return slug || 'material';
}

export async function removeMaterial(actor: Actor, id: string): Promise<void> {
  authorize(actor, 'materials.manage');
  const { practiceId } = actor;
  await withPractice(practiceId, async (tx) => {
    const removed = await deleteMaterial(tx, { practiceId, id: requireId(id) });
    if (!removed) throw new AppError('not-found');
    await record(tx, actor, { action: 'material.removed', subject: id });
  });
}
