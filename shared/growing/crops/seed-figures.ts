import { celsiusFromFahrenheit } from './celsius-from-fahrenheit';
import type { GerminationTemperatures, LightToGerminate, SeedFigures } from './crop';
import { cited, span, type Figure, type Span } from './figure';
import {
  emergenceDays,
  HARRINGTON_MINGES,
  trialTemperaturesC,
  type EmergenceDays,
} from './published/emergence-days';
import {
  germinationTemperaturesF,
  HARRINGTON_OREGON,
  MASTER_GARDENER_GN154,
  otherGerminationTemperaturesF,
  type PrintedTemperatures,
} from './published/germination-temperatures';
import {
  FEDERAL_MINIMUM,
  federalMinimumPct,
  NEW_HAMPSHIRE_MINIMUM,
  newHampshireMinimumPct,
} from './published/minimum-germination';
import { HARRINGTON_SEEDLINGS, normalSeedlingsPct, type NormalSeedlings } from './published/normal-seedlings';
import {
  KNOTT,
  OLD_SEED_LIFE,
  oldSeedLifeYears,
  OTHER_SEED_LIFE,
  otherSeedLifeYears,
  seedLifeYears,
} from './published/seed-life';
import {
  BIERHUIZEN_WAGENVOORT,
  BREWSTER,
  emergenceThermalTimes,
  onionOnPaper,
  type ThermalTime,
} from './published/thermal-times';

/** Name of a row in at least one of the published tables. */
export type PublishedRow =
  | keyof typeof emergenceDays
  | keyof typeof germinationTemperaturesF
  | keyof typeof emergenceThermalTimes
  | keyof typeof seedLifeYears
  | keyof typeof otherSeedLifeYears
  | keyof typeof federalMinimumPct
  | keyof typeof newHampshireMinimumPct;

/** What the tables do not say of a crop's seed. */
export interface OwnSeedFigures {
  readonly depthMm: Figure<Span> | null;
  readonly light: Figure<LightToGerminate> | null;
  /** A row taken where the crop's own is missing, and in words that it is: "leek taken as onion". */
  readonly standIn?: { readonly row: PublishedRow; readonly words: string };
  /** Temperatures where no table has any. */
  readonly temperatures?: Figure<GerminationTemperatures>;
}

/** Looks a row up in one of the tables, with its source. */
type RowReader = <T>(table: Readonly<Record<string, T>>, source: string) => Figure<T> | null;

/**
 * Gathers what the published tables say of a crop's seed.
 *
 * @param row - The crop's name in the tables; a table that lacks it has no figure.
 * @param own - What they do not say.
 * @returns Figures with their sources.
 */
export function seedFigures(row: PublishedRow, own: OwnSeedFigures): SeedFigures {
  const ownRow = readerOf(row, '');
  const anyRow: RowReader = (table, source) =>
    ownRow(table, source) ??
    (own.standIn === undefined
      ? null
      : readerOf(own.standIn.row, `; ${own.standIn.words} (assumption)`)(table, source));
  return {
    emergence: emergenceFigure(anyRow),
    normalSeedlings: seedlingsFigure(anyRow),
    temperatures: temperatureFigures(ownRow, anyRow, own.temperatures),
    thermalTimes: thermalTimeFigures(row, anyRow),
    depthMm: own.depthMm,
    light: own.light,
    lifeYears: lifeFigures(anyRow),
    minimumGerminationPct:
      anyRow<number>(federalMinimumPct, FEDERAL_MINIMUM) ??
      anyRow<number>(newHampshireMinimumPct, NEW_HAMPSHIRE_MINIMUM),
  };
}

/**
 * What the tables say of herb seed: as {@link seedFigures}, and New Hampshire's minimum for all herbs that it does not
 * name.
 */
export function herbSeedFigures(row: PublishedRow | null, own: OwnSeedFigures): SeedFigures {
  const { otherHerb } = newHampshireMinimumPct;
  const figures = seedFigures(row ?? 'otherHerb', own);
  return {
    ...figures,
    minimumGerminationPct:
      figures.minimumGerminationPct ?? cited(otherHerb, `${NEW_HAMPSHIRE_MINIMUM}, herbs not named`),
  };
}

function readerOf(row: string, remark: string): RowReader {
  return (table, source) => {
    const value = table[row];
    return value === undefined ? null : cited(value, source + remark);
  };
}

function emergenceFigure(read: RowReader): SeedFigures['emergence'] {
  const row = read<EmergenceDays>(emergenceDays, HARRINGTON_MINGES);
  if (row === null) return null;
  const value = trialTemperaturesC.flatMap((temperatureC, index) => {
    const days = row.value[index] ?? null;
    return days === null ? [] : [{ temperatureC, days: days === 'none' ? null : days }];
  });
  return { ...row, value };
}

function seedlingsFigure(read: RowReader): SeedFigures['normalSeedlings'] {
  const row = read<NormalSeedlings>(normalSeedlingsPct, HARRINGTON_SEEDLINGS);
  if (row === null) return null;
  const value = trialTemperaturesC.flatMap((temperatureC, index) => {
    const percent = row.value[index] ?? null;
    return percent === null ? [] : [{ temperatureC, percent }];
  });
  return { ...row, value };
}

function temperatureFigures(
  ownRow: RowReader,
  anyRow: RowReader,
  own: Figure<GerminationTemperatures> | undefined,
): Figure<GerminationTemperatures>[] {
  const printed = [
    ownRow<PrintedTemperatures>(germinationTemperaturesF, HARRINGTON_OREGON),
    ownRow<PrintedTemperatures>(otherGerminationTemperaturesF, MASTER_GARDENER_GN154),
  ].filter((figure) => figure !== null);
  if (printed.length > 0) return printed.map(inCelsius);
  if (own !== undefined) return [own];
  const standIn = anyRow<PrintedTemperatures>(germinationTemperaturesF, HARRINGTON_OREGON);
  return standIn === null ? [] : [inCelsius(standIn)];
}

function inCelsius({ value, source }: Figure<PrintedTemperatures>): Figure<GerminationTemperatures> {
  const [low, high] = value.optimumF;
  return cited(
    {
      minC: celsiusFromFahrenheit(value.minF),
      optimumC: span(celsiusFromFahrenheit(low), celsiusFromFahrenheit(high)),
      bestC: value.bestF === null ? null : celsiusFromFahrenheit(value.bestF),
      maxC: celsiusFromFahrenheit(value.maxF),
    },
    source,
  );
}

function thermalTimeFigures(row: PublishedRow, read: RowReader): Figure<ThermalTime>[] {
  const inSoil = read<ThermalTime>(emergenceThermalTimes, BIERHUIZEN_WAGENVOORT);
  const onPaper = row === 'onion' ? cited(onionOnPaper, BREWSTER) : null;
  return [onPaper, inSoil].filter((figure) => figure !== null);
}

function lifeFigures(read: RowReader): Figure<Span>[] {
  return [
    read<number>(seedLifeYears, KNOTT),
    read<number>(otherSeedLifeYears, OTHER_SEED_LIFE),
    read<number>(oldSeedLifeYears, OLD_SEED_LIFE),
  ].flatMap((figure) => (figure === null ? [] : [{ ...figure, value: span(figure.value) }]));
}
