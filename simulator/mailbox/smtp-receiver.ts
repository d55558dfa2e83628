import { once } from 'node:events';
import type { AddressInfo, Socket } from 'node:net';
import { SMTPServer, type SMTPServerSession } from 'smtp-server';
import type { FaultMode, FaultSwitch } from './fault-switch';
import { readMail } from './mail';
import type { MailArchive } from './mail-archive';

const LARGEST_MAIL_BYTES = 20_000_000;

/** A receiver of mail that listens on loopback. */
export interface SmtpReceiver {
  readonly port: number;
  stop(): Promise<void>;
}

/**
 * Takes mail for anybody from anybody on this machine, and puts it into the archive.
 *
 * @param archive - Where mail goes.
 * @param faults - What is to go wrong.
 * @param port - 0 for any that is free.
 * @throws The network's error when the port is taken.
 */
export async function startSmtpReceiver(
  archive: MailArchive,
  faults: FaultSwitch,
  port: number,
): Promise<SmtpReceiver> {
  let arrived = 0;
  const sockets = new Map<number, Socket>();
  const faultOfSession = new Map<string, FaultMode>();

  const server = new SMTPServer({
    name: 'mailbox.example.org',
    authOptional: true,
    // Loopback alone: encryption would need a certificate that nobody has signed.
    disabledCommands: ['STARTTLS'],
    allowInsecureAuth: true,
    disableReverseLookup: true,
    size: LARGEST_MAIL_BYTES,
    onAuth: ({ username }, _session, done) => done(null, { user: username ?? '' }),
    onMailFrom: (_address, session, done) => {
      const fault = faults.take();
      faultOfSession.set(session.id, fault);
      if (fault === 'refuse-temporarily') done(smtpError(451, 'Try again later'));
      else if (fault === 'refuse-permanently') done(smtpError(550, 'No such mailbox here'));
      else done();
    },
    onData: (stream, session, done) => {
      if (faultOfSession.get(session.id) === 'drop-connection') {
        sockets.get(session.remotePort)?.destroy();
        return;
      }
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('end', () => {
        if (stream.sizeExceeded) {
          done(smtpError(552, 'The mail is too large'));
          return;
        }
        arrived += 1;
        const envelope = { id: String(arrived), receivedAt: new Date().toISOString(), ...partiesOf(session) };
        readMail(Buffer.concat(chunks), envelope).then(
          (mail) => {
            archive.add(mail);
            done();
          },
          (error: Error) => done(error),
        );
      });
    },
    onClose: (session) => void faultOfSession.delete(session.id),
  });
  server.on('error', (error) => console.error(error));
  server.server.on('connection', (socket: Socket) => {
    const remotePort = socket.remotePort ?? 0;
    sockets.set(remotePort, socket);
    socket.on('close', () => sockets.delete(remotePort));
  });
  const listening = once(server.server, 'listening');
  server.listen(port, '127.0.0.1');
  await listening;
  return {
    port: (server.server.address() as AddressInfo).port,
    stop: async () => {
      for (const socket of sockets.values()) socket.destroy();
      await new Promise<void>((resolve) => {
        server.close(() => resolve());
      });
    },
  };
}

function partiesOf({ envelope }: SMTPServerSession): { from: string; to: string[] } {
  const from = envelope.mailFrom === false ? '' : envelope.mailFrom.address;
  return { from, to: envelope.rcptTo.map(({ address }) => address) };
}

function smtpError(responseCode: number, message: string): Error {
  return Object.assign(new Error(message), { responseCode });
}
