'use client';

import { Failure } from '@/components/layout/failure';

export default function SegmentError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return <Failure error={error} reset={reset} />;
}
