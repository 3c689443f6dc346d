import type { Plan, PlanInput } from '@/lib/balancing/plan';
import { PLAN_WORKER_PATH } from './shell-names';

let worker: Worker | null = null;
let lastId = 0;

/** Plans on this device, beside the page; works without signal once the loop was taken along. Rejects with the reason where it cannot. */
export function makePlan(input: PlanInput, signal?: AbortSignal): Promise<Plan> {
  worker ??= new Worker(PLAN_WORKER_PATH);
  const at = worker;
  const id = ++lastId;
  return new Promise((resolve, reject) => {
    const settle = (result: () => void) => {
      at.removeEventListener('message', onMessage);
      at.removeEventListener('error', onError);
      result();
    };
    const onMessage = ({ data }: MessageEvent<{ id: number; plan?: Plan; message?: string }>) => {
      if (data.id !== id) return;
      settle(() => (data.plan ? resolve(data.plan) : reject(new Error(data.message))));
    };
    const onError = () => {
      worker = null;
      settle(() => reject(new Error('The planner could not be started on this device. Open the page once where there is signal.')));
    };
    at.addEventListener('message', onMessage);
    at.addEventListener('error', onError);
    // A plan that nobody waits for any more gives way: the newest readings are planned at once.
    signal?.addEventListener('abort', () => {
      at.terminate();
      if (worker === at) worker = null;
      settle(() => reject(new DOMException('No longer wanted', 'AbortError')));
    });
    at.postMessage({ id, input });
  });
}
