import { pipeSeries, type PipeSeriesId } from '@/lib/hydraulics/pipe-series';
import type { Drawing, DrawingPipe } from './drawing';

/** What a pipe is made of and how long it is: what new pipes take over from the last one. */
export type PipeFigures = Pick<DrawingPipe, 'lengthM' | 'series' | 'nominal' | 'boreMm' | 'roughnessMm' | 'minorK'>;

export const seriesIds = Object.keys(pipeSeries) as PipeSeriesId[];

export const isSeriesId = (series: string | null): series is PipeSeriesId => series !== null && Object.hasOwn(pipeSeries, series);

/** Bore and roughness of a size of a published series; a free bore where `series` is null. */
export function chosenSize(
  series: PipeSeriesId | null,
  nominal: string | null,
): Pick<PipeFigures, 'series' | 'nominal' | 'boreMm' | 'roughnessMm'> | null {
  if (series === null) return null;
  const { sizes, roughnessMm } = pipeSeries[series];
  const size = sizes.find((it) => it.nominal === nominal);
  return { series, nominal: size?.nominal ?? null, boreMm: size?.boreMm ?? null, roughnessMm };
}

/** Where bore and roughness of a pipe come from, in words. */
export function sizeSource(pipe: Pick<DrawingPipe, 'series'>): string {
  if (!isSeriesId(pipe.series)) return 'Bore and roughness as typed.';
  const { source, roughnessSource } = pipeSeries[pipe.series];
  return `Bore: ${source}. Roughness: ${roughnessSource}.`;
}

/** "5 m, DN25", for a line of text; lengths in metres. */
export function pipeWords(pipe: PipeFigures): string {
  const size = pipe.nominal ?? (pipe.boreMm === null ? 'no size' : `bore ${pipe.boreMm} mm`);
  return `${pipe.lengthM === null ? 'no length' : `${pipe.lengthM} m`}, ${size}`;
}

/** What the first pipe of a drawing has: a common pipe, its length left for the designer to say. */
export const firstPipeFigures: PipeFigures = { lengthM: null, ...chosenSize('steel-en10255-medium', 'DN25')!, minorK: 0 };

/** The figures of the pipe that was drawn last: new pipes go on from it. Null where there is none. */
export function lastPipeOf({ pipes }: Drawing): PipeFigures | null {
  const last = pipes.at(-1);
  if (!last) return null;
  const { lengthM, series, nominal, boreMm, roughnessMm, minorK } = last;
  return { lengthM, series, nominal, boreMm, roughnessMm, minorK };
}
