/** The trade's words come in pairs: a shop on the US basis has fixtures on breakers, one on the IEC basis luminaires on MCBs. */
import type { ShopSettings } from '@/lib/units/settings';

const PAIRS = {
  fixture: ['fixture', 'luminaire'],
  panel: ['panel', 'distribution board'],
  breaker: ['breaker', 'MCB'],
  ground: ['ground', 'earth'],
  'home-run': ['home run', 'final-circuit cable'],
  lift: ['lift', 'MEWP'],
  retainage: ['retainage', 'retention'],
  closeout: ['closeout', 'handover'],
} as const;

export type Term = keyof typeof PAIRS;

export const isTerm = (name: string): name is Term => Object.hasOwn(PAIRS, name);

/** The word of the shop's basis. */
export function term(name: Term, settings: Pick<ShopSettings, 'basis'>): string {
  return PAIRS[name][settings.basis === 'us' ? 0 : 1];
}

/** `{=fixture}` within a text; `{=Fixture}` where it begins a sentence. */
export function fillTerms(text: string, settings: Pick<ShopSettings, 'basis'>): string {
  return text.replace(/\{=([\w-]+)\}/g, (whole, name: string) => {
    const lower = name.toLowerCase();
    if (!isTerm(lower)) return whole;
    const word = term(lower, settings);
    return lower === name ? word : word.charAt(0).toUpperCase() + word.slice(1);
  });
}
