import { belowKinds, silenceKinds, type AlertKind } from '@shared/alerts/alert-rule';
import type { NoteTone } from './note-line';

/** How an alert is marked. */
export interface AlertLook {
  readonly tone: NoteTone;
  /** Name of a Material symbol. */
  readonly icon: string;
}

const lampKinds: readonly AlertKind[] = ['lampDark', 'lampLit', 'lightShort', 'lightSumShort'];
const sensorKinds: readonly AlertKind[] = [...silenceKinds, 'sensorFailed', 'sensorsDisagree'];

/** The mark of an alert: too much, too little, the lamps, or a sensor that can't be trusted. */
export function alertLook(kind: AlertKind): AlertLook {
  if (lampKinds.includes(kind)) return { tone: 'lamp', icon: 'lightbulb' };
  if (sensorKinds.includes(kind)) return { tone: 'lamp', icon: 'sensors_off' };
  if ((belowKinds as readonly AlertKind[]).includes(kind)) return { tone: 'frost', icon: 'arrow_downward' };
  return { tone: 'ember', icon: 'arrow_upward' };
}
