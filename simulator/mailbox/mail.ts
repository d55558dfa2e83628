import { simpleParser, type AddressObject } from 'mailparser';

/** A file that came with a mail; the mailbox names it and does not keep it. */
export interface Attachment {
  readonly name: string;
  readonly bytes: number;
}

/** A mail that has arrived. */
export interface ReceivedMail {
  /** Number in order of arrival, as text. */
  readonly id: string;
  readonly receivedAt: string;
  readonly from: string;
  /** Everyone it was handed over for, copies included. */
  readonly to: readonly string[];
  readonly subject: string;
  readonly messageId: string | null;
  /** Message ids that it answers or follows. */
  readonly references: readonly string[];
  readonly text: string | null;
  readonly html: string | null;
  readonly attachments: readonly Attachment[];
  /** The mail as it came. */
  readonly source: string;
}

/**
 * Reads a mail as it came over SMTP.
 *
 * @param source - The mail with its headers.
 * @param envelope - What the sender said before it, and our own number and time for it.
 */
export async function readMail(
  source: Buffer,
  envelope: Pick<ReceivedMail, 'id' | 'receivedAt' | 'to'> & { readonly from: string },
): Promise<ReceivedMail> {
  const parsed = await simpleParser(source, { skipHtmlToText: true });
  const references = [parsed.inReplyTo ?? [], parsed.references ?? []].flat();
  return {
    ...envelope,
    from: addressText(parsed.from) ?? envelope.from,
    subject: parsed.subject ?? '',
    messageId: parsed.messageId ?? null,
    references: [...new Set(references)],
    text: parsed.text ?? null,
    html: typeof parsed.html === 'string' ? parsed.html : null,
    attachments: parsed.attachments.map(({ filename, size }) => ({
      name: filename ?? 'unnamed',
      bytes: size,
    })),
    source: source.toString('utf8'),
  };
}

function addressText(from: AddressObject | undefined): string | undefined {
  const [sender] = from?.value ?? [];
  if (sender?.address === undefined) return undefined;
  return sender.name === '' ? sender.address : `${sender.name} <${sender.address}>`;
}
