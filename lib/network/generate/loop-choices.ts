import type { ValveWish } from './balancing-valve-choice';
import type { GenerateOptions } from './scheduled-terminal';

/** What all parts of a loop are drawn with. */
export interface LoopChoices {
  options: GenerateOptions;
  service: 'chilled' | 'hot';
  valves: ValveWish;
}
