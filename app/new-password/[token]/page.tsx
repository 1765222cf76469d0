import type { Metadata } from 'next';
import { NewPasswordForm } from '@/components/people/new-password-form';
import { PlainPage } from '@/components/shell/plain-page';

// The address is a key: it must not travel to another site as a referrer, nor into an index.
export const metadata: Metadata = {
  title: 'New password',
  referrer: 'no-referrer',
  robots: { index: false },
};

export default async function NewPasswordPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params;
  return (
    <PlainPage title="Set a new password">
      <NewPasswordForm token={token} />
    </PlainPage>
  );
}
