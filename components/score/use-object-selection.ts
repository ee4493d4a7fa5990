'use client';
import { useScore, useScoreStore } from '@/components/editor/state/score-context';
import type { ObjectKind } from '@/components/editor/state/score-store';

export type { ObjectKind } from '@/components/editor/state/score-store';

/** Whether an object is the selected one, and how to make it so; a second press lets go. */
export function useObjectSelection(
  kind: ObjectKind,
  index: number,
): { isSelected: boolean; select: () => void } {
  const store = useScoreStore();
  const isSelected = useScore(({ selection }) => selection?.kind === kind && selection.index === index);
  return { isSelected, select: () => store.getState().select(isSelected ? null : { kind, index }) };
}
