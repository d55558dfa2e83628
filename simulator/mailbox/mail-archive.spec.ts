import type { ReceivedMail } from './mail';
import { MailArchive } from './mail-archive';

function mail(id: number, messageId: string | null, references: string[] = []): ReceivedMail {
  return {
    id: String(id),
    receivedAt: new Date(id * 1000).toISOString(),
    from: 'lampmeadow@example.org',
    to: ['grower@example.org'],
    subject: `Mail ${id}`,
    messageId,
    references,
    text: null,
    html: null,
    attachments: [],
    source: '',
  };
}

function conversationIds(mails: readonly ReceivedMail[], id: number): string[] {
  const archive = new MailArchive(100);
  for (const arrived of mails) archive.add(arrived);
  const found = archive.get(String(id));
  return (found === undefined ? [] : (archive.conversations().get(found) ?? [])).map((member) => member.id);
}

describe('conversations in the mailbox', () => {
  it('hold a mail and its answers, oldest first, whichever is asked for', () => {
    const mails = [mail(1, '<a>'), mail(2, '<x>'), mail(3, '<b>', ['<a>']), mail(4, '<c>', ['<b>'])];
    for (const id of [1, 3, 4]) expect(conversationIds(mails, id)).toEqual(['1', '3', '4']);
    expect(conversationIds(mails, 2)).toEqual(['2']);
  });

  it('join answers to a mail that never arrived here', () => {
    expect(conversationIds([mail(1, '<b>', ['<a>']), mail(2, '<c>', ['<a>'])], 1)).toEqual(['1', '2']);
  });

  it('join two that a mail between them, arriving in any order, connects', () => {
    const ends = [mail(1, '<a>'), mail(2, '<b>')];
    expect(conversationIds([...ends, mail(3, '<c>', ['<a>', '<b>'])], 2)).toEqual(['1', '2', '3']);
    expect(conversationIds([mail(1, '<c>', ['<a>', '<b>']), mail(2, '<a>'), mail(3, '<b>')], 3)).toEqual([
      '1',
      '2',
      '3',
    ]);
  });

  it('keep mails without names apart', () => {
    expect(conversationIds([mail(1, null), mail(2, null)], 1)).toEqual(['1']);
  });
});
