import type { AlertTimeLine } from '@shared/contracts/alerts';
import { alert } from '../../core/testing/board-builder';
import { alertTimeLine } from './time-line';

const nothing: AlertTimeLine = { mails: [], quiets: [], assignments: [] };
const words = {
  peak: '28.3 °C',
  when: (at: string): string => at.slice(11, 16),
  now: Date.parse('2026-12-01T18:00:00Z'),
};
const texts = (
  changes: Parameters<typeof alert>[0],
  told: Partial<AlertTimeLine> = {},
  peak: string | null = words.peak,
): string[] =>
  alertTimeLine(alert(changes), { ...nothing, ...told }, { ...words, peak }).map(({ text }) => text);

const mail = (changes: Partial<AlertTimeLine['mails'][number]> = {}): AlertTimeLine['mails'][number] => ({
  personName: 'Jo Ashdown',
  reason: 'opened',
  writtenAt: '2026-12-01T14:04:00Z',
  sentAt: '2026-12-01T14:05:10Z',
  refusedAt: null,
  dueAt: null,
  attempts: 1,
  ...changes,
});
const quiet = (changes: Partial<AlertTimeLine['quiets'][number]> = {}): AlertTimeLine['quiets'][number] => ({
  setAt: '2026-12-01T14:10:00Z',
  until: '2026-12-01T20:00:00Z',
  setByName: 'Jo Ashdown',
  endedAt: null,
  endedByName: null,
  ...changes,
});

describe('the time line of an alert', () => {
  it('is in order of time, with only what has happened', () => {
    expect(texts({})).toEqual(['Began', 'Alert opened', 'Farthest off: 28.3 °C']);
  });

  it('goes on to its end, with who has seen it and what they wrote', () => {
    const over = {
      acknowledgedAt: '2026-12-01T14:10:00Z',
      acknowledgedByName: 'Maren Oxley',
      acknowledgeNote: 'Vent opened',
      endedAt: '2026-12-01T14:16:00Z',
      clearedAt: '2026-12-01T14:21:00Z',
    };
    expect(texts(over).slice(2)).toEqual([
      'Seen by Maren Oxley: “Vent opened”',
      'Farthest off: 28.3 °C',
      'Back where it should be',
      'Over',
    ]);
  });

  it('has no peak where a peak says nothing', () => {
    expect(texts({ kind: 'sensorSilent' }, {}, null)).toEqual(['Began', 'Alert opened']);
  });

  it('says plainly what was found later', () => {
    expect(texts({ foundLater: true })[1]).toBe(
      'Would have opened; found later, when readings were brought in',
    );
  });

  it('is there before the mails are known', () => {
    expect(alertTimeLine(alert(), null, words)).toHaveLength(3);
  });

  describe('tells of mails', () => {
    it('to whom they went, together where they went together', () => {
      const mails = [mail(), mail({ personName: 'Maren Oxley', sentAt: '2026-12-01T14:05:40Z' })];
      const later = mail({ personName: 'Maren Oxley', reason: 'escalated', sentAt: '2026-12-01T15:10:00Z' });
      expect(texts({}, { mails: [...mails, later] })).toEqual([
        'Began',
        'Alert opened',
        'Mail that it opened, to Jo Ashdown and Maren Oxley',
        'Farthest off: 28.3 °C',
        'Mail that nobody has seen it, to Maren Oxley',
      ]);
    });

    it.each([
      [mail({ sentAt: null, attempts: 0, dueAt: '2026-12-02T07:00:00Z' }), ': goes out at 07:00'],
      [
        mail({ sentAt: null, attempts: 3, dueAt: '2026-12-01T14:30:00Z' }),
        ': not sent yet after 3 tries; tried again at 14:30',
      ],
      [
        mail({ sentAt: null, refusedAt: '2026-12-01T14:05:00Z' }),
        ': refused by the mail server, so it is not tried again',
      ],
    ])('how far %j is', (one, ending) => {
      expect(texts({}, { mails: [one] })).toContain(`Mail that it opened, to Jo Ashdown${ending}`);
    });
  });

  describe('tells of quiets', () => {
    it('until when, who set it, and who ended it', () => {
      const ended = quiet({ endedAt: '2026-12-01T15:00:00Z', endedByName: 'Maren Oxley' });
      expect(texts({}, { quiets: [ended] })).toEqual([
        'Began',
        'Alert opened',
        'Quiet until 20:00, set by Jo Ashdown',
        'Farthest off: 28.3 °C',
        'Quiet ended by Maren Oxley',
      ]);
    });

    it('that it ran out, only once it has and the alert was open still', () => {
      const past = quiet({ until: '2026-12-01T17:00:00Z' });
      expect(texts({}, { quiets: [past] })).toContain('Quiet no more');
      expect(texts({}, { quiets: [quiet()] })).not.toContain('Quiet no more');
      const over = { endedAt: '2026-12-01T16:00:00Z', clearedAt: '2026-12-01T16:10:00Z' };
      expect(texts(over, { quiets: [past] })).not.toContain('Quiet no more');
    });

    it('that one was set for the alert before', () => {
      const early = quiet({ setAt: '2026-12-01T12:00:00Z' });
      expect(texts({}, { quiets: [early] })[0]).toBe(
        'Quiet until 20:00, set by Jo Ashdown, for the alert before this one',
      );
    });
  });

  it('tells what was done and who looks after it', () => {
    const deeds = [
      { id: '', at: '2026-12-01T14:20:00Z', personId: null, personName: 'Jo Ashdown', text: 'Lamp raised' },
    ];
    const assignments = [
      { at: '2026-12-01T14:16:00Z', personName: 'Jo Ashdown', assignedByName: 'Maren Oxley' },
      { at: '2026-12-01T14:30:00Z', personName: 'Maren Oxley', assignedByName: 'Maren Oxley' },
      { at: '2026-12-01T14:40:00Z', personName: null, assignedByName: null },
    ];
    expect(texts({ deeds }, { assignments }).slice(3)).toEqual([
      'Jo Ashdown looks after it, says Maren Oxley',
      'Done by Jo Ashdown: “Lamp raised”',
      'Maren Oxley looks after it',
      'Nobody looks after it any more, says somebody who has left',
    ]);
  });
});
