/** The quote page of the desk: what the asker may see, and nothing beside it. */
import { type Actor, canSeeCost } from '@/lib/access/policy';
import { getJob } from '@/lib/jobs/queries';
import { type LinkRow, linksOfJob } from '@/lib/links/queries';
import { withShop } from '@/lib/platform/db';
import { getShop, settingsOf } from '@/lib/shops/queries';
import type { LineCheck } from '../blockers';
import { type Composed, composeQuote } from '../compose';
import { plainDecimal } from '../content';
import { livePorts } from '../ports';
import type { QuoteContent } from '../schema/content';
import type { DeskDraft, DeskEvent, DeskLine, DeskQuote, DeskSent, DeskTerms } from '../schema/desk';
import type { LineChange } from '../schema/lines';
import type { SourcePorts } from '../sources';
import { contentOf, type SentQuote, sentQuotes } from './sent';

const MONEY_CHANGES: LineChange['what'][] = ['parts-cost', 'hours'];

function lineOf(check: LineCheck, composed: Composed, withCost: boolean): DeskLine {
  const { line, source, changes } = check;
  const priced = composed.state.figures.lines.get(line.id) ?? { costMinor: 0, amountMinor: 0 };
  return {
    id: line.id,
    version: line.version,
    source: line.source,
    areaName: line.areaName,
    description: line.description,
    amountMinor: priced.amountMinor,
    taxable: line.taxable,
    optional: line.optional,
    chosen: line.chosen,
    openStops: source?.openStops ?? 0,
    gone: line.source !== 'typed' && source === null,
    changes: changes.map((change) =>
      withCost || !MONEY_CHANGES.includes(change.what) ? change : { ...change, before: '', after: '' },
    ),
    figures: withCost
      ? {
          quantity: plainDecimal(line.quantity),
          unitCost: plainDecimal(line.unitCost),
          unitLabourHours: plainDecimal(line.unitLabourHours),
          labourRate: plainDecimal(line.labourRate),
          markupPct: plainDecimal(line.markupPct),
          costMinor: priced.costMinor,
        }
      : null,
  };
}

function termsOf({ state }: Composed, withCost: boolean): DeskTerms {
  const { terms } = state;
  return {
    version: terms.version,
    depositPct: plainDecimal(terms.depositPct),
    discountPct: plainDecimal(terms.discountPct),
    overheadPct: withCost ? plainDecimal(terms.overheadPct) : null,
    contingencyPct: withCost ? plainDecimal(terms.contingencyPct) : null,
    taxName: terms.taxName,
    taxRatePct: plainDecimal(terms.taxRatePct),
    validDays: terms.validDays,
    scopeNote: terms.scopeNote,
    exclusions: terms.exclusions,
  };
}

async function draftOf(shopId: string, composed: Composed, withCost: boolean): Promise<DeskDraft> {
  const { state, content, bodySha256 } = composed;
  const shop = await getShop(shopId);
  return {
    terms: termsOf(composed, withCost),
    depositApplies: state.depositPct !== '0' || Number(state.terms.depositPct) === 0,
    pricesAt: state.terms.pricesAt,
    lines: state.checks.map((check) => lineOf(check, composed, withCost)),
    unused: state.unused.map((source) => ({
      id: source.id,
      label: source.areaName ? `${source.areaName}: ${source.description}` : source.description,
      openStops: source.openStops,
    })),
    totals: content.totals,
    cost: withCost ? { costMinor: state.figures.costMinor, marginPct: state.figures.marginPct } : null,
    blockers: state.blockers,
    bodySha256,
    nextRevision: content.revision,
    defaults: withCost
      ? { labourRate: plainDecimal(shop.labourRate), markupPct: plainDecimal(shop.markupPct) }
      : null,
  };
}

const text = (value: unknown): string => (typeof value === 'string' ? value : '');

function eventsFor({ events }: SentQuote): DeskEvent[] {
  return events.map(({ id, kind, at, by, detail }) => ({
    id,
    kind,
    at,
    by,
    note: text(detail['reason']) || text(detail['to']),
  }));
}

function sentOf(quote: SentQuote, content: QuoteContent): DeskSent {
  const { document, state, acceptance, events } = quote;
  const sending = events.findLast((event) => event.kind === 'sent' || event.kind === 'resent');
  return {
    documentId: document.id,
    revision: document.revision,
    state,
    amountMinor: Number(document.amountMinor ?? 0),
    validUntil: document.validUntil,
    sha256: document.sha256,
    hasPdf: document.pdfSha256 !== null,
    sentTo: text(sending?.detail['to']),
    events: eventsFor(quote),
    options: content.options.map(({ id, text: words, amountMinor, chosen }) => ({
      ...{ id, text: words, amountMinor, chosen },
    })),
    acceptance: acceptance && {
      name: acceptance.name,
      at: acceptance.at,
      totalMinor: Number(acceptance.totalMinor),
      reference: acceptance.reference,
      sha256: acceptance.sha256,
    },
  };
}

const linkFor = (link: LinkRow) => ({
  id: link.id,
  email: link.contactEmail,
  open: link.revokedAt === null && (link.expiresAt === null || link.expiresAt.getTime() > Date.now()),
});

/** @throws {AppError} `not-found` */
export function deskQuote(actor: Actor, jobId: string, ports: SourcePorts = livePorts): Promise<DeskQuote> {
  const { shopId } = actor;
  return withShop(shopId, async () => {
    const { id, number, title, customerName, customerEmail, steps } = await getJob(jobId);
    const composed = await composeQuote(shopId, jobId, new Date(), ports);
    const sent: DeskSent[] = [];
    for (const quote of await sentQuotes(shopId, jobId))
      sent.push(sentOf(quote, await contentOf(quote.document.id)));
    return {
      job: { id, number, title, customerName, customerEmail },
      settings: settingsOf(await getShop(shopId)),
      steps,
      draft: composed ? await draftOf(shopId, composed, canSeeCost(actor)) : null,
      sent,
      links: (await linksOfJob(jobId)).map(linkFor),
    };
  });
}
