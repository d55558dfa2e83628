import { isTemperature, type Quantity } from '../climate/quantity';
import type { AlertKind } from './alert-rule';

/** What an alert's series is measured in: a quantity, or a sum of a day's light. */
export type AlertQuantity = Quantity | 'lightHours' | 'dailyLightIntegral';

/** One line of usual caution, for the place where a hand goes near something that can hurt. */
export const cautions = {
  lamp: 'Usual caution: switch the lamp off before reaching in, and don’t look into the LEDs.',
  mat: 'Usual caution: unplug the mat before moving it; use a thermostat, lay nothing on top, discard it if damaged.',
  water:
    'Usual caution: keep water off plugs and cables; plugs above the water line, behind a residual-current device.',
  damp: 'Usual caution: condensed water and mould near mains call for a residual-current device and an electrician.',
} as const;

/** What something is called, and what is said of it when it is too high or too low. */
export interface SideWords {
  readonly noun: string;
  readonly tooHigh: string;
  readonly tooLow: string;
}

const humidityWords: SideWords = { noun: 'air', tooHigh: 'too damp', tooLow: 'too dry' };
const plainWords = (noun: string): SideWords => ({ noun, tooHigh: 'too high', tooLow: 'too low' });
const lightWords: SideWords = { noun: 'light', tooHigh: 'too strong', tooLow: 'too weak' };

/** Words for a quantity that left its wanted range. */
export const sideWords: Readonly<Record<AlertQuantity, SideWords>> = {
  airTemperature: { noun: 'air', tooHigh: 'too warm', tooLow: 'too cold' },
  rootZoneTemperature: { noun: 'root zone', tooHigh: 'too warm', tooLow: 'too cold' },
  relativeHumidity: humidityWords,
  absoluteHumidity: humidityWords,
  vapourPressureDeficit: plainWords('VPD'),
  dewPoint: plainWords('dew point'),
  ppfd: lightWords,
  illuminance: lightWords,
  lightHours: { noun: 'day', tooHigh: 'too long', tooLow: 'too short' },
  dailyLightIntegral: plainWords('daily light'),
};

/** What to try, and the caution that goes with it. A cause is a "may". */
export interface Advice {
  readonly tryThis: string;
  readonly caution: string | null;
}

const spaceOut = 'Plants or wet trays may stand too close; space them out and let a fan move the air.';
const moisten: Advice = {
  tryThis: 'A heater or a fan may be drying the air; cover young trays or stand water near the shelf.',
  caution: cautions.water,
};
const dimLamp: Advice = {
  tryThis: 'The lamp may be too close; raise it or dim it.',
  caution: cautions.lamp,
};
const brightenLamp: Advice = {
  tryThis:
    'The lamp may be too high, dirty or worn; lower it, wipe it, or see whether it is due for replacement.',
  caution: cautions.lamp,
};

/** What may be the matter when the lamps are off, where lamps are the usual cause. */
const unlitAdvice: Readonly<Record<'aboveRange' | 'belowRange', Partial<Record<AlertQuantity, Advice>>>> = {
  aboveRange: {
    airTemperature: {
      tryThis:
        'A heater or a warm shelf below may be the cause, as the lamps are off; open the vent or move the air.',
      caution: null,
    },
    ppfd: strayLight(),
    illuminance: strayLight(),
  },
  belowRange: { ppfd: lampOff(), illuminance: lampOff() },
};

function strayLight(): Advice {
  return {
    tryThis:
      'Light may come from a window or another shelf, as the lamps are off; shade it if it should be dark.',
    caution: null,
  };
}

function lampOff(): Advice {
  return { tryThis: 'The lamps are off; look at the timer and the plug.', caution: cautions.lamp };
}

const aboveAdvice: Readonly<Record<AlertQuantity, Advice>> = {
  airTemperature: {
    tryThis: 'The lamp may be too close; raise it or open the vent.',
    caution: cautions.lamp,
  },
  rootZoneTemperature: {
    tryThis: 'The heat mat may be set too high or its probe may have slipped out; look at both.',
    caution: cautions.mat,
  },
  relativeHumidity: { tryThis: spaceOut, caution: cautions.damp },
  absoluteHumidity: { tryThis: spaceOut, caution: cautions.damp },
  dewPoint: { tryThis: spaceOut, caution: cautions.damp },
  vapourPressureDeficit: moisten,
  ppfd: dimLamp,
  illuminance: dimLamp,
  lightHours: { tryThis: 'The timer may run too long; look at its hours.', caution: null },
  dailyLightIntegral: dimLamp,
};

