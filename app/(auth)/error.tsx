'use client';

import { Failure } from '@/components/layout/failure';

export default function AuthError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return <Failure error={error} reset={reset} />;
}
