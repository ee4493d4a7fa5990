import { Skeleton } from '@/components/ui/skeleton';

export default function AuthLoading() {
  return (
    <>
      <p role="status" className="sr-only">
        Loading
      </p>
      <Skeleton lines={6} />
    </>
  );
}
