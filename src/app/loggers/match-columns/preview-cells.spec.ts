import { fileSeries, loggerFileDetail, previewRow } from '../testing/logger-file-builder';
import { previewLines } from './preview-cells';

const shown = (changes: Parameters<typeof loggerFileDetail>[0]) => previewLines(loggerFileDetail(changes));

describe('the preview of a file', () => {
  it('shows what a value becomes only where its unit changes', () => {
    expect(shown({})[0]?.cells.map(({ converted }) => converted)).toEqual([null, '19.39']);
    expect(shown({ series: [fileSeries({ unit: '°C' })] })[0]?.cells[1]?.converted).toBeNull();
    expect(shown({ series: [] })[0]?.cells[1]?.converted).toBeNull();
  });

  it('shows zero as a value', () => {
    expect(shown({ preview: [previewRow({ values: { 1: 0 } })] })[0]?.cells[1]?.converted).toBe('0.00');
  });

  it('marks a problem in its cell, or on the line where it has none', () => {
    const [inCell, onLine] = shown({
      preview: [
        previewRow({ problem: { column: 2, message: 'Not a number' } }),
        previewRow({ problem: { column: null, message: 'Too few cells' } }),
      ],
    });
    expect(inCell?.cells.map(({ problem }) => problem)).toEqual([null, 'Not a number']);
    expect(inCell).toMatchObject({ hasProblem: true, problem: null });
    expect(onLine?.cells.map(({ problem }) => problem)).toEqual([null, null]);
    expect(onLine).toMatchObject({ hasProblem: true, problem: 'Too few cells' });
  });

  it('keeps a cell that is missing empty, and tells where lines are left out', () => {
    const lines = shown({
      preview: [
        previewRow({ line: 15, cells: ['x'] }),
        previewRow({ line: 16 }),
        previewRow({ line: 40_318, part: 'last' }),
      ],
    });
    expect(lines[0]?.cells[1]?.text).toBe('');
    expect(lines.map(({ isAfterGap }) => isAfterGap)).toEqual([false, false, true]);
  });
});
