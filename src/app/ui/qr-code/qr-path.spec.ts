import jsQR from 'jsqr';
import { qrPath } from './qr-path';

const quiet = 4;
const pixels = 4;

/** Draws the path as a printer would and has it read by another program. */
function read({ size, d }: ReturnType<typeof qrPath>): string | undefined {
  const side = (size + 2 * quiet) * pixels;
  const picture = new Uint8ClampedArray(side * side * 4).fill(255);
  for (const [, from, row, length] of d.matchAll(/M(\d+) (\d+)h(\d+)v1h-\d+z/g)) {
    for (let y = 0; y < pixels; y += 1) {
      for (let x = 0; x < Number(length) * pixels; x += 1) {
        const at = ((Number(row) + quiet) * pixels + y) * side + (Number(from) + quiet) * pixels + x;
        picture.set([0, 0, 0], at * 4);
      }
    }
  }
  return jsQR(picture, side, side)?.data;
}

describe('a QR code', () => {
  it.each([
    'http://127.0.0.1:4280/plantings/0b6f6c0e-0000-4000-8000-0000000001f4',
    'https://room.example.org/plantings/9f0c3a52-7c3f-4b43-9a58-5d4a3d1f0c11',
    'short',
  ])('of %s is read as that by another program', (text) => {
    expect(read(qrPath(text))).toBe(text);
  });

  it('of an address is small enough for a plant label: at most 41 squares a side', () => {
    expect(qrPath('https://room.example.org/plantings/9f0c3a52-7c3f-4b43-9a58-5d4a3d1f0c11').size).toBe(37);
  });
});
