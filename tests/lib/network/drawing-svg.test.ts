import { expect, it } from 'vitest';
import { drawingSvg, type SheetTitle } from '@/lib/network/drawing-svg';
import { figuresOfDrawing } from '@/lib/network/drawing-figures';
import { change, ladder } from '../../make/drawing';
import { solved } from '../../make/solved';

const title: SheetTitle = {
  loop: 'Level 2 east',
  project: 'Offices',
  revision: 'Revision 3',
  date: '2 March 2026',
  figures: 'Flows as balanced',
};

/** What the text elements of an SVG say. */
const said = (svg: string) => [...svg.matchAll(/<text[^>]*>([^<]*)<\/text>/g)].map(([, text]) => text);

it('shows every tag, the flow and setting of each terminal, and whose drawing it is', () => {
  const loop = ladder([0.2, 0.3]);
  const results = solved(loop);
  const { svg } = drawingSvg(loop, { title, figures: figuresOfDrawing(loop, results, 'balanced') });
  for (const words of ['P-1', 'CH-1', 'FC-1', 'FC-2', '0.200', '0.300', 'Level 2 east', 'Offices', 'Revision 3, 2 March 2026'])
    expect(said(svg)).toContain(words);
  const setting = results.balance.valves.find(({ id }) => id === 'FC-1:balancing')!.setting;
  expect(said(svg)).toContain(setting.toFixed(1));
});

it('draws each pipe once, return dashed, and lies within its own view', () => {
  const loop = ladder([0.2]);
  const placed = {
    ...loop,
    equipment: loop.equipment.map((piece, i) => ({ ...piece, x: 120 * i, y: 40 * (i % 3) })),
    pipes: loop.pipes.map((it) => ({ ...it, circuit: it.id.startsWith('r') ? ('return' as const) : it.circuit })),
  };
  const { svg } = drawingSvg(placed, { title, figures: null });
  expect(svg.match(/<path d="[^"]*" fill="none" stroke="#16232b" stroke-width="1.5"( stroke-dasharray="6 4")?\/>/g)).toHaveLength(
    placed.pipes.length,
  );
  const [left, top, width, height] = /viewBox="([^"]+)"/.exec(svg)![1].split(' ').map(Number);
  for (const { x, y } of placed.equipment) {
    expect(x).toBeGreaterThan(left!);
    expect(x).toBeLessThan(left! + width!);
    expect(y).toBeGreaterThan(top!);
    expect(y).toBeLessThan(top! + height!);
  }
});

it('what was typed stays text, whatever it holds', () => {
  const { svg } = drawingSvg(change(ladder([0.2]), 'FC-1', { tag: '</text><script>alert("1")</script>&\u0001' }), { title, figures: null });
  expect(svg).not.toContain('<script');
  expect(said(svg)).toContain('&lt;/text&gt;&lt;script&gt;alert(&quot;1&quot;)&lt;/script&gt;&amp;');
});
