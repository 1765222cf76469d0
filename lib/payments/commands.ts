/**
 * Card payments: the state comes from the object that is fetched, not from the order of notices. Webhook and return
 * page settle alike; a repeat changes nothing.
 */
import { command, type CommandContext, systemActor } from '@/lib/access/command';
import type { Actor } from '@/lib/access/policy';
import { getInvoice, lockInvoice } from '@/lib/invoices/queries';
import { balanceOf } from '@/lib/invoices/schema';
import { refreshStage } from '@/lib/jobs/commands';
import { run, select, withShop } from '@/lib/platform/db';
import { shopIdByCheckout, shopIdByPaymentSession } from '@/lib/platform/db/definer';
import { env } from '@/lib/platform/env';
import { AppError, invalid, notFound } from '@/lib/platform/http/errors';
import { log } from '@/lib/platform/log';
import { enqueue } from '@/lib/platform/queue/outbox';
import { type Checkout, paymentService, type PaymentNotice } from '@/lib/platform/stripe';
import { getShop, settingsOf } from '@/lib/shops/queries';
import { dayIn, parseMoney } from '@/lib/units';
import { isId } from '@/lib/access/actor';
import type { PayState, RecordPaymentInput } from './schema';

/** From the row's making: a page that is gone to again (at most 20 minutes old) stays open long enough to type a card. */
const MINUTES_OPEN = 60;

interface SessionRow {
  id: string;
  invoiceId: string;
  account: string;
  checkoutId: string | null;
  amountMinor: string;
  currency: string;
  state: PayState;
  createdAt: Date;
  /** Young enough for its card page to be open for a good while yet. */
  fresh: boolean;
}

const SESSION = `id, invoice_id as "invoiceId", account, checkout_id as "checkoutId", amount_minor::text as "amountMinor", currency, state,
  created_at as "createdAt", created_at > now() - interval '20 minutes' as fresh`;

const base = () => env().APP_URL.replace(/\/$/, '');

async function findSession(id: string): Promise<SessionRow | null> {
  const rows = await select<SessionRow>(`select ${SESSION} from payment_sessions where id = $1`, [id]);
  return rows[0] ?? null;
}

interface Prepared {
  session: SessionRow;
  stale: SessionRow[];
  description: string;
  email: string;
}

/** Takes one open session per invoice under its lock, so that a double click on pay makes one. */
async function prepare(shopId: string, jobId: string, invoiceId: string, email: string): Promise<Prepared> {
  return command(systemActor(shopId, 'customer'), async ({ audit }) => {
    const invoice = await lockInvoice(invoiceId);
    if (invoice.jobId !== jobId) throw notFound('This invoice');
    const balance = balanceOf(invoice);
    if (balance <= 0n) throw new AppError('conflict', 'Nothing is open on this invoice.');
    const shop = await getShop(shopId);
    if (balance > BigInt(shop.cardCeilingMinor))
      throw new AppError(
        'conflict',
        `This amount is above what ${shop.name} takes by card. Please pay by transfer or cheque.`,
      );
    const open = await select<SessionRow>(
      `select ${SESSION} from payment_sessions where invoice_id = $1 and state = 'open' order by created_at desc`,
      [invoiceId],
    );
    const pending = await select(
      `select 1 from payment_sessions where invoice_id = $1 and state = 'pending'`,
      [invoiceId],
    );
    if (pending.length > 0)
      throw new AppError('conflict', 'A payment for this invoice is on its way already.');
    // A second press, or a second tab, goes to the same page; an old page is replaced before it runs out.
    const fresh = open.find((one) => one.amountMinor === String(balance) && one.fresh);
    const session =
      fresh ?? (await insertSession(shopId, invoiceId, shop.stripeAccount ?? '', balance, invoice.currency));
    await audit('payment.started', { type: 'document', id: invoiceId }, { after: { sessionId: session.id } });
    return {
      session,
      stale: open.filter((one) => one.id !== session.id && one.checkoutId !== null),
      description: `${shop.name}, invoice ${invoice.number}`,
      email,
    };
  });
}

async function insertSession(
  shopId: string,
  invoiceId: string,
  account: string,
  amount: bigint,
  currency: string,
): Promise<SessionRow> {
  const rows = await run<SessionRow>(
    `insert into payment_sessions (shop_id, invoice_id, account, amount_minor, currency)
     values ($1, $2, $3, $4, $5) returning ${SESSION}`,
    [shopId, invoiceId, account, String(amount), currency],
  );
  if (!rows[0]) throw new Error('The payment session was not written.');
  return rows[0];
}

