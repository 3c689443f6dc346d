/** The strip shows at most this far from design; a tick beyond stops at the edge. Per cent of design. */
export const stripReach = { lowest: 40, highest: 160 };

interface Tick {
  percentOfDesign: number | null;
}

export interface StripGeometry<T extends Tick> {
  designY: number;
  bandTop: number;
  bandBottom: number;
  ticks: { x: number; y: number | null; tick: T }[];
}

/** Where everything of a flow strip lies in a box of this size: shared by the screen, the workbook and the printed report. */
export function stripGeometry<T extends Tick>(
  ticks: T[],
  band: { lowerPercent: number; upperPercent: number },
  box: { width: number; height: number; margin: number },
): StripGeometry<T> {
  const { width, height, margin } = box;
  const yOf = (percent: number) => {
    const kept = Math.min(Math.max(percent, stripReach.lowest), stripReach.highest);
    return margin + ((stripReach.highest - kept) / (stripReach.highest - stripReach.lowest)) * (height - 2 * margin);
  };
  const step = (width - 2 * margin) / Math.max(1, ticks.length);
  return {
    designY: yOf(100),
    bandTop: yOf(band.upperPercent),
    bandBottom: yOf(band.lowerPercent),
    ticks: ticks.map((tick, i) => ({
      tick,
      x: margin + step * (i + 0.5),
      y: tick.percentOfDesign === null ? null : yOf(tick.percentOfDesign),
    })),
  };
}
