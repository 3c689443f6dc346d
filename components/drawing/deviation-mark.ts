import type { StripBand } from '@/lib/commissioning/flow-strip';

export type Verdict = 'low' | 'within' | 'high';

/** Where a per cent of design stands against the project's band. */
export const verdictOf = (percent: number, band: StripBand): Verdict =>
  percent < band.lowerPercent ? 'low' : percent > band.upperPercent ? 'high' : 'within';

export const signs: Record<Verdict, string> = { low: '▾', within: '●', high: '▴' };
export const tones: Record<Verdict, string> = { low: 'text-low', within: 'text-ink', high: 'text-high' };
