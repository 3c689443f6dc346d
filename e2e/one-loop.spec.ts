import { expect, test } from '@playwright/test';
import { designer } from './make/draw';
import { drawTwoTerminals } from './make/draw-two-terminals';
import { signIn } from './make/sign-in';

test.use({ permissions: ['clipboard-read', 'clipboard-write'] });

test('a loop is drawn, issued, measured, put right, signed and handed over as a workbook', async ({ page }) => {
  test.setTimeout(240_000);
  await signIn(page, 'mara');
  await page.getByRole('button', { name: 'New project' }).click();
  const dialog = page.getByRole('dialog');
  const name = `Foundry Lane ${Date.now()}`;
  await dialog.getByLabel('Name').fill(name);
  for (const [number, person] of [[1, 'Tobin Ashgrove'], [2, 'Ingrid Vale']] as const) {
    await dialog.getByRole('button', { name: 'Add a member' }).click();
    await dialog.getByLabel(`Member ${number}`, { exact: true }).selectOption(person);
  }
  await dialog.getByRole('button', { name: 'Make the project' }).click();
  await page.getByRole('button', { name: 'New loop' }).click();
  await page.getByRole('dialog').getByLabel('Name').fill('CHW-9');
  await page.getByRole('dialog').getByRole('button', { name: /make/i }).click();
  await expect(page).toHaveURL(/\/drawing$/);
  await drawTwoTerminals(page);
  const draw = designer(page);
  await draw.panel.getByRole('tab', { name: 'Settings' }).click();
  await expect(draw.panel.getByRole('row', { name: /FC-/ }).first()).toContainText('3.26');
});
