/** Round values from 0 to at least `largest`, four to seven of them; `largest` above 0. */
export function linearTicks(largest: number): number[] {
  const rough = largest / 5;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 2.5, 5, 10].map((factor) => factor * power).find((candidate) => candidate >= rough * 0.999)!;
  const count = Math.ceil(largest / step - 1e-9);
  return Array.from({ length: count + 1 }, (_, i) => Number((i * step).toPrecision(12)));
}

/** 1, 2 and 5 of each power of ten around the two values, both above 0; the powers alone where that would crowd the axis. */
export function logTicks(smallest: number, largest: number): number[] {
  const from = Math.floor(Math.log10(smallest));
  const to = Math.ceil(Math.log10(largest));
  const factors = to - from > 2 ? [1] : [1, 2, 5];
  const ticks: number[] = [];
  for (let power = from; power <= to; power++) for (const factor of factors) ticks.push(Number((factor * 10 ** power).toPrecision(12)));
  const first = ticks.findLastIndex((tick) => tick <= smallest);
  const last = ticks.findIndex((tick) => tick >= largest);
  return ticks.slice(Math.max(first, 0), last < 0 ? undefined : last + 1);
}
