/** The stand-in's settings, from the environment of its process. */
export interface FakeConfig {
  /** 0 takes any free port. */
  port: number;
  /** Where the browser finds the pay page; by default the stand-in's own address. */
  publicUrl?: string;
  /** Without one, events are kept but not sent. */
  webhookUrl?: string;
  webhookSecret: string;
  /** The one key that is accepted; without it, any test key. */
  secretKey?: string;
  /** Folder for state.json; without one, nothing outlives the process. */
  dataFolder?: string;
  /** First wait before a webhook that was not accepted is sent again; it doubles each time. */
  retryMs: number;
}

function portOf(text: string | undefined): number {
  const port = Number(text);
  if (!text || !Number.isInteger(port) || port < 0 || port > 65_535)
    throw new Error(`STRIPE_FAKE_PORT must be a port number, not "${text ?? ''}".`);
  return port;
}

export function fakeConfig(env: NodeJS.ProcessEnv): FakeConfig {
  const optional = {
    publicUrl: env.STRIPE_FAKE_PUBLIC_URL,
    webhookUrl: env.STRIPE_FAKE_WEBHOOK_URL,
    secretKey: env.STRIPE_FAKE_SECRET_KEY,
    dataFolder: env.STRIPE_FAKE_DATA,
  };
  return {
    port: portOf(env.STRIPE_FAKE_PORT),
    webhookSecret: env.STRIPE_FAKE_WEBHOOK_SECRET || 'whsec_stand_in',
    retryMs: Number(env.STRIPE_FAKE_RETRY_MS) || 1_000,
    ...Object.fromEntries(Object.entries(optional).filter(([, value]) => value)),
  };
}