const belowAdvice: Readonly<Record<AlertQuantity, Advice>> = {
  airTemperature: {
    tryThis: 'A window or door may be open, or the heating off; look, and cover young plants for the night.',
    caution: null,
  },
  rootZoneTemperature: {
    tryThis: 'The heat mat may be off or unplugged, or cold water may have been used; look at both.',
    caution: cautions.mat,
  },
  relativeHumidity: moisten,
  absoluteHumidity: moisten,
  dewPoint: moisten,
  vapourPressureDeficit: { tryThis: spaceOut, caution: cautions.damp },
  ppfd: brightenLamp,
  illuminance: brightenLamp,
  lightHours: {
    tryThis: 'The timer may be set short, or a lamp may have failed for part of the day; look at both.',
    caution: cautions.lamp,
  },
  dailyLightIntegral: brightenLamp,
};

const swing = 'A door, a window or the heating may have changed the air; look before the plants feel it.';

const adviceByKind: Readonly<
  Record<Exclude<AlertKind, 'aboveRange' | 'belowRange' | 'lightShort' | 'lightSumShort'>, Advice>
> = {
  fastRise: { tryThis: swing, caution: null },
  fastFall: { tryThis: swing, caution: null },
  lampDark: {
    tryThis:
      'The timer may have failed, a plug may be out, or the light sensor may be covered; look at each.',
    caution: cautions.lamp,
  },
  lampLit: {
    tryThis: 'The timer may be stuck or overridden; switch it back to its plan.',
    caution: cautions.lamp,
  },
  matStuckOn: {
    tryThis: 'Nothing here waits to germinate; the heat mat may have been forgotten. Switch it off.',
    caution: cautions.mat,
  },
  condensation: {
    tryThis: 'Water may be settling on the cold surface; air the shelf, or move plants away from cold walls.',
    caution: cautions.damp,
  },
  wetHours: {
    tryThis: 'Grey mould may start on wet leaves; space the plants out, move the air, take off dead leaves.',
    caution: cautions.damp,
  },
  sensorsDisagree: {
    tryThis:
      'One of the two may have drifted or stand in a draught or in the light; lay them side by side for an hour.',
    caution: null,
  },
  sensorFailed: {
    tryThis:
      'The sensor may be wet, unplugged or worn out; look at it. Its readings are kept but left out of sums.',
    caution: null,
  },
  sensorSilent: {
    tryThis: 'Its cable or battery may have failed; look at the sensor. What it sends later is filled in.',
    caution: null,
  },
  deviceSilent: {
    tryThis:
      'It may have lost power or network; look at its plug and light. What it kept is filled in when it is back.',
    caution: cautions.water,
  },
  dangerLow: {
    tryThis: 'Plants may be lost at this; move them somewhere warmer now and look at the heating.',
    caution: null,
  },
  dangerHigh: {
    tryThis: 'Plants may be lost at this; switch off lamps and mats, and open the vent now.',
    caution: cautions.lamp,
  },
};

/**
 * What to try about an alert.
 *
 * @param kind - Kind of the alert.
 * @param quantity - What it is about.
 * @param isLit - Whether the shelf's lamps shone then; null where that is not known.
 * @returns One sentence or two, and the caution that belongs to it.
 */
export function adviceFor(kind: AlertKind, quantity: AlertQuantity, isLit: boolean | null = null): Advice {
  switch (kind) {
    case 'aboveRange':
      return unlit(kind, quantity, isLit) ?? aboveAdvice[quantity];
    case 'belowRange':
      return unlit(kind, quantity, isLit) ?? belowAdvice[quantity];
    case 'lightShort':
    case 'lightSumShort':
      return belowAdvice[quantity];
    case 'dangerHigh':
      // A mat is what heats the root zone; a lamp is what heats the air.
      return quantity === 'rootZoneTemperature'
        ? { ...adviceByKind.dangerHigh, caution: cautions.mat }
        : adviceByKind.dangerHigh;
    default:
      return adviceByKind[kind];
  }
}

function unlit(
  side: keyof typeof unlitAdvice,
  quantity: AlertQuantity,
  isLit: boolean | null,
): Advice | undefined {
  return isLit === false ? unlitAdvice[side][quantity] : undefined;
}

/**
 * The word for a rise or a fall of a quantity.
 *
 * @param quantity - What changes.
 * @param isRise - Whether it goes up.
 * @returns A word that follows the noun: "warming", "cooling", "rising" or "falling".
 */
export function changeWord(quantity: AlertQuantity, isRise: boolean): string {
  const isTemperatureOfMatter = quantity !== 'dewPoint' && isWarmth(quantity);
  if (isTemperatureOfMatter) return isRise ? 'warming' : 'cooling';
  return isRise ? 'rising' : 'falling';
}

function isWarmth(quantity: AlertQuantity): boolean {
  return quantity !== 'lightHours' && quantity !== 'dailyLightIntegral' && isTemperature(quantity);
}
