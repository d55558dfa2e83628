import type { Request, Response } from 'express';
import multer, { MulterError, type StorageEngine } from 'multer';
import { RequestProblem } from './request-problem';

/** Takes the bytes of an uploaded file as they come. */
export type UploadReceiver<T> = (fileName: string, bytes: AsyncIterable<Buffer>) => Promise<T>;

/**
 * Receives the one file of a multipart request, handing its bytes on as they come; nothing touches the disk here.
 *
 * @param req - The request, its body not yet read.
 * @param res - Its answer.
 * @param maxBytes - Largest file.
 * @param receive - Takes the bytes; it has to read them to the end or throw.
 * @returns What the receiver returned.
 * @throws {@link RequestProblem} 413 for a larger file, 422 without a file in field `file`, 415 for another kind of body.
 */
export async function receiveUpload<T>(
  req: Request,
  res: Response,
  maxBytes: number,
  receive: UploadReceiver<T>,
): Promise<T> {
  if (req.is('multipart/form-data') === false) {
    throw new RequestProblem(
      415,
      'NOT_MULTIPART',
      'Send the file as multipart/form-data, in the field “file”.',
    );
  }
  const storage = new ReceiverStorage(receive, maxBytes);
  const upload = multer({
    storage,
    limits: { fileSize: maxBytes, files: 1, fields: 10, fieldSize: 10_000, headerPairs: 100 },
    defParamCharset: 'utf8',
  }).single('file');
  await new Promise<void>((resolve, reject) => {
    upload(req, res, (error: unknown) => {
      if (error === undefined || error === null) resolve();
      else reject(problemOf(storage.failure ?? error, maxBytes));
    });
  });
  if (storage.received === null) {
    throw new RequestProblem(422, 'NO_FILE', 'Choose a file: the request has none in its field “file”.');
  }
  return storage.received.value;
}

class ReceiverStorage<T> implements StorageEngine {
  received: { readonly value: T } | null = null;
  failure: unknown = null;

  constructor(
    private readonly receive: UploadReceiver<T>,
    private readonly maxBytes: number,
  ) {}

  _handleFile(_req: Request, file: Express.Multer.File, done: (error?: unknown) => void): void {
    const { stream } = file;
    this.receive(plainName(file.originalname), whole(stream, this.maxBytes)).then(
      (value) => {
        this.received = { value };
        done(null);
      },
      (error: unknown) => {
        this.failure = error;
        stream.resume(); // The rest of the request still has to go somewhere.
        done(error);
      },
    );
  }

  _removeFile(_req: Request, _file: Express.Multer.File, done: (error: Error | null) => void): void {
    // What was received is gone already: its transaction was rolled back.
    done(null);
  }
}

/** The bytes of a stream, which must not have been cut off at the limit. */
async function* whole(stream: NodeJS.ReadableStream, maxBytes: number): AsyncGenerator<Buffer> {
  for await (const bytes of stream) yield bytes as Buffer;
  if ((stream as { truncated?: boolean }).truncated === true) throw tooLarge(maxBytes);
}

function tooLarge(maxBytes: number): RequestProblem {
  const megabytes = (maxBytes / 1_000_000).toLocaleString('en', { maximumFractionDigits: 1 });
  return new RequestProblem(
    413,
    'FILE_TOO_LARGE',
    `The file is larger than ${megabytes} MB. Nothing was kept.`,
  );
}

function problemOf(error: unknown, maxBytes: number): unknown {
  if (!(error instanceof MulterError)) return error;
  if (error.code === 'LIMIT_FILE_SIZE') return tooLarge(maxBytes);
  return new RequestProblem(422, 'BAD_UPLOAD', 'Send one file, in the field “file”.');
}

/** A name as text: without folders and control characters, of a bearable length. */
function plainName(name: string): string {
  const base = name.slice(Math.max(name.lastIndexOf('/'), name.lastIndexOf('\\')) + 1);
  const text = base.replace(/[\u0000-\u001f\u007f-\u009f\u2028\u2029\u202a-\u202e\u2066-\u2069]/g, '').trim();
  return text === '' ? 'unnamed' : text.slice(0, 200);
}
