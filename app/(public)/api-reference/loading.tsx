import { PageSkeleton } from '@/components/layout/page-frame';

export default function Loading() {
  return <PageSkeleton />;
}
