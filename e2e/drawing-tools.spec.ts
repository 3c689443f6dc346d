import { expect, test, type Page } from '@playwright/test';
import { emptyDrawing } from '@/lib/network/drawing';
import { crossingPipes, openSheet } from './make/sheet';

/** Every action of the canvas by mouse, key and finger, on a sheet of its own. */

test.describe.configure({ timeout: 180_000 });

const menu = (page: Page) => page.getByRole('menu').last();
const choose = (page: Page, name: string | RegExp) => menu(page).getByRole('menuitem', { name }).click();
const tagsOf = (drawing: { equipment: { tag: string }[] }) => drawing.equipment.map(({ tag }) => tag).sort();

test.describe('by mouse', () => {
  test('a pipe hops over another, and its bends are dragged, undone and straightened', async ({ page }) => {
    const sheet = await openSheet(page, crossingPipes());
    const straight = await sheet.line('level');
    expect(straight).toMatch(/A5 5/);
    expect(await sheet.line('plumb')).not.toMatch(/A/);

    const on = await sheet.screen(240, 480);
    await page.mouse.click(on.x, on.y);
    await expect(sheet.edge('level')).toHaveClass(/selected/);
    const part = page.locator('.pipe-hold[data-hold="level"]');
    await expect(part).toHaveCount(1);
    await sheet.drag(await sheet.screen(335, 480), await sheet.screen(335, 520));
    await expect(page.locator('.pipe-hold[data-hold="corner"]')).not.toHaveCount(0);
    const bent = await sheet.saved(({ pipes }) => pipes[0].bends.length > 0);
    expect(bent.pipes[0].bends).toEqual([
      { x: 210, y: 480 },
      { x: 210, y: 520 },
      { x: 480, y: 520 },
    ]);
    expect(await sheet.line('level')).toMatch(/L315 520A5 5 0 0 1 325 520/);

    // A corner takes both its parts along.
    await sheet.drag(await sheet.screen(210, 520), await sheet.screen(250, 600));
    const cornered = await sheet.saved(({ pipes }) => pipes[0].bends.some(({ y }) => y === 600));
    expect(cornered.pipes[0].bends).toContainEqual({ x: 250, y: 600 });
    expect(await sheet.line('level')).not.toMatch(/A/);

    await page.keyboard.press('Control+z');
    await page.keyboard.press('Control+z');
    expect(await sheet.line('level')).toBe(straight);
    await page.keyboard.press('Control+Shift+z');
    await page.keyboard.press('Shift+s');
    expect(await sheet.line('level')).toBe(straight);
  });

  test('pieces are placed by a press and by dragging, joined by dragging and by two presses, put into a pipe and taken out', async ({
    page,
  }) => {
    const sheet = await openSheet(page, crossingPipes());
    // Dragged from the tools.
    const to = await sheet.screen(840, 480);
    const pane = (await page.locator('.react-flow__pane').boundingBox())!;
    await sheet.tool('Pump').dragTo(page.locator('.react-flow__pane'), { targetPosition: { x: to.x - pane.x, y: to.y - pane.y } });
    await expect(sheet.nodes).toHaveCount(6);
    await expect(sheet.selected).toHaveAttribute('aria-label', 'Pump P-1');
    const pump = (await sheet.selected.getAttribute('data-id'))!;

    // Two presses with the pipe tool, a bend between them.
    await sheet.tool('Pipe').click();
    await sheet.node('T-1').click();
    const bend = await sheet.screen(600, 560);
    await page.mouse.click(bend.x, bend.y);
    await sheet.node(pump).click();
    await expect(sheet.edges).toHaveCount(3);
    await page.keyboard.press('Escape');

    // A valve pressed onto the pipe goes into it; deleted, the pipe is whole again.
    await sheet.tool('Balancing valve').click();
    const on = await sheet.screen(240, 480);
    await page.mouse.click(on.x, on.y);
    await expect(sheet.edges).toHaveCount(4);
    await page.keyboard.press('Escape');
    const split = await sheet.saved(({ pipes }) => pipes.length === 4);
    expect(
      split.pipes.filter(({ from, to: end }) => from.equipmentId === 'CH-1' || end.equipmentId === 'T-1').map(({ lengthM }) => lengthM),
    ).toEqual([3, 3]);
    await page.keyboard.press('Delete');
    await expect(sheet.edges).toHaveCount(3);
    const healed = await sheet.saved(({ pipes }) => pipes.length === 3);
    expect(healed.pipes.find(({ id }) => id === 'level')).toMatchObject({ lengthM: 6, to: { equipmentId: 'T-1' } });

    // A free piece dragged onto a pipe goes into it too.
    await sheet.tool('Strainer').click();
    const free = await sheet.screen(240, 560);
    await page.mouse.click(free.x, free.y);
    await page.keyboard.press('Escape');
    await sheet.drag(free, on);
    await expect(sheet.edges).toHaveCount(4);
    await page.getByRole('button', { name: /^Undo/ }).click();
    await expect(sheet.edges).toHaveCount(3);
    await page.getByRole('button', { name: /^Redo/ }).click();
    await expect(sheet.edges).toHaveCount(4);
  });

  test('a box selects, with Shift it adds; what is selected is lined up, spaced, turned and nudged', async ({ page }) => {
    const sheet = await openSheet(page, crossingPipes());
    await sheet.drag(await sheet.screen(280, 350), await sheet.screen(360, 420));
    await expect(sheet.selected).toHaveCount(1);
    await page.keyboard.down('Shift');
    await sheet.drag(await sheet.screen(440, 430), await sheet.screen(540, 610));
    await page.keyboard.up('Shift');
    await expect(sheet.selected).toHaveCount(2);
    await sheet.node('T-3').click({ modifiers: ['Control'] });
    await expect(sheet.selected).toHaveCount(3);

    await page.keyboard.press('Shift+v');
    const plumb = await sheet.saved(
      ({ equipment }) => new Set(equipment.filter(({ kind }) => kind === 'tee').map(({ x }) => x)).size === 1,
    );
    expect(plumb.equipment.find(({ id }) => id === 'T-1')).toMatchObject({ x: 400, y: 480 });
    await page.keyboard.press('ArrowDown');
    await page.keyboard.press('Shift+ArrowRight');
    await sheet.saved(({ equipment }) => equipment.some(({ id, x, y }) => id === 'T-2' && x === 440 && y === 390));
    for (let i = 0; i < 3; i++) await page.keyboard.press('Control+z');

    await page.keyboard.press('Control+a');
    await expect(sheet.selected).toHaveCount(5);
    await page.keyboard.press('Shift+x');
    const even = await sheet.saved(({ equipment }) => equipment.some(({ id, x }) => id === 'T-1' && x !== 480));
    expect(even.equipment.find(({ id }) => id === 'CH-1')).toMatchObject({ x: 160 });
    expect(even.equipment.find(({ id }) => id === 'FC-2.01')).toMatchObject({ x: 700 });
    await page.keyboard.press('Control+z');

    await page.keyboard.press('Escape');
    await sheet.node('CH-1').click();
    await page.keyboard.press('r');
    await page.keyboard.press('m');
    await sheet.saved(({ equipment }) => equipment.some(({ id, rotation, isMirrored }) => id === 'CH-1' && rotation === 90 && isMirrored));
  });

  test('pieces are copied, cut, pasted and duplicated with new tags', async ({ page }) => {
    const sheet = await openSheet(page, crossingPipes());
    await sheet.node('FC-2.01').click();
    await page.keyboard.press('Control+c');
    await page.keyboard.press('Control+v');
    await expect(sheet.nodes).toHaveCount(6);
    await page.keyboard.press('Control+d');
    await expect(sheet.nodes).toHaveCount(7);
    expect(tagsOf(await sheet.saved(({ equipment }) => equipment.length === 7)).slice(1, 4)).toEqual(['FC-2.01', 'FC-2.02', 'FC-2.03']);
    await page.keyboard.press('Control+x');
    await expect(sheet.nodes).toHaveCount(6);
    // Saved as six, so that seven are not those of before.
    await sheet.saved(({ equipment }) => equipment.length === 6);
    // Pasted where the menu was asked for, on another storey.
    const at = await sheet.screen(700, 540);
    await page.mouse.click(at.x, at.y, { button: 'right' });
    await choose(page, /^Paste/);
    const pasted = await sheet.saved(({ equipment }) => equipment.length === 7);
    expect(pasted.equipment.at(-1)).toMatchObject({ tag: 'FC-1.01', storeyId: 'storey-1', x: 700, y: 540 });
  });

  test('storeys are renamed, moved, made higher, duplicated, added and removed', async ({ page }) => {
    const sheet = await openSheet(page, crossingPipes());
    const storeys = (name: string) => page.getByRole('button', { name: `Storey ${name}: menu` });
    const order = async (isReady: (names: string[]) => boolean) => {
      const names = (drawing: Awaited<ReturnType<typeof sheet.saved>>) =>
        [...drawing.storeys].sort((a, b) => a.top - b.top).map(({ name }) => name);
      return names(await sheet.saved((drawing) => isReady(names(drawing))));
    };
    await storeys('Level 1').click();
    await choose(page, /^Rename/);
    await page.getByRole('dialog').getByLabel('Name').fill('East wing');
    await page.getByRole('dialog').getByRole('button', { name: 'Rename' }).click();
    await storeys('East wing').click();
    await choose(page, /^Move the storey up/);
    expect(await order((names) => names[0] === 'East wing')).toEqual(['East wing', 'Level 2', 'Plant room']);
    await page.keyboard.press('Control+z');

    const edge = page.getByRole('separator', { name: 'Height of the band of East wing' });
    const { x, y } = (await edge.boundingBox())!;
    await sheet.drag({ x: x + 15, y: y + 8 }, { x: x + 15, y: y - 42 });
    const higher = await sheet.saved((drawing) => drawing.storeys.some(({ name, height }) => name === 'East wing' && height > 320));
    expect(higher.equipment.find(({ id }) => id === 'FC-2.01')!.storeyId).toBe('storey-2');

    await storeys('East wing').click();
    await choose(page, /^Duplicate the storey/);
    await expect(sheet.nodes).toHaveCount(9);
    await expect(sheet.edges).toHaveCount(4);
    const twice = await sheet.saved(({ equipment }) => equipment.length === 9);
    expect(new Set(tagsOf(twice)).size).toBe(9);
    expect(await order((names) => names.length === 4)).toEqual(['Level 2', 'Level 3', 'East wing', 'Plant room']);
    await page.keyboard.press('Control+z');
    expect(await order((names) => names.length === 3)).toEqual(['Level 2', 'East wing', 'Plant room']);

    await page.keyboard.press('Shift+PageUp');
    expect(await order((names) => names.length === 4)).toEqual(['Level 3', 'Level 2', 'East wing', 'Plant room']);
    await page.keyboard.press('f');
    await storeys('Plant room').click();
    await choose(page, /^Remove the storey/);
    expect(await order((names) => names.length === 3)).toEqual(['Level 3', 'Level 2', 'East wing']);
    await storeys('East wing').click();
    await choose(page, /^Remove the storey/);
    await expect(page.getByText('East wing is not empty')).toBeVisible();
  });

  test('menus open on a piece, a pipe and the sheet, and by Shift F10', async ({ page }) => {
    const sheet = await openSheet(page, crossingPipes());
    await sheet.node('FC-2.01').click({ button: 'right' });
    await expect(sheet.node('FC-2.01')).toHaveClass(/selected/);
    await choose(page, /^Rotate/);
    await sheet.saved(({ equipment }) => equipment.some(({ id, rotation }) => id === 'FC-2.01' && rotation === 90));

    const on = await sheet.screen(240, 480);
    await page.mouse.click(on.x, on.y, { button: 'right' });
    await menu(page).getByRole('menuitem', { name: 'Put into the pipe here' }).hover();
    await page.getByRole('menuitem', { name: 'Strainer' }).click();
    await expect(sheet.edges).toHaveCount(3);

    const off = await sheet.screen(900, 560);
    await page.mouse.click(off.x, off.y, { button: 'right' });
    await menu(page).getByRole('menuitem', { name: 'Place here' }).hover();
    await page.keyboard.press('ArrowRight');
    await page.keyboard.press('Enter');
    await expect(sheet.selected).toHaveAttribute('aria-label', 'Pump P-1');

    await page.keyboard.press('Shift+F10');
    await expect(menu(page)).toBeVisible();
    await page.keyboard.press('Escape');
    await expect(page.getByRole('menu')).toHaveCount(0);
    await page.keyboard.press('ContextMenu');
    await choose(page, /^Delete/);
    await expect(sheet.nodes).toHaveCount(6);
  });

  test('a tag is found and jumped to, the view fits all or what is selected, and the small map moves it', async ({ page }) => {
    const sheet = await openSheet(page, crossingPipes());
    const scale = async () => Number((await page.getByLabel('Scale').innerText()).replace(/\D/g, ''));
    await page.keyboard.press('Control+f');
    await page.getByLabel('Find by tag or room').fill('t-3');
    await page.keyboard.press('Enter');
    await expect(sheet.node('T-3')).toHaveClass(/selected/);
    await page.keyboard.press('Escape');
    await page.locator('.react-flow__pane').click({ position: { x: 400, y: 20 } });
    await sheet.node('T-3').click();
    const before = await scale();
    await page.keyboard.press('Shift+f');
    await expect.poll(scale).toBeGreaterThan(before);
    await page.keyboard.press('f');
    await expect.poll(scale).toBeLessThanOrEqual(before);

    await page.keyboard.press('Shift+o');
    const map = page.getByRole('img', { name: 'Small map of the sheet' });
    const was = await sheet.screen(0, 0);
    await map.click({ position: { x: 30, y: 30 } });
    expect(await sheet.screen(0, 0)).not.toEqual(was);
  });

  test('tags follow rules, are shown before they change and are changed at one step', async ({ page }) => {
    const sheet = await openSheet(page, crossingPipes());
    await page.keyboard.press('Control+k');
    await page.getByRole('combobox', { name: 'All commands' }).fill('renumb');
    await page.keyboard.press('Enter');
    const dialog = page.getByRole('dialog', { name: 'Rules for tags' });
    await dialog.getByLabel('Tee').fill('{kind}');
    await expect(dialog.getByRole('alert')).toContainText('{n} once');
    await dialog.getByLabel('Tee').fill('J{storey}-{nn}');
    await expect(dialog.getByRole('row', { name: 'T-1 J1-03' })).toBeVisible();
    await dialog.getByRole('button', { name: 'Renumber 3' }).click();
    const renumbered = await sheet.saved(({ tagRules }) => tagRules !== undefined);
    expect(tagsOf(renumbered)).toEqual(['CH-1', 'FC-2.01', 'J1-01', 'J1-02', 'J1-03']);
    await sheet.tool('Tee').click();
    const at = await sheet.screen(640, 160);
    await page.mouse.click(at.x, at.y);
    await expect(sheet.selected).toHaveAttribute('aria-label', 'Tee J2-01');
    await page.keyboard.press('Control+z');
    await page.keyboard.press('Control+z');
    expect(tagsOf(await sheet.saved(({ tagRules }) => tagRules === undefined))).toEqual(['CH-1', 'FC-2.01', 'T-1', 'T-2', 'T-3']);
  });
});

