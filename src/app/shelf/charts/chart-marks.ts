import type { ShelfEventKind } from '@shared/care/shelf-event';
import type { Quantity } from '@shared/climate/quantity';
import type { Alert } from '@shared/contracts/alerts';
import type { ShelfEvent } from '@shared/contracts/care';
import type { ChartMark, ChartSpan } from '../../ui/chart/chart-data';
import { alertLook } from '../../ui/note-line/alert-look';

/** The icon and the word of each kind of event. */
export const eventLooks: Readonly<Record<ShelfEventKind, { readonly icon: string; readonly word: string }>> =
  {
    watered: { icon: 'water_drop', word: 'Watered' },
    fed: { icon: 'science', word: 'Fed' },
    trimmed: { icon: 'content_cut', word: 'Trimmed' },
    picked: { icon: 'shopping_basket', word: 'Picked' },
    moved: { icon: 'swap_horiz', word: 'Moved' },
    counted: { icon: 'tag', word: 'Counted' },
    observed: { icon: 'visibility', word: 'Observed' },
  };

/** An event in words: "Watered: 0.8 L". A text that says the word itself stands alone. */
export function eventText({ kind, text }: Pick<ShelfEvent, 'kind' | 'text'>): string {
  const { word } = eventLooks[kind];
  return text.toLowerCase().includes(word.toLowerCase()) ? text : `${word}: ${text}`;
}

/**
 * The marks of one chart in order of time: what was done and seen on the shelf, and the alerts about its quantity.
 *
 * @param describe - Says an alert in a few words.
 */
export function chartMarks(
  quantity: Quantity,
  events: readonly ShelfEvent[],
  alerts: readonly Alert[],
  span: ChartSpan,
  describe: (alert: Alert) => string,
): ChartMark[] {
  const ofEvents = events.map((event) => ({
    at: Date.parse(event.at),
    icon: eventLooks[event.kind].icon,
    text: eventText(event),
  }));
  const ofAlerts = alerts
    .filter((alert) => alert.quantity === quantity)
    .map((alert) => ({
      at: Date.parse(alert.beganAt),
      icon: alertLook(alert.kind).icon,
      text: describe(alert),
    }));
  return [...ofEvents, ...ofAlerts]
    .filter(({ at }) => at >= span.from && at < span.to)
    .sort((a, b) => a.at - b.at);
}
