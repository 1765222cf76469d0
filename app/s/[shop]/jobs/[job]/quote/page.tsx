import type { Metadata } from 'next';
import Link from 'next/link';
import { DraftLines } from '@/components/quotes/draft-lines';
import { Blockers, DraftTotals } from '@/components/quotes/draft-side';
import { BringUpToDate, OpenDraft, UnusedSources } from '@/components/quotes/draft-tools';
import { LineForm } from '@/components/quotes/line-form';
import { SendPanel } from '@/components/quotes/send-panel';
import { LinkList } from '@/components/quotes/link-list';
import { SentList } from '@/components/quotes/sent-list';
import { TermsForm } from '@/components/quotes/terms-form';
import { JobLine } from '@/components/job-line/job-line';
import { jobLineSteps } from '@/components/jobs/steps';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState, Sheet } from '@/components/ui/sheet';
import { pageActor } from '@/lib/access/actor';
import { canEditWork, canSendQuote } from '@/lib/access/policy';
import { deskQuote } from '@/lib/quotes/queries';
import type { DeskDraft, DeskQuote } from '@/lib/quotes/schema/desk';
import { formatDateTime, formatMoney } from '@/lib/units';
import { found } from './found';

export const metadata: Metadata = { title: 'Quote' };

interface Props {
  params: Promise<{ shop: string; job: string }>;
}

interface Part {
  shop: string;
  quote: DeskQuote;
  draft: DeskDraft;
}

function Lines({ shop, quote, draft, editable }: Part & { editable: boolean }) {
  const { job, settings } = quote;
  const defaults = editable ? draft.defaults : null;
  const areas = [...new Set(draft.lines.map((line) => line.areaName).filter(Boolean))];
  return (
    <Sheet title="Lines" aside={`Prices of ${formatDateTime(draft.pricesAt, settings)}`}>
      {draft.lines.length === 0 ? (
        <EmptyState>
          There is no line yet. Change lines and circuits of the survey come here by themselves; type others
          below.
        </EmptyState>
      ) : null}
      <DraftLines shopId={shop} jobId={job.id} lines={draft.lines} settings={settings} defaults={defaults} />
      {defaults ? (
        <div className="mt-5 flex flex-col gap-5 border-t border-rule pt-5">
          <UnusedSources shopId={shop} jobId={job.id} unused={draft.unused} />
          <BringUpToDate
            shopId={shop}
            jobId={job.id}
            needed={draft.lines.some((line) => line.changes.length > 0 || line.gone)}
          />
          <details open={draft.lines.length === 0}>
            <summary className="inline-flex min-h-touch items-center rounded-md border-2 border-ink px-4 font-bold">
              Type a line
            </summary>
            <div className="pt-2">
              <LineForm
                shopId={shop}
                jobId={job.id}
                line={null}
                defaults={defaults}
                areas={areas}
                currency={settings.currency}
              />
            </div>
          </details>
        </div>
      ) : null}
    </Sheet>
  );
}

function Side({ shop, quote, draft, editable, sends }: Part & { editable: boolean; sends: boolean }) {
  const { job, settings } = quote;
  return (
    <div className="flex min-w-0 flex-col gap-5">
      <Sheet title="Totals">
        <DraftTotals draft={draft} settings={settings} />
        <Link
          href={`/s/${shop}/jobs/${job.id}/quote/preview`}
          className="mt-3 inline-flex min-h-touch items-center underline"
        >
          Preview: as the customer will see it
        </Link>
      </Sheet>
      {sends ? (
        <Sheet title="Send">
          {draft.blockers.length > 0 ? (
            <Blockers draft={draft} />
          ) : (
            <SendPanel
              shopId={shop}
              jobId={job.id}
              bodySha256={draft.bodySha256}
              revision={draft.nextRevision}
              email={job.customerEmail}
              total={formatMoney(draft.totals.totalMinor, settings)}
            />
          )}
        </Sheet>
      ) : null}
      {editable ? (
        <Sheet title="Terms">
          <TermsForm shopId={shop} jobId={job.id} terms={draft.terms} depositApplies={draft.depositApplies} />
        </Sheet>
      ) : null}
    </div>
  );
}

export default async function QuotePage({ params }: Props) {
  const { shop, job } = await params;
  const actor = await pageActor(shop, 'price:see');
  const quote = await found(deskQuote(actor, job));
  const { draft, sent } = quote;
  const accepted = sent.find((revision) => revision.acceptance !== null);
  // What was accepted is changed by agreement, not by the next draft.
  const editable = canEditWork(actor) && !accepted;
  const sends = canSendQuote(actor) && !accepted;
  return (
    <PageBody
      title={quote.job.title}
      sub={`${quote.job.customerName}, job ${quote.job.number}, quote`}
      actions={
        <ButtonLink look="secondary" href={`/s/${shop}/jobs/${job}`}>
          The job
        </ButtonLink>
      }
    >
      <Sheet>
        <JobLine size="large" steps={jobLineSteps(quote.steps)} />
      </Sheet>
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-5 lg:grid-cols-[minmax(0,1fr)_26rem] lg:grid-rows-[auto_1fr]">
        {draft ? (
          <>
            <Lines shop={shop} quote={quote} draft={draft} editable={editable} />
            <div className="lg:col-start-2 lg:row-span-2 lg:row-start-1">
              <Side shop={shop} quote={quote} draft={draft} editable={editable} sends={sends} />
            </div>
          </>
        ) : (
          <Sheet title="Draft">
            <EmptyState action={editable ? <OpenDraft shopId={shop} jobId={job} /> : null}>
              {editable
                ? 'There is no draft yet. Starting one takes over every change line and circuit of the survey, at today’s prices.'
                : 'There is no draft yet. An estimator starts it when the survey is done.'}
            </EmptyState>
          </Sheet>
        )}
        {sent.length > 0 ? (
          <Sheet title="Sent">
            <SentList
              shopId={shop}
              jobId={job}
              sent={sent}
              settings={quote.settings}
              canSend={canSendQuote(actor)}
            />
            <LinkList shopId={shop} jobId={job} links={quote.links} />
          </Sheet>
        ) : null}
      </div>
    </PageBody>
  );
}
