import type { Metadata } from 'next';
import { Caution } from '@/components/layout/caution';
import { PageHead, Passage } from '@/components/layout/page-frame';
import { exampleCriteria } from '@/lib/checks/example-criteria';
import { listCriteria } from '@/lib/server/criteria';
import { requireActor } from '@/lib/server/session';
import { CriterionDialog } from './_components/criterion-dialog';
import { CriterionList } from './_components/criterion-list';
import { ExampleList } from './_components/example-list';

export const metadata: Metadata = { title: 'Criteria' };

export default async function CriteriaPage() {
  const actor = await requireActor();
  const criteria = await listCriteria(actor);
  const isAdministrator = actor.role === 'administrator';
  const adopted = criteria.filter(({ example }) => !example);
  const adoptedIds = new Set(adopted.map(({ id }) => id));
  const examples = exampleCriteria.filter(({ id }) => !adoptedIds.has(id));
  return (
    <>
      <PageHead
        over={actor.practiceName}
        title="Criteria"
        lead="What an answer is held against. A criterion applies only to the quantity it was defined for."
        actions={isAdministrator && <CriterionDialog trigger="Add a criterion" title="Add a criterion" />}
      />
      <Passage title="Adopted" aside="Used in every section of this practice.">
        <CriterionList criteria={adopted} isAdministrator={isAdministrator} />
      </Passage>
      <Passage
        title="Examples"
        aside="Published values shipped with the product. They are used, and marked as examples, where nothing is adopted for a quantity."
      >
        <ExampleList examples={examples} isAdministrator={isAdministrator} />
      </Passage>
      <Passage title="Caution">
        <Caution />
      </Passage>
    </>
  );
}
