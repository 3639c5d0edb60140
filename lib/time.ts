import { TZDate } from '@date-fns/tz';
import { format } from 'date-fns';

/** A moment as a day in the zone: "6 May 2026". */
export const showDay = (at: Date, zone: string): string => format(new TZDate(at, zone), 'd MMM yyyy');

/** A moment as day and time in the zone: "6 May 2026, 10:42". */
export const showMoment = (at: Date, zone: string): string => format(new TZDate(at, zone), 'd MMM yyyy, HH:mm');

/** A calendar day (`YYYY-MM-DD`) in words: "6 May 2026". */
export function showCalendarDay(day: string): string {
  const [year, month, date] = day.split('-').map(Number);
  return format(new Date(year!, month! - 1, date!), 'd MMM yyyy');
}

/** The calendar day (`YYYY-MM-DD`) that a moment falls on in the zone. */
export const dayIn = (at: Date, zone: string): string => format(new TZDate(at, zone), 'yyyy-MM-dd');

/** What a `datetime-local` input shows for a moment in the zone. */
export const localInput = (at: Date, zone: string): string => format(new TZDate(at, zone), "yyyy-MM-dd'T'HH:mm");

/**
 * The moment that a `datetime-local` value means in the zone.
 * @throws RangeError on text that is no such value
 */
export function fromLocalInput(text: string, zone: string): Date {
  const match = /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2})$/.exec(text);
  if (!match) throw new RangeError('not a date and time');
  const [, y, mo, d, h, mi] = match.map(Number);
  return new Date(new TZDate(y!, mo! - 1, d!, h!, mi!, zone).getTime());
}

/** Whether the runtime knows the zone's name. */
export function isTimeZone(zone: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: zone });
    return true;
  } catch {
    return false;
  }
}