/** Sends a customer to the card page: our row first, then the service, with our row's id as its idempotency key. */
export async function startCheckout(
  shopId: string,
  jobId: string,
  invoiceId: string,
  email: string,
): Promise<{ url: string }> {
  const { session, stale, description } = await prepare(shopId, jobId, invoiceId, email);
  for (const old of stale) if (old.checkoutId) await closeStale(shopId, old);
  if (session.checkoutId) return reopen(shopId, session, session.checkoutId);
  const back = `${base()}/pay/${session.id}`;
  const checkout = await paymentService().createCheckoutSession({
    account: session.account || null,
    amountMinor: BigInt(session.amountMinor),
    currency: session.currency,
    description,
    customerEmail: email,
    successUrl: back,
    cancelUrl: back,
    metadata: { shopId, paymentSessionId: session.id, invoiceId },
    // The same key must carry the same request, so the time is counted from our row and not from now.
    expiresAt: new Date(session.createdAt.getTime() + MINUTES_OPEN * 60_000),
    idempotencyKey: session.id,
  });
  const open = await withShop(shopId, async () => {
    await run(
      'update payment_sessions set checkout_id = $2, url = $3, checked_at = now() where id = $1 returning id',
      [session.id, checkout.id, checkout.url],
    );
    return balanceOf(await getInvoice(invoiceId));
  });
  // Voided or paid by hand while the page was being made: nobody may pay on it.
  if (String(open) !== session.amountMinor) {
    await closePage(shopId, { ...session, checkoutId: checkout.id });
    throw new AppError('conflict', 'What is open on this invoice has just changed. Reload to see it.');
  }
  if (!checkout.url) throw new AppError('unavailable', 'The card page could not be opened. Try again.');
  return { url: checkout.url };
}

/** The card page that was opened a moment ago, if it still is. */
async function reopen(shopId: string, session: SessionRow, checkoutId: string): Promise<{ url: string }> {
  const checkout = await paymentService().fetchCheckoutSession(checkoutId, session.account || null);
  if (checkout.state === 'open' && checkout.url) return { url: checkout.url };
  await settle(shopId, session.id, checkout);
  throw new AppError('conflict', 'This payment page has been used. Reload to see where the invoice stands.');
}

/** Ends a card page, and settles it if it had been paid in that moment. */
async function closePage(shopId: string, session: SessionRow): Promise<PayState> {
  const checkout = await paymentService().expireCheckoutSession(
    session.checkoutId ?? '',
    session.account || null,
  );
  return settle(shopId, session.id, checkout);
}

/** After an invoice was voided or paid by hand: what still stands open at the card service is ended. */
export async function closePagesOf(shopId: string, invoiceId: string): Promise<void> {
  const open = await withShop(shopId, () =>
    select<SessionRow>(
      `select ${SESSION} from payment_sessions where invoice_id = $1 and state = 'open' and checkout_id is not null`,
      [invoiceId],
    ),
  );
  for (const session of open) await closePage(shopId, session);
}

/** An older page must not be paid too. */
async function closeStale(shopId: string, session: SessionRow): Promise<void> {
  const state = await closePage(shopId, session);
  if (state === 'paid' || state === 'pending')
    throw new AppError('conflict', 'This invoice has just been paid on another page. Reload to see it.');
}

function assertSame(session: SessionRow, checkout: Checkout): void {
  const same =
    checkout.metadata['paymentSessionId'] === session.id &&
    (session.checkoutId === null || session.checkoutId === checkout.id) &&
    String(checkout.amountMinor) === session.amountMinor &&
    checkout.currency === session.currency.trim();
  if (same) return;
  log().error(
    { sessionId: session.id, checkoutId: checkout.id },
    'a checkout does not fit its payment session',
  );
  throw new AppError(
    'conflict',
    'The payment does not fit its invoice: amount, currency or reference differ.',
  );
}

/** A session of somebody else's account may carry our reference; it pays nothing of ours. */
function assertSameAccount(session: SessionRow, notice: PaymentNotice): void {
  if (session.account === notice.account) return;
  log().error({ sessionId: session.id, eventId: notice.eventId }, 'a notice came from another account');
  throw new AppError('conflict', 'This notice comes from another account than its payment.');
}

/** Paid stays paid, and nothing opens again: what was fetched before another answer may be written after it. */
function laterOf(known: PayState, fetched: PayState): PayState {
  return known === 'paid' || fetched === 'open' ? known : fetched;
}

async function recordCardPayment(
  { shopId }: CommandContext,
  session: SessionRow,
  checkout: Checkout,
): Promise<void> {
  const { timeZone } = settingsOf(await getShop(shopId));
  const inserted = await run<{ id: string }>(
    `insert into payments (shop_id, invoice_id, payment_session_id, method, account, external_id, amount_minor, currency, received_on)
     values ($1, $2, $3, 'card', $4, $5, $6, $7, $8) on conflict (shop_id, account, external_id) do nothing returning id`,
    [
      shopId,
      session.invoiceId,
      session.id,
      session.account,
      checkout.paymentIntentId ?? checkout.id,
      session.amountMinor,
      session.currency,
      dayIn(timeZone, new Date()),
    ],
  );
  const [payment] = inserted;
  if (!payment) return;
  await enqueue('payment.receipt', { paymentId: payment.id });
  // It was paid in the moment in which it was voided: the money is here, and somebody must say what becomes of it.
  if ((await getInvoice(session.invoiceId)).voided)
    await enqueue('payment.on-void', { paymentId: payment.id });
}

