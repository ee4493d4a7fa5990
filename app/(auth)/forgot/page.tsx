import type { Metadata } from 'next';
import { AuthHead } from '@/components/layout/auth-head';
import { ForgotForm } from './forgot-form';

export const metadata: Metadata = { title: 'Forgot the password' };

export default function ForgotPage() {
  return (
    <>
      <AuthHead title="Forgot the password">
        Write the address you sign in with; we send a link to set a new one.
      </AuthHead>
      <ForgotForm />
    </>
  );
}
