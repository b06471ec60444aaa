import { expect, test, type Page } from '@playwright/test';
import { expectAccessible } from './support/axe';
import { account, signIn } from './support/people';

interface Yard { id: string; name: string; role: string }
interface Facts { zones: { id: string; seededOn: string | null }[]; taps: { id: string }[]; positions: { id: string }[] }

/** Reads the API as the page itself does, with the token its session gets from the cookie. */
async function read<T>(page: Page, path: string): Promise<T> {
  const session = (await (await page.request.post('/api/auth/refresh', { headers: { 'X-Requested-With': 'dapple' } })).json()) as { accessToken: string };
  const answer = await page.request.get(`/api${path}`, { headers: { Authorization: `Bearer ${session.accessToken}` } });
  expect(answer.ok(), path).toBe(true);
  return (await answer.json()) as T;
}

/** Goes to a page, waits for what it has to show, and looks at it in both themes. */
async function look(page: Page, path: string): Promise<void> {
  for (const colorScheme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
    await page.goto(path);
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
    if (path !== '/gallery') {
      // The gallery shows what waiting and failing look like; everywhere else the wait must be over and nothing failed.
      await expect(page.locator('.d-skeleton')).toHaveCount(0);
      await expect(page.getByRole('alert').filter({ hasText: 'could not be loaded' })).toHaveCount(0);
    }
    await expect(page).toHaveTitle(/Dapple/);
    await expectAccessible(page, `${path} in ${colorScheme}`);
  }
}

const publicPaths = ['/', '/sign-in', '/sign-up', '/forgot', '/reset?token=abcdefghijklmnopqrstuvwxyz', '/confirm?token=abcdefghijklmnopqrstuvwxyz', '/cup-test', '/does-it-fit', '/calculators', '/calculators/move-distance', '/calculators/hose-and-bucket', '/calculators/soil-store', '/calculators/water-balance', '/calculators/seedbed',
  '/calculators/sun-exposure', '/calculators/reference-et', '/credits', '/demo/mail', '/gallery', '/nowhere-at-all'];

test('pages without an account are accessible in both themes', async ({ page }) => {
  test.setTimeout(900_000);
  for (const path of publicPaths) {
    await look(page, path);
  }
});

for (const role of ['owner', 'helper', 'consultant'] as const) {
  test(`what a ${role} sees is accessible in both themes`, async ({ page }) => {
    test.setTimeout(900_000);
    await signIn(page, account(role));
    const { yards } = await read<{ yards: Yard[] }>(page, '/yards');
    const mine = yards.filter((yard) => yard.role === role);
    let seeded: { yard: Yard; facts: Facts } | null = null;
    for (const yard of mine) {
      const facts = await read<Facts>(page, `/yards/${yard.id}`);
      if (seeded === null || (facts.zones.some((zone) => zone.seededOn !== null) && !seeded.facts.zones.some((zone) => zone.seededOn !== null))) {
        seeded = { yard, facts };
      }
    }
    expect(seeded, `the demonstration gives the ${role} a yard`).not.toBeNull();
    const { yard, facts } = seeded as NonNullable<typeof seeded>;
    const of = (part: string) => `/yards/${yard.id}/${part}`;
    const zone = facts.zones.find((one) => one.seededOn !== null);
    const paths = ['/yards', '/yards/new', '/account', of('today'), of('plan'), of('fit'), of('water'), of('people'), of('yard'), of('proposals'), of('season'), ...(zone ? [of(`zones/${zone.id}/establishment`), of(`zones/${zone.id}/sun`)] : [])];
    if (role !== 'helper') {
      paths.push(of('hours'), of('settings'), of('history'), of('set-up'));
    }
    if (facts.taps[0] && facts.positions[0]) {
      paths.push(of(`taps/${facts.taps[0].id}`), of(`positions/${facts.positions[0].id}/catch-test`));
    }
    for (const path of paths) {
      await look(page, path);
    }
  });
}

test('every screen of a yard works from 320 px and with text at twice its size', async ({ page }) => {
  test.setTimeout(600_000);
  await signIn(page, account('owner'));
  const { yards } = await read<{ yards: Yard[] }>(page, '/yards');
  const yard = yards.find((one) => one.role === 'owner') as Yard;
  await page.setViewportSize({ width: 320, height: 700 });
  for (const scale of ['100%', '200%']) {
    for (const part of ['today', 'plan', 'water', 'yard', 'people', 'fit', 'season']) {
      await page.goto(`/yards/${yard.id}/${part}`);
      await page.addStyleTag({ content: `html { font-size: ${scale} !important; }` });
      await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
      await expect(page.locator('.d-skeleton')).toHaveCount(0);
      const sideways = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
      expect(sideways, `${part} at ${scale}`).toBeLessThanOrEqual(0);
    }
  }
});
