import { expect, test } from '@playwright/test';
import { account, signIn } from './support/people';

test('signing in works by keyboard alone, and sends on to where one was going', async ({ page }) => {
  const owner = account('owner');
  await page.goto('/account');
  await expect(page).toHaveURL(/\/sign-in\?next=%2Faccount$/);
  await page.getByLabel('E-mail').focus();
  await page.keyboard.type(owner.email);
  await page.keyboard.press('Tab');
  await page.keyboard.type(owner.password);
  await page.keyboard.press('Enter');
  await expect(page).toHaveURL(/\/account$/);
  await expect(page.getByText(owner.email).first()).toBeVisible();
});

test('a session survives a reload, and signing out ends it', async ({ page }) => {
  await signIn(page, account('helper'));
  await page.reload();
  await expect(page).toHaveURL(/\/yards/);
  await page.goto('/account');
  await page.getByRole('button', { name: 'Sign out', exact: true }).click();
  await page.goto('/yards');
  await expect(page).toHaveURL(/\/sign-in/);
});

test('a wrong password is told in a sentence and keeps what was typed', async ({ page }) => {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(account('owner').email);
  await page.getByLabel('Password', { exact: true }).fill('not the password at all');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('alert')).toContainText(/[a-z]{4,}/);
  await expect(page.getByLabel('E-mail')).toHaveValue(account('owner').email);
});

test('a failing service is told with what was kept and a way on; the way on works', async ({ page }) => {
  await signIn(page, account('owner'));
  let failing = true;
  await page.route('**/api/yards/*/today', (route) => (failing ? route.fulfill({ status: 500, contentType: 'application/json', body: JSON.stringify({ error: { code: 'internal_error', message: 'Something went wrong here.', requestId: 'x' } }) }) : route.continue()));
  await page.reload();
  await expect(page.getByRole('alert')).toContainText('Today’s plan could not be loaded');
  await expect(page.getByRole('alert')).toContainText('Nothing you entered was lost');
  failing = false;
  await page.getByRole('button', { name: 'Try again' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/June/);
});

test('a lost connection while saving keeps the form; the same press then does it once', async ({ page }) => {
  await signIn(page, account('owner'), '/account');
  const sent: (string | undefined)[] = [];
  let lost = true;
  await page.route('**/api/me', (route) => {
    if (route.request().method() !== 'PATCH') {
      return route.continue();
    }
    sent.push(route.request().headers()['idempotency-key']);
    return lost ? route.abort('connectionreset') : route.continue();
  });
  const name = page.getByLabel('Your name');
  const before = await name.inputValue();
  await name.fill('A name typed on a bad line');
  await page.getByRole('button', { name: 'Save the name' }).click();
  await expect(page.getByRole('alert')).toContainText('No connection');
  await expect(name).toHaveValue('A name typed on a bad line');
  lost = false;
  await page.getByRole('button', { name: 'Save the name' }).click();
  await expect(page.getByRole('heading', { name: 'A name typed on a bad line' })).toBeVisible();
  expect(sent).toHaveLength(2);
  expect(sent[0]).toBe(sent[1]);
  await name.fill(before);
  await page.getByRole('button', { name: 'Save the name' }).click();
  await expect(page.getByRole('heading', { name: before })).toBeVisible();
});

test('scripts of other origins and inline scripts are not let in', async ({ page }) => {
  const answer = await page.goto('/');
  const policy = answer?.headers()['content-security-policy'] ?? '';
  expect(policy).toContain("script-src 'self'");
  expect(policy).not.toMatch(/script-src[^;]*unsafe-inline/);
});

test('a service that does not answer signs nobody out', async ({ page }) => {
  await signIn(page, account('helper'));
  let down = true;
  await page.route('**/api/auth/refresh', (route) => (down ? route.fulfill({ status: 503, body: '' }) : route.continue()));
  await page.reload();
  await expect(page.getByRole('alert')).toContainText('You are still signed in');
  down = false;
  await page.getByRole('button', { name: 'Try again' }).click();
  await expect(page).toHaveURL(/\/yards/);
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
  await expect(page.getByRole('alert')).toHaveCount(0);
});

test('what if shows the difference before anything is kept, and a fixed set stays fixed', async ({ page }) => {
  await signIn(page, account('owner'));
  await page.getByRole('link', { name: 'Plan', exact: true }).click();
  await page.getByRole('button', { name: 'Try something' }).click();
  const dialog = page.getByRole('dialog', { name: 'What if' });
  await dialog.getByLabel('Something else counts most').check();
  await dialog.getByLabel(/^Spare water/).check();
  await dialog.getByRole('button', { name: 'Show the difference' }).click();
  await expect(page.getByText('Spare water counts most')).toBeVisible();
  await expect(page.getByRole('button', { name: 'Keep it' })).toBeVisible();
  await page.getByRole('button', { name: 'Forget it' }).click();
  await expect(page.getByText('Keep it green', { exact: true })).toBeVisible();

  await page.locator('.p-sets > li[data-kind="set"] summary').first().click();
  const fix = page.getByRole('button', { name: /^Fix the set/ }).first();
  const name = (await fix.getAttribute('aria-label') ?? '').replace('Fix the set ', '');
  await fix.click();
  await expect(page.getByText('Fixed', { exact: true })).toBeVisible();
  await page.getByRole('button', { name: `Let the fixed set ${name} go` }).click();
  await expect(page.getByText('Fixed', { exact: true })).toHaveCount(0);
});
