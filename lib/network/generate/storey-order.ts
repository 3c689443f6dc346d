/** How high a storey's name says that it lies; null where the name says nothing. */
function levelOf(name: string): number | null {
  const text = name.toLowerCase();
  const number = Number(text.match(/-?\d+(\.\d+)?/)?.[0] ?? NaN);
  if (/\b(basement|cellar|lower ground)\b|^b\d+$/.test(text)) return -Math.abs(Number.isNaN(number) ? 1 : number) - 0.5;
  if (/\bground\b|^(g|gf)$/.test(text)) return 0;
  if (/\b(roof|attic|penthouse)\b/.test(text)) return Infinity;
  return Number.isNaN(number) ? null : number;
}

/**
 * The storeys of a schedule, the lowest first: by the numbers in their names ("Level 2", "Ground floor", "B1"), or as the schedule first
 * names them where a name says no height or two say the same.
 */
export function storeysLowestFirst(names: Iterable<string>): string[] {
  const storeys = [...new Set(names)];
  const levels = new Map(storeys.map((name) => [name, levelOf(name)]));
  const known = new Set(levels.values());
  if (known.has(null) || known.size < storeys.length) return storeys;
  return storeys.sort((a, b) => (levels.get(a)! < levels.get(b)! ? -1 : 1));
}
