/** Forward volts of an LED as its sheet gives them: typical, lowest and highest at one current. */
import * as z from 'zod/mini';
import { atLeast, atMost, refuse } from '@/lib/engine/contract';
import { positive } from './inputs';

export const forwardVoltsShape = {
  forwardVolts: positive,
  forwardVoltsMin: positive,
  forwardVoltsMax: positive,
};

/** An LED on a current source: what the source is set to stands beside it. */
export const sourceLed = z.strictObject({
  ...forwardVoltsShape,
  /** Current at which the forward volts are given; what the source is set to unless given. */
  amps: z.optional(positive),
  maxAmps: z.optional(positive),
});
export type SourceLed = z.infer<typeof sourceLed>;

export interface ForwardVolts {
  forwardVolts: number;
  forwardVoltsMin: number;
  forwardVoltsMax: number;
}

/** @throws {EngineError} `invalid-input` where lowest, typical and highest are not in that order. */
export function checkForwardVolts(led: ForwardVolts, path: string): void {
  if (led.forwardVoltsMin > led.forwardVoltsMax) {
    refuse(`${path}.forwardVoltsMin`, 'must not be above forwardVoltsMax');
  }
  if (!atLeast(led.forwardVolts, led.forwardVoltsMin) || !atMost(led.forwardVolts, led.forwardVoltsMax)) {
    refuse(`${path}.forwardVolts`, 'must lie between forwardVoltsMin and forwardVoltsMax');
  }
}
