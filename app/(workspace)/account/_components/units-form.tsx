'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useIsHydrated } from '@/components/form/use-action-form';
import { Notice } from '@/components/ui/notice';
import type { Actor } from '@/lib/domain/dto';
import { setUnits } from '../actions';

const systems = [
  { value: 'si', label: 'SI', example: 'm, m/s, l/s per metre, kPa, kN' },
  { value: 'us', label: 'US customary', example: 'ft, ft/s, gpm per foot, psf, kip' },
] as const;

/** The unit system a person reads and types in; kept at once. */
export function UnitsForm({ units }: { units: Actor['units'] }) {
  const router = useRouter();
  const isReady = useIsHydrated();
  const [chosen, setChosen] = useState(units);
  const [said, setSaid] = useState<{ tone: 'done' | 'attention'; text: string } | null>(null);
  const choose = async (next: Actor['units']) => {
    const before = chosen;
    setChosen(next);
    setSaid(null);
    try {
      const result = await setUnits({ units: next });
      if (result.ok) {
        setSaid({ tone: 'done', text: 'Kept.' });
        router.refresh();
        return;
      }
      setSaid({ tone: 'attention', text: result.message });
    } catch {
      setSaid({ tone: 'attention', text: 'The server cannot be reached. The choice was not kept.' });
    }
    setChosen(before);
  };
  return (
    <fieldset disabled={!isReady} className="grid gap-3">
      <legend className="sr-only">Units</legend>
      {systems.map(({ value, label, example }) => (
        <label key={value} className="flex items-baseline gap-3">
          <input
            type="radio"
            name="units"
            value={value}
            checked={chosen === value}
            onChange={() => void choose(value)}
            className="size-4 translate-y-0.5 accent-action"
          />
          <span>
            <span className="font-medium">{label}</span> <span className="text-secondary">{example}</span>
          </span>
        </label>
      ))}
      {said && <Notice tone={said.tone}>{said.text}</Notice>}
    </fieldset>
  );
}
