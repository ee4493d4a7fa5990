import type { Metadata } from 'next';
import Link from 'next/link';
import { AuthHead } from '@/components/layout/auth-head';
import { paths } from '@/lib/paths';
import { SignUpForm } from './sign-up-form';

export const metadata: Metadata = { title: 'Set up a practice' };

export default function SignUpPage() {
  return (
    <>
      <AuthHead title="Set up a practice">
        You become its administrator and can invite colleagues afterwards. Already have an account?{' '}
        <Link href={paths.signIn()} className="text-link">
          Sign in
        </Link>
        .
      </AuthHead>
      <SignUpForm />
    </>
  );
}
