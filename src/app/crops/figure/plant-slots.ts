import type { Crop } from '@shared/contracts/crops';
import type { DayLengthResponse, PetToxicity } from '@shared/growing/crops/crop';
import { bulbingFromHours, type OnionClass } from '@shared/growing/onion-class';
import type { FieldsSlot, TypedFields } from './fields-slot';
import { figuresOf } from './figure-slot';

/** What people eat of it. */
export function eatenSlot(crop: Crop): FieldsSlot {
  return {
    kind: 'fields',
    title: 'What is eaten of it',
    fields: [
      {
        kind: 'text',
        name: 'eaten',
        label: 'Eaten',
        help: 'Such as leaves, or ripe fruit. Take it away for a plant that is not food.',
        maxLength: 80,
      },
    ],
    figure: crop.eaten === null ? null : { values: { eaten: crop.eaten }, source: '' },
    hasSource: false,
    problemOf: () => null,
    with: ({ eaten }) => ({ ...figuresOf(crop), eaten: String(eaten) }),
    without: () => ({ ...figuresOf(crop), eaten: null }),
  };
}

/** Whether it harms pets. */
export function toxicitySlot(crop: Crop): FieldsSlot {
  const { toxicToPets } = crop;
  return {
    kind: 'fields',
    title: 'Whether it harms pets',
    fields: [
      {
        kind: 'choice',
        name: 'toxicity',
        label: 'Cats and dogs that eat of it',
        help: 'Go by a list of a poison centre or a veterinary society, and name it below. In doubt it harms.',
        choices: [
          { value: 'toxic', words: 'It harms them' },
          { value: 'notKnownToBeToxic', words: 'Not known to harm them' },
        ],
      },
    ],
    figure: toxicToPets && { values: { toxicity: toxicToPets.value }, source: toxicToPets.source },
    hasSource: true,
    problemOf: () => null,
    with: ({ toxicity }, source) => ({
      ...figuresOf(crop),
      toxicToPets: { value: toxicity as PetToxicity, source },
    }),
    without: () => ({ ...figuresOf(crop), toxicToPets: null }),
  };
}

/** How it answers to the length of the day. */
export function dayLengthSlot(crop: Crop): FieldsSlot {
  const { dayLength } = crop;
  return {
    kind: 'fields',
    title: 'What the length of the day does',
    fields: [
      {
        kind: 'choice',
        name: 'kind',
        label: 'It',
        help: 'Hours of light count, lamps included. Shelves warn by it.',
        choices: [
          { value: 'bulbs', words: 'forms bulbs in long days' },
          { value: 'bolts', words: 'runs to seed in long days' },
          { value: 'flowersUnder', words: 'flowers only in short days' },
          { value: 'indifferent', words: 'doesn’t mind' },
        ],
      },
      {
        kind: 'choice',
        name: 'onion',
        label: 'Class of onion',
        help: 'Sowing dates warn where the class does not fit the latitude.',
        choices: [
          { value: 'none', words: 'no onion' },
          ...(Object.entries(bulbingFromHours) as [OnionClass, number][]).map(([value, from]) => ({
            value,
            words: `${value}-day, from about ${from} h`,
          })),
        ],
        isWanted: ({ kind }) => kind === 'bulbs',
      },
      {
        kind: 'number',
        name: 'hours',
        label: 'Hours of light',
        help: 'From so many on; for flowers in short days, up to so many.',
        unit: 'h',
        bounds: [0, 24],
        mayBeEmpty: false,
        isWanted: ({ kind }) => kind !== null && kind !== 'indifferent',
      },
    ],
    figure: dayLength && { values: valuesOf(dayLength.value), source: dayLength.source },
    hasSource: true,
    problemOf: () => null,
    with: (values, source) => ({ ...figuresOf(crop), dayLength: { value: responseOf(values), source } }),
    without: () => ({ ...figuresOf(crop), dayLength: null }),
  };
}

/** Its usual pot. */
export function usualPotSlot(crop: Crop): FieldsSlot {
  const { usualPot } = crop;
  return {
    kind: 'fields',
    title: 'Usual pot',
    fields: [{ kind: 'text', name: 'pot', label: 'Pot', help: 'Such as “9 cm, later 4 L”.', maxLength: 120 }],
    figure: usualPot && { values: { pot: usualPot.value }, source: usualPot.source },
    hasSource: true,
    problemOf: () => null,
    with: ({ pot }, source) => ({ ...figuresOf(crop), usualPot: { value: String(pot), source } }),
    without: () => ({ ...figuresOf(crop), usualPot: null }),
  };
}

function valuesOf(response: DayLengthResponse): TypedFields {
  switch (response.kind) {
    case 'bulbs':
      return { kind: 'bulbs', onion: response.onion ?? 'none', hours: response.fromHours };
    case 'bolts':
      return { kind: 'bolts', onion: null, hours: response.fromHours };
    case 'flowersUnder':
      return { kind: 'flowersUnder', onion: null, hours: response.toHours };
    case 'indifferent':
      return { kind: 'indifferent', onion: null, hours: null };
  }
}

function responseOf({ kind, onion, hours }: TypedFields): DayLengthResponse {
  const limit = typeof hours === 'number' ? hours : 0;
  switch (kind as DayLengthResponse['kind']) {
    case 'bulbs':
      return { kind: 'bulbs', fromHours: limit, onion: onion === 'none' ? null : (onion as OnionClass) };
    case 'bolts':
      return { kind: 'bolts', fromHours: limit };
    case 'flowersUnder':
      return { kind: 'flowersUnder', toHours: limit };
    case 'indifferent':
      return { kind: 'indifferent' };
  }
}
