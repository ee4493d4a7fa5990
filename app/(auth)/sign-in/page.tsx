import type { Metadata } from 'next';
import Link from 'next/link';
import { z } from 'zod';
import { AuthHead } from '@/components/layout/auth-head';
import { paths } from '@/lib/paths';
import { SignInForm } from './sign-in-form';

export const metadata: Metadata = { title: 'Sign in' };

// Only a path of our own; anything else would let a mailed link send people elsewhere after they sign in.
const search = z.object({
  next: z
    .string()
    // no control characters either: a browser drops a tab, and "/<tab>/elsewhere" would become "//elsewhere"
    .regex(/^\/(?![/\\])[^\\\p{Cc}]*$/u)
    .catch(paths.desk()),
});

export default async function SignInPage({ searchParams }: PageProps<'/sign-in'>) {
  const { next } = search.parse(await searchParams);
  return (
    <>
      <AuthHead title="Sign in">
        New here?{' '}
        <Link href={paths.signUp()} className="text-link">
          Set up a practice
        </Link>
        . If a colleague invited you, use the link in their e-mail.
      </AuthHead>
      <SignInForm next={next} />
    </>
  );
}
