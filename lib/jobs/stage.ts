/**
 * A job's stage follows from what happened; nobody drags it. One pure function over facts: the stored stage is
 * its result, rewritten in each transaction that changes a fact, and a test recomputes it for every job.
 */
export interface JobFacts {
  surveyDone: boolean;
  /** Stops of change lines and circuits that nobody has overridden. */
  openStops: number;
  quoteSent: boolean;
  accepted: boolean;
  /** `none` and `terms` are paths of their own: the step counts as done. */
  depositRule: 'percent' | 'none' | 'terms';
  /** A deposit invoice was issued, void or not: voiding it does not waive the deposit, only the job's rule does. */
  depositAsked: boolean;
  /** One that is not void. */
  depositInvoiced: boolean;
  depositPaid: boolean;
  visitPlanned: boolean;
  sheetReleased: boolean;
  sheetsSignedOff: boolean;
  finalInvoiced: boolean;
  finalPaid: boolean;
  closed: boolean;
}

export type Stage = 'survey' | 'quote' | 'install' | 'closeout' | 'closed';

export const depositDone = (facts: JobFacts): boolean =>
  facts.accepted && (facts.depositRule !== 'percent' || !facts.depositAsked || facts.depositPaid);

export function stageOf(facts: JobFacts): Stage {
  if (facts.closed) return 'closed';
  if (!facts.accepted && !facts.surveyDone) return 'survey';
  if (!facts.accepted || !depositDone(facts)) return 'quote';
  if (!facts.sheetsSignedOff) return 'install';
  return 'closeout';
}

export type StepKey = 'survey' | 'quote' | 'deposit' | 'install' | 'closeout' | 'paid';

export interface Step {
  key: StepKey;
  state: 'reached' | 'open' | 'beyond';
  /** What the open step waits for, as a key of the message catalogue. */
  waitsFor: WaitKey | null;
}

export type WaitKey =
  | 'survey-not-finished'
  | 'stops-to-clear'
  | 'quote-not-sent'
  | 'quote-waits-for-answer'
  | 'deposit-not-invoiced'
  | 'deposit-open'
  | 'no-visit-yet'
  | 'sheet-not-released'
  | 'sheet-not-signed-off'
  | 'final-invoice-not-sent'
  | 'balance-open'
  | 'job-not-closed';

function waitOf(key: StepKey, facts: JobFacts): WaitKey {
  switch (key) {
    case 'survey':
      return 'survey-not-finished';
    case 'quote':
      if (facts.openStops > 0) return 'stops-to-clear';
      return facts.quoteSent ? 'quote-waits-for-answer' : 'quote-not-sent';
    case 'deposit':
      return facts.depositInvoiced ? 'deposit-open' : 'deposit-not-invoiced';
    case 'install':
      if (!facts.visitPlanned) return 'no-visit-yet';
      return facts.sheetReleased ? 'sheet-not-signed-off' : 'sheet-not-released';
    case 'closeout':
      return facts.finalInvoiced ? 'job-not-closed' : 'final-invoice-not-sent';
    case 'paid':
      return facts.finalPaid ? 'job-not-closed' : 'balance-open';
  }
}

/** The devices of the job line: closed switches up to the first that is open, dotted beyond. */
export function stepsOf(facts: JobFacts): Step[] {
  const done: Record<StepKey, boolean> = {
    survey: facts.surveyDone || facts.accepted,
    quote: facts.accepted,
    deposit: depositDone(facts),
    install: facts.sheetsSignedOff,
    closeout: facts.finalInvoiced,
    paid: facts.finalPaid,
  };
  let reached = true;
  return (Object.keys(done) as StepKey[]).map((key): Step => {
    if (facts.closed || (reached && done[key])) return { key, state: 'reached', waitsFor: null };
    const first = reached;
    reached = false;
    return { key, state: first ? 'open' : 'beyond', waitsFor: first ? waitOf(key, facts) : null };
  });
}
