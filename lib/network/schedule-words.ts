import type { ValveState } from '@/lib/hydraulics/types';
import type { characteristics, DrawingPipe, EquipmentOf } from './drawing';
import type { Option } from './schedule-column';

export const valveStateNames: Record<ValveState, string> = {
  open: 'fully open',
  throttled: 'throttled',
  'too-small': 'too small for its flow',
  'too-large': 'too large for its flow',
};

const characteristicNames: Record<(typeof characteristics)[number], string> = {
  equalPercentage: 'equal percentage',
  linear: 'linear',
  quickOpening: 'quick opening',
};
export const characteristicOptions = Object.entries(characteristicNames) as Option[];

const sourceNames: Record<EquipmentOf<'source'>['sourceKind'], string> = {
  chiller: 'chiller',
  boiler: 'boiler',
  'heat-exchanger': 'heat exchanger',
};
export const sourceOptions = Object.entries(sourceNames) as Option[];

const circuitNames: Record<DrawingPipe['circuit'], string> = { supply: 'supply', return: 'return' };
export const circuitOptions = Object.entries(circuitNames) as Option[];
