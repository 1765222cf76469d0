import type { Metadata } from 'next';
import { CircuitList } from '@/components/circuits/circuit-list';
import { PageBody } from '@/components/shell/header';
import { pageActor } from '@/lib/access/actor';

export const metadata: Metadata = { title: 'Circuits' };

export default async function CircuitsPage({ params }: { params: Promise<{ shop: string; job: string }> }) {
  const { shop, job } = await params;
  const actor = await pageActor(shop, 'work:edit');
  return (
    <PageBody title="Circuits">
      <CircuitList shopId={shop} membershipId={actor.membershipId} jobId={job} />
    </PageBody>
  );
}
