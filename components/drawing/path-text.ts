import type { Point } from '@/lib/network/piece-geometry';
import type { Hop } from '@/lib/network/pipe-crossings';

const HOP_RADIUS = 5;

export const pathText = (path: Point[]): string => path.map(({ x, y }, i) => `${i ? 'L' : 'M'}${x} ${y}`).join('');

/** The same with a small hop over each pipe that the route passes: upwards, whichever way it runs. */
export function hoppingPathText(path: Point[], hops: readonly Hop[]): string {
  if (hops.length === 0) return pathText(path);
  let text = `M${path[0].x} ${path[0].y}`;
  let reached = path[0].x;
  for (let part = 0; part < path.length - 1; part++) {
    const [a, b] = [path[part], path[part + 1]];
    const way = Math.sign(b.x - a.x);
    reached = a.x;
    for (const hop of hops) {
      if (hop.part !== part) continue;
      // Near a corner or the hop before, a hop is smaller; where there is no room at all it is left out.
      const radius = Math.min(HOP_RADIUS, Math.abs(hop.x - reached), Math.abs(b.x - hop.x));
      if (radius < 1 || (hop.x - reached) * way < 0) continue;
      text += `L${hop.x - way * radius} ${a.y}A${radius} ${radius} 0 0 ${way > 0 ? 1 : 0} ${hop.x + way * radius} ${a.y}`;
      reached = hop.x + way * radius;
    }
    text += `L${b.x} ${b.y}`;
  }
  return text;
}
