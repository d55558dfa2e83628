import { request } from 'node:http';
import { startMailbox, type Mailbox } from './start-mailbox';

describe('the mailbox asked under another name', () => {
  let mailbox: Mailbox;

  beforeEach(async () => {
    mailbox = await startMailbox({ smtpPort: 0, httpPort: 0 });
  });
  afterEach(() => mailbox.stop());

  function statusFor(host: string): Promise<number | undefined> {
    return new Promise((resolve, reject) => {
      const sent = request(`${mailbox.address}/api/mails`, { headers: { host } }, (response) => {
        response.resume();
        resolve(response.statusCode);
      });
      sent.on('error', reject);
      sent.end();
    });
  }

  it('refuses, so that no page from elsewhere can read the mails', async () => {
    expect(await statusFor('elsewhere.example.org')).toBe(421);
    expect(await statusFor('localhost:4380')).toBe(200);
  });
});
