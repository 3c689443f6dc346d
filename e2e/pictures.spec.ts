import { test, type Browser, type Page } from '@playwright/test';
import { signIn, type DemoPerson } from './make/sign-in';

/** Takes the two pictures of README.md from the demo. */

async function demoLoop(
  browser: Browser,
  who: DemoPerson,
  options: { viewport: { width: number; height: number }; colorScheme: 'light' | 'dark' },
): Promise<{ page: Page; path: string }> {
  const context = await browser.newContext({ ...options, hasTouch: options.colorScheme === 'dark', locale: 'en-GB' });
  const page = await context.newPage();
  await signIn(page, who);
  const href = await page.getByRole('link', { name: /CHW-1/ }).first().getAttribute('href');
  return { page, path: href!.replace(/\/(drawing|commissioning|report|schedule)$/, '') };
}

test('the drawing with its solved flows', async ({ browser }) => {
  const { page, path } = await demoLoop(browser, 'mara', { viewport: { width: 1440, height: 900 }, colorScheme: 'light' });
  await page.goto(`${path}/drawing`);
  await page.getByText(/^● Solved in/).waitFor();
  await page.screenshot({ path: 'public/pictures/drawing.png' });
});

test('a station on the tablet', async ({ browser }) => {
  const { page, path } = await demoLoop(browser, 'tobin', { viewport: { width: 1024, height: 768 }, colorScheme: 'dark' });
  await page.goto(`${path}/commissioning`);
  await page.locator('a[href*="/stations/"]', { hasText: 'FC-2.03' }).last().click();
  const meter = page.getByLabel('Meter');
  await meter.selectOption((await meter.locator('option', { hasText: 'DP-02' }).getAttribute('value'))!);
  await page.getByLabel('Setting, turns').fill('4,0');
  await page.getByLabel('Differential pressure, kPa').fill('5,1');
  await page.screenshot({ path: 'public/pictures/station.png' });
});
