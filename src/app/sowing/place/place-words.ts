import { formatNumber } from '@shared/format/numbers';

/** A place as maps write it: "53.3° N, 6.3° W". */
export function placeText(latitudeDeg: number, longitudeDeg: number | null): string {
  const latitude = degrees(latitudeDeg, 'N', 'S');
  return longitudeDeg === null ? latitude : `${latitude}, ${degrees(longitudeDeg, 'E', 'W')}`;
}

function degrees(value: number, above: string, below: string): string {
  return `${formatNumber(Math.abs(value), 1)}°\u00a0${value < 0 ? below : above}`;
}
