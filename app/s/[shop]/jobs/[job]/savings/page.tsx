import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { FindingList } from '@/components/findings/finding-list';
import { HowFigured } from '@/components/findings/how-figured';
import { EnergyBars, MoneyOverTime } from '@/components/savings/pictures';
import { SavingFormFields } from '@/components/savings/saving-form';
import { PageBody } from '@/components/shell/header';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState, KeyFigure, Notice, Sheet } from '@/components/ui/sheet';
import { isId, pageActor } from '@/lib/access/actor';
import { may } from '@/lib/access/policy';
import { toAppError } from '@/lib/platform/http/errors';
import { minorDigits } from '@/lib/pricing/currencies';
import { loadSaving } from '@/lib/savings/queries';
import { formatMoney, formatNumber } from '@/lib/units';

export const metadata: Metadata = { title: 'Savings' };

export default async function SavingsPage({ params }: { params: Promise<{ shop: string; job: string }> }) {
  const { shop, job: jobId } = await params;
  const actor = await pageActor(shop, 'price:see');
  if (!isId(jobId)) notFound();
  const saving = await loadSaving(shop, jobId).catch((error: unknown) => {
    if (toAppError(error).code === 'not-found') notFound();
    throw error;
  });
  const { job, settings, figured, assumptions, quoted } = saving;
  const { energy, payback, areas, leftOut } = figured;
  const money = (units: number) =>
    formatMoney(Math.round(units * 10 ** (minorDigits(settings.currency) ?? 2)), settings);
  const { result } = energy;
  const rated = assumptions.energyRate.value !== null;
  const pays = payback?.result ?? null;
  return (
    <PageBody
      title="Savings"
      sub={`Job ${job.number}, ${job.title}, ${job.customerName}`}
      actions={
        <ButtonLink look="secondary" href={`/s/${shop}/jobs/${jobId}`}>
          The job
        </ButtonLink>
      }
    >
      <div className="grid items-start gap-5 lg:grid-cols-[3fr_2fr]">
        <div className="flex flex-col gap-5">
          <Sheet title="A year">
            {saving.changes === 0 ? (
              <EmptyState>
                No changes yet: what is taken out and what takes its place comes from the survey’s change
                lines.
              </EmptyState>
            ) : (
              <>
                {leftOut.length > 0 ? (
                  <Notice kind="caution" title={`Hours not known: ${leftOut.join(', ')}.`}>
                    These areas are left out until the survey has their hours.
                  </Notice>
                ) : null}
                <dl className="mb-4">
                  <KeyFigure
                    label="Energy before"
                    value={formatNumber(result.kilowattHoursBefore, 0)}
                    unit="kWh"
                  />
                  <KeyFigure
                    label="Energy after"
                    value={formatNumber(result.kilowattHoursAfter, 0)}
                    unit="kWh"
                  />
                  <KeyFigure
                    label="Saved, with heating and cooling"
                    value={formatNumber(result.netKilowattHoursSaved, 0)}
                    unit="kWh"
                  />
                  <KeyFigure
                    label="Connected load saved"
                    value={formatNumber(result.demandKilowattsSaved, 2)}
                    unit="kW"
                  />
                  <KeyFigure label="Money saved" value={rated ? money(result.costSaved) : 'rate not known'} />
                  <KeyFigure
                    label="Carbon saved"
                    value={result.kgCo2Saved === null ? '–' : formatNumber(result.kgCo2Saved, 0)}
                    unit="kg"
                  />
                </dl>
                {areas.length > 0 ? <EnergyBars areas={areas} /> : null}
              </>
            )}
          </Sheet>
          <Sheet title="Over the years" aside={quoted ? `Cost: ${quoted.source}` : undefined}>
            {pays ? (
              <>
                <dl className="mb-4">
                  <KeyFigure label="Cost less incentive" value={money(pays.netCost)} />
                  <KeyFigure
                    label="Paid back after"
                    value={
                      pays.simplePaybackYears === null ? 'never' : formatNumber(pays.simplePaybackYears, 1)
                    }
                    unit={pays.simplePaybackYears === null ? undefined : 'years'}
                  />
                  <KeyFigure label="Worth today, all of it (NPV)" value={money(pays.netPresentValue)} />
                  <KeyFigure
                    label="Rate of return (IRR)"
                    value={pays.internalRatePct === null ? '–' : formatNumber(pays.internalRatePct, 1)}
                    unit="%"
                  />
                </dl>
                <MoneyOverTime flows={pays.cashFlows} money={money} paybackYears={pays.simplePaybackYears} />
              </>
            ) : (
              <EmptyState>
                {rated
                  ? 'No cost yet: send a quote, or type the cost of the work.'
                  : 'No energy rate yet: type it here, or add the utility’s account to the survey.'}
              </EmptyState>
            )}
          </Sheet>
          <Sheet title="Findings">
            <FindingList findings={[...energy.findings, ...(payback?.findings ?? [])]} settings={settings} />
            <HowFigured steps={[...energy.working, ...(payback?.working ?? [])]} settings={settings} />
          </Sheet>
        </div>
        <Sheet title="Assumptions" aside="each with its source">
          {may(actor, 'work:edit') ? (
            <SavingFormFields
              key={saving.version ?? 0}
              shopId={shop}
              jobId={jobId}
              version={saving.version}
              assumptions={assumptions}
              currency={settings.currency}
            />
          ) : (
            <p className="text-ink-2">The estimator sets these.</p>
          )}
        </Sheet>
      </div>
    </PageBody>
  );
}
