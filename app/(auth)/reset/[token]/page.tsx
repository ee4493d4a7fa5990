import type { Metadata } from 'next';
import Link from 'next/link';
import { AuthHead } from '@/components/layout/auth-head';
import { paths } from '@/lib/paths';
import { readReset } from '@/lib/server/accounts';
import { ResetForm } from './reset-form';

export const metadata: Metadata = { title: 'New password' };

export default async function ResetPage({ params }: PageProps<'/reset/[token]'>) {
  const { token } = await params;
  const reset = await readReset(token);
  if (!reset) {
    return (
      <AuthHead title="This link no longer works">
        A link to set a new password works once, for one hour.{' '}
        <Link href={paths.forgot()} className="text-link">
          Ask for a new one
        </Link>
        .
      </AuthHead>
    );
  }
  return (
    <>
      <AuthHead title="New password">For {reset.email}.</AuthHead>
      <ResetForm token={token} />
    </>
  );
}
