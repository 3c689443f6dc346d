import { expect, test, type Browser, type Page } from '@playwright/test';
import { designer } from './make/draw';
import { signIn } from './make/sign-in';

async function atDrawing(browser: Browser): Promise<Page> {
  const page = await (await browser.newContext({ viewport: { width: 1440, height: 900 }, locale: 'en-GB' })).newPage();
  await signIn(page, 'mara');
  const href = await page.getByRole('link', { name: /HTG-1/ }).first().getAttribute('href');
  await page.goto(`${href!.replace(/\/drawing$/, '')}/drawing`);
  await page.getByText(/^● Solved in/).waitFor();
  return page;
}

test('of two who draw at once the later one is told, sees what differs, and both changes are kept', async ({ browser }) => {
  test.setTimeout(120_000);
  const [first, second] = [await atDrawing(browser), await atDrawing(browser)];
  await designer(first).fill('Supply', 82);
  await expect(first.getByText('Saving…')).toBeHidden();
  await expect(first.getByText(/^Saved /)).toBeVisible();

  await designer(second).fill('Supply', 78);
  const dialog = second.getByRole('dialog', { name: /saved this drawing meanwhile/ });
  await expect(dialog).toBeVisible();
  await expect(dialog).toContainText('Fluid');
  await dialog.getByRole('button', { name: 'All theirs' }).click();
  await dialog.getByRole('button', { name: 'Save both together' }).click();
  await expect(second.getByText(/^Saved /)).toBeVisible();
  await expect(designer(second).field('Supply')).toHaveValue('82');
});

test('what is drawn without a connection is kept and saved when it is back; undo and redo give the same drawing', async ({ browser }) => {
  test.setTimeout(120_000);
  const page = await atDrawing(browser);
  const draw = designer(page);
  await page.context().setOffline(true);
  await draw.fill('Return', 58);
  await expect(page.getByText('Not saved: no connection, keeping it here')).toBeVisible();
  await page.context().setOffline(false);
  await expect(page.getByText(/^Saved /)).toBeVisible({ timeout: 40_000 });
  await page.reload();
  await expect(draw.field('Return')).toHaveValue('58');

  const count = page.locator('.react-flow__node');
  await expect(count.first()).toBeVisible();
  const before = await count.count();
  await draw.place('Tee', 300, 60);
  await expect(count).toHaveCount(before + 1);

  // The tee leads nowhere: a fault that names it and selects its place.
  await page.keyboard.press('Escape');
  await expect(page.locator('.react-flow__node.selected')).toHaveCount(0);
  await draw.panel.getByRole('tab', { name: /^Faults/ }).click();
  await draw.panel.getByRole('button', { name: /joins fewer than two pipes/ }).click();
  await expect(page.locator('.react-flow__node.selected')).toHaveCount(1);

  await page.getByRole('button', { name: /^Undo/ }).click();
  await expect(count).toHaveCount(before);
  await page.keyboard.press('Control+Shift+z');
  await expect(count).toHaveCount(before + 1);
  await page.keyboard.press('Control+z');
  await expect(count).toHaveCount(before);
});
