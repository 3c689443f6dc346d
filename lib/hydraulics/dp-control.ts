import { type Loops, shortLoops } from './graph/loops';
import { metresPerKpa } from './links/law';
import type { NetworkState } from './network-state';
import type { PreparedNetwork } from './prepare';
import type { CorrectionOfAll } from './correction-of-all';
import { solveDense } from './sparse/dense';
import type { LinkOf } from './types';

type ControllerState = 'open' | 'throttling' | 'shut';

interface Controller {
  link: number;
  setpointM: number;
  /** Links from the high to the low sensed node, with their directions; full impulse lines, so friction alone counts. */
  path: { link: number; sign: number }[];
  state: ControllerState;
  /** Last correction of the throttled head and the head before it, m. */
  step: number;
  before: number;
}

/** Slack before a controller changes its state, m. */
const SLACK_M = 1e-7;
const MOST_SWITCHES = 60;

/**
 * Differential pressure controllers. One that throttles takes a head, beyond that of its open valve, which makes the
 * sensed differential equal its set point; it is found together with the loops. One that would have to add head stands open; one
 * that would have to turn the flow back is shut. Which is which is settled between solutions.
 */
export class DpControl {
  private switches = 0;

  private constructor(readonly controllers: Controller[]) {}

  /** Null where the network has no controller that acts on what it senses; one that cannot (on a closed branch) stays open and is left out. */
  static of(network: PreparedNetwork): DpControl | null {
    const range = network.kinds.find(({ kind }) => kind === 'dpController');
    if (!range) return null;
    const head = metresPerKpa(network.fluid.densityKgM3);
    const senses = senseFinder(network);
    const { chainOf } = network.chains;
    const meshes = meshesOf(network, shortLoops(network.document.nodes.length, network.chains));
    const mesh = (link: number) => (chainOf[link] < 0 ? -1 : meshes[chainOf[link]]);
    const controllers: Controller[] = [];
    for (let i = range.first; i < range.last; i++) {
      const link = network.document.links[network.position[i]] as LinkOf<'dpController'>;
      const [high, low] = link.sense.map((id) => network.nodeIndex.get(id)!);
      const path = senses(high, low);
      if (path?.some((step) => mesh(step.link) >= 0 && mesh(step.link) === mesh(i)))
        controllers.push({ link: i, setpointM: link.setpointKpa * head, path, state: 'throttling', step: 0, before: 0 });
    }
    return controllers.length ? new DpControl(controllers) : null;
  }

  isThrottling(): boolean {
    return this.controllers.some((each) => each.state === 'throttling');
  }

  /** Largest distance of a throttling controller from its set point, m. */
  worstError(state: NetworkState): number {
    let worst = 0;
    for (const each of this.controllers)
      if (each.state === 'throttling') worst = Math.max(worst, Math.abs(sensed(state, each) - each.setpointM));
    return worst;
  }

  /**
   * Adds to the chains' step what the throttled heads change. With Z the flows by which the loops answer to each head, and W the sensed
   * differentials' answer to flows, the heads' corrections y solve (S + W Z) y = setpoint - sensed - W step.
   */
  correct(state: NetworkState, loops: CorrectionOfAll, chainStep: Float64Array): void {
    const active = this.controllers.filter((each) => each.state === 'throttling');
    if (!active.length) return;
    const { chains } = state.network;
    const answers = active.map(({ link }) => {
      const unit = new Float64Array(chains.count);
      const answer = new Float64Array(chains.count);
      const c = chains.chainOf[link];
      if (c < 0) return answer;
      unit[c] = signInChain(state.network, c, link);
      loops.sumHeads(unit);
      loops.correct(answer);
      return answer;
    });
    const n = active.length;
    const right = sensedChanges(state, active, chainStep).map((change, j) => active[j].setpointM - sensed(state, active[j]) - change);
    const system = Array.from({ length: n }, () => new Float64Array(n));
    active.forEach((each, k) => {
      const changes = sensedChanges(state, active, answers[k]);
      active.forEach((other, j) => {
        const own = other.path.find((step) => step.link === each.link)?.sign ?? 0;
        system[j][k] = own + changes[j];
      });
    });
    const heads = solveDense(system, Float64Array.from(right));
    active.forEach((each, k) => {
      each.step = heads[k];
      each.before = state.throttledHead[each.link];
      for (let c = 0; c < chainStep.length; c++) chainStep[c] += answers[k][c] * heads[k];
    });
  }

