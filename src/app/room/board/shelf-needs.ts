import type { ShelfAdviceView } from '@shared/contracts/advice';
import type { BoardShelf } from '@shared/contracts/board';
import type { NoteTone } from '../../ui/note-line/note-line';

/** Something that a shelf needs for what grows on it, though nothing measured there is wrong. */
export interface ShelfNeed {
  /** Unique in the room. */
  readonly id: string;
  /** Where there is more about it. */
  readonly link: readonly string[];
  readonly tone: NoteTone;
  /** Name of a Material symbol. */
  readonly icon: string;
  /** What, short, with the shelf: "A3 needs light now". */
  readonly title: string;
  /** Why, in a sentence. */
  readonly why: string;
  /** Both in a sentence, where the shelf needs no naming. */
  readonly note: string;
}

type Need = Omit<ShelfNeed, 'id' | 'link'>;
type Conflict = ShelfAdviceView['conflicts'][number];

const dayLengthTitles: Readonly<Record<ShelfAdviceView['dayLength'][number]['kind'], string>> = {
  bulbs: 'has days long enough for bulbs',
  bolts: 'has days long enough to bolt',
  staysWithoutFlowers: 'has days too long for flowers',
};

/** What a shelf needs for what grows on it: lamps, mat, a place that suits all, a look at seed that is late. */
export function shelfNeeds(shelf: BoardShelf): readonly ShelfNeed[] {
  const { id, advice } = shelf;
  const needs = advice === null ? [firstLeafNeed(shelf)] : adviceNeeds(shelf.label, advice);
  return [
    ...needs
      .filter((need) => need !== null)
      .map((need) => ({ ...need, id: `${id} ${need.title}`, link: ['/shelf', id] })),
    ...lateNeeds(shelf),
  ];
}

/** Until advice was worked out: a shelf that is kept dark although leaves have come up needs light. */
function firstLeafNeed({ label, plantings, now: { lampDay } }: BoardShelf): Need | null {
  if (!lampDay.hasLamp || lampDay.planned.length > 0 || lampDay.lit === true) return null;
  const up = plantings.find(({ stage }) => stage === 'emerging' || stage === 'seedling');
  if (up === undefined) return null;
  const below = plantings.find(({ stage }) => stage === 'sown');
  const why = `${up.crop} has come up${below === undefined ? '' : `, though ${below.crop.toLowerCase()} has not`}`;
  return {
    tone: 'lamp',
    icon: 'lightbulb',
    title: `${label} needs light now`,
    why: `${why}.`,
    note: `${why}: this shelf needs light now.`,
  };
}

function adviceNeeds(label: string, advice: ShelfAdviceView): (Need | null)[] {
  return [
    lampNeed(label, advice.lamps),
    matNeed(label, advice.heatMat),
    conflictNeed(label, advice),
    ...advice.dayLength.map(({ kind, sentence }) =>
      need('lamp', 'schedule', `${label} ${dayLengthTitles[kind]}`, sentence, sentence),
    ),
  ];
}

function lampNeed(label: string, { change, hours, reason }: ShelfAdviceView['lamps']): Need | null {
  const long = hours === null ? '' : `, ${hours} h a day`;
  switch (change) {
    case null:
      return null;
    case 'switchOn':
      return need('lamp', 'lightbulb', `${label} needs light now`, reason, `Lamps on now${long}: ${reason}`);
    case 'switchOff':
      return need('lamp', 'light_off', `${label} lamps can go off`, reason, `Lamps can go off: ${reason}`);
    case 'lengthen':
      return need(
        'lamp',
        'lightbulb',
        `${label} needs longer light`,
        reason,
        `Longer light${long}: ${reason}`,
      );
    case 'shorten':
      return need(
        'lamp',
        'lightbulb',
        `${label} has too long light`,
        reason,
        `Shorter light${long}: ${reason}`,
      );
  }
}

function matNeed(label: string, { change, reason }: ShelfAdviceView['heatMat']): Need | null {
  if (change === null) return null;
  return change === 'switchOn'
    ? need('frost', 'mode_heat', `${label} heat mat on`, reason, `Heat mat on now: ${reason}`)
    : need('ember', 'mode_heat_off', `${label} heat mat off`, reason, `Heat mat off now: ${reason}`);
}

/** All that does not go together, as one: the first of it, how much more, and where something could go. */
function conflictNeed(label: string, { conflicts, moves }: ShelfAdviceView): Need | null {
  const [first, ...more] = conflicts;
  if (first === undefined) return null;
  const rest = more.length === 0 ? '' : ` ${more.length} more on the shelf’s page.`;
  const move = moves[0] === undefined ? '' : ` ${moves[0].sentence}`;
  const why = `${first.sentence}${rest}${move}`;
  return need('lamp', 'swap_horiz', `${label} ${conflictTitle(first)}`, why, why);
}

function conflictTitle({ kind }: Conflict): string {
  if (kind === 'noLamp') return 'has no lamp for what is up';
  if (kind === 'noHeatMat') return 'has no heat mat for what waits';
  return 'can’t suit all that stands on it';
}

function lateNeeds({ label, plantings, sowings }: BoardShelf): ShelfNeed[] {
  return sowings
    .filter(({ isLate }) => isLate)
    .map(({ plantingId, up, sown, day }) => {
      const crop = plantings.find(({ id }) => id === plantingId)?.crop ?? 'Seed';
      const count = up === 0 ? `None of ${sown} is up` : `${up} of ${sown} are up`;
      const why = `${count} on day ${day}, later than its warmth led to expect.`;
      return {
        ...need('ember', 'hourglass_bottom', `${label} ${crop} is late`, why, `${crop} is late: ${why}`),
        id: `${plantingId} late`,
        link: ['/plantings', plantingId],
      };
    });
}

function need(tone: NoteTone, icon: string, title: string, why: string, note: string): Need {
  return { tone, icon, title, why, note };
}
