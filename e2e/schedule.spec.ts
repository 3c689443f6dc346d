import { expect, test, type Locator, type Page } from '@playwright/test';
import ExcelJS from 'exceljs';
import { designer } from './make/draw';
import { signIn } from './make/sign-in';

/** The Schedule as the Drawing's twin: what is done to the tables is done to the drawing, and taken back there. */

test.use({ permissions: ['clipboard-read', 'clipboard-write'] });

/** A new loop with four terminal units, drawn by hand. */
async function drawnLoop(page: Page): Promise<void> {
  await signIn(page, 'mara');
  const made = async (path: string, data: object): Promise<string> => {
    const answer = await page.request.post(path, { data });
    expect(answer.ok(), await answer.text()).toBe(true);
    return ((await answer.json()) as { id: string }).id;
  };
  const project = await made('/api/projects', { name: `Sorrel Yard ${Date.now()}`, client: '', building: '', members: [] });
  const loop = await made(`/api/projects/${project}/loops`, { name: 'CHW-7', service: 'chilled' });
  await page.goto(`/projects/${project}/loops/${loop}/drawing`);
  const draw = designer(page);
  for (const x of [300, 420, 540, 660]) await draw.place('Terminal unit', x, 340);
  await draw.selectNothing();
  await expect(page.getByText(/^Saved /)).toBeVisible();
}

async function toPage(page: Page, name: 'Drawing' | 'Schedule'): Promise<void> {
  await page.getByRole('navigation', { name: 'Pages of the loop' }).getByRole('link', { name }).click();
  await page.waitForURL(new RegExp(`/${name.toLowerCase()}$`));
}

function schedule(page: Page) {
  const grid = page.getByRole('grid');
  const rows = grid.getByRole('row').filter({ has: page.getByRole('rowheader') });
  const cellOf = async (row: number, head: string): Promise<Locator> => {
    const heads = await grid.getByRole('columnheader').allInnerTexts();
    const column = heads.findIndex((text) => text.split('\n')[0] === head);
    expect(column, `${head} among ${heads.join(', ')}`).toBeGreaterThan(0);
    return rows.nth(row).locator('[role="rowheader"], [role="gridcell"]').nth(column);
  };
  const type = async (row: number, head: string, text: string) => {
    await (await cellOf(row, head)).click();
    await grid.press('F2');
    await grid.getByRole('textbox').fill(text);
    await page.keyboard.press('Enter');
  };
  const paste = async (text: string) => {
    await page.evaluate((it) => navigator.clipboard.writeText(it), text);
    await page.keyboard.press('ControlOrMeta+v');
  };
  return { grid, rows, cellOf, type, paste };
}

