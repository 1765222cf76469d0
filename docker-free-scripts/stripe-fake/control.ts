/** Knobs for the tests, JSON under /_control. Only JSON bodies are taken, so no page in a browser can turn them. */
import { BANK_RETURNED } from './cards';
import { type Fake, NO_REQUEST } from './fake';
import { expire, settleDebit } from './payments';
import { PLAIN } from './webhooks';

type Body = Record<string, unknown>;
type Answer = [status: number, body: object];

const refuse = (message: string, status = 400): Answer => [status, { error: message }];

const count = (value: unknown, fallback: number) =>
  typeof value === 'number' && Number.isFinite(value) && value >= 0 ? value : fallback;

/** Each call states the whole mode: what is left out is off. */
function setMode(fake: Fake, body: Body): Answer {
  const mode = {
    repeat: Math.min(20, count(body.repeat, PLAIN.repeat)),
    shuffle: body.shuffle === true,
    delayMs: count(body.delayMs, PLAIN.delayMs),
    hold: body.hold === true,
  };
  fake.webhooks.mode = mode;
  return [200, mode];
}

function setOutage(fake: Fake, body: Body): Answer {
  fake.outage =
    body.on === true ? { times: count(body.times, Infinity), afterWork: body.afterWork === true } : null;
  return [200, { on: fake.outage !== null }];
}

const events = (fake: Fake): Answer => [
  200,
  {
    events: fake.store.events.map(({ event, account, attempts, nextAt }) => ({
      id: event.id,
      type: event.type,
      account,
      object: (event.data.object as { id?: string }).id,
      attempts,
      waiting: nextAt !== null,
    })),
  },
];

async function resend(fake: Fake, body: Body): Promise<Answer> {
  const stored = fake.store.events.find((one) => one.event.id === body.eventId);
  if (!stored) return refuse('There is no such event.', 404);
  await fake.webhooks.resend(stored);
  return [200, { status: stored.attempts.at(-1)?.status ?? 0 }];
}

function settle(fake: Fake, body: Body): Answer {
  const stored = fake.store.findSession(String(body.sessionId));
  if (!stored) return refuse('There is no such session.', 404);
  if (body.outcome !== 'succeeded' && body.outcome !== 'failed')
    return refuse('outcome is "succeeded" or "failed".');
  const done = settleDebit(fake, stored, body.outcome === 'failed' ? BANK_RETURNED : null);
  return done ? [200, stored.session] : refuse('No bank debit of this session is on its way.', 409);
}

/** As if the session's time were over. */
function expireNow(fake: Fake, body: Body): Answer {
  const stored = fake.store.findSession(String(body.sessionId));
  if (!stored) return refuse('There is no such session.', 404);
  if (stored.session.status !== 'open') return refuse(`The session is ${stored.session.status}.`, 409);
  expire(fake, stored, NO_REQUEST);
  return [200, stored.session];
}

const ROUTES: Record<string, (fake: Fake, body: Body) => Answer | Promise<Answer>> = {
  'GET /_control/events': events,
  'POST /_control/webhooks': setMode,
  'POST /_control/release': (fake) => [200, { released: fake.webhooks.release() }],
  'POST /_control/resend': resend,
  'POST /_control/settle': settle,
  'POST /_control/expire': expireNow,
  'POST /_control/down': setOutage,
};

function parse(text: string): Body | null {
  try {
    const value: unknown = JSON.parse(text || '{}');
    return typeof value === 'object' && value !== null ? (value as Body) : null;
  } catch {
    return null;
  }
}

export async function answerControl(
  fake: Fake,
  { method, path, type, text }: { method: string; path: string; type: string; text: string },
): Promise<Answer> {
  const work = ROUTES[`${method} ${path}`];
  if (!work) return refuse('There is no such control.', 404);
  if (method === 'POST' && !type.startsWith('application/json')) return refuse('Send JSON.', 415);
  const body = parse(text);
  if (!body) return refuse('The body is not a JSON object.');
  const answer = await work(fake, body);
  fake.store.save();
  return answer;
}
