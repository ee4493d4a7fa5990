'use client';

import { useRouter } from 'next/navigation';
import { type ReactNode, useState } from 'react';
import { useIsHydrated } from '@/components/form/use-action-form';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { paths } from '@/lib/paths';
import { beginSection } from '../actions';

interface Choice {
  id: string;
  title: string;
  summary: string;
  figure: ReactNode;
}

/** The starting points, each drawn from its own document. */
export function StartingPointList({ projectId, choices }: { projectId: string; choices: Choice[] }) {
  const router = useRouter();
  const isReady = useIsHydrated();
  const [begun, setBegun] = useState('');
  const [failure, setFailure] = useState('');
  const begin = async (startingPoint: string) => {
    setBegun(startingPoint);
    setFailure('');
    try {
      const result = await beginSection({ projectId, startingPoint });
      if (result.ok) return router.push(paths.section(projectId, result.value.id));
      setFailure(result.message);
    } catch {
      setFailure('The server cannot be reached. Nothing was begun; try again when the connection is back.');
    }
    setBegun('');
  };
  return (
    <div className="grid gap-6">
      {failure && <Notice tone="attention">{failure}</Notice>}
      <ul className="grid gap-x-10 gap-y-8 sm:grid-cols-2 2xl:grid-cols-3">
        {choices.map(({ id, title, summary, figure }) => (
          <li key={id} className="row-span-3 grid grid-rows-subgrid gap-3">
            <div className="self-end">{figure}</div>
            <div className="grid gap-1">
              <h3 className="text-lg font-semibold" id={`start-${id}`}>
                {title}
              </h3>
              <p className="text-[0.9375rem] text-secondary">{summary}</p>
            </div>
            <Button
              className="justify-self-start"
              disabled={!isReady || begun !== ''}
              aria-describedby={`start-${id}`}
              onClick={() => void begin(id)}
            >
              {begun === id ? 'Beginning…' : 'Begin with this'}
            </Button>
          </li>
        ))}
      </ul>
    </div>
  );
}
