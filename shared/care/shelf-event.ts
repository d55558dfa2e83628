/** What a mark on a shelf's chart tells of. */
export const shelfEventKinds = [
  'watered',
  'fed',
  'trimmed',
  'picked',
  'moved',
  'counted',
  'observed',
] as const;
/** One of {@link shelfEventKinds}. */
export type ShelfEventKind = (typeof shelfEventKinds)[number];
