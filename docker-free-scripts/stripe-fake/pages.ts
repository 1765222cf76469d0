/** The pay page's requests: GET and POST /pay/:id, POST /pay/:id/confirm. */
import { expireDue } from './api';
import { checkTyped, digitsOf, NOT_AUTHENTICATED, outcomeOf, type Typed } from './cards';
import type { Fake } from './fake';
import type { HttpAnswer } from './api-http';
import { PAGE_HEADERS } from './page-layout';
import {
  challengePage,
  donePage,
  expiredPage,
  type FormState,
  NOTHING_TYPED,
  payForm,
  unknownPage,
} from './pay-form';
import { beginDebit, challenge, decline, pay } from './payments';
import type { Method, StoredSession } from './store';

const html = (body: string, status = 200): HttpAnswer => ({ status, body, headers: PAGE_HEADERS });

const redirect = (location: string): HttpAnswer => ({
  status: 303,
  body: '',
  headers: { location, 'cache-control': 'no-store', 'referrer-policy': 'no-referrer' },
});

const nextUrl = ({ session }: StoredSession) =>
  (session.success_url ?? '').replaceAll('{CHECKOUT_SESSION_ID}', session.id);

/** With 200 whatever is wrong: a browser writes other answers to its console as errors of the page. */
const form = (stored: StoredSession, state: Partial<FormState> = {}) =>
  html(payForm(stored, { typed: NOTHING_TYPED, problems: {}, ...state }));

function show(stored: StoredSession): HttpAnswer {
  const { session } = stored;
  if (session.status === 'complete')
    return html(donePage(nextUrl(stored), session.payment_status === 'unpaid'));
  if (session.status === 'expired') return html(expiredPage(session.cancel_url));
  return stored.pending ? html(challengePage(stored)) : form(stored);
}

function typedIn(body: string, stored: StoredSession): Typed {
  const fields = new URLSearchParams(body);
  const get = (name: string) => (fields.get(name) ?? '').slice(0, 200);
  const types = stored.session.payment_method_types;
  const asked = get('method') === 'bank' ? 'bank' : 'card';
  const method = types.length > 1 ? asked : types[0] === 'card' ? 'card' : 'bank';
  return {
    method,
    name: get('name'),
    number: get('number'),
    expiry: get('expiry'),
    cvc: get('cvc'),
    routing: get('routing'),
    account: get('account'),
  };
}

/** Of the number just its last four digits go on from here. */
function methodOf(typed: Typed): Method {
  const card = typed.method === 'card';
  return {
    type: card ? 'card' : 'us_bank_account',
    last4: digitsOf(card ? typed.number : typed.account).slice(-4),
    name: typed.name.trim(),
  };
}

function submit(fake: Fake, stored: StoredSession, body: string): HttpAnswer {
  const typed = typedIn(body, stored);
  const problems = checkTyped(typed, new Date());
  if (Object.keys(problems).length > 0) return form(stored, { typed, problems });
  const method = methodOf(typed);
  if (method.type === 'us_bank_account') {
    beginDebit(fake, stored, method);
    return redirect(nextUrl(stored));
  }
  const outcome = outcomeOf(digitsOf(typed.number));
  if (outcome.kind === 'challenge') {
    challenge(fake, stored, method);
    return redirect(`/pay/${stored.session.id}`);
  }
  if (outcome.kind === 'declined') {
    decline(fake, stored, method, outcome.refusal);
    return form(stored, { typed, refusal: outcome.refusal.message });
  }
  pay(fake, stored, method);
  return redirect(nextUrl(stored));
}

function confirm(fake: Fake, stored: StoredSession, body: string): HttpAnswer {
  const method = stored.pending;
  if (!method) return redirect(`/pay/${stored.session.id}`);
  if (new URLSearchParams(body).get('answer') === 'yes') {
    pay(fake, stored, method);
    return redirect(nextUrl(stored));
  }
  decline(fake, stored, method, NOT_AUTHENTICATED);
  const typed = { ...NOTHING_TYPED, name: method.name };
  return form(stored, { typed, refusal: NOT_AUTHENTICATED.message });
}

export function answerPage(fake: Fake, method: string, path: string, body: string): HttpAnswer {
  const match = /^\/pay\/(\w+)(\/confirm)?$/.exec(path);
  const stored = match?.[1] ? fake.store.findSession(match[1]) : undefined;
  if (!stored) return html(unknownPage(), 404);
  expireDue(fake);
  const post = method === 'POST';
  // The second click of two, or a form sent from an old tab.
  if (post && stored.session.status === 'complete') return redirect(nextUrl(stored));
  const answer =
    !post || stored.session.status !== 'open'
      ? show(stored)
      : match?.[2]
        ? confirm(fake, stored, body)
        : submit(fake, stored, body);
  fake.store.save();
  return answer;
}
