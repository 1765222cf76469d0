import type { Metadata } from 'next';
import { ForgottenForm } from '@/components/people/forgotten-form';
import { PlainPage } from '@/components/shell/plain-page';

export const metadata: Metadata = { title: 'Forgotten password' };

export default function ForgottenPage() {
  return (
    <PlainPage title="Forgotten password">
      <ForgottenForm />
    </PlainPage>
  );
}
