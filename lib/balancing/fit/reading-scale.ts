import type { LoopReading } from '../readings';

/** A meter's usual error where a reading says nothing of its own: 1.5 % of the flow, with 0.1 kPa or 1 mL/s. */
const USUAL_FLOW_RELATIVE = 0.015;
const USUAL_ABSOLUTE = { dropKpa: 0.1, flowLs: 0.001 };

/**
 * The scale on which a reading's error has standard deviation 1 at any size. With error² = (relative · value)² + absolute² that is
 * asinh(relative · value / absolute) / relative (variance-stabilising transform, M. Bartlett 1947): a logarithm for
 * large readings, a straight line near zero, where a negative reading is as good as a positive one.
 */
export class ReadingScale {
  private readonly relative: number;
  private readonly absolute: number;

  constructor({ quantity, flowRelative = USUAL_FLOW_RELATIVE, absolute = USUAL_ABSOLUTE[quantity] }: LoopReading) {
    // A drop grows with the square of the flow.
    this.relative = quantity === 'dropKpa' ? 2 * flowRelative : flowRelative;
    this.absolute = absolute;
  }

  of(value: number): number {
    return Math.asinh((this.relative * value) / this.absolute) / this.relative;
  }

  slope(value: number): number {
    return 1 / Math.hypot(this.relative * value, this.absolute);
  }
}
