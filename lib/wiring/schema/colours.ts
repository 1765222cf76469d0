/**
 * What colour a conductor is, by jurisdiction, as text keys and swatches.
 * US: grounded white (gray at 277/480 V), equipment ground green: fixed by code (NEC 200.6, 250.119, read in a
 * third party's summary); black and red, brown and orange hots are common practice. IEC: brown, blue, green-yellow,
 * IEC 60445. Low-voltage DC red + and black - is common practice on both sides.
 */
import * as z from 'zod/mini';
import type { ShopSettings } from '@/lib/units/settings';

export const CONDUCTOR_ROLES = [
  'line',
  'line-2',
  'line-3',
  'neutral',
  'ground',
  'positive',
  'negative',
] as const;
export const CONDUCTOR_COLOURS = [
  'black',
  'red',
  'blue',
  'white',
  'gray',
  'green',
  'brown',
  'orange',
  'yellow',
  'green-yellow',
] as const;

export const conductor = z.strictObject({
  role: z.enum(CONDUCTOR_ROLES),
  colour: z.enum(CONDUCTOR_COLOURS),
});
export type Conductor = z.infer<typeof conductor>;

export const COLOUR_SOURCE = {
  us: 'NEC 2023 200.6 and 250.119 (read in a summary); colours of the hots: common practice',
  iec: 'IEC 60445:2010 (read in a summary)',
  dc: 'common practice',
} as const;

const DC: Conductor[] = [
  { role: 'positive', colour: 'red' },
  { role: 'negative', colour: 'black' },
];

export const dcConductors = (): Conductor[] => DC.map((one) => ({ ...one }));

type Colour = Conductor['colour'];

/** Above 250 V between line and neutral, or above 300 V between lines, US practice changes to brown and gray. */
function usLines(volts: number): [Colour, Colour, Colour, Colour] {
  return volts > 250 ? ['brown', 'orange', 'yellow', 'gray'] : ['black', 'red', 'blue', 'white'];
}

/** Line to line at 208 or 240 V in the US: two hots and no neutral. */
const usLineToLine = (volts: number) => (volts > 150 && volts <= 250) || volts > 300;

/** The conductors of a mains circuit. Existing buildings differ: prove before touch. */
export function mainsConductors(
  circuit: { volts: number; system: 'single-phase' | 'three-phase' },
  settings: Pick<ShopSettings, 'basis'>,
): Conductor[] {
  const us = settings.basis === 'us';
  const [one, two, three, neutral]: [Colour, Colour, Colour, Colour] = us
    ? usLines(circuit.volts)
    : ['brown', 'black', 'gray', 'blue'];
  const ground: Conductor = { role: 'ground', colour: us ? 'green' : 'green-yellow' };
  const lines: Conductor[] = [{ role: 'line', colour: one }];
  const twoHots = us && circuit.system === 'single-phase' && usLineToLine(circuit.volts);
  if (circuit.system === 'three-phase' || twoHots) lines.push({ role: 'line-2', colour: two });
  if (circuit.system === 'three-phase') lines.push({ role: 'line-3', colour: three });
  return twoHots ? [...lines, ground] : [...lines, { role: 'neutral', colour: neutral }, ground];
}

export const mainsColourSource = (settings: Pick<ShopSettings, 'basis'>): string =>
  COLOUR_SOURCE[settings.basis];
