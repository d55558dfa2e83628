import type { Crop, CropFigures } from '@shared/contracts/crops';
import { withSeed } from './seed-slots';

/** One row: what holds at a temperature. */
export interface TableRow {
  /** [°C] */
  readonly temperatureC: number;
  /** Null where the cell is empty. */
  readonly value: number | null;
}

/** A figure of a crop that is a table by the warmth of the mix. */
export interface TableSlot {
  readonly kind: 'table';
  readonly title: string;
  /** Heading of the second column. */
  readonly column: string;
  readonly help: string;
  /** Least and most of the second column. */
  readonly bounds: readonly [least: number, most: number];
  /** Whether an empty cell says something. */
  readonly mayBeEmpty: boolean;
  /** Null where there is none yet. */
  readonly figure: { readonly rows: readonly TableRow[]; readonly source: string } | null;
  /** The crop's figures with another one here; null takes it away. Only for rows that fit. */
  readonly with: (
    figure: { readonly rows: readonly TableRow[]; readonly source: string } | null,
  ) => CropFigures;
}

/** Days until it is up by the warmth of the mix; null for a crop without seed. */
export function emergenceSlot(crop: Crop): TableSlot | null {
  const { seed } = crop;
  if (seed === null) return null;
  return {
    kind: 'table',
    title: 'Emergence by the warmth of the mix',
    column: 'Days until up',
    help: 'Days from sowing until seedlings are up, at a steady warmth. An empty field says that none comes up there. Forecasts go by it.',
    bounds: [0.5, 400],
    mayBeEmpty: true,
    figure: seed.emergence && {
      rows: seed.emergence.value.map(({ temperatureC, days: value }) => ({ temperatureC, value })),
      source: seed.emergence.source,
    },
    with: (figure) =>
      withSeed(crop, {
        emergence: figure && {
          value: figure.rows.map(({ temperatureC, value: days }) => ({ temperatureC, days })),
          source: figure.source,
        },
      }),
  };
}

/** Share of normal seedlings by the warmth of the mix; null for a crop without seed. */
export function seedlingsSlot(crop: Crop): TableSlot | null {
  const { seed } = crop;
  if (seed === null) return null;
  return {
    kind: 'table',
    title: 'Normal seedlings by the warmth of the mix',
    column: 'Normal seedlings, %',
    help: 'Of all seeds sown, those that make sound seedlings at a steady warmth.',
    bounds: [0, 100],
    mayBeEmpty: false,
    figure: seed.normalSeedlings && {
      rows: seed.normalSeedlings.value.map(({ temperatureC, percent: value }) => ({ temperatureC, value })),
      source: seed.normalSeedlings.source,
    },
    with: (figure) =>
      withSeed(crop, {
        normalSeedlings: figure && {
          value: figure.rows.map(({ temperatureC, value }) => ({ temperatureC, percent: value ?? 0 })),
          source: figure.source,
        },
      }),
  };
}
