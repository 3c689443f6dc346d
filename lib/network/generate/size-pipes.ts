import { sumMinorK, type FittingId } from '@/lib/hydraulics/fittings';
import { fluidProperties, type FluidProperties } from '@/lib/hydraulics/fluids';
import { reynoldsPerLs } from '@/lib/hydraulics/links/pipe';
import { pipeSeries, type PipeSize, type PipeSeriesId } from '@/lib/hydraulics/pipe-series';
import { size } from '@/lib/hydraulics/size';
import type { SizedPipe } from '@/lib/hydraulics/types';
import type { Drawing, DrawingPipe } from '../drawing';
import { meanFluid, solvableDocument } from './solvable-document';
import type { PipeFitting } from './sheet';

export interface PipeRules {
  series: PipeSeriesId;
  /** Friction at design flow, local losses left out. */
  maxPaPerM: number;
  maxVelocityMs: number;
}

export interface PipedDrawing {
  drawing: Drawing;
  /** Pipes too large for the chosen series, which are of `LARGE_SERIES`. */
  otherSeries: string[];
  /** Pipes that no size keeps within the limits. */
  overLimit: string[];
}

/** Where a series ends, mains go on in this one, which reaches DN400. */
export const LARGE_SERIES: PipeSeriesId = 'steel-asme-sch40';
/** Narrower pipe is not laid for terminals, and a connection that carries nothing is not narrower than the second: common practice, no source. */
const LEAST_BORE_MM = 12;
const LEAST_CONNECTION_MM = 20;
/** Fittings up to here are threaded, above it welded; common practice, no source. */
const LARGEST_THREADED_MM = 54;

/**
 * Gives every pipe without a bore a size for its design flow: the smallest of the series within both limits, with the local losses of its
 * `fittingsOf` by Hooper's 2-K method at that flow; a pipe that none are given for keeps its `minorK`.
 */
export function sizePipes(drawn: Drawing, fittingsOf: Map<string, PipeFitting[]>, rules: PipeRules): PipedDrawing {
  const open = new Set(drawn.pipes.filter(({ boreMm }) => boreMm === null).map(({ id }) => id));
  const first = sizesFor(drawn, open, rules.series, rules);
  const tooLarge = new Set(first.unmet);
  const second = tooLarge.size && rules.series !== LARGE_SERIES ? sizesFor(drawn, tooLarge, LARGE_SERIES, rules) : null;
  const chosen = new Map([...first.sizes, ...(second?.sizes ?? [])]);
  const fluid = fluidProperties(meanFluid(drawn.fluid));
  if (!fluid.ok) throw new Error(fluid.error.message);
  const pipes = drawn.pipes.map((pipe): DrawingPipe => {
    const found = chosen.get(pipe.id);
    if (!found) return pipe;
    const { series, flowLs, boreMm } = found;
    const own = fittingsOf.get(pipe.id);
    const { roughnessMm } = pipeSeries[series];
    return {
      ...pipe,
      series,
      nominal: found.nominal,
      boreMm,
      roughnessMm,
      minorK: own ? minorK(own, flowLs, boreMm, fluid.properties) : pipe.minorK,
    };
  });
  return { drawing: { ...drawn, pipes }, otherSeries: second ? [...tooLarge] : [], overLimit: second?.unmet ?? first.unmet };
}

interface Chosen extends Pick<SizedPipe, 'flowLs' | 'nominal' | 'boreMm'> {
  series: PipeSeriesId;
}

function sizesFor(drawn: Drawing, ids: Set<string>, series: PipeSeriesId, { maxPaPerM, maxVelocityMs }: PipeRules) {
  const { sizes, roughnessMm } = pipeSeries[series];
  const widest = { boreMm: sizes.at(-1)!.boreMm, roughnessMm };
  const document = solvableDocument({ ...drawn, pipes: drawn.pipes.map((pipe) => (pipe.boreMm === null ? { ...pipe, ...widest } : pipe)) });
  const links = document.links.map((link) => (link.kind === 'pipe' && ids.has(link.id) ? { ...link, size: true, series } : link));
  const sized = size({ ...document, links, options: { ...document.options, sizing: { maxPaPerM, maxVelocityMs } } });
  if (!sized.converged) throw new Error(sized.warnings.map(({ message }) => message).join(' '));
  const atLeast = (boreMm: number, found: PipeSize | SizedPipe) =>
    found.boreMm >= boreMm ? found : (sizes.find((it) => it.boreMm >= boreMm) ?? found);
  const chosen = sized.pipes.map((pipe): [string, Chosen] => {
    const { nominal, boreMm } = atLeast(pipe.flowLs === 0 ? LEAST_CONNECTION_MM : LEAST_BORE_MM, pipe);
    return [pipe.id, { series, flowLs: pipe.flowLs, nominal, boreMm }];
  });
  return { sizes: chosen, unmet: sized.warnings.flatMap(({ code, id }) => (code === 'no-size' && id ? [id] : [])) };
}

const makes: Record<PipeFitting, [threaded: FittingId, welded: FittingId]> = {
  elbow: ['elbow-90-threaded', 'elbow-90-welded'],
  'tee-run': ['tee-run-threaded', 'tee-run-welded'],
  'tee-branch': ['tee-branch-threaded', 'tee-branch-welded'],
};

function minorK(of: PipeFitting[], flowLs: number, boreMm: number, fluid: FluidProperties): number {
  const reynolds = Math.abs(flowLs) * reynoldsPerLs(boreMm, fluid);
  if (reynolds === 0) return 0;
  const counts: Partial<Record<FittingId, number>> = {};
  for (const fitting of of) {
    const id = makes[fitting][boreMm > LARGEST_THREADED_MM ? 1 : 0];
    counts[id] = (counts[id] ?? 0) + 1;
  }
  return Number(sumMinorK(counts, boreMm, reynolds).toFixed(2));
}
