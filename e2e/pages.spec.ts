import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Page } from '@playwright/test';
import { signIn, type DemoPerson } from './make/sign-in';

/** Every page, as one who uses it sees it: nothing wrong by axe (WCAG 2.2 AA), no error in the console, no sideways scroll on a phone. */

const loopPages = ['drawing', 'schedule', 'commissioning', 'report'];
const officePages = ['/projects', '/instruments', '/activity', '/account'];
/** For designers and administrators. */
const cataloguePages = ['valves', 'valves/new', 'pumps', 'pumps/new', 'pipes', 'fittings'].map((it) => `/catalogue/${it}`);

async function pathsFor(page: Page, who: DemoPerson): Promise<string[]> {
  await signIn(page, who);
  const href = await page.getByRole('link', { name: /CHW-1/ }).first().getAttribute('href');
  const loop = href!.replace(/\/(drawing|commissioning|report|schedule)$/, '');
  const project = loop.replace(/\/loops\/.*$/, '');
  await page.goto(`${loop}/commissioning`);
  const station = await page.locator('a[href*="/stations/"]').first().getAttribute('href');
  const onSite = ['readiness', 'next', 'findings', 'rounds', 'snags', 'labels'].map((it) => `${loop}/commissioning/${it}`);
  const drawn = who === 'tobin' ? [] : [...cataloguePages, `${loop}/schedule/import`];
  return [
    ...officePages,
    project,
    ...loopPages.map((it) => `${loop}/${it}`),
    station!,
    ...(who === 'tobin' ? [...onSite, '/aboard'] : []),
    ...drawn,
    ...(who === 'owen' ? ['/people'] : []),
  ];
}

/**
 * A piece on the canvas is as small as the view is far away; WCAG 2.5.8 excepts a target whose work another control
 * does: find by tag, the list of faults, the schedule. So it does a storey's name that a piece lies on: its menu's work is done in the
 * list of storeys too.
 */
const isPieceFarOut = (rule: string, target: unknown[]) =>
  rule === 'target-size' && /div\[data-id=|button\[aria-label="Storey /.test(String(target));

const settled = async (page: Page) => {
  await page.waitForLoadState('networkidle');
  await expect(page.getByRole('heading').or(page.getByRole('application')).first()).toBeVisible();
};

for (const [who, colorScheme] of [
  ['mara', 'light'],
  ['tobin', 'dark'],
  ['owen', 'light'],
] as const) {
  test(`every page is accessible to ${who}, in ${colorScheme}`, async ({ browser }) => {
    test.setTimeout(180_000);
    const context = await browser.newContext({ colorScheme, viewport: { width: 1280, height: 860 }, reducedMotion: 'reduce' });
    const page = await context.newPage();
    const trouble: string[] = [];
    page.on('pageerror', (error) => trouble.push(error.message));
    page.on('console', (message) => message.type() === 'error' && trouble.push(message.text()));
    for (const path of await pathsFor(page, who)) {
      await page.goto(path);
      await settled(page);
      const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']).analyze();
      expect(
        violations.flatMap(({ id, nodes }) =>
          nodes.filter((node) => !isPieceFarOut(id, node.target)).map(({ target }) => `${path}: ${id} at ${target.join(' ')}`),
        ),
      ).toEqual([]);
    }
    expect(trouble).toEqual([]);
  });
}

test('no page scrolls sideways on a phone', async ({ browser }) => {
  test.setTimeout(120_000);
  const context = await browser.newContext({ viewport: { width: 390, height: 844 }, hasTouch: true });
  const page = await context.newPage();
  for (const path of await pathsFor(page, 'owen')) {
    await page.goto(path);
    await settled(page);
    const width = await page.evaluate(() => document.documentElement.scrollWidth);
    expect(width, path).toBeLessThanOrEqual(390);
  }
});

test('a technician sees no draft, and a page of nobody’s is not found', async ({ page }) => {
  await signIn(page, 'tobin');
  const answer = await page.goto('/projects/01930000-0000-7000-8000-000000000001');
  expect(answer?.status()).toBe(404);
  await page.goto('/people');
  await expect(page.getByText(/role|not allowed|may not/i).first()).toBeVisible();
  await expect(page.getByRole('button', { name: /invite/i })).toHaveCount(0);
});

test('a wrong password keeps the address, and signing in leads back to where one was going', async ({ page }) => {
  await page.goto('/instruments');
  await expect(page).toHaveURL(/\/sign-in\?next=/);
  await page.getByLabel('E-mail').fill('ingrid@quillfeather.example');
  await page.getByLabel('Password', { exact: true }).fill('not the password');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByText(/do not fit together/)).toBeVisible();
  await expect(page.getByLabel('E-mail')).toHaveValue('ingrid@quillfeather.example');
  await page.getByLabel('Password', { exact: true }).fill('demo-evenhead-2026');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page).toHaveURL(/\/instruments$/);
  const cookie = (await page.context().cookies()).find(({ name }) => name.includes('session-token'));
  expect(cookie).toMatchObject({ httpOnly: true, sameSite: 'Lax' });
  await page.getByRole('button', { name: /^Account of/ }).click();
  await page.getByRole('menuitem', { name: 'Sign out' }).click();
  await expect(page).toHaveURL(/\/sign-in/);
  await page.goto('/projects');
  await expect(page).toHaveURL(/\/sign-in/);
});
