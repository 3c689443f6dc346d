/** One tick of the flow strip: one terminal, near to far; height = per cent of design, null = not measured yet. */
export interface StripTick {
  tag: string;
  percentOfDesign: number | null;
  verdict: 'low' | 'within' | 'high' | null;
}

/** The tolerance band behind the ticks, as per cent of design (e.g. 90 to 110). */
export interface StripBand {
  lowerPercent: number;
  upperPercent: number;
}
