import { FaultSwitch } from './fault-switch';
import { MailArchive } from './mail-archive';
import { startMailboxWeb } from './mailbox-web';
import { startSmtpReceiver } from './smtp-receiver';

const KEPT_MAILS = 1000;

/** A running mailbox. */
export interface Mailbox {
  readonly smtpPort: number;
  /** Where its pages are. */
  readonly address: string;
  stop(): Promise<void>;
}

/**
 * Starts the mailbox, which plays the hosted mail service: takes every mail by SMTP and shows what would have gone out.
 *
 * @param ports - Ports on loopback; 0 for any that is free.
 * @throws The network's error when a port is taken.
 */
export async function startMailbox(ports: { smtpPort: number; httpPort: number }): Promise<Mailbox> {
  const archive = new MailArchive(KEPT_MAILS);
  const faults = new FaultSwitch();
  const smtp = await startSmtpReceiver(archive, faults, ports.smtpPort);
  const web = await startMailboxWeb(archive, faults, ports.httpPort).catch(async (error: unknown) => {
    await smtp.stop();
    throw error;
  });
  return {
    smtpPort: smtp.port,
    address: web.address,
    stop: async () => {
      await Promise.all([smtp.stop(), web.stop()]);
    },
  };
}
