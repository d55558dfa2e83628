import type { IncomingMessage } from 'node:http';

const LARGEST_BODY_BYTES = 10_000;

/**
 * Reads the JSON of a small request.
 *
 * @returns What was sent; `undefined` when it is not JSON or longer than 10 kB, so that a schema refuses it.
 */
export async function readJsonBody(request: IncomingMessage): Promise<unknown> {
  const chunks: Buffer[] = [];
  let bytes = 0;
  for await (const chunk of request as AsyncIterable<Buffer>) {
    bytes += chunk.length;
    if (bytes > LARGEST_BODY_BYTES) return undefined;
    chunks.push(chunk);
  }
  try {
    return JSON.parse(Buffer.concat(chunks).toString('utf8')) as unknown;
  } catch {
    return undefined; // Malformed JSON is refused like any other wrong body.
  }
}
