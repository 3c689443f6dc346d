import { size } from '@/lib/hydraulics/size';
import type { Drawing } from './drawing';
import { drawingToDocument } from './drawing-to-document';
import { chosenSize, isSeriesId } from './pipe-choice';
import { usualPipeLimits } from './pipe-limits';
import type { Refusal } from './connect-pipe';

/** Gives a pipe the smallest size of its series that keeps the loop's limits at design flow, or says why there is none. */
export function sizePipe(drawing: Drawing, pipeId: string): Drawing | Refusal {
  const pipe = drawing.pipes.find(({ id }) => id === pipeId);
  const { document } = drawingToDocument(drawing, '');
  if (!pipe || !isSeriesId(pipe.series) || !document)
    return { refused: 'Only a pipe of a series, in a loop that can be solved, can be sized.' };
  const { series } = pipe;
  const sizing = (drawing.pipeLimits ?? usualPipeLimits).map(({ upToBoreMm, ...limit }) => ({
    ...limit,
    ...(upToBoreMm !== null && { upToBoreMm }),
  }));
  const result = size({
    ...document,
    links: document.links.map((link) => (link.id === pipeId && link.kind === 'pipe' ? { ...link, size: true, series } : link)),
    options: { ...document.options, sizing },
  });
  const [sized] = result.pipes;
  if (!result.converged || !sized) return { refused: result.warnings[0]?.message ?? 'The pipe could not be sized.' };
  if (result.warnings.some(({ code }) => code === 'no-size'))
    return { refused: `No size of ${series} keeps the limits at this flow: divide it, or set other limits.` };
  return { ...drawing, pipes: drawing.pipes.map((it) => (it.id === pipeId ? { ...it, ...chosenSize(series, sized.nominal) } : it)) };
}
