import type { ValveState } from '@/lib/hydraulics/types';

export const valveStateWords: Record<ValveState, string> = {
  open: 'fully open',
  throttled: 'throttled',
  'too-small': 'too small for its flow',
  'too-large': 'too large for its flow',
};
