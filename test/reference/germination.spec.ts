import { cropById } from '@shared/growing/crops/crop-library';

/** Thermal time [°C·d] that Harrington & Minges' days amount to above a base. */
function thermalTimesOf(id: string, baseC: number, fromC: number, toC: number): number[] {
  const emergence = cropById(id)?.seed?.emergence?.value ?? [];
  return emergence
    .filter(({ temperatureC }) => temperatureC >= fromC && temperatureC <= toC)
    .map(({ temperatureC, days }) => (days ?? NaN) * (temperatureC - baseC));
}

describe('the two published families of emergence', () => {
  // Sums of Bierhuizen & Wagenvoort (1974), from memory, against the days of Harrington & Minges (1954). The expected
  // ends were worked out by hand from both tables, to whole °C·d.
  it.each([
    ['tomato', 15, 25, 88, 98],
    ['sweet-pepper', 20, 20, 182, 182],
    ['carrot', 10, 25, 131, 148],
    ['lettuce-head', 15, 25, 43, 50],
    ['onion-long-day', 5, 25, 93, 112],
  ])('for %s at %d to %d °C give %d to %d °C·d at the remembered base', (id, fromC, toC, least, most) => {
    const inSoil = cropById(id)?.seed?.thermalTimes.at(-1)?.value;
    const sums = thermalTimesOf(id, inSoil?.baseC ?? NaN, fromC, toC);

    expect(Math.round(Math.min(...sums))).toBe(least);
    expect(Math.round(Math.max(...sums))).toBe(most);
  });

  it('put onion on paper at 4 days at 22.5 °C and 16 at 7.5 °C (Brewster 2008)', () => {
    const onPaper = cropById('onion-long-day')?.seed?.thermalTimes[0]?.value;
    const daysAt = (temperatureC: number) =>
      (onPaper?.sumCD ?? NaN) / (temperatureC - (onPaper?.baseC ?? NaN));

    expect(daysAt(22.5)).toBe(4);
    expect(daysAt(7.5)).toBe(16);
  });
});
