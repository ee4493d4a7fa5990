'use client';
import dynamic from 'next/dynamic';
import { ScoreSkeleton } from './score-skeleton';

/** The score lives in the browser alone: it begins from what this browser still holds of the section. */
export const ScoreIsland = dynamic(() => import('./score').then(({ Score }) => Score), {
  ssr: false,
  loading: ScoreSkeleton,
});
