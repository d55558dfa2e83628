import { libraryCrop } from '../testing/library-crop';
import { climateGroups, emergenceTable, growthFacts, seedFacts, sowingFacts, type Fact } from './crop-facts';

const onion = libraryCrop('onion-long-day');
const named = (facts: readonly Fact[], name: string): Fact => {
  const fact = facts.find((one) => one.name === name);
  if (fact === undefined) throw new Error(`no fact ${name}`);
  return fact;
};

describe('what is known of a crop', () => {
  it('stands source by source where sources disagree', () => {
    const raising = named(sowingFacts(onion), 'From sowing to a plant that can go out');
    // Delaware 9–12, Utah 8–12, Purdue 10–12, Cornell 6–8 weeks.
    expect(raising.figures.map(({ text }) => text)).toEqual([
      '9 to 12 weeks',
      '8 to 12 weeks',
      '10 to 12 weeks',
      '6 to 8 weeks',
    ]);
    expect(raising.figures[3]?.source).toMatch(/Cornell/);
  });

  it('says where nobody published a figure, and where one could be put', () => {
    const brightness = named(climateGroups(onion, '°C')[0]?.facts ?? [], 'Brightness');
    expect(brightness.figures).toEqual([]);
    expect(brightness.addTo?.figure).toBeNull();
  });

  it('has days and shares by warmth in one table, with none where nothing came up', () => {
    const rows = emergenceTable(onion, '°C');
    // Harrington & Minges (1954): onion takes 136 days at 0 °C and 6 at 20 °C; none comes up at 40 °C.
    expect(rows.map(({ at }) => at.replace('\u00a0', ' '))).toContain('20 °C');
    expect(rows.find(({ at }) => at.startsWith('0'))?.days).toBe('136');
    expect(rows.at(-1)?.days).toBe('none');
  });

  it('tells temperatures in the reader’s unit', () => {
    // 65–70 °F by Delaware, Utah and Cornell; stored as 18.3–21.1 °C.
    const air = named(climateGroups(onion, '°F')[1]?.facts ?? [], 'Air with lamps on');
    expect(air.figures[0]?.text.replaceAll('\u2060', '')).toBe('65–70\u00a0°F');
  });

  it('has no seed where none is sown', () => {
    const cutting = libraryCrop('onion-long-day', { seed: null });
    expect(seedFacts(cutting, '°C')).toEqual([]);
    expect(emergenceTable(cutting, '°C')).toEqual([]);
  });

  it('says what the length of the day does', () => {
    expect(named(growthFacts(onion, '°C'), 'Length of the day').figures[0]?.text).toContain(
      'forms bulbs from 14',
    );
  });
});
