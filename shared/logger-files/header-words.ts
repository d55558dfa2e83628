import type { LoggerQuantity } from './quantities';
import { quantityRules } from './quantities';
import type { LoggerUnit } from './units';
import { dimensionOf, storedUnitOf, unitOfText } from './units';

/** A unit found in the text of a header cell. */
export interface HeaderUnit {
  readonly unit: LoggerUnit;
  /** The unit as the file spells it. */
  readonly unitText: string;
  /** The header without its unit. */
  readonly name: string;
}

/** What a header says that its column measures. */
export interface HeaderMeaning {
  readonly quantity: LoggerQuantity;
  /** The unit that the header states, or null. */
  readonly unit: LoggerUnit | null;
  readonly unitText: string;
  /** One sentence for the person who checks the proposal. */
  readonly reason: string;
}

// General vocabulary in English, German, French, Spanish, Dutch and Italian, accents folded away. From memory.
const words = {
  vapourPressureDeficit:
    /\bvpd\b|vapou?r pressure defici|dampfdruckdefizit|sattigungsdefizit|deficit de (pression|presion)|dampdrukdeficit/,
  dewPoint: /\bdew ?(point|pt)?\b|dewpoint|taupunkt|rosee|rocio|dauwpunt|rugiada/,
  absolute: /\babs(olute?|olue|oluta)?\b/,
  rootZone:
    /\b(soil|root|substrate?s?|substrat|media|medium|compost|boden|erde|wurzel|sol|racines?|suelo|raiz|sustrato|bodem|wortel|terreno)(?=\b|temp|zone)/,
  temperature: /temp|\bt ?\d?\b|\bwarme\b/,
  humidity: /humid|\bhum\b|\brh ?\d?\b|feucht|\brlf\b|vochtig|humedad|umidita|hygro/,
  shortHumidity: /\b(h|hr|rf|rv|ur)\b/,
  ppfd: /\bppfd\b|\bpar\b|photon/,
  illuminance:
    /illumin|\blux\b|beleuchtung|helligkeit|eclairement|iluminancia|verlichting|lichtsterkte|luminosi/,
  light: /\blight\b|\blicht\b|lumiere|\bluz\b|\bluce\b/,
  time: /time|date|zeit|datum|\buhr|heure|horodat|fecha|\bhora|tijd|\bora\b|\bdata\b|elapsed|epoch|unix/,
  elapsed: /elapsed|duration|dauer|laufzeit|verstrichen|ecoule|transcurrido|verstreken|since start/,
  sensor:
    /sensor|device|channel|probe|logger|station|location|kanal|gerat|fuhler|capteur|canal|dispositivo|kanaal|apparaat|standort/,
  quantity:
    /quantity|parameter|measur|variable|metric|messgrosse|grandeur|magnitud|grootheid|\btype\b|\btyp\b/,
  value: /value|reading|wert|valeur|valor|waarde|valore/,
  unit: /^unit|einheit|unite|unidad|eenheid|unita/,
  rowNumber: /^(#|no|nr|n°|no\.?|nr\.?|row|index|record|zeile|num(ber|mer|ero)?|id)$/,
  other: /batter|\bco2\b|\bco₂|volt|rssi|signal|wind|rain|precip|\bph\b|\bec\b|conduct|akku/,
} as const satisfies Record<string, RegExp>;

/** Names of the word lists that a header can be tested against. */
export type HeaderWord = keyof typeof words;

/** Tells whether a header holds a word of a list. */
export function headerSays(header: string, word: HeaderWord): boolean {
  return words[word].test(foldHeader(header));
}

/**
 * Folds a header for comparison: small letters, no accents, `camelCase` and `snake_case` as words.
 *
 * @example
 * foldHeader('Température_sol'); // 'temperature sol'
 */
export function foldHeader(header: string): string {
  return header
    .slice(0, 200)
    .replace(/(\p{Ll})(\p{Lu})/gu, '$1 $2')
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/ß/g, 'ss')
    .replace(/[_.\-/\s]+/g, ' ')
    .trim();
}

