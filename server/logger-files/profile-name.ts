/**
 * A name for the profile, or the made-up device, of a file.
 *
 * @param fileName - Of the file.
 * @returns The name without its ending, one line, at most 80 characters.
 */
export function profileNameOf(fileName: string): string {
  const stem = fileName.replace(/\.[A-Za-z0-9]{1,5}$/, '').trim();
  return stem === '' ? 'Logger file' : stem.slice(0, 80).trim();
}