test('by key alone pieces are placed, reached, joined, a pipe is bent and a valve put into it', async ({ page }) => {
  const sheet = await openSheet(page, emptyDrawing('chilled'));
  await page.locator('body').press('s');
  await page.keyboard.press('Enter');
  await expect(sheet.nodes).toHaveCount(1);
  await page.keyboard.press('t');
  await page.keyboard.press('Enter');
  await expect(sheet.nodes).toHaveCount(2);
  for (let i = 0; i < 3; i++) await page.keyboard.press('Shift+ArrowRight');
  await page.keyboard.press('Escape');
  // From the tee to the source, and both of them joined.
  await page.keyboard.press('Alt+ArrowLeft');
  await expect(sheet.selected).toHaveAttribute('aria-label', /^Source/);
  await page.keyboard.press('Alt+Shift+ArrowRight');
  await expect(sheet.selected).toHaveCount(2);
  await page.keyboard.press('j');
  await expect(sheet.edges).toHaveCount(1);
  // The pipe from the source, and a part of it.
  await page.keyboard.press('Escape');
  await page.keyboard.press('Alt+ArrowLeft');
  await page.keyboard.press('.');
  await expect(page.locator('.react-flow__edge.selected')).toHaveCount(1);
  await page.keyboard.press('x');
  await expect(page.locator('.pipe-hold:focus')).toHaveCount(1);
  await page.keyboard.press('Shift+ArrowDown');
  await page.keyboard.press('ArrowDown');
  const bent = await sheet.saved(({ pipes }) => (pipes[0]?.bends.length ?? 0) > 0);
  const source = bent.equipment.find(({ kind }) => kind === 'source')!;
  await sheet.saved(({ pipes }) => pipes[0].bends.some(({ y }) => y === source.y + 50));
  // A valve into the selected pipe.
  await page.keyboard.press('b');
  await page.keyboard.press('Enter');
  await expect(sheet.edges).toHaveCount(2);
  await page.keyboard.press('Escape');
  await page.keyboard.press('.');
  await page.keyboard.press(',');
  await expect(sheet.selected).toHaveCount(1);
  // A pipe from piece to piece with the pipe tool.
  await page.keyboard.press('Control+a');
  await page.keyboard.press('Delete');
  await expect(sheet.nodes).toHaveCount(0);
  for (let i = 0; i < 3; i++) await page.keyboard.press('Control+z');
  await expect(sheet.edges).toHaveCount(1);
});

