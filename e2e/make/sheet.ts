import { expect, type Page } from '@playwright/test';
import { emptyDrawing, type Drawing, type Port } from '@/lib/network/drawing';
import { firstPipeFigures } from '@/lib/network/pipe-choice';
import { newPiece } from '@/lib/network/new-piece';
import { signIn } from './sign-in';

/**
 * On level 1 a source and a tee with a level pipe between them, and two more tees with a plumb pipe that passes it; on level 2
 * a unit. Ids are the tags.
 */
export function crossingPipes(): Drawing {
  let drawing = emptyDrawing('chilled');
  const pieces = [
    ['source', 'CH-1', 160, 480],
    ['tee', 'T-1', 480, 480],
    ['tee', 'T-2', 320, 380],
    ['tee', 'T-3', 320, 580],
    ['terminalUnit', 'FC-2.01', 700, 160],
  ] as const;
  for (const [kind, tag, x, y] of pieces) {
    drawing = { ...drawing, equipment: [...drawing.equipment, { ...newPiece(drawing, kind, { x, y }), id: tag, tag }] };
  }
  const pipe = (id: string, from: [string, Port], to: [string, Port]) => ({
    ...firstPipeFigures,
    id,
    from: { equipmentId: from[0], port: from[1] },
    to: { equipmentId: to[0], port: to[1] },
    circuit: 'supply' as const,
    lengthM: 6,
    bends: [],
  });
  return { ...drawing, pipes: [pipe('level', ['CH-1', 'out'], ['T-1', 'w']), pipe('plumb', ['T-2', 's'], ['T-3', 'n'])] };
}

/** A loop of its own, open on its Drawing page, and what a test needs to look at it. */
export async function openSheet(page: Page, drawing: Drawing = emptyDrawing('chilled')) {
  await signIn(page, 'mara');
  const post = async (path: string, data: unknown): Promise<string> => {
    const answer = await page.request.post(path, { data });
    expect(answer.ok(), await answer.text()).toBe(true);
    return ((await answer.json()) as { id: string }).id;
  };
  const href = await page.getByRole('link', { name: /CHW-1/ }).first().getAttribute('href');
  const projectId = href!.match(/projects\/([^/]+)/)![1];
  const loopId = await post(`/api/projects/${projectId}/loops`, { name: `Sheet ${Date.now()}`, service: 'chilled' });
  const draftPath = `/api/loops/${loopId}/draft`;
  const readDraft = async () => (await (await page.request.get(draftPath)).json()) as { version: number; drawing: Drawing };
  const { version } = await readDraft();
  const kept = await page.request.put(draftPath, { data: { baseVersion: version, drawing } });
  expect(kept.ok(), await kept.text()).toBe(true);
  await page.goto(`/projects/${projectId}/loops/${loopId}/drawing`);
  const tool = (name: string) => page.getByRole('toolbar', { name: 'Tools' }).getByRole('button', { name: new RegExp(`^${name} \\(`) });
  // The page answers to keys once it is alive.
  await expect(async () => {
    await page.keyboard.press('u');
    await expect(tool('Terminal unit')).toHaveAttribute('aria-pressed', 'true', { timeout: 500 });
  }).toPass({ timeout: 60_000 });
  await page.keyboard.press('v');
  await expect(page.locator('.react-flow__node')).toHaveCount(drawing.equipment.length);

  /** Where a point of the sheet lies on the screen. */
  const screen = async (x: number, y: number): Promise<{ x: number; y: number }> => {
    const [box, matrix] = await Promise.all([
      page.locator('.react-flow__pane').boundingBox(),
      page.locator('.react-flow__viewport').evaluate((it) => {
        const { a, e, f } = new DOMMatrix(getComputedStyle(it).transform);
        return { a, e, f };
      }),
    ]);
    return { x: box!.x + x * matrix.a + matrix.e, y: box!.y + y * matrix.a + matrix.f };
  };
  const node = (id: string) => page.locator(`.react-flow__node[data-id="${id}"]`);
  const edge = (id: string) => page.locator(`[data-testid="rf__edge-${id}"]`);
  const line = (id: string) => edge(id).locator('.pipe-line').getAttribute('d');
  const nodes = page.locator('.react-flow__node');
  const edges = page.locator('.react-flow__edge');
  const selected = page.locator('.react-flow__node.selected');
  /** The drawing as the server has it, once `isReady` holds for it. */
  const saved = async (isReady: (drawing: Drawing) => boolean): Promise<Drawing> => {
    let read: Drawing | null = null;
    await expect
      .poll(async () => isReady((read = (await readDraft()).drawing)), { timeout: 20_000, message: 'the saved drawing' })
      .toBe(true);
    return read!;
  };
  const drag = async (from: { x: number; y: number }, to: { x: number; y: number }) => {
    await page.mouse.move(from.x, from.y);
    await page.mouse.down();
    await page.mouse.move((from.x + to.x) / 2, (from.y + to.y) / 2, { steps: 4 });
    await page.mouse.move(to.x, to.y, { steps: 4 });
    await page.mouse.up();
  };
  return { screen, node, edge, line, nodes, edges, selected, saved, tool, drag };
}
