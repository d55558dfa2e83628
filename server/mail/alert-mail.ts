import { describeEpisode, type EpisodeDescription } from '@shared/alerts/describe-episode';
import { episodeOf } from '@shared/contracts/alerts';
import type { Series } from '@shared/contracts/series';
import { episodeFormatters } from '@shared/format/episode-formatters';
import { formatQuantityRange } from '@shared/format/quantities';
import { formatDuration, sayWhen } from '@shared/format/room-time';
import { drawAlertChart, type AlertChartData } from './alert-chart';
import type { MailKind, MailPicture } from './mail-entity';
import type { MailSection, SectionPicture } from './mail-layout';
import type { AlertOfRoom, Recipient, RoomOfMail } from './telling-store';

/** For whom, about which room, and when a mail is written. */
export interface MailSetting {
  readonly recipient: Recipient;
  readonly room: RoomOfMail;
  /** Where links lead, without a trailing slash. */
  readonly publicUrl: string;
  readonly now: number;
}

/** A section about an alert, with the picture in it. */
export interface AlertSection {
  readonly section: MailSection;
  readonly picture: MailPicture | null;
}

const HOUR_MS = 3_600_000;
/** Before the episode, so that one sees how it came. */
const LEAD_MS = 3 * HOUR_MS;
/** A chart that small shows no more. */
const LONGEST_CHART_MS = 72 * HOUR_MS;

/**
 * The span that an alert's chart shows.
 *
 * @param alert - The alert.
 * @param now - The present [ms].
 * @returns From some hours before it began to its end and a little more, or now [ms].
 */
export function chartSpan(alert: AlertOfRoom, now: number): { readonly from: number; readonly to: number } {
  const to = alert.clearedAt === null ? now : Math.min(now, Date.parse(alert.clearedAt) + HOUR_MS);
  return { from: Math.max(Date.parse(alert.beganAt) - LEAD_MS, to - LONGEST_CHART_MS), to };
}

/**
 * What a mail says of one alert.
 *
 * @param alert - The alert.
 * @param setting - For whom and when.
 * @param series - The readings around it; null leaves the chart out.
 * @returns The section, and the chart in it.
 */
export function alertSection(alert: AlertOfRoom, setting: MailSetting, series: Series | null): AlertSection {
  const words = wordsFor(alert, setting);
  const isOver = alert.clearedAt !== null;
  const data = series === null ? null : chartData(alert, setting.now, series);
  const png = data === null ? null : drawAlertChart(data);
  const cid = `chart-${alert.id}@lampmeadow`;
  return {
    section: {
      heading: words.title,
      lines: isOver ? [words.sentence, overLine(alert, setting)] : [words.sentence, words.tryThis],
      caution: isOver ? null : words.caution,
      picture: data === null || png === null ? null : captionOf(cid, words, alert, setting, data),
      links: [
        { text: 'See the alert', url: `${setting.publicUrl}/alerts/${alert.id}` },
        { text: `See shelf ${alert.shelfLabel}`, url: `${setting.publicUrl}/shelf/${alert.shelfId}` },
      ],
    },
    picture: png === null ? null : { cid, png: png.toString('base64') },
  };
}

/**
 * What a mail says of alerts that it has no room to tell at length.
 *
 * @param alerts - At least one.
 * @param setting - For whom and when.
 * @returns A section with a line each.
 */
export function othersSection(alerts: readonly AlertOfRoom[], setting: MailSetting): MailSection {
  return {
    heading: `And ${alerts.length} more`,
    lines: [],
    items: alerts.map((alert) => alertLine(alert, setting)),
    links: [{ text: 'See all alerts', url: `${setting.publicUrl}/alerts` }],
  };
}

/**
 * The subject of a mail that begins a conversation.
 *
 * @param alerts - At least one.
 * @param setting - For whom and when.
 * @returns What and where; how many when there are several.
 */
export function alertSubject(alerts: readonly AlertOfRoom[], setting: MailSetting): string {
  const [first] = alerts;
  const isUrgent = alerts.some(({ urgency, clearedAt }) => urgency === 'goNow' && clearedAt === null);
  const what =
    alerts.length === 1 && first !== undefined
      ? wordsFor(first, setting).title
      : `${alerts.length} alerts${placesOf(alerts)}`;
  return `${isUrgent ? 'Go now: ' : ''}${what} · ${setting.room.name}`;
}

