import type { ReceivedMail } from './mail';

/** Which mails are looked for; parts of an address or subject in any case. */
export interface MailQuery {
  readonly to?: string | undefined;
  readonly subject?: string | undefined;
}

interface Conversation {
  readonly mails: ReceivedMail[];
  readonly names: string[];
}

/** The mails that have arrived, newest first; beyond a number the oldest go. */
export class MailArchive {
  private mails: readonly ReceivedMail[] = [];

  /** @param capacity - Mails kept at most. */
  constructor(private readonly capacity: number) {}

  /** Puts a mail before the others. */
  add(mail: ReceivedMail): void {
    this.mails = [mail, ...this.mails].slice(0, this.capacity);
  }

  /** Mails that fit, newest first. */
  find({ to = '', subject = '' }: MailQuery = {}): readonly ReceivedMail[] {
    return this.mails.filter(
      (mail) => mail.to.some((address) => contains(address, to)) && contains(mail.subject, subject),
    );
  }

  /** The mail of this number, if it is still there. */
  get(id: string): ReceivedMail | undefined {
    return this.mails.find((mail) => mail.id === id);
  }

  /**
   * Mails by conversation: those that answer or follow one another, directly or through mails that never arrived here,
   * by Message-ID, In-Reply-To and References (RFC 5322, 3.6.4).
   *
   * @returns For each mail its conversation, oldest first, the mail itself among them.
   */
  conversations(): ReadonlyMap<ReceivedMail, readonly ReceivedMail[]> {
    const byName = new Map<string, Conversation>();
    const found = new Map<ReceivedMail, readonly ReceivedMail[]>();
    for (const mail of this.mails) {
      found.set(mail, [mail]);
      const joined: Conversation = { mails: [mail], names: namesOf(mail) };
      for (const known of new Set(joined.names.flatMap((name) => byName.get(name) ?? []))) {
        joined.mails.push(...known.mails);
        joined.names.push(...known.names);
      }
      for (const name of joined.names) byName.set(name, joined);
    }
    for (const { mails } of new Set(byName.values())) {
      const ordered = mails.toSorted((a, b) => Number(a.id) - Number(b.id));
      for (const mail of mails) found.set(mail, ordered);
    }
    return found;
  }

  /** Forgets all mails. */
  clear(): void {
    this.mails = [];
  }
}

function namesOf({ messageId, references }: ReceivedMail): string[] {
  return messageId === null ? [...references] : [messageId, ...references];
}

function contains(text: string, part: string): boolean {
  return text.toLowerCase().includes(part.toLowerCase());
}
