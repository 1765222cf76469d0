/**
 * The local stand-in for the card service: the API paths that we use, a page to type a test card into, and signed
 * webhooks. `node docker-free-scripts/stripe-fake.mjs`, settings in stripe-fake/config.ts.
 */
import { register } from 'tsx/esm/api';

register();
const { main } = await import('./stripe-fake/main.ts');
await main(process.env);