/**
 * Finds the unit in a header: in brackets, after a separator (`Temp, °C`, `temp_c`, `temperatureC`), or alone.
 *
 * @returns The unit with what is left as the name, or null. A bare letter (C, F, K) needs a word for temperature
 * beside it, because `Shelf C` is a name.
 */
export function unitInHeader(header: string): HeaderUnit | null {
  const text = header.trim().slice(0, 200);
  for (const bracket of text.matchAll(/[([{]([^()[\]{}]+(?:\([^()]*\))?[^()[\]{}]*)[)\]}]/g)) {
    const unit = unitOfText(bracket[1] ?? '');
    if (unit !== null) {
      return { unit, unitText: (bracket[1] ?? '').trim(), name: text.replace(bracket[0], ' ').trim() };
    }
  }
  const spaced = text.replace(/(\p{Ll})(\p{Lu}\p{Ll}{0,2})$/u, '$1 $2');
  for (const separator of spaced.matchAll(/^|[\s,;:/_-]+(?:in\s+)?/g)) {
    const unitText = spaced.slice(separator.index + separator[0].length);
    const name = spaced.slice(0, separator.index);
    const unit = unitOfText(unitText);
    if (unit === null) continue;
    const isBareLetter = unitText.length === 1 && unit !== '%';
    if (!isBareLetter || headerSays(name, 'temperature') || headerSays(name, 'dewPoint')) {
      return { unit, unitText, name };
    }
  }
  return null;
}

/**
 * Reads what a header says that its column measures.
 *
 * @param header - Text of the header cell; its unit may be in it.
 * @param unitLine - Text of the unit where the file keeps units on a line or in a column of their own, else ''.
 * @returns The quantity and the unit stated, or null where the words name nothing that is kept here or contradict
 * the unit.
 */
export function meaningOfHeader(header: string, unitLine = ''): HeaderMeaning | null {
  const separate = unitOfText(unitLine);
  const found =
    separate === null ? unitInHeader(header) : { unit: separate, unitText: unitLine.trim(), name: header };
  const quantity = quantityOfWords(foldHeader(found?.name ?? header), found?.unit ?? null);
  if (quantity === null) return null;
  if (found !== null && dimensionOf(found.unit) !== quantityRules[quantity].dimension) return null;
  const label = quantityRules[quantity].label;
  const stated =
    found === null
      ? `no unit is stated, ${storedUnitOf(quantity)} is assumed`
      : `the unit is stated as ${found.unitText}`;
  return {
    quantity,
    unit: found?.unit ?? null,
    unitText: found?.unitText ?? '',
    reason: `The header “${header.trim().slice(0, 60)}” reads as ${label}; ${stated}.`,
  };
}

function quantityOfWords(name: string, unit: LoggerUnit | null): LoggerQuantity | null {
  const has = (word: HeaderWord): boolean => words[word].test(name);
  const dimension = unit === null ? null : dimensionOf(unit);
  if (has('vapourPressureDeficit')) return 'vapourPressureDeficit';
  if (has('dewPoint')) return 'dewPoint';
  if (has('rootZone'))
    return has('temperature') || dimension === 'temperature' ? 'rootZoneTemperature' : null;
  if (dimension === 'density' || (has('humidity') && has('absolute'))) return 'absoluteHumidity';
  if (has('humidity')) return 'relativeHumidity';
  if (has('ppfd') || dimension === 'photonFlux') return 'ppfd';
  if (has('illuminance') || dimension === 'illuminance') return 'illuminance';
  if (has('other')) return null;
  if (has('temperature') || dimension === 'temperature') return 'airTemperature';
  const isHumidityUnit = dimension === 'humidity' && (name === '' || has('shortHumidity'));
  return isHumidityUnit ? 'relativeHumidity' : null;
}
