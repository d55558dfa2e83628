import { createHmac, timingSafeEqual } from 'node:crypto';
import { mailStops, type MailStop } from '@shared/mail/mail-stop';

/** Whose mails of which room and kind a link stops. */
export interface MailLinkMeaning {
  readonly personId: string;
  readonly roomId: string;
  readonly stops: MailStop;
}

const ID_BYTES = 16;
const SIGNED_BYTES = 2 * ID_BYTES + 1;
const SEAL_BYTES = 16;

/** Makes and reads the tokens of links in mails. They say what they mean and are sealed, so nothing is stored. */
export class MailLinkTokens {
  /** @param secret - Of this installation. */
  constructor(private readonly secret: string) {}

  /** The token of a link; the same for the same meaning, for as long as the secret stays. */
  write({ personId, roomId, stops }: MailLinkMeaning): string {
    const said = Buffer.concat([bytesOf(personId), bytesOf(roomId), Buffer.of(mailStops.indexOf(stops))]);
    return Buffer.concat([said, this.seal(said)]).toString('base64url');
  }

  /** What a token means; null for one that is not ours. */
  read(token: string): MailLinkMeaning | null {
    const bytes = Buffer.from(token, 'base64url');
    if (bytes.length !== SIGNED_BYTES + SEAL_BYTES) return null;
    const said = bytes.subarray(0, SIGNED_BYTES);
    if (!timingSafeEqual(bytes.subarray(SIGNED_BYTES), this.seal(said))) return null;
    const stops = mailStops[said[SIGNED_BYTES - 1] ?? mailStops.length];
    if (stops === undefined) return null;
    return { personId: idOf(said.subarray(0, ID_BYTES)), roomId: idOf(said.subarray(ID_BYTES)), stops };
  }

  private seal(said: Buffer): Buffer {
    return createHmac('sha256', this.secret)
      .update('mail link')
      .update(said)
      .digest()
      .subarray(0, SEAL_BYTES);
  }
}

function bytesOf(id: string): Buffer {
  return Buffer.from(id.replaceAll('-', ''), 'hex');
}

function idOf(bytes: Buffer): string {
  const hex = bytes.subarray(0, ID_BYTES).toString('hex');
  return [hex.slice(0, 8), hex.slice(8, 12), hex.slice(12, 16), hex.slice(16, 20), hex.slice(20)].join('-');
}
