/** Dates and times: stored as UTC, shown in the shop's zone. Due dates are plain dates without a zone. */
import { TZDate } from '@date-fns/tz';
import { format } from 'date-fns';
import type { ShopSettings } from './settings';

type TimeSettings = Pick<ShopSettings, 'locale' | 'timeZone'>;

const DAY = { 'en-US': 'MMM d, yyyy', 'en-GB': 'd MMM yyyy' } as const;
const CLOCK = { 'en-US': 'h:mm a', 'en-GB': 'HH:mm' } as const;

const inZone = (at: Date | string, zone: string) => new TZDate(new Date(at), zone);
/** A calendar day has no zone: it is read in UTC, so that it never slips to the day before. */
const plainDay = (day: string) => new TZDate(`${day.slice(0, 10)}T00:00:00Z`, 'UTC');

const isPlainDay = (value: Date | string): value is string =>
  typeof value === 'string' && /^\d{4}-\d{2}-\d{2}$/.test(value);

/** A moment, or a plain `yyyy-mm-dd`, as the shop writes days. */
export function formatDate(value: Date | string, settings: TimeSettings): string {
  return format(isPlainDay(value) ? plainDay(value) : inZone(value, settings.timeZone), DAY[settings.locale]);
}

export function formatTime(value: Date | string, settings: TimeSettings): string {
  return format(inZone(value, settings.timeZone), CLOCK[settings.locale]);
}

export function formatDateTime(value: Date | string, settings: TimeSettings): string {
  return `${formatDate(value, settings)}, ${formatTime(value, settings)}`;
}

/** Local wall-clock time as stored for visits (`2026-12-01 08:30:00`, no zone). */
export function formatLocalTime(local: string, settings: TimeSettings): string {
  return format(new TZDate(`${local.replace(' ', 'T').slice(0, 19)}Z`, 'UTC'), CLOCK[settings.locale]);
}

/** Today's calendar day in the shop's zone, as `yyyy-mm-dd`. */
export function dayIn(timeZone: string, at: Date): string {
  return format(inZone(at, timeZone), 'yyyy-MM-dd');
}
