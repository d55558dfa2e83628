import { formatDayAndYear } from '@shared/format/room-time';
import { dayAfter } from '@shared/growing/calendar-day';

/** "3 Sep 2026 to 1 Dec 2026"; the last day of a span is the one before its end. Null stays null. */
export function spanWords(span: { readonly from: string; readonly to: string } | null): string | null {
  if (span === null) return null;
  const words = (day: string): string => formatDayAndYear(`${day}T00:00:00Z`, 'UTC');
  return `${words(span.from)} to ${words(dayAfter(span.to, -1))}`;
}
