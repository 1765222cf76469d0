/** The service's published test numbers (docs.stripe.com/testing) and the checks of what is typed. */

export type Outcome = { kind: 'paid' } | { kind: 'challenge' } | { kind: 'declined'; refusal: Refusal };

export interface Refusal {
  code: string;
  declineCode: string;
  message: string;
}

export const REFUSED: Refusal = {
  code: 'card_declined',
  declineCode: 'generic_decline',
  message: 'Your card was declined.',
};
const NO_FUNDS: Refusal = {
  code: 'card_declined',
  declineCode: 'insufficient_funds',
  message: 'Your card has insufficient funds.',
};
export const NOT_AUTHENTICATED: Refusal = {
  code: 'payment_intent_authentication_failure',
  declineCode: 'authentication_not_handled',
  message: 'The payment was not confirmed, so nothing was charged.',
};
export const BANK_RETURNED: Refusal = {
  code: 'payment_method_provider_decline',
  declineCode: 'insufficient_funds',
  message: 'The bank returned the debit.',
};

export const TEST_CARDS: readonly { number: string; outcome: Outcome; says: string }[] = [
  { number: '4242424242424242', outcome: { kind: 'paid' }, says: 'paid' },
  { number: '4000000000000002', outcome: { kind: 'declined', refusal: REFUSED }, says: 'declined' },
  {
    number: '4000000000009995',
    outcome: { kind: 'declined', refusal: NO_FUNDS },
    says: 'insufficient funds',
  },
  { number: '4000002500003155', outcome: { kind: 'challenge' }, says: 'asks to confirm' },
];

export const TEST_BANK = { routing: '110000000', account: '000123456789' };

export interface Typed {
  method: 'card' | 'bank';
  name: string;
  number: string;
  expiry: string;
  cvc: string;
  routing: string;
  account: string;
}

export type Problems = Partial<Record<Exclude<keyof Typed, 'method'>, string>>;

export const digitsOf = (text: string) => text.replace(/\D/g, '');

/** The last digit checks the others (ISO/IEC 7812-1, annex B). */
export function passesLuhn(digits: string): boolean {
  const sum = [...digits].reverse().reduce((total, digit, index) => {
    const value = Number(digit) * (index % 2 === 1 ? 2 : 1);
    return total + (value > 9 ? value - 9 : value);
  }, 0);
  return digits.length > 0 && sum % 10 === 0;
}

function expiryProblem(text: string, now: Date): string | undefined {
  const match =
    /^\s*(\d{1,2})\s*[/\-. ]\s*(\d{2}|\d{4})\s*$/.exec(text) ?? /^\s*(\d{2})(\d{2})\s*$/.exec(text);
  if (!match) return 'Type the expiry as month and year, like 04 / 31.';
  const month = Number(match[1]);
  const year = Number(match[2]) % 100;
  if (month < 1 || month > 12) return 'The month of the expiry is from 01 to 12.';
  const current = (now.getUTCFullYear() % 100) * 12 + now.getUTCMonth() + 1;
  return year * 12 + month < current ? 'This card has expired.' : undefined;
}

function numberProblem(digits: string): string | undefined {
  if (digits === '') return 'Type a card number.';
  if (digits.length < 13 || digits.length > 19 || !passesLuhn(digits))
    return 'This is not a card number: a digit is wrong or missing.';
  if (TEST_CARDS.some((card) => card.number === digits)) return undefined;
  return 'Only the test numbers below work here. Never type a real card.';
}

function cardProblems(typed: Typed, now: Date): Problems {
  const problems: Problems = {};
  const number = numberProblem(digitsOf(typed.number));
  const expiry = expiryProblem(typed.expiry, now);
  if (number) problems.number = number;
  if (expiry) problems.expiry = expiry;
  if (!/^\d{3,4}$/.test(typed.cvc.trim()))
    problems.cvc = 'The CVC has three digits, on the back of the card.';
  return problems;
}

function bankProblems(typed: Typed): Problems {
  const problems: Problems = {};
  if (digitsOf(typed.routing) !== TEST_BANK.routing)
    problems.routing = 'Only the test number below works here.';
  if (digitsOf(typed.account) !== TEST_BANK.account)
    problems.account = 'Only the test number below works here.';
  return problems;
}

export function checkTyped(typed: Typed, now: Date): Problems {
  const problems = typed.method === 'card' ? cardProblems(typed, now) : bankProblems(typed);
  if (typed.name.trim() === '') problems.name = 'Type the name of the holder.';
  return problems;
}

export function outcomeOf(digits: string): Outcome {
  return TEST_CARDS.find((card) => card.number === digits)?.outcome ?? { kind: 'declined', refusal: REFUSED };
}
