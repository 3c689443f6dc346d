'use client';

import type { KvPoint } from '@/lib/network/drawing';
import { toUnit } from '@/lib/units/format-quantity';
import { unitFor } from '@/lib/units/quantities';
import { useUnitChoice } from '../shell/units-context';
import { CurveChart } from './curve-chart';

interface KvChartProps {
  name: string;
  sizes: { nominal: string; points: readonly KvPoint[] }[];
  height?: number;
}

/** Sizes further apart than this are read on a logarithmic scale. */
const WIDE_SPAN = 15;

/** Kv over the handwheel's setting, straight from point to point as the engine reads it. */
export function KvChart({ name, sizes, height = 300 }: KvChartProps) {
  const unit = unitFor('valveCoefficient', useUnitChoice());
  const curves = sizes.map(({ nominal, points }) => {
    const line = points.map(({ setting, kv }) => ({ x: setting, y: toUnit('valveCoefficient', kv, unit) }));
    return { label: nominal, line, points: sizes.length > 4 ? [] : line };
  });
  const largest = curves.map(({ line }) => line.at(-1)?.y ?? 0);
  return (
    <CurveChart
      label={`${unit} of ${name} over its setting in turns, ${sizes.map(({ nominal }) => nominal).join(', ')}`}
      x={{ label: 'setting', unit: 'turns', largest: Math.max(...curves.flatMap(({ line }) => line.map(({ x }) => x))) }}
      y={{
        label: unit,
        unit: unit === 'Kv' ? 'm³/h at 1 bar' : 'US gpm at 1 psi',
        isLogarithmic: Math.max(...largest) > WIDE_SPAN * Math.min(...largest),
      }}
      curves={curves}
      height={height}
    />
  );
}
