/** Dates and times: stored as UTC, shown in the shop's zone. Due dates are plain dates without a zone. */
import { TZDate, tzOffset } from '@date-fns/tz';
import { format } from 'date-fns';
import { parsed, type Parsed, unread } from './parsed';
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

const DAY_TEXT = /^(\d{4})-(\d{2})-(\d{2})$/;

/** A calendar day as date fields give it (`2026-12-01`); a day that no calendar has is refused. */
export function parseDay(text: string): Parsed<string> {
  const day = text.trim();
  const [, year = '', month = '', date = ''] = DAY_TEXT.exec(day) ?? [];
  const at = new Date(Date.UTC(Number(year), Number(month) - 1, Number(date)));
  const same = year !== '' && at.toISOString().slice(0, 10) === day;
  return same ? parsed(day) : unread('Type a day such as 2026-12-01.');
}

const DAY_MS = 24 * 60 * 60 * 1000;
const offsetAt = (at: number, timeZone: string) => tzOffset(timeZone, new Date(at)) * 60_000;

/**
 * The moment of a wall-clock time (`2026-12-01T08:30`) in a zone. A time that the clocks skip in spring is moved
 * on by what they skip; of one that comes twice in autumn the first is meant.
 */
export function parseLocalTime(text: string, timeZone: string): Parsed<Date> {
  const match = /^(\d{4}-\d{2}-\d{2})[T ](\d{2}):(\d{2})(?::\d{2})?$/.exec(text.trim());
  const day = parseDay(match?.[1] ?? '');
  const [hours, minutes] = [Number(match?.[2]), Number(match?.[3])];
  if (!match || !day.ok || hours > 23 || minutes > 59)
    return unread('Type a day and a time such as 2026-12-01 08:30.');
  const wall = Date.parse(`${day.value}T${match[2]}:${match[3]}:00Z`);
  // The offsets in force well before and well after; one of them holds at the moment itself unless it is skipped.
  const [before, after] = [-DAY_MS, DAY_MS].map((shift) => offsetAt(wall + shift, timeZone)) as [
    number,
    number,
  ];
  const moments = [before, after].map((offset) => wall - offset).sort((x, y) => x - y);
  const meant = moments.find((at) => at + offsetAt(at, timeZone) === wall);
  return parsed(new Date(meant ?? wall - before));
}
