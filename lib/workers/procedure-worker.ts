/// <reference lib="webworker" />
import { planFrom, type PlanInput } from '@/lib/balancing/plan';

/** Plans beside the page, so that a tablet stays at hand while a large loop is fitted. */
addEventListener('message', ({ data }: MessageEvent<{ id: number; input: PlanInput }>) => {
  try {
    postMessage({ id: data.id, plan: planFrom(data.input) });
  } catch (error) {
    postMessage({ id: data.id, message: error instanceof Error ? error.message : String(error) });
  }
});
