/** Findings by their weight: the four ways to say something about a figure. */
import type { Finding } from './contract';

type Make = (code: string, message: string, values: Finding['values'], basis: string) => Finding;

const of =
  (severity: Finding['severity'], hard: boolean): Make =>
  (code, message, values, basis) => ({ code, severity, hard, message, values, basis });

/** Never overridden. */
export const hardStop = of('stop', true);
/** May be overridden by a licensed person who says why. */
export const softStop = of('stop', false);
export const caution = of('caution', false);
export const note = of('note', false);
