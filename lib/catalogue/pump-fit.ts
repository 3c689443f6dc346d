import { pumpCurve, pumpHead, headAt } from '@/lib/hydraulics/links/pump';
import { cubicAt, evaluateCubic, monotoneCubic } from '@/lib/hydraulics/monotone-cubic';
import type { PumpPoint } from './pump-points';

export interface CurvePoint {
  x: number;
  y: number;
}

/** A curve and the points it goes through; the line is empty where one point gives no curve. */
export interface FittedCurve {
  points: CurvePoint[];
  line: CurvePoint[];
}

export interface PumpFit {
  /** m over L/s. */
  head: FittedCurve;
  /** 0 to 1 over L/s. */
  efficiency: FittedCurve;
  /** Net positive suction head required, m over L/s. */
  suctionHead: FittedCurve;
}

const SAMPLES = 120;

/** What the engine makes of a pump's points at full speed: its own monotone cubics, sampled for a chart. Points in the order of flow, fit for a curve. */
export function pumpFit(points: readonly PumpPoint[]): PumpFit {
  const heads = points.map(({ flowLs, headM }) => ({ x: flowLs, y: headM }));
  const curve = pumpCurve({ id: '', kind: 'pump', from: '', to: '', curve: points.map(({ flowLs, headM }) => ({ flowLs, headM })) });
  return {
    head: {
      points: heads,
      // The engine holds the head level from no flow to the first point.
      line: samples(0, heads.at(-1)!.x).map((x) => {
        pumpHead(curve, x, 1);
        return { x, y: headAt.headM };
      }),
    },
    efficiency: fitted(points, ({ efficiency }) => efficiency),
    suctionHead: fitted(points, ({ suctionHeadM }) => suctionHeadM),
  };
}

function fitted(points: readonly PumpPoint[], pick: (point: PumpPoint) => number | null): FittedCurve {
  const given = points.flatMap((point) => {
    const y = pick(point);
    return y === null ? [] : [{ x: point.flowLs, y }];
  });
  if (given.length < 2) return { points: given, line: [] };
  const cubic = monotoneCubic(
    given.map(({ x }) => x),
    given.map(({ y }) => y),
  );
  const line = samples(given[0]!.x, given.at(-1)!.x).map((x) => {
    evaluateCubic(cubic, x);
    return { x, y: cubicAt.value };
  });
  return { points: given, line };
}

const samples = (from: number, to: number): number[] => Array.from({ length: SAMPLES + 1 }, (_, i) => from + ((to - from) * i) / SAMPLES);
