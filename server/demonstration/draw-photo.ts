import sharp from 'sharp';

const WIDTH = 1200;
const HEIGHT = 900;
const ROWS = 4;
const PLACES = 6;

/**
 * Draws a tray of seedlings from above the edge, in place of a photo: the demonstration is invented, and so are its pictures.
 *
 * @param up - Seedlings that stand, of the 24 places of the tray.
 * @returns The drawing as a JPEG.
 */
export function drawTray(up: number): Promise<Buffer> {
  const places = Array.from({ length: ROWS * PLACES }, (_, place) => {
    const row = Math.floor(place / PLACES);
    const x = 190 + (place % PLACES) * 160 + (row % 2) * 24;
    return { x, y: 330 + row * 145, place };
  });
  // Every fifth place first, so that what is up is scattered as seedlings are.
  const isUp = (place: number): boolean => (place * 5) % (ROWS * PLACES) < up;
  const crumbs = places.map(
    ({ x, y }) => `<ellipse cx="${x}" cy="${y + 4}" rx="30" ry="11" fill="#46342a"/>`,
  );
  const blades = places.filter(({ place }) => isUp(place)).map(({ x, y, place }) => blade(x, y, place));
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${WIDTH}" height="${HEIGHT}">
    <rect width="${WIDTH}" height="${HEIGHT}" fill="#d9d4c7"/>
    <rect x="60" y="180" width="1080" height="660" rx="28" fill="#2f3b37"/>
    <rect x="96" y="214" width="1008" height="592" rx="16" fill="#5b4636"/>
    ${crumbs.join('')}${blades.join('')}
  </svg>`;
  return sharp(Buffer.from(svg)).jpeg({ quality: 82 }).toBuffer();
}

/** A seedling still bent over, as alliums come up; each a little different. */
function blade(x: number, y: number, place: number): string {
  const lean = ((place * 37) % 40) - 20;
  const height = 90 + ((place * 29) % 50);
  const tip = `${x + lean} ${y - height}`;
  return `<path d="M${x} ${y} Q ${tip} ${x + lean * 2} ${y - height * 0.55}" fill="none" stroke="#4f8f4a"
    stroke-width="9" stroke-linecap="round"/>`;
}
