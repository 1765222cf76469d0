/** The services that the application talks to: local stand-ins, unless the environment names the real ones. */
import { existsSync, mkdirSync } from 'node:fs';
import { connect } from 'node:net';
import { join } from 'node:path';
import { keptPorts, keptSecrets } from './ports.mjs';
import { ROOT, script } from './paths.mjs';
import { httpProbe } from './processes.mjs';
import { startPostgres } from './postgres.mjs';

const SECRETS = [
  'db_postgres',
  'db_migrator',
  'db_web',
  'db_worker',
  'nextauth',
  'link',
  'audit',
  'stripe_webhook',
  'stripe_key',
];

const tcpProbe = (port) => () =>
  new Promise((resolve) => {
    const socket = connect({ port, host: '127.0.0.1' });
    socket.once('connect', () => {
      socket.destroy();
      resolve(true);
    });
    socket.once('error', () => resolve(false));
  });

async function startMail(children, ports) {
  const maildev = join(ROOT, 'node_modules', 'maildev', 'dist', 'bin', 'maildev.js');
  const smtp = ['--ip', '127.0.0.1', '-s', String(ports.smtp)];
  const web = ['--web-ip', '127.0.0.1', '-w', String(ports.mail)];
  const catcher = children.start('maildev', process.execPath, [maildev, ...smtp, ...web]);
  await children.ready(catcher, 'The mail catcher', httpProbe(`http://127.0.0.1:${ports.mail}/api/healthz`));
  return { SMTP_URL: `smtp://127.0.0.1:${ports.smtp}`, MAIL_CATCHER_URL: `http://127.0.0.1:${ports.mail}` };
}

async function startStripe(children, { ports, secrets, data, appUrl }) {
  const env = {
    ...process.env,
    STRIPE_FAKE_PORT: String(ports.stripe),
    STRIPE_FAKE_WEBHOOK_URL: `${appUrl}/api/v1/stripe/webhook`,
    STRIPE_FAKE_WEBHOOK_SECRET: `whsec_${secrets.stripe_webhook}`,
    STRIPE_FAKE_SECRET_KEY: `sk_test_${secrets.stripe_key}`,
    STRIPE_FAKE_DATA: join(data, 'stripe'),
  };
  const fake = children.start('stripe-fake', process.execPath, [script('stripe-fake.mjs')], { env });
  await children.ready(fake, 'The card stand-in', httpProbe(`http://127.0.0.1:${ports.stripe}/healthz`));
  return {
    STRIPE_SECRET_KEY: env.STRIPE_FAKE_SECRET_KEY,
    STRIPE_WEBHOOK_SECRET: env.STRIPE_FAKE_WEBHOOK_SECRET,
    STRIPE_API_BASE: `http://127.0.0.1:${ports.stripe}`,
  };
}

async function startObjectStore(children, { ports, data }) {
  const folder = join(data, 'objects');
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const env = { ...process.env, OBJECT_STORE_PORT: String(ports.objects), OBJECT_STORE_DIR: folder };
  const store = children.start('object-store', process.execPath, [script('object-store.mjs')], { env });
  await children.ready(store, 'The object store', tcpProbe(ports.objects));
  // The stand-in's own published test credentials.
  return {
    S3_ENDPOINT: `http://127.0.0.1:${ports.objects}`,
    S3_BUCKET: 'lampwright',
    S3_REGION: 'us-east-1',
    S3_ACCESS_KEY_ID: 'S3RVER',
    S3_SECRET_ACCESS_KEY: 'S3RVER',
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
  };
}

/** A set address means the real service: then no stand-in. */
const realServices = () =>
  ['DATABASE_URL', 'SMTP_URL', 'S3_ENDPOINT', 'STRIPE_SECRET_KEY'].filter((name) => process.env[name]);

function realDatabase() {
  const url = process.env.DATABASE_URL;
  return {
    DATABASE_URL_MIGRATOR: process.env.DATABASE_URL_MIGRATOR ?? url,
    DATABASE_URL_WEB: process.env.DATABASE_URL_WEB ?? url,
    DATABASE_URL_WORKER: process.env.DATABASE_URL_WORKER ?? url,
  };
}

/**
 * Starts what the environment does not name and returns the application's environment.
 * @param preferred first choices of ports, e.g. `{app: 3000}`
 */
export async function startServices(children, { data, durable = true, preferred = {} }) {
  const ports = await keptPorts(data, ['app', 'postgres', 'smtp', 'mail', 'stripe', 'objects'], preferred);
  const secrets = keptSecrets(data, SECRETS);
  const appUrl = process.env.APP_URL ?? `http://127.0.0.1:${ports.app}`;
  const real = realServices();
  const env = {
    APP_URL: appUrl,
    NEXTAUTH_URL: appUrl,
    NEXTAUTH_SECRET: process.env.NEXTAUTH_SECRET ?? secrets.nextauth,
    LINK_SECRET: process.env.LINK_SECRET ?? secrets.link,
    AUDIT_SECRET: process.env.AUDIT_SECRET ?? secrets.audit,
    LAMPWRIGHT_DEMO: real.length === 0 ? '1' : '0',
    NEXT_TELEMETRY_DISABLED: '1',
  };
  Object.assign(
    env,
    real.includes('DATABASE_URL')
      ? realDatabase()
      : await startPostgres(children, { data, port: ports.postgres, secrets, durable }),
  );
  if (!real.includes('SMTP_URL')) Object.assign(env, await startMail(children, ports));
  if (!real.includes('STRIPE_SECRET_KEY') && existsSync(script('stripe-fake.mjs')))
    Object.assign(env, await startStripe(children, { ports, secrets, data, appUrl }));
  if (!real.includes('S3_ENDPOINT') && existsSync(script('object-store.mjs')))
    Object.assign(env, await startObjectStore(children, { ports, data }));
  return { env: { ...process.env, ...env }, own: env, ports, real };
}
