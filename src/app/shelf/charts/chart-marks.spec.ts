import { alert, inventedId } from '../../core/testing/board-builder';
import { chartMarks, eventText } from './chart-marks';

const span = { from: Date.parse('2026-12-01T00:00:00Z'), to: Date.parse('2026-12-02T00:00:00Z') };
const watered = (at: string) => ({
  id: inventedId(600),
  shelfId: inventedId(1),
  at,
  kind: 'watered' as const,
  text: '0.8 L from below',
  personName: null,
});

describe('the marks of a chart', () => {
  it('are events and alerts about its quantity within the span, in order', () => {
    const events = [
      watered('2026-12-01T18:00:00Z'),
      watered('2026-12-02T00:00:00Z'),
      watered('2026-11-30T23:59:59Z'),
    ];
    const alerts = [alert(), alert({ quantity: 'relativeHumidity' })];
    const marks = chartMarks('airTemperature', events, alerts, span, ({ shelfLabel }) => shelfLabel);
    expect(marks).toEqual([
      { at: Date.parse('2026-12-01T13:54:00Z'), icon: 'arrow_upward', text: 'A1' },
      { at: Date.parse('2026-12-01T18:00:00Z'), icon: 'water_drop', text: 'Watered: 0.8 L from below' },
    ]);
  });

  it('say the kind of an event once', () => {
    expect(eventText({ kind: 'watered', text: 'Watered, 0.8 L' })).toBe('Watered, 0.8 L');
    expect(eventText({ kind: 'picked', text: 'Trimmed, picked 212 g' })).toBe('Trimmed, picked 212 g');
    expect(eventText({ kind: 'picked', text: '212 g' })).toBe('Picked: 212 g');
  });
});
