import type { Metadata } from 'next';
import { PeopleDesk } from '@/components/people/people-desk';
import { PageBody } from '@/components/shell/header';
import { pageActor } from '@/lib/access/actor';
import { loadMembers } from '@/lib/people/queries';

export const metadata: Metadata = { title: 'People' };

export default async function PeoplePage({ params }: { params: Promise<{ shop: string }> }) {
  const { shop } = await params;
  const actor = await pageActor(shop, 'people:edit');
  return (
    <PageBody title="People">
      <PeopleDesk shopId={shop} members={await loadMembers(shop)} self={actor.membershipId} />
    </PageBody>
  );
}
