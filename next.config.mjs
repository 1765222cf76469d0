/**
 * `distDir` comes from the environment so that the demo (`.next`) and the tests (`.next-test`) can be
 * built and served from one checkout at the same time.
 * @type {import('next').NextConfig}
 */
const config = {
  distDir: process.env.NEXT_DIST_DIR ?? '.next',
  // Names a build: phones with an older service worker take the new one.
  env: process.env.NODE_ENV === 'production' ? { LAMPWRIGHT_BUILD: Date.now().toString(36) } : {},
  poweredByHeader: false,
  // A customer's page must not give its address away, nor be found.
  headers: async () => [
    {
      source: '/:where(l|new-password)/:rest*',
      headers: [
        { key: 'Referrer-Policy', value: 'no-referrer' },
        { key: 'X-Robots-Tag', value: 'noindex, nofollow' },
      ],
    },
    {
      source: '/:path*',
      headers: [
        { key: 'X-Content-Type-Options', value: 'nosniff' },
        { key: 'X-Frame-Options', value: 'DENY' },
      ],
    },
  ],
  reactStrictMode: true,
  serverExternalPackages: [
    'sequelize',
    'pg',
    'pg-boss',
    '@node-rs/argon2',
    'sharp',
    '@react-pdf/renderer',
    'pino',
  ],
  // The type check is a step of its own in `npm test`; a build must not fall over a test file or stale route types.
  typescript: { ignoreBuildErrors: true },
  // The client cache must not show a page from before a sign-out or a change by somebody else.
  experimental: { staleTimes: { dynamic: 0, static: 30 } },
};
export default config;
