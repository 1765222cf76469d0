import type { Metadata } from 'next';
import { PageBody } from '@/components/shell/header';
import { SurveyScreen } from '@/components/survey/survey-screen';
import { pageActor } from '@/lib/access/actor';

export const metadata: Metadata = { title: 'Survey' };

/** A shell without private data: what it shows comes from the device's store and the API. */
export default async function SurveyPage({ params }: { params: Promise<{ shop: string; job: string }> }) {
  const { shop, job } = await params;
  const actor = await pageActor(shop, 'work:edit');
  return (
    <PageBody title="Site survey" sub="Saved on this device while you type, and sent when there is a signal.">
      <SurveyScreen shopId={shop} membershipId={actor.membershipId} jobId={job} />
    </PageBody>
  );
}
