/** The stand-in's web server, on loopback only. */
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { expireDue } from './api';
import { answerApi, type HttpAnswer } from './api-http';
import type { FakeConfig } from './config';
import { answerControl } from './control';
import type { Fake } from './fake';
import { answerPage } from './pages';
import { Store } from './store';
import { Webhooks } from './webhooks';

const LARGEST_BODY = 262_144;
const LOOK_FOR_EXPIRED_MS = 15_000;

async function bodyOf(request: IncomingMessage): Promise<string | null> {
  const chunks: Buffer[] = [];
  let size = 0;
  for await (const chunk of request as AsyncIterable<Buffer>) {
    size += chunk.length;
    if (size > LARGEST_BODY) return null;
    chunks.push(chunk);
  }
  return Buffer.concat(chunks).toString('utf8');
}

const json = (status: number, body: object): HttpAnswer => ({
  status,
  headers: { 'content-type': 'application/json' },
  body: JSON.stringify(body),
});

async function answer(fake: Fake, request: IncomingMessage): Promise<HttpAnswer> {
  const method = request.method ?? 'GET';
  const { pathname: path, search } = new URL(request.url ?? '/', 'http://127.0.0.1');
  const body = await bodyOf(request);
  if (body === null) return json(413, { error: { type: 'invalid_request_error', message: 'Too large.' } });
  if (path === '/healthz') return json(200, { ok: true });
  if (path.startsWith('/v1/'))
    return answerApi(fake, { method, path, query: search.slice(1), headers: request.headers, body });
  if (path.startsWith('/_control/')) {
    const type = request.headers['content-type'] ?? '';
    return json(...(await answerControl(fake, { method, path, type, text: body })));
  }
  return answerPage(fake, method, path, body);
}

function reply(response: ServerResponse, { status, headers, body, lost }: HttpAnswer): void {
  if (lost) {
    response.destroy();
    return;
  }
  response.writeHead(status, headers);
  response.end(body);
}

export interface RunningFake {
  url: string;
  close(): Promise<void>;
}

export async function startStripeFake(config: FakeConfig): Promise<RunningFake> {
  const store = new Store(config.dataFolder);
  const fake: Fake = { config, store, webhooks: new Webhooks(config, store), url: '', outage: null };
  const server = createServer((request, response) => {
    answer(fake, request).then(
      (done) => reply(response, done),
      (error: unknown) => {
        console.error(error);
        reply(response, json(500, { error: { type: 'api_error', message: 'The stand-in failed.' } }));
      },
    );
  });
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(config.port, '127.0.0.1', resolve);
  });
  fake.url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  fake.webhooks.resume();
  const timer = setInterval(() => expireDue(fake), LOOK_FOR_EXPIRED_MS);
  return {
    url: fake.url,
    close: async () => {
      clearInterval(timer);
      const closed = new Promise<void>((resolve) => server.close(() => resolve()));
      server.closeAllConnections();
      await Promise.all([closed, fake.webhooks.close()]);
      store.save();
    },
  };
}
