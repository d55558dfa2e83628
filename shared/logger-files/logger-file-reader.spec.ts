import { LoggerFileError } from './logger-file-error';
import { createLoggerFileReader } from './logger-file-reader';
import type { LoggerFileShape } from './logger-file-shape';
import { recogniseLoggerFile } from './recognise-logger-file';
import { shapeFingerprint } from './shape-fingerprint';

function bytes(...lines: string[]): Uint8Array {
  return Buffer.from(lines.map((line) => `${line}\n`).join(''));
}

function recognise(content: Uint8Array): LoggerFileShape {
  return recogniseLoggerFile(content, { zone: 'UTC', truncated: false }).shape;
}

function valuesOf(content: Uint8Array, shape: LoggerFileShape): number[] {
  const values: number[] = [];
  const sink = {
    onReading: (_: unknown, __: number, value: number) => values.push(value),
    onRejected: () => undefined,
  };
  const reader = createLoggerFileReader(shape, sink);
  reader.write(content);
  reader.end();
  return values;
}

const unnamed = bytes('2026-01-20 08:00,21.5,60', '2026-01-20 08:10,21.6,61');

describe('createLoggerFileReader', () => {
  it('with columns that the person has named, reads what was unnamed', () => {
    const shape = recognise(unnamed);
    const columns = shape.columns.map((column) =>
      column.index === 1 ? { ...column, quantity: 'airTemperature' as const, unit: '°C' as const } : column,
    );
    expect(valuesOf(unnamed, { ...shape, columns })).toEqual([21.5, 21.6]);
  });

  it('with a shape that was kept as JSON, reads the same', () => {
    const content = bytes('Time,Temperature (°C)', '2026-01-20 08:00,21.5');
    const kept = JSON.parse(JSON.stringify(recognise(content))) as LoggerFileShape;
    expect(kept).toEqual(recognise(content));
    expect(valuesOf(content, kept)).toEqual([21.5]);
  });

  it('with elapsed time and no start, is refused before anything is read', () => {
    const shape = recognise(bytes('Elapsed (s),Temperature (°C)', '0,21.5', '60,21.6'));
    const sink = { onReading: () => undefined, onRejected: () => undefined };
    expect(() => createLoggerFileReader(shape, sink)).toThrow(LoggerFileError);
  });

  it('with a refused cell of any length, hands on at most 80 characters of it', () => {
    const content = bytes(
      'Time,Temperature (°C)',
      '2026-01-20 08:00,21.5',
      `2026-01-20 08:10,${'x'.repeat(5000)}`,
    );
    const texts: string[] = [];
    const sink = { onReading: () => undefined, onRejected: ({ text }: { text: string }) => texts.push(text) };
    const reader = createLoggerFileReader(recognise(content), sink);
    reader.write(content);
    expect(reader.end().rejected).toBe(1);
    expect(texts).toEqual(['x'.repeat(80)]);
  });
});

describe('shapeFingerprint', () => {
  const header = 'Time,Temperature (°C),Humidity (%)';
  const one = recognise(bytes(header, '2026-01-20 08:00,21.5,60'));

  it('of another file of the same layout, is the same', () => {
    const other = recognise(
      bytes('Shelf 3', '', header, '2026-02-01 09:00,19.5,70', '2026-02-01 09:10,19.4,71'),
    );
    expect(shapeFingerprint(other)).toBe(shapeFingerprint(one));
  });

  it('of a file with another column, differs', () => {
    const other = recognise(bytes(`${header},Light (lx)`, '2026-01-20 08:00,21.5,60,100'));
    expect(shapeFingerprint(other)).not.toBe(shapeFingerprint(one));
  });
});
