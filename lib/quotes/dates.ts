/** Calendar days as the shop counts them. */
import { addDays } from 'date-fns';
import { dayIn } from '@/lib/units';

/** The last day on which a quote may be signed: days are counted on the shop's calendar. */
export const validUntilOf = (at: Date, days: number, timeZone: string): string =>
  addDays(new Date(`${dayIn(timeZone, at)}T12:00:00Z`), days)
    .toISOString()
    .slice(0, 10);
