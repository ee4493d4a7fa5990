import { ScoreSkeleton } from '@/components/score/score-skeleton';

export default function LoadingSection() {
  return <ScoreSkeleton />;
}
