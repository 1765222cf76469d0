import { formatDate, formatLocalTime } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';

/** A visit's wall-clock times; a visit over midnight or several days names both days. */
export function visitTimes(visit: { startsAt: string; endsAt: string }, settings: ShopSettings): string {
  const [first, last] = [visit.startsAt.slice(0, 10), visit.endsAt.slice(0, 10)];
  const until = formatLocalTime(visit.endsAt, settings);
  return (
    `${formatDate(first, settings)}, ${formatLocalTime(visit.startsAt, settings)} to ` +
    (first === last ? until : `${formatDate(last, settings)}, ${until}`)
  );
}
