import { Skeleton } from '@/components/ui/skeleton';

export default function Loading() {
  return (
    <>
      <p role="status" className="sr-only">
        Loading
      </p>
      <div aria-hidden className="mb-10 h-10 w-2/3 max-w-md animate-pulse bg-rule/60" />
      <Skeleton lines={8} />
    </>
  );
}
