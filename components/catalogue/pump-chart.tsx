'use client';

import { pumpFit, type FittedCurve } from '@/lib/catalogue/pump-fit';
import type { PumpPoint } from '@/lib/catalogue/pump-points';
import { toUnit } from '@/lib/units/format-quantity';
import { unitFor } from '@/lib/units/quantities';
import { useUnitChoice } from '../shell/units-context';
import { CurveChart } from './curve-chart';

/** Head, efficiency and suction head required over flow: the points as given, and through them the curves that the engine calculates with. */
export function PumpChart({ name, points, isSmall }: { name: string; points: readonly PumpPoint[]; isSmall?: boolean }) {
  const choice = useUnitChoice();
  const [flowUnit, headUnit] = [unitFor('flow', choice), unitFor('head', choice)];
  const fit = pumpFit(points);
  const x = { label: 'flow', unit: flowUnit, largest: toUnit('flow', points.at(-1)!.flowLs, flowUnit) };
  const shown = ({ points: given, line }: FittedCurve, convert: (y: number) => number): FittedCurve => {
    const place = (point: { x: number; y: number }) => ({ x: toUnit('flow', point.x, flowUnit), y: convert(point.y) });
    return { points: given.map(place), line: line.map(place) };
  };
  const head = (value: number) => toUnit('head', value, headUnit);
  return (
    <div className="flex flex-col gap-3">
      <CurveChart
        label={`Head of ${name} over flow`}
        x={x}
        y={{ label: 'Head', unit: headUnit }}
        curves={[shown(fit.head, head)]}
        height={isSmall ? 190 : 260}
      />
      {!isSmall && fit.efficiency.points.length > 0 && (
        <CurveChart
          label={`Efficiency of ${name} over flow`}
          x={x}
          y={{ label: 'Efficiency', unit: '%' }}
          curves={[shown(fit.efficiency, (value) => 100 * value)]}
          height={160}
        />
      )}
      {!isSmall && fit.suctionHead.points.length > 0 && (
        <CurveChart
          label={`Suction head required by ${name} over flow`}
          x={x}
          y={{ label: 'Suction head required', unit: headUnit }}
          curves={[shown(fit.suctionHead, head)]}
          height={160}
        />
      )}
    </div>
  );
}
