import type { Metadata } from 'next';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState, Sheet } from '@/components/ui/sheet';
import { VisitCard } from '@/components/visits/visit-card';
import { pageActor } from '@/lib/access/actor';
import { may, seesOnlyOwnVisits } from '@/lib/access/policy';
import { loadComingVisits } from '@/lib/visits/queries';

export const metadata: Metadata = { title: 'Visits' };

export default async function VisitsPage({ params }: { params: Promise<{ shop: string }> }) {
  const { shop } = await params;
  const actor = await pageActor(shop, 'sheet:write');
  const { visits, today, settings } = await loadComingVisits(actor);
  const now = visits.filter((visit) => visit.startsAt.slice(0, 10) <= today);
  const later = visits.filter((visit) => visit.startsAt.slice(0, 10) > today);
  const own = seesOnlyOwnVisits(actor);
  const desk = may(actor, 'job:see');
  const cards = (list: typeof visits) => (
    <ul className="flex flex-col gap-4">
      {list.map((visit) => (
        <VisitCard key={visit.id} shopId={shop} visit={visit} settings={settings} desk={desk} />
      ))}
    </ul>
  );
  return (
    <PageBody title="Visits" sub={own ? 'Those you are on.' : 'Today’s and coming visits of the shop.'}>
      <Sheet title="Today">
        {now.length > 0 ? (
          cards(now)
        ) : (
          <EmptyState
            action={
              desk && visits.length === 0 ? (
                <ButtonLink look="secondary" href={`/s/${shop}/jobs`}>
                  To the jobs
                </ButtonLink>
              ) : null
            }
          >
            {own
              ? 'You are on no visit today. When the office plans one with you, it is here.'
              : 'No visit today. A visit is planned on the job’s page, under Install.'}
          </EmptyState>
        )}
      </Sheet>
      {later.length > 0 ? <Sheet title="Coming">{cards(later)}</Sheet> : null}
    </PageBody>
  );
}
