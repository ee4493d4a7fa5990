import type { Metadata } from 'next';
import { PageHead, Passage } from '@/components/layout/page-frame';
import { listMaterials } from '@/lib/server/materials';
import { requireActor } from '@/lib/server/session';
import { MaterialDialog } from './_components/material-dialog';
import { MaterialTable } from './_components/material-table';

export const metadata: Metadata = { title: 'Materials' };

export default async function MaterialsPage() {
  const actor = await requireActor();
  const materials = await listMaterials(actor);
  const mayChange = actor.role !== 'client';
  return (
    <>
      <PageHead
        over={actor.practiceName}
        title="Materials"
        lead="Soils and rocks the practice has met before, each with where its permeability comes from."
        actions={mayChange && <MaterialDialog trigger="Add a material" title="Add a material" />}
      />
      <Passage title="Library" aside="A section keeps its own copy; changing one here changes no section.">
        <MaterialTable materials={materials} mayChange={mayChange} />
      </Passage>
    </>
  );
}