test('a schedule is typed, pasted and filled, taken back on the Drawing, filtered and exported', async ({ page }) => {
  test.setTimeout(120_000);
  await drawnLoop(page);
  await toPage(page, 'Schedule');
  const { grid, rows, cellOf, type, paste } = schedule(page);
  await expect(rows).toHaveCount(4);

  // 1. A figure in its own unit; one that cannot be keeps its text and says why.
  await type(0, 'Design flow', '12 gpm');
  await expect(await cellOf(0, 'Design flow')).toHaveText('0.757');
  await type(0, 'Design flow', '-1');
  await expect(grid.getByRole('alert')).toContainText('Above 0 L/s');
  await expect(grid.getByRole('textbox')).toHaveValue('-1');
  await page.keyboard.press('Escape');
  await expect(await cellOf(0, 'Design flow')).toHaveText('0.757');

  // 2. A block: all of it, or none of it with the faulty cell named.
  await (await cellOf(0, 'Room')).click();
  await paste('1.11\t3,5\n1.12\tmuch');
  await expect(page.getByRole('alert').filter({ hasText: 'Nothing was pasted' })).toContainText('load');
  await expect(await cellOf(0, 'Room')).toHaveText('');
  await paste('1.11\t3,5\t0.2\n1.12\t4\t0.25\r\n');
  await expect(await cellOf(0, 'Load')).toHaveText('3.50');
  await expect(await cellOf(1, 'Room')).toHaveText('1.12');
  await expect(await cellOf(1, 'Design flow')).toHaveText('0.250');

  // 3. Fill down, over a range made by keys.
  await (await cellOf(1, 'Design flow')).click();
  await page.keyboard.press('Shift+ArrowDown');
  await page.keyboard.press('Shift+ArrowDown');
  await page.keyboard.press('ControlOrMeta+d');
  await expect(await cellOf(3, 'Design flow')).toHaveText('0.250');
  await expect(grid.getByRole('rowgroup').last()).toContainText('0.950');

  // 4. Several rows at once.
  const tag = (await (await cellOf(3, 'Terminal')).innerText()).trim();
  const other = (await (await cellOf(2, 'Terminal')).innerText()).trim();
  for (const it of [other, tag]) await grid.getByRole('checkbox', { name: `Select ${it}` }).check();
  const selected = page.getByRole('form', { name: 'Selected rows' });
  await selected.getByLabel('Set', { exact: true }).selectOption('Coil drop');
  await selected.getByRole('textbox').fill('21');
  await selected.getByRole('button', { name: 'Set all' }).click();
  for (const row of [2, 3]) await expect(await cellOf(row, 'Coil drop')).toHaveText('21.00');
  await expect(await cellOf(1, 'Coil drop')).toHaveText('');
  await grid.getByRole('checkbox', { name: `Select ${other}` }).uncheck();

  // 5. What is selected here is selected on the Drawing, and its Undo takes back what was done here.
  await toPage(page, 'Drawing');
  await expect(page.locator('.react-flow__node.selected')).toHaveCount(1);
  const panel = page.getByRole('complementary', { name: 'Figures' });
  await expect(panel.getByLabel('Coil drop at design', { exact: true })).toHaveValue('21');
  await page.getByRole('button', { name: /^Undo/ }).click();
  await expect(panel.getByLabel('Coil drop at design', { exact: true })).not.toHaveValue('21');
  await page.getByRole('button', { name: /^Undo/ }).click();
  await toPage(page, 'Schedule');
  await expect(rows).toHaveCount(4);
  await expect(await cellOf(3, 'Design flow')).not.toHaveText('0.250');
  await expect(rows.nth(3)).toHaveAttribute('aria-selected', 'true');
  await grid.press('ControlOrMeta+Shift+z');
  await expect(await cellOf(3, 'Design flow')).toHaveText('0.250');

  // 6. Filtered, without a column, and exported as it is seen.
  await page.getByRole('button', { name: 'Filters' }).click();
  await grid.getByLabel('Filter design flow').fill('> 0.2');
  await expect(rows).toHaveCount(3);
  await page.getByRole('button', { name: 'Columns' }).click();
  await page.getByRole('checkbox', { name: 'Load' }).uncheck();
  await page.keyboard.press('Escape');
  for (let press = 0; press < 2; press++) await grid.getByRole('button', { name: /^Terminal/ }).click();
  await expect(rows.first()).toContainText(tag);
  const download = page.waitForEvent('download');
  await page.getByRole('button', { name: 'Excel' }).click();
  const workbook = new ExcelJS.Workbook();
  await workbook.xlsx.readFile(await (await download).path());
  const sheet = workbook.getWorksheet('Terminals')!;
  const head = Array.from(sheet.getRow(3).values as unknown[], String);
  expect(head.some((text) => text.startsWith('Design flow (L/s)'))).toBe(true);
  expect(head.some((text) => text.startsWith('Load'))).toBe(false);
  expect([4, 6].map((row) => (sheet.getRow(row).values as unknown[]).includes(tag))).toEqual([true, false]);
  const flow = head.findIndex((text) => text.startsWith('Design flow'));
  expect([4, 5, 6, 7].map((row) => sheet.getRow(row).getCell(flow).value)).toEqual([0.25, 0.25, 0.25, 0.75]);

  // 7. The columns are remembered, and the draft is what was saved.
  await expect(page.getByText(/^Saved /)).toBeVisible();
  await page.reload();
  await expect(rows).toHaveCount(4);
  await expect(grid.getByRole('columnheader', { name: 'Load' })).toHaveCount(0);
  await expect(await cellOf(1, 'Design flow')).toHaveText('0.250');
});

test('a row leads to its place on the Drawing, and one who may not edit reads the tables only', async ({ page, browser }) => {
  test.setTimeout(120_000);
  await signIn(page, 'mara');
  const href = await page.getByRole('link', { name: /CHW-1/ }).first().getAttribute('href');
  const loop = href!.replace(/\/(drawing|commissioning|report|schedule)$/, '');
  await page.goto(`${loop}/schedule`);
  const { grid, rows } = schedule(page);
  await rows.nth(2).hover();
  await rows
    .nth(2)
    .getByRole('link', { name: /in the Drawing/ })
    .click();
  await expect(page).toHaveURL(/\/drawing\?select=/);
  await expect(page.locator('.react-flow__node.selected')).toHaveCount(1);
  await expect(grid).toHaveCount(0);

  const context = await browser.newContext();
  const reader = await context.newPage();
  await signIn(reader, 'ingrid');
  await reader.goto(`${loop}/schedule`);
  const read = schedule(reader);
  await expect(read.grid).toHaveAttribute('aria-readonly', 'true');
  await (await read.cellOf(0, 'Design flow')).click();
  await read.grid.press('F2');
  await expect(read.grid.getByRole('textbox')).toHaveCount(0);
  await expect(reader.getByRole('link', { name: 'Bring in a schedule' })).toHaveCount(0);
  await context.close();
});
