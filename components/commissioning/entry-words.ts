import type { Reading } from '@/lib/api/commissioning';

/** An entry as it was typed: "2.6 turns, 74 mbar". */
export const enteredWords = (entered: Reading['entered']): string =>
  entered.map(({ text, unit }) => `${text} ${unit}`).join(', ') || 'No text kept';
