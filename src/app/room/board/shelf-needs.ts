import type { BoardShelf } from '@shared/contracts/board';
import type { NoteTone } from '../../ui/note-line/note-line';

/** Something that a shelf needs for what grows on it, though nothing measured there is wrong. */
export interface ShelfNeed {
  /** Unique in the room. */
  readonly id: string;
  readonly shelfId: string;
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

/** What a shelf needs that is kept dark although leaves have come up: light. Empty when nothing does. */
export function shelfNeeds({ id, label, plantings, now: { lampDay } }: BoardShelf): readonly ShelfNeed[] {
  if (!lampDay.hasLamp || lampDay.planned.length > 0 || lampDay.lit === true) return [];
  const up = plantings.find(({ stage }) => stage === 'emerging' || stage === 'seedling');
  if (up === undefined) return [];
  const below = plantings.find(({ stage }) => stage === 'sown');
  const why = `${up.crop} has come up${below === undefined ? '' : `, though ${below.crop.toLowerCase()} has not`}`;
  return [
    {
      id: `${id} lamps`,
      shelfId: id,
      tone: 'lamp',
      icon: 'lightbulb',
      title: `${label} needs light now`,
      why: `${why}.`,
      note: `${why}: this shelf needs light now.`,
    },
  ];
}
