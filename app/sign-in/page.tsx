import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { SignInForm } from '@/components/people/sign-in-form';
import { NobodyOnThisDevice } from '@/components/shell/on-this-device';
import { PlainPage } from '@/components/shell/plain-page';
import { currentSession } from '@/lib/platform/auth';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage() {
  if (await currentSession()) redirect('/');
  return (
    <PlainPage title="Sign in">
      <NobodyOnThisDevice />
      <SignInForm />
      <p>
        <Link href="/forgotten">Forgotten password</Link>
      </p>
    </PlainPage>
  );
}
