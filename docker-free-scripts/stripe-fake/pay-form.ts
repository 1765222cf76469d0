/** What the pay page shows in each of its states. */
import { digitsOf, type Problems, TEST_BANK, TEST_CARDS, type Typed } from './cards';
import { escapeHtml, money, page } from './page-layout';
import type { StoredSession } from './store';

export const NOTHING_TYPED: Typed = {
  method: 'card',
  name: '',
  number: '',
  expiry: '',
  cvc: '',
  routing: '',
  account: '',
};

interface FieldSpec {
  name: keyof Problems;
  label: string;
  value: string;
  hint?: string;
  numeric?: boolean;
}

/** Autocomplete is off: a browser must not offer somebody's real card here. */
function field(
  { name, label, value, hint, numeric }: FieldSpec,
  problem: string | undefined,
  focus: boolean,
) {
  const described = [hint && `${name}-hint`, problem && `${name}-wrong`].filter(Boolean).join(' ');
  const attributes = [
    `id="${name}" name="${name}" type="text" autocomplete="off" spellcheck="false" maxlength="200"`,
    `value="${escapeHtml(value)}"`,
    numeric ? 'inputmode="numeric"' : '',
    described && `aria-describedby="${described}"`,
    problem ? 'aria-invalid="true"' : '',
    focus ? 'autofocus' : '',
  ];
  return `<div class="field"><label for="${name}">${label}</label><input ${attributes.filter(Boolean).join(' ')}>
${hint ? `<p class="hint" id="${name}-hint">${escapeHtml(hint)}</p>` : ''}
${problem ? `<p class="wrong" id="${name}-wrong">${escapeHtml(problem)}</p>` : ''}</div>`;
}

/** Numbers are never given back; this says which one was typed. */
function notKept(number: string): string | undefined {
  const digits = digitsOf(number);
  return digits.length >= 8
    ? `The number ending in ${digits.slice(-4)} was not kept; type it again.`
    : undefined;
}

function heading({ session, items }: StoredSession): string {
  const what = items.map((item) => escapeHtml(item.description ?? '')).join(', ');
  const amount = money(session.amount_total ?? 0, session.currency ?? 'usd');
  return `<h1>${what}</h1><p class="amount">${amount}</p>`;
}

function methodChoice(typed: Typed): string {
  const radio = (value: Typed['method'], label: string) =>
    `<div class="choice"><input type="radio" id="method-${value}" name="method" value="${value}"${
      typed.method === value ? ' checked' : ''
    }><label for="method-${value}">${label}</label></div>`;
  return `<fieldset class="field"><legend>Pay by</legend>${radio('card', 'Card')}${radio(
    'bank',
    'Bank debit (takes days to settle)',
  )}</fieldset>`;
}

function testNumbers(offersBank: boolean): string {
  const cards = TEST_CARDS.map(
    ({ number, says }) => `<tr><td>${number.replace(/(\d{4})(?=\d)/g, '$1 ')}</td><td>${says}</td></tr>`,
  ).join('');
  const bank = `<p class="bank-numbers">Bank debit: routing ${TEST_BANK.routing}, account ${TEST_BANK.account}.</p>`;
  return `<div class="below"><table><caption>Test numbers</caption>${cards}</table>
<p class="soft">Any expiry to come, any three digits as the CVC.</p>${offersBank ? bank : ''}</div>`;
}

export interface FormState {
  typed: Typed;
  problems: Problems;
  /** Why the last attempt was refused. */
  refusal?: string;
}

export function payForm(stored: StoredSession, { typed, problems, refusal }: FormState): string {
  const { session } = stored;
  const offersBank = session.payment_method_types.includes('us_bank_account');
  const offersCard = session.payment_method_types.includes('card');
  const first = Object.keys(problems)[0];
  const show = (spec: FieldSpec) => field(spec, problems[spec.name], first === spec.name);
  const wrong =
    refusal ?? (first ? 'Not everything can be used yet. What is wrong stands at each field.' : undefined);
  const again = notKept(typed.method === 'card' ? typed.number : typed.account);
  const hint = again ? { hint: again } : {};
  const number = show({ name: 'number', label: 'Card number', value: '', numeric: true, ...hint });
  const expiry = show({ name: 'expiry', label: 'Expiry MM/YY', value: typed.expiry });
  const cvc = show({ name: 'cvc', label: 'CVC', value: '', numeric: true });
  const routing = show({ name: 'routing', label: 'Routing number', value: '', numeric: true });
  const account = show({ name: 'account', label: 'Account number', value: '', numeric: true });
  const only = offersCard
    ? ''
    : '<input type="radio" id="method-bank" name="method" value="bank" checked hidden>';
  const amount = money(session.amount_total ?? 0, session.currency ?? 'usd');
  return page(
    'Pay',
    `<section class="sheet">${heading(stored)}
${wrong ? `<div class="summary" role="alert"><p>${escapeHtml(wrong)}</p></div>` : ''}
<form method="post" action="/pay/${session.id}" novalidate>
${offersBank && offersCard ? methodChoice(typed) : only}
${offersCard ? `<div class="card">${number}<div class="pair">${expiry}${cvc}</div></div>` : ''}
${offersBank ? `<div class="bank">${routing}${account}</div>` : ''}
${show({ name: 'name', label: 'Name of the holder', value: typed.name })}
<button>Pay ${amount}</button></form>
${session.cancel_url ? `<a class="button quiet" href="${escapeHtml(session.cancel_url)}">Go back without paying</a>` : ''}
${testNumbers(offersBank)}</section>`,
  );
}

export function challengePage(stored: StoredSession): string {
  return page(
    'Confirm',
    `<section class="sheet">${heading(stored)}
<p>This card asks you to confirm the payment. With a real card its bank would ask here.</p>
<p class="soft">Card ending in ${escapeHtml(stored.pending?.last4 ?? '')}</p>
<form method="post" action="/pay/${stored.session.id}/confirm">
<button name="answer" value="yes">Confirm the payment</button>
<button class="quiet" name="answer" value="no">Do not confirm</button></form></section>`,
  );
}

function closing(title: string, text: string, link: string | null, label: string): string {
  const back = link ? `<a class="button" href="${escapeHtml(link)}">${label}</a>` : '';
  return page(title, `<section class="sheet"><h1>${title}</h1><p>${text}</p>${back}</section>`);
}

export const donePage = (next: string, debit: boolean) =>
  debit
    ? closing(
        'This was sent already',
        'The bank debit is on its way. Nothing is charged twice.',
        next,
        'Go on',
      )
    : closing('This was paid already', 'Nothing is charged twice.', next, 'Go on');

export const expiredPage = (back: string | null) =>
  closing(
    'This page has expired',
    'Nothing was charged. Go back and begin the payment again.',
    back,
    'Go back and begin again',
  );

export const unknownPage = () =>
  closing('There is no such payment', 'The address is not complete, or it is from another day.', null, '');
