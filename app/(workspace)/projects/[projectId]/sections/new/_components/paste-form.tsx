'use client';

import { useRouter } from 'next/navigation';
import { type ChangeEvent, useState } from 'react';
import { ActionForm } from '@/components/form/action-form';
import { useActionForm } from '@/components/form/use-action-form';
import { Field } from '@/components/ui/field';
import { FileInput, TextArea } from '@/components/ui/input';
import { Notice } from '@/components/ui/notice';
import type { Issue } from '@/lib/domain/issue';
import { newSectionForm } from '@/lib/domain/forms';
import { sectionLimits } from '@/lib/domain/limits';
import { paths } from '@/lib/paths';
import { createSectionFromText } from '../actions';

/** A section from a document of one's own, with every error listed at its place in the document. */
export function PasteForm({ projectId }: { projectId: string }) {
  const router = useRouter();
  const [issues, setIssues] = useState<readonly Issue[]>([]);
  const form = useActionForm({
    schema: newSectionForm,
    defaultValues: { projectId, text: '' },
    action: (input) => {
      setIssues([]);
      return createSectionFromText(input);
    },
    onDone: (outcome) => {
      if (outcome.status === 'refused') setIssues(outcome.issues);
      else router.push(paths.section(projectId, outcome.id));
    },
  });
  const readFile = async (event: ChangeEvent<HTMLInputElement>) => {
    const file = event.target.files?.[0];
    if (!file) return;
    if (file.size > sectionLimits.bytes) {
      form.setError('text', {
        message: `That file is larger than ${sectionLimits.bytes / 1000} kB, the most a section may be.`,
      });
      return;
    }
    form.setValue('text', await file.text(), { shouldValidate: true });
  };
  return (
    <ActionForm
      state={form}
      label="Section document"
      submitLabel="Read and create"
      sendingLabel="Reading…"
      className="max-w-3xl"
    >
      <Field label="From a file" hint="JSON, at most 1 MB. It is read into the field below first.">
        <FileInput accept=".json,application/json" onChange={(event) => void readFile(event)} />
      </Field>
      <Field label="Section document" error={form.formState.errors.text?.message}>
        <TextArea
          rows={10}
          spellCheck={false}
          className="font-mono text-sm"
          placeholder='{ "format": "underfall-section/1", "title": "…", … }'
          {...form.register('text')}
        />
      </Field>
      {issues.length > 0 && <IssueList issues={issues} />}
    </ActionForm>
  );
}

function IssueList({ issues }: { issues: readonly Issue[] }) {
  return (
    <Notice
      tone="attention"
      title={
        issues.length === 1 ? 'One thing needs mending first' : `${issues.length} things need mending first`
      }
    >
      <ul className="mt-1 grid gap-2">
        {issues.map(({ code, pointer, message }) => (
          <li key={`${code}${pointer}`}>
            {message}{' '}
            <code className="text-sm break-all text-secondary">{pointer || 'the whole document'}</code>
          </li>
        ))}
      </ul>
    </Notice>
  );
}
