import type { RoutineWho } from '@shared/contracts/care-routines';

const list = new Intl.ListFormat('en-GB');

/**
 * Who does it, in words: "always Pia Lindqvist", "in turn: Pia Lindqvist and Ravi Sandhill".
 *
 * @param who - As the routine has it.
 * @param names - Of the room's members by id; null until they are known.
 */
export function whoWords(who: RoutineWho, names: ReadonlyMap<string, string> | null): string {
  if (who.how === 'onDuty') return 'whoever is on duty';
  if (names === null) return '';
  const nameOf = (personId: string): string => names.get(personId) ?? 'somebody who left';
  if (who.how === 'person') return `always ${nameOf(who.personId)}`;
  const people = list.format(who.personIds.map(nameOf));
  return who.how === 'pair' ? `${people} together` : `in turn: ${people}`;
}