/** Brings our session to what the service says of it, in one transaction. @returns its state */
export async function settle(
  shopId: string,
  sessionId: string,
  checkout: Checkout,
  eventKey?: PaymentNotice,
): Promise<PayState> {
  return command(systemActor(shopId, 'card service'), async (context) => {
    await run('select id from payment_sessions where id = $1 for update', [sessionId]);
    const session = await findSession(sessionId);
    if (!session) throw notFound('This payment');
    assertSame(session, checkout);
    if (eventKey) {
      assertSameAccount(session, eventKey);
      await noteEvent(shopId, eventKey);
    }
    const state = laterOf(session.state, checkout.state);
    if (state === 'paid') await recordCardPayment(context, session, checkout);
    await run(
      `update payment_sessions set state = $2, checkout_id = coalesce(checkout_id, $3), checked_at = now()
       where id = $1 returning id`,
      [sessionId, state, checkout.id],
    );
    await context.audit('payment.checked', { type: 'payment-session', id: sessionId }, { after: { state } });
    await refreshStage((await getInvoice(session.invoiceId)).jobId);
    return state;
  });
}

async function noteEvent(shopId: string, notice: PaymentNotice): Promise<void> {
  await run(
    `insert into payment_events (shop_id, account, event_id, type, object_id) values ($1, $2, $3, $4, $5)
     on conflict (shop_id, account, event_id) do nothing returning id`,
    [shopId, notice.account, notice.eventId, notice.type, notice.objectId],
  );
}

async function knownEvent(shopId: string, notice: PaymentNotice): Promise<boolean> {
  const rows = await withShop(shopId, () =>
    select('select 1 from payment_events where account = $1 and event_id = $2', [
      notice.account,
      notice.eventId,
    ]),
  );
  return rows.length > 0;
}

/** A signed notice: what it is about is fetched again. Notices of things that are not ours are let pass. */
export async function handleNotice(notice: PaymentNotice): Promise<void> {
  const checkoutId = notice.checkoutId;
  const sessionId = notice.metadata['paymentSessionId'] ?? '';
  const shopId = checkoutId
    ? ((await shopIdByCheckout(notice.account, checkoutId)) ??
      (isId(sessionId) ? await shopIdByPaymentSession(sessionId) : null))
    : null;
  if (!shopId || !checkoutId || !isId(sessionId) || (await knownEvent(shopId, notice))) return;
  const checkout = await paymentService().fetchCheckoutSession(checkoutId, notice.account || null);
  await settle(shopId, sessionId, checkout, notice);
}

export interface Returned {
  state: PayState;
  shopId: string;
  invoiceId: string;
}

/** The return page: settles as the webhook does, whichever comes first. */
export async function settleReturn(sessionId: string): Promise<Returned | null> {
  const shopId = isId(sessionId) ? await shopIdByPaymentSession(sessionId) : null;
  const session = shopId ? await withShop(shopId, () => findSession(sessionId)) : null;
  if (!shopId || !session) return null;
  if (!session.checkoutId || session.state === 'paid')
    return { state: session.state, shopId, invoiceId: session.invoiceId };
  const checkout = await paymentService().fetchCheckoutSession(session.checkoutId, session.account || null);
  if (checkout.state === session.state) return { state: session.state, shopId, invoiceId: session.invoiceId };
  return { state: await settle(shopId, sessionId, checkout), shopId, invoiceId: session.invoiceId };
}

/** A payment that came by hand. */
export async function recordPayment(actor: Actor, input: RecordPaymentInput): Promise<{ id: string }> {
  return command(actor, async ({ audit, shopId }) => {
    const invoice = await lockInvoice(input.invoiceId);
    if (invoice.voided)
      throw new AppError('conflict', 'This invoice is void: nothing can be received for it.');
    const settings = settingsOf(await getShop(shopId));
    const amount = parseMoney(input.amount, settings);
    if (!amount.ok) throw invalid('amount', amount.message);
    if (amount.value <= 0n) throw invalid('amount', 'More than nothing.');
    if (amount.value > balanceOf(invoice))
      throw invalid('amount', 'This is more than is open on the invoice.');
    if (input.receivedOn > dayIn(settings.timeZone, new Date()))
      throw invalid('receivedOn', 'This day has not come yet.');
    const rows = await run<{ id: string }>(
      `insert into payments (shop_id, invoice_id, method, amount_minor, currency, received_on, reference, recorded_by)
       values ($1, $2, $3, $4, $5, $6, $7, $8) returning id`,
      [
        shopId,
        invoice.id,
        input.method,
        String(amount.value),
        invoice.currency,
        input.receivedOn,
        input.reference,
        actor.membershipId,
      ],
    );
    const id = rows[0]?.id ?? '';
    await enqueue('payment.receipt', { paymentId: id });
    await enqueue('payment.close-pages', { invoiceId: invoice.id });
    await audit(
      'payment.recorded',
      { type: 'payment', id },
      { after: { invoice: invoice.number, method: input.method, amountMinor: String(amount.value) } },
    );
    await refreshStage(invoice.jobId);
    return { id };
  });
}
