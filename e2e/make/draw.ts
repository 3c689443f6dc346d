import { expect, type Page } from '@playwright/test';
import type { Port } from '@/lib/network/drawing';

/** Draws as a designer does: a tool, a press on the canvas, a drag from end to end, figures in the panel. */
export function designer(page: Page) {
  const canvas = page.locator('.react-flow__pane');
  const panel = page.getByRole('complementary', { name: 'Figures' });

  const field = (label: string) => panel.getByLabel(label, { exact: true });

  /** Places a piece at a point of the canvas (px from its upper left) and answers its id. */
  const place = async (tool: string, x: number, y: number): Promise<string> => {
    await page
      .getByRole('toolbar', { name: 'Tools' })
      .getByRole('button', { name: new RegExp(`^${tool} \\(`) })
      .click();
    await canvas.click({ position: { x, y } });
    await page.keyboard.press('Escape');
    const placed = page.locator('.react-flow__node.selected');
    await expect(placed).toHaveCount(1);
    return (await placed.getAttribute('data-id'))!;
  };

  const port = (id: string, name: Port) => page.locator(`.react-flow__node[data-id="${id}"] .piece-port[data-handleid="${name}"]`);

  /** Drags a pipe from one end to another; it stands selected afterwards. */
  const connect = async (from: [string, Port], to: [string, Port]): Promise<void> => {
    const pipes = page.locator('.react-flow__edge');
    const before = await pipes.count();
    const [start, end] = [await port(...from).boundingBox(), await port(...to).boundingBox()];
    // The ends of a piece show themselves once the pointer is over it.
    const piece = (await page.locator(`.react-flow__node[data-id="${from[0]}"]`).boundingBox())!;
    await page.mouse.move(piece.x + piece.width / 2, piece.y + piece.height / 2);
    await page.mouse.move(start!.x + start!.width / 2, start!.y + start!.height / 2, { steps: 4 });
    await page.mouse.down();
    await page.mouse.move(end!.x + end!.width / 2 + 3, end!.y + end!.height / 2, { steps: 6 });
    await page.mouse.move(end!.x + end!.width / 2, end!.y + end!.height / 2);
    await page.mouse.up();
    await expect(pipes).toHaveCount(before + 1);
  };

  const fill = async (label: string, value: string | number): Promise<void> => {
    await field(label).fill(String(value));
    await field(label).press('Enter');
  };

  const choose = (label: string, option: string) => field(label).selectOption(option);

  /** Puts rows on the clipboard, as a spreadsheet would, and pastes them. */
  const paste = async (label: string, rows: number[][]): Promise<void> => {
    await page.evaluate((text) => navigator.clipboard.writeText(text), rows.map((row) => row.join('\t')).join('\n'));
    await panel.getByLabel(`Paste ${label} from a spreadsheet`).click();
    await page.keyboard.press('ControlOrMeta+v');
    await expect(panel.getByLabel(`Remove point ${rows.length}`)).toBeVisible();
  };

  const selectNothing = async (): Promise<void> => {
    await page.keyboard.press('Escape');
    await page.keyboard.press('Escape');
  };

  return { panel, place, connect, fill, choose, paste, field, selectNothing };
}
