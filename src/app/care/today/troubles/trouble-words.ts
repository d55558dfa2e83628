import type { KeptDeed } from '../../../core/care/care-deed';
import { amountWords, outcomeWord } from '../../../core/care/task-words';

/** What the person entered with a deed that was not taken: "Done · 250 ml · looked dry". */
export function enteredWords(deed: KeptDeed): string {
  switch (deed.kind) {
    case 'photo':
      return 'A photo';
    case 'reopen':
      return 'Taken back';
    case 'add':
      return `Added: ${deed.task.title}`;
    case 'close': {
      const { outcome = 'done', note = '', millilitres = null, grams = null, count = null } = deed.completion;
      const amounts = amountWords({ millilitres, grams, count });
      return [outcomeWord(outcome), amounts, note === '' ? '' : `“${note}”`]
        .filter((part) => part !== '')
        .join(' · ');
    }
  }
}
