import type { Metadata } from 'next';
import { CircuitDesk } from '@/components/circuits/circuit-desk';
import { PageBody } from '@/components/shell/header';
import { pageActor } from '@/lib/access/actor';

export const metadata: Metadata = { title: 'Circuit' };

export default async function CircuitPage({
  params,
}: {
  params: Promise<{ shop: string; job: string; circuit: string }>;
}) {
  const { shop, job, circuit } = await params;
  const actor = await pageActor(shop, 'work:edit');
  return (
    <PageBody title="Circuit desk">
      <CircuitDesk shopId={shop} membershipId={actor.membershipId} jobId={job} circuitId={circuit} />
    </PageBody>
  );
}
