/**
 * The bytes of an upload that is small enough to be held.
 *
 * @param stream - As it comes, already limited in size.
 */
export async function wholeUpload(stream: AsyncIterable<Buffer>): Promise<Buffer> {
  const parts: Buffer[] = [];
  for await (const part of stream) parts.push(part);
  return Buffer.concat(parts);
}
