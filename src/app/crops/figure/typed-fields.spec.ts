import type { Crop } from '@shared/contracts/crops';
import { libraryCrop } from '../testing/library-crop';
import type { FieldsSlot } from './fields-slot';
import { figuresOf } from './figure-slot';
import { dayLengthSlot, eatenSlot, toxicitySlot, usualPotSlot } from './plant-slots';
import { leastGerminationSlot, lightSlot, temperaturesSlot, thermalTimeSlot } from './seed-slots';
import { fieldsProblem, isWanted, shownFields, storedFields } from './typed-fields';

const onion = libraryCrop('onion-long-day', { isOwn: true });
const source = 'Our log of 2026';

function there<T>(slot: T | null): T {
  if (slot === null) throw new Error('no such figure');
  return slot;
}

const slots: readonly [string, (crop: Crop) => FieldsSlot][] = [
  ['warmth', (crop) => there(temperaturesSlot(crop, 0))],
  ['thermal time', (crop) => there(thermalTimeSlot(crop, 0))],
  ['light', (crop) => there(lightSlot(crop))],
  ['least germination', (crop) => there(leastGerminationSlot(crop))],
  ['what is eaten', eatenSlot],
  ['toxicity', toxicitySlot],
  ['day length', dayLengthSlot],
  ['pot', usualPotSlot],
];

describe('a figure of several fields', () => {
  it.each(slots)('for %s goes through the fields unchanged, in either unit', (_name, slotOf) => {
    const slot = slotOf(onion);
    if (slot.figure === null) throw new Error('the library has none to try');
    for (const reader of ['°C', '°F'] as const) {
      const values = storedFields(slot, shownFields(slot, reader), reader);
      expect(fieldsProblem(slot, values, reader)).toBeNull();
      expect(slot.with(values, slot.figure.source)).toEqual(figuresOf(onion));
    }
  });

  it.each(slots)('for %s can be taken away and put there anew', (_name, slotOf) => {
    const slot = slotOf(onion);
    const without = { ...onion, ...slot.without() };
    const empty = slotOf(without);
    expect(empty.figure === null || empty.figure.values !== slot.figure?.values).toBe(true);
    expect(fieldsProblem(slot, {}, '°C')).not.toBeNull();
  });

  it.each([
    [{ low: 25, high: 20 }, 'high', /below where it is good/],
    [{ minC: 19 }, 'minC', /above where it is good/],
    [{ maxC: 20 }, 'maxC', /Must not be below/],
    [{ bestC: 40 }, 'bestC', /between the coldest and the warmest/],
    [{ low: null }, 'low', /missing/],
    [{ maxC: 61 }, 'maxC', /Between -20 and 60 °C/],
  ])('with %j out of order says so at the field %s', (changes, name, words) => {
    const values = { minC: 2, low: 18, high: 24, bestC: 21, maxC: 35, ...changes };
    const problem = fieldsProblem(there(temperaturesSlot(onion, 0)), values, '°C');
    expect(problem?.name).toBe(name);
    expect(problem?.words).toMatch(words);
  });

  it('is stored in °C as it was typed in °F', () => {
    const slot = there(temperaturesSlot(onion, 9));
    // 50, 68, 77, 95 °F.
    const typed = { minC: 50, low: 68, high: 77, bestC: null, maxC: 95 };
    expect(storedFields(slot, typed, '°F')).toEqual({ minC: 10, low: 20, high: 25, bestC: null, maxC: 35 });
  });

  it('asks for a class of onion only where bulbs are formed, and for hours only where they count', () => {
    const slot = dayLengthSlot(onion);
    const asked = (kind: string | null): string[] =>
      slot.fields.filter((field) => isWanted(field, { kind })).map(({ name }) => name);
    expect(asked('bulbs')).toEqual(['kind', 'onion', 'hours']);
    expect(asked('bolts')).toEqual(['kind', 'hours']);
    expect(asked('indifferent')).toEqual(['kind']);
    const typed = { kind: 'bolts', onion: 'long', hours: 13 };
    expect(slot.with(storedFields(slot, typed, '°C'), source).dayLength).toEqual({
      value: { kind: 'bolts', fromHours: 13 },
      source,
    });
  });
});
