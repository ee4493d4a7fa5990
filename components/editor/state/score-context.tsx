'use client';
import { createContext, useContext } from 'react';
import { useStore } from 'zustand';
import type { ScoreState, ScoreStore } from './score-store';

export const ScoreContext = createContext<ScoreStore | null>(null);

/** The store itself, for handlers that read it once. */
export function useScoreStore(): ScoreStore {
  const store = useContext(ScoreContext);
  if (!store) throw new RangeError('ScoreContext is missing above this component');
  return store;
}

/** A part of the state; the component renders again when that part changes. */
export function useScore<T>(select: (state: ScoreState) => T): T {
  return useStore(useScoreStore(), select);
}
