import type { Metadata } from 'next';
import { NextUp } from '@/components/jobs/next-up';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { pageActor } from '@/lib/access/actor';
import { may } from '@/lib/access/policy';
import { nextUp } from '@/lib/desk/queries';

export const metadata: Metadata = { title: 'Next up' };

const COUNT = [
  'Nothing waits for you',
  'One thing waits for you',
  'Two things wait for you',
  'Three things wait for you',
  'Four things wait for you',
  'Five things wait for you',
];

export default async function NextUpPage({ params }: { params: Promise<{ shop: string }> }) {
  const { shop } = await params;
  const actor = await pageActor(shop, 'shop:enter');
  const { waiting, today } = await nextUp(actor);
  return (
    <PageBody
      title={COUNT[waiting.length] ?? `${waiting.length} things wait for you`}
      sub={today}
      actions={may(actor, 'job:open') ? <ButtonLink href={`/s/${shop}/jobs/new`}>New job</ButtonLink> : null}
    >
      <NextUp waiting={waiting} />
    </PageBody>
  );
}
