import type { Task } from '@shared/contracts/care';
import type { QuantityStatistics } from '@shared/contracts/series';
import { formatQuantityRange, quantityName } from '@shared/format/quantities';
import { formatDuration, formatShortDay } from '@shared/format/room-time';
import { alertLine, unitOf, type MailSetting } from './alert-mail';
import type { MailSection } from './mail-layout';
import type { AlertOfRoom } from './telling-store';

/** One shelf's night. */
export interface ShelfNight {
  readonly label: string;
  readonly statistics: readonly QuantityStatistics[];
}

/** What a morning has to tell. */
export interface MorningNews {
  /** The room's day, `YYYY-MM-DD`. */
  readonly day: string;
  /** Length of the night that is told of [ms]. */
  readonly nightMs: number;
  readonly shelves: readonly ShelfNight[];
  /** Open ones, and those that are over since yesterday. */
  readonly alerts: readonly AlertOfRoom[];
  /** Not done: late, today's and of the days to come. */
  readonly tasks: readonly Task[];
}

/** Shorter times outside the range are no news. */
const WORTH_TELLING_MS = 15 * 60_000;

/**
 * The sections of a person's morning letter.
 *
 * @param news - Of the room.
 * @param setting - Whose letter, and when.
 * @returns Sections that have something in them, the night last but always.
 */
export function letterSections(news: MorningNews, setting: MailSetting): MailSection[] {
  const { publicUrl } = setting;
  const open = news.alerts.filter(({ clearedAt }) => clearedAt === null);
  const over = news.alerts.filter(({ clearedAt }) => clearedAt !== null);
  const mine = tasksOf(news.tasks, setting);
  const due = mine.filter(({ dueOn }) => dueOn <= news.day);
  const later = mine.filter(({ dueOn }) => dueOn > news.day);
  const told = (alert: AlertOfRoom): string => alertLine(alert, setting);
  const sections: MailSection[] = [
    {
      heading: open.length === 1 ? 'One alert is open' : `${open.length} alerts are open`,
      lines: [],
      items: open.map(told),
      links: [{ text: 'See the alerts', url: `${publicUrl}/alerts` }],
    },
    { heading: 'Over since yesterday', lines: [], items: over.map(told) },
    { heading: 'Today’s care', lines: [], items: due.map((task) => taskLine(task, news.day)) },
    { heading: 'What comes up', lines: [], items: later.map((task) => taskLine(task, news.day)) },
    {
      heading: 'Last night',
      lines: news.shelves.length === 0 ? ['No shelf has readings of the night.'] : [],
      items: news.shelves.map((shelf) => nightLine(shelf, news.nightMs, setting)),
      links: [{ text: 'See the room', url: `${publicUrl}/room` }],
    },
  ];
  return sections.filter(({ heading, items = [] }) => items.length > 0 || heading === 'Last night');
}

/**
 * Whether a morning has anything to tell a person beyond that the night was quiet.
 *
 * @param news - Of the room.
 * @param setting - Whose letter.
 * @returns True for alerts, for care due by them or by nobody else, and for a shelf long outside its range.
 */
export function hasNews(news: MorningNews, setting: MailSetting): boolean {
  const isDue = tasksOf(news.tasks, setting).some(({ dueOn }) => dueOn <= news.day);
  const wasOutside = news.shelves.some(({ statistics }) =>
    statistics.some((statistic) => outsideMs(statistic, news.nightMs) >= WORTH_TELLING_MS),
  );
  return news.alerts.length > 0 || isDue || wasOutside;
}

function tasksOf(tasks: readonly Task[], { recipient }: MailSetting): Task[] {
  return tasks.filter(
    ({ holders }) => holders.length === 0 || holders.some(({ personId }) => personId === recipient.personId),
  );
}

function taskLine({ title, plantingLabel, rackName, shelfLabel, dueOn, cover }: Task, today: string): string {
  const where = [plantingLabel, rackName, shelfLabel]
    .map((part) => (part === null ? '' : `, ${part}`))
    .join('');
  const whose = cover === 'anybody' ? ' (anybody)' : cover === 'uncovered' ? ' (nobody has it)' : '';
  const day = formatShortDay(`${dueOn}T12:00:00Z`, 'UTC');
  const when = dueOn === today ? '' : dueOn < today ? `, due since ${day}` : ` on ${day}`;
  return `${title}${where}${when}${whose}`;
}

function nightLine({ label, statistics }: ShelfNight, nightMs: number, setting: MailSetting): string {
  const unit = unitOf(setting);
  const shown = statistics.filter(
    ({ quantity }) => quantity === 'airTemperature' || quantity === 'relativeHumidity',
  );
  const ranges = shown.map(
    ({ quantity, min, max }) =>
      `${quantityName[quantity]} ${formatQuantityRange(quantity, { low: min, high: max }, unit)}`,
  );
  const outside = statistics
    .map((statistic) => ({ name: quantityName[statistic.quantity], ms: outsideMs(statistic, nightMs) }))
    .filter(({ ms }) => ms >= 60_000)
    .map(({ name, ms }) => `${name} ${formatDuration(ms)} outside its range`);
  return `${label}: ${[...ranges, ...outside].join(', ')}`;
}

/** Time outside the wanted range, as far as readings speak for the night [ms]; 0 without a range. */
function outsideMs({ inRange, coverage }: QuantityStatistics, nightMs: number): number {
  return inRange === null ? 0 : (1 - inRange) * coverage * nightMs;
}