/**
 * The first line of a mail about alerts.
 *
 * @param kind - Why it is written.
 * @param count - How many alerts it tells.
 * @returns The line; null where the alert speaks for itself.
 */
export function alertOpening(kind: MailKind, count: number): string | null {
  const [it, they] = count === 1 ? ['This alert', 'it'] : ['These alerts', 'them'];
  switch (kind) {
    case 'urgent':
      return `${it} became urgent: go now.`;
    case 'escalated':
      return `Nobody has acknowledged ${they} yet, so the room’s keepers are asked to look.`;
    case 'assigned':
      return `You are asked to look after ${count === 1 ? 'this alert' : 'these alerts'}.`;
    case 'cleared':
      return count === 1 ? 'It is over.' : 'These are over.';
    case 'opened':
      return count === 1 ? null : 'These came together; one cause may be behind them, such as a power cut.';
    case 'letter':
    case 'care':
      return null;
  }
}

/** An alert in one line of a list. */
export function alertLine(alert: AlertOfRoom, setting: MailSetting): string {
  const { title, sentence } = wordsFor(alert, setting);
  return `${title}. ${sentence}`;
}

/** What an alert is, in the recipient's units and the room's time. */
export function wordsFor(alert: AlertOfRoom, setting: MailSetting): EpisodeDescription {
  const { room, now } = setting;
  return describeEpisode({
    episode: episodeOf(alert),
    kind: alert.kind,
    quantity: alert.quantity,
    shelfLabel: alert.shelfLabel,
    formatters: episodeFormatters(unitOf(setting), room.timeZone, now),
    now,
  });
}

/** The unit in which a mail's reader has temperatures. */
export function unitOf({ recipient }: MailSetting): '°C' | '°F' {
  return recipient.temperatureUnit === 'fahrenheit' ? '°F' : '°C';
}

function placesOf(alerts: readonly AlertOfRoom[]): string {
  const labels = [...new Set(alerts.map(({ shelfLabel }) => shelfLabel))].sort();
  return labels.length > 4 ? ` on ${labels.length} shelves` : ` on ${labels.join(', ')}`;
}

function overLine({ beganAt, endedAt, clearedAt }: AlertOfRoom, { room, now }: MailSetting): string {
  const end = endedAt ?? clearedAt ?? beganAt;
  const lasted = formatDuration(Date.parse(end) - Date.parse(beganAt));
  return `Over since ${sayWhen(end, now, room.timeZone)}, after ${lasted}.`;
}

function captionOf(
  cid: string,
  words: EpisodeDescription,
  alert: AlertOfRoom,
  setting: MailSetting,
  { points, wanted }: AlertChartData,
): SectionPicture {
  const { room, now } = setting;
  const { from, to } = chartSpan(alert, now);
  const [start, end] = [sayWhen(from, now, room.timeZone), sayWhen(to, now, room.timeZone)];
  const values = points.flatMap(([, value]) => (value === null ? [] : [value]));
  const range = (low: number | null, high: number | null): string =>
    formatQuantityRange(alert.quantity, { low, high }, unitOf(setting));
  const last = wanted.at(-1);
  const note = [
    `Measured ${range(Math.min(...values), Math.max(...values))}.`,
    ...(last === undefined
      ? []
      : [`Green is what is wanted${wanted.length > 1 ? ' now' : ''}: ${range(last.low, last.high)}.`]),
  ].join(' ');
  return {
    cid,
    alt: `Chart from ${start} to ${end}. ${words.sentence}`,
    ends: [start, alert.clearedAt === null ? `now, ${end}` : end],
    note,
  };
}

function chartData(alert: AlertOfRoom, now: number, series: Series): AlertChartData {
  const line = series.lines.find(({ sensorId }) => sensorId === alert.sensorId) ?? series.lines[0];
  const span = chartSpan(alert, now);
  const hasLimit = ['aboveRange', 'belowRange', 'dangerHigh', 'dangerLow'].includes(alert.kind);
  return {
    ...span,
    points: line?.points ?? [],
    wanted: series.wanted.map((step) => ({
      ...step,
      from: Date.parse(step.from),
      to: Date.parse(step.to),
    })),
    episode: {
      from: Date.parse(alert.beganAt),
      to: alert.endedAt === null ? span.to : Date.parse(alert.endedAt),
    },
    limit: hasLimit ? alert.peakLimit : null,
  };
}