  moveTo(state: NetworkState, part: number): void {
    for (const each of this.controllers) if (each.state === 'throttling') state.throttledHead[each.link] = each.before + part * each.step;
  }

  /** Nudges each throttling controller by its own error: what goes with correcting one loop after another. */
  nudge(state: NetworkState): void {
    for (const each of this.controllers) {
      if (each.state !== 'throttling') continue;
      state.throttledHead[each.link] += sensed(state, each) - each.setpointM;
    }
  }

  /** Settles who throttles, stands open or is shut; answers whether any has changed. After many rounds only the worst one may. */
  switchStates(state: NetworkState): boolean {
    const wrong: { each: Controller; next: ControllerState; by: number }[] = [];
    for (const each of this.controllers) {
      const error = sensed(state, each) - each.setpointM;
      const head = state.throttledHead[each.link];
      const flow = state.linkFlow[each.link];
      if (each.state === 'throttling' && head < -SLACK_M) wrong.push({ each, next: 'open', by: -head });
      else if (each.state === 'throttling' && head > SLACK_M && flow < -1e-9) wrong.push({ each, next: 'shut', by: head });
      else if (each.state === 'open' && error > SLACK_M) wrong.push({ each, next: 'throttling', by: error });
      else if (each.state === 'shut' && error < -SLACK_M) wrong.push({ each, next: 'throttling', by: -error });
    }
    if (!wrong.length || this.switches++ >= MOST_SWITCHES) return false;
    wrong.sort((a, b) => b.by - a.by);
    for (const { each, next } of this.switches > MOST_SWITCHES / 2 ? wrong.slice(0, 1) : wrong) {
      each.state = next;
      each.step = 0;
      each.before = 0;
      state.throttledHead[each.link] = 0;
      state.shut[each.link] = next === 'shut' ? 1 : 0;
    }
    return true;
  }
}

function sensed(state: NetworkState, { path }: Controller): number {
  let head = 0;
  for (const { link, sign } of path) head += sign * state.linkLoss[link];
  return head;
}

/** How the sensed differentials answer to a change of the chains' flows. */
function sensedChanges(state: NetworkState, controllers: Controller[], chainStep: Float64Array): number[] {
  const { chains } = state.network;
  return controllers.map(({ path }) => {
    let head = 0;
    for (const { link, sign } of path) {
      const c = chains.chainOf[link];
      if (c >= 0) head += sign * state.linkSlope[link] * signInChain(state.network, c, link) * chainStep[c];
    }
    return head;
  });
}

function signInChain({ chains }: PreparedNetwork, c: number, link: number): number {
  let p = chains.start[c];
  while (chains.member[p] !== link) p++;
  return chains.sign[p];
}

/** Chains that share loops, directly or through others, have one number: what is throttled in one moves the flow in all. -1 where no loop passes. */
function meshesOf({ chains }: PreparedNetwork, loops: Loops): Int32Array {
  const up = Int32Array.from({ length: chains.count }, (_, c) => c);
  const top = (c: number) => {
    while (up[c] !== c) c = up[c] = up[up[c]];
    return c;
  };
  const looped = new Uint8Array(chains.count);
  for (let l = 0; l < loops.count; l++)
    for (let p = loops.start[l]; p < loops.start[l + 1]; p++) {
      looped[loops.chain[p]] = 1;
      up[top(loops.chain[p])] = top(loops.chain[loops.start[l]]);
    }
  return up.map((_, c) => (looped[c] ? top(c) : -1));
}

/** Finds the shortest way between two nodes over open links; null where there is none. */
function senseFinder({ from, to, document }: PreparedNetwork) {
  const at: number[][] = document.nodes.map(() => []);
  from.forEach((v, i) => {
    at[v].push(i);
    at[to[i]].push(i);
  });
  return (high: number, low: number) => {
    const came = new Map<number, { link: number; previous: number }>([[high, { link: -1, previous: -1 }]]);
    const queue = [high];
    for (let next = 0; next < queue.length && !came.has(low); next++) {
      const v = queue[next];
      for (const link of at[v]) {
        const w = from[link] === v ? to[link] : from[link];
        if (came.has(w)) continue;
        came.set(w, { link, previous: v });
        queue.push(w);
      }
    }
    if (!came.has(low)) return null;
    const path: { link: number; sign: number }[] = [];
    for (let v = low; v !== high;) {
      const { link, previous } = came.get(v)!;
      path.push({ link, sign: from[link] === previous ? 1 : -1 });
      v = previous;
    }
    return path;
  };
}