for (const [name, viewport] of [
  ['on a tablet', { width: 1024, height: 768 }],
  ['on a phone', { width: 390, height: 844 }],
] as const) {
  test.describe(`by finger ${name}`, () => {
    test.use({ viewport, hasTouch: true });

    const finger = async (page: Page) => {
      const client = await page.context().newCDPSession(page);
      return (type: 'touchStart' | 'touchMove' | 'touchEnd', ...points: { x: number; y: number }[]) =>
        client.send('Input.dispatchTouchEvent', { type, touchPoints: points.map(({ x, y }, id) => ({ x, y, id })) });
    };

    test('pieces are placed, joined by two taps, picked in a box, and their menu opens under a finger that stays', async ({ page }) => {
      const sheet = await openSheet(page, emptyDrawing('chilled'));
      const touch = await finger(page);
      const pane = (await page.locator('.react-flow__pane').boundingBox())!;
      const at = (x: number, y: number) => ({ x: pane.x + pane.width * x, y: pane.y + pane.height * y });
      const tap = async ({ x, y }: { x: number; y: number }) => page.touchscreen.tap(x, y);

      await sheet.tool('Pump').tap();
      await tap(at(0.25, 0.6));
      await sheet.tool('Source').tap();
      await tap(at(0.7, 0.6));
      await expect(sheet.nodes).toHaveCount(2);
      await expect.poll(() => page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(viewport.width);

      await sheet.tool('Pipe').tap();
      await sheet.nodes.nth(0).tap();
      await sheet.nodes.nth(1).tap();
      await expect(sheet.edges).toHaveCount(1);
      await sheet.tool('Select').tap();

      // A finger that stays on the pump.
      await tap(at(0.5, 0.25));
      await touch('touchStart', at(0.25, 0.6));
      await expect(menu(page)).toBeVisible();
      await touch('touchEnd');
      await menu(page)
        .getByRole('menuitem', { name: /^Rotate/ })
        .tap();
      await sheet.saved(({ equipment }) => equipment.some(({ kind, rotation }) => kind === 'pump' && rotation === 90));

      // Two fingers.
      const scale = async () => page.locator('.react-flow__viewport').evaluate((it) => new DOMMatrix(getComputedStyle(it).transform).a);
      const before = await scale();
      await touch('touchStart', at(0.45, 0.3), at(0.55, 0.3));
      await touch('touchMove', at(0.4, 0.3), at(0.6, 0.3));
      await touch('touchMove', at(0.3, 0.3), at(0.7, 0.3));
      await touch('touchEnd');
      expect(await scale()).toBeGreaterThan(before * 1.2);
      await page.getByRole('button', { name: /^All commands/ }).tap();
      await page.getByRole('option', { name: /^Fit all/ }).tap();
      await expect.poll(scale).toBeLessThan(before * 1.2);

      // A box, drawn with one finger.
      await sheet.tool('Pick several').tap();
      await touch('touchStart', at(0.03, 0.25));
      await touch('touchMove', at(0.5, 0.5));
      await touch('touchMove', at(0.97, 0.95));
      await touch('touchEnd');
      await expect(sheet.selected).toHaveCount(2);
      await sheet.tool('Select').tap();
      await page.getByRole('button', { name: /^Delete/ }).tap();
      await expect(sheet.nodes).toHaveCount(0);
      await page.getByRole('button', { name: /^Undo/ }).tap();
      await expect(sheet.nodes).toHaveCount(2);
    });

    test('a bend is dragged with one finger', async ({ page }) => {
      const sheet = await openSheet(page, crossingPipes());
      const touch = await finger(page);
      const on = await sheet.screen(250, 480);
      await page.touchscreen.tap(on.x, on.y);
      await expect(page.locator('.pipe-hold')).toHaveCount(1);
      await touch('touchStart', await sheet.screen(335, 480));
      await touch('touchMove', await sheet.screen(335, 500));
      await touch('touchMove', await sheet.screen(335, 540));
      await touch('touchEnd');
      await sheet.saved(({ pipes }) => pipes[0].bends.some(({ y }) => y === 540));
    });
  });
}
