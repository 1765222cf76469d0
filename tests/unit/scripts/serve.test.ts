import { spawnSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { refusals } from '../../../docker-free-scripts/serve.mjs';

const own = 'a-secret-that-a-person-made-2b7c41';
const production: Record<string, string> = {
  DATABASE_URL_WEB: 'postgres://web:pw@db.example.com/lampwright',
  SMTP_URL: 'smtps://mail.example.com',
  S3_ENDPOINT: 'https://objects.example.com',
  STRIPE_SECRET_KEY: 'sk_live_x',
  STRIPE_WEBHOOK_SECRET: 'whsec_x',
  NEXTAUTH_SECRET: own,
  LINK_SECRET: own,
  AUDIT_SECRET: own,
  APP_URL: 'https://jobs.example.com',
};

describe('serve', () => {
  it('has nothing against a complete environment of one’s own', () => {
    expect(refusals(production)).toEqual([]);
  });

  it('names what is missing', () => {
    const { LINK_SECRET: _link, SMTP_URL: _smtp, ...rest } = production;
    expect(refusals(rest)).toEqual(['Missing: SMTP_URL, LINK_SECRET.']);
  });

  it.each([
    ['the demo', { LAMPWRIGHT_DEMO: '1' }, /demo people/],
    ['a generated secret behind https', { LINK_SECRET: 'lampwright-demo-00ff' }, /not yours: LINK_SECRET/],
    ['the stand-in for cards', { STRIPE_API_BASE: 'http://127.0.0.1:20111' }, /loopback/],
    ['the stand-in by name', { STRIPE_API_BASE: 'http://localhost:20111' }, /loopback/],
    ['the stand-in by IPv6', { STRIPE_API_BASE: 'http://[::1]:20111' }, /loopback/],
    ['an address that is none', { APP_URL: 'jobs.example.com' }, /APP_URL is not a URL/],
  ])('refuses %s', (_name, change, reason) => {
    const reasons = refusals({ ...production, ...change });
    expect(reasons).toHaveLength(1);
    expect(reasons[0]).toMatch(reason);
  });

  it('accepts a generated secret on plain loopback, to try it out', () => {
    expect(
      refusals({ ...production, APP_URL: 'http://127.0.0.1:3000', LINK_SECRET: 'lampwright-demo-00ff' }),
    ).toEqual([]);
  });

  it('ends with 2 and its reasons, without a stack', () => {
    const env = { NODE_ENV: 'production', PATH: process.env.PATH, LAMPWRIGHT_DEMO: '1' } as const;
    const done = spawnSync(process.execPath, ['docker-free-scripts/serve.mjs'], { env, encoding: 'utf8' });
    expect(done.status).toBe(2);
    expect(done.stderr).toContain('Missing: DATABASE_URL_WEB');
    expect(done.stderr).toContain('demo people may not be served');
    expect(done.stderr).not.toContain('    at ');
  });
});
