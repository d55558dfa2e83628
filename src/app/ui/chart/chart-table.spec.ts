import type { ChartLine } from './chart-data';
import { chartSummary } from './chart-summary';
import { chartCsv, chartTable } from './chart-table';

const dublin = 'Europe/Dublin';
const start = Date.UTC(2026, 11, 1, 14);
const minute = 60_000;

function line(values: (number | null)[], overrides: Partial<ChartLine> = {}): ChartLine {
  const points = values.map((value, index) => [start + index * minute, value, value, value] as const);
  return { name: 'Air', unit: '°C', decimals: 1, points, ...overrides };
}

describe('the table of a chart', () => {
  it('has a row a point while there are few, and a dash for a gap', () => {
    const { columns, rows } = chartTable([line([20, null, 0])], dublin);
    expect(columns).toEqual(['Air, °C']);
    expect(rows).toEqual([
      { when: 'Tue 1 Dec, 14:00', cells: ['20.0'] },
      { when: 'Tue 1 Dec, 14:01', cells: ['–'] },
      { when: 'Tue 1 Dec, 14:02', cells: ['0.0'] },
    ]);
  });

  it('keeps every lowest and highest value when it is thinned', () => {
    const values = Array.from({ length: 1000 }, () => 20);
    values[501] = 31;
    values[502] = 4;
    const { rows } = chartTable([line(values)], dublin);
    expect(rows.length).toBeLessThanOrEqual(48);
    expect(rows.flatMap(({ cells }) => cells)).toContain('4.0 to 31.0');
  });

  it('sets lines with points at different times side by side', () => {
    const other = line([5], { name: 'Root zone', points: [[start + minute, 5, 4, 6]] });
    expect(chartTable([line([20, 21]), other], dublin).rows).toEqual([
      { when: 'Tue 1 Dec, 14:00', cells: ['20.0', '–'] },
      { when: 'Tue 1 Dec, 14:01', cells: ['21.0', '4.0 to 6.0'] },
    ]);
  });
});

describe('the CSV file of a chart', () => {
  it('has UTC and room time, an empty cell for a gap, and no live formula in a name', () => {
    const csv = chartCsv([line([20.25, null], { name: '=SUM(A1)' })], dublin);
    expect(csv.split('\r\n')).toEqual([
      "Time (UTC),Time (Europe/Dublin),'=SUM(A1) mean [°C],'=SUM(A1) lowest [°C],'=SUM(A1) highest [°C]",
      '2026-12-01T14:00:00.000Z,"Tue 1 Dec, 14:00",20.25,20.25,20.25',
      '2026-12-01T14:01:00.000Z,"Tue 1 Dec, 14:01",,,',
      '',
    ]);
  });
});

describe('the words for a chart', () => {
  const wanted = [{ from: start, to: start + 10 * minute, low: 20, high: 26 }];
  const said = (values: (number | null)[]): string =>
    chartSummary([line(values)], wanted, dublin).replaceAll('\u00a0', ' ');

  it('say the span, the last value against the range, the lowest and the highest', () => {
    expect(said([19, 28.3, null])).toBe(
      'Chart from Tue 1 Dec, 14:00 to Tue 1 Dec, 14:02. Air: last 28.3 °C, above the wanted range, lowest 19.0 °C, highest 28.3 °C.',
    );
  });

  it('say when there is nothing to show', () => {
    expect(said([])).toBe('Chart without readings.');
    expect(said([null])).toContain('Air: no readings.');
  });
});
