import * as z from 'zod';
import { readSettings } from '../process/read-settings';
import { Problem, runProcess } from '../process/run-process';
import { startMailbox } from './start-mailbox';

const port = z.coerce.number().int().min(0).max(65_535).default(0);
const settings = z.object({ MAILBOX_SMTP_PORT: port, MAILBOX_HTTP_PORT: port });

runProcess(async () => {
  const values = readSettings(settings, process.env);
  const mailbox = await startMailbox({
    smtpPort: values.MAILBOX_SMTP_PORT,
    httpPort: values.MAILBOX_HTTP_PORT,
  }).catch((error: NodeJS.ErrnoException & { port?: number }) => {
    if (error.code !== 'EADDRINUSE') throw error;
    throw new Problem(`Port ${error.port ?? '?'} is taken; name another for the mailbox.`);
  });
  const { smtpPort, address, stop } = mailbox;
  return { announcement: { smtpPort, address }, stop };
});
