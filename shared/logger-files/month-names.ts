import { Info } from 'luxon';

const locales = ['en', 'de', 'fr', 'es', 'nl', 'it', 'pt'];

const monthByName = new Map<string, number>();
for (const locale of locales) {
  for (const length of ['short', 'long'] as const) {
    for (const names of [Info.months(length, { locale }), Info.monthsFormat(length, { locale })]) {
      names.forEach((name, index) => monthByName.set(foldMonth(name), index + 1));
    }
  }
}
monthByName.set('sept', 9);

/**
 * The month that a word names in English, German, French, Spanish, Dutch, Italian or Portuguese.
 *
 * @param word - Full or abbreviated name, any case, with or without full stop.
 * @returns 1 to 12, or null.
 */
export function monthOfName(word: string): number | null {
  return monthByName.get(foldMonth(word)) ?? null;
}

function foldMonth(name: string): string {
  return name
    .normalize('NFD')
    .replace(/[\p{M}.]/gu, '')
    .toLowerCase();
}
