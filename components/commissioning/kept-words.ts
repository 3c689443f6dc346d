import type { KeptEntry } from '@/lib/client/kept-entry';
import { enteredWords } from './entry-words';

/** What a kept entry says, for the list of what waits or was refused. */
export function keptWords({ content }: KeptEntry): string {
  switch (content.kind) {
    case 'reading':
      return enteredWords(content.body.entered);
    case 'setting':
      return `set from ${content.body.before ?? '?'} to ${content.body.after}`;
    case 'check':
      return { done: 'check done', open: 'check open', 'not-applicable': 'check does not apply' }[content.body.answer];
    case 'snag':
      return `snag: ${content.body.text}`;
    case 'resolution':
      return `snag resolved: ${content.body.note}`;
    case 'photo':
      return 'a photo';
  }
}
