import { expect, test, type Page } from '@playwright/test';
import { linkIn, mailTo } from './support/people';

const password = 'a hose across the lawn';

/** Signs up, confirms by the mail's link, and stands at the list of yards. */
async function join(page: Page, name: string, email: string, next?: string): Promise<void> {
  await page.goto(next ?? '/sign-up');
  if (next !== undefined) {
    await page.getByRole('link', { name: 'Make an account' }).click();
  }
  await page.getByLabel('Your name').fill(name);
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Make an account' }).click();
  await expect(page.getByRole('heading', { name: 'One link to go' })).toBeVisible();
  const mail = await mailTo(page, email, /confirm/i);
  await page.goto(linkIn(mail.text));
  await page.getByRole('button', { name: 'Confirm and go in' }).click();
  await expect(page).toHaveURL(/\/yards$/);
}

async function budgetToday(page: Page): Promise<string> {
  await page.getByRole('link', { name: 'Water', exact: true }).click();
  await page.getByText(/Each day of .* in numbers/).first().click();
  const row = page.locator('[data-selected]').first();
  await expect(row).toBeVisible();
  return (await row.textContent()) ?? '';
}

test('from signing up to the morning round and a consultant’s change', async ({ page, browser, baseURL }, { project }) => {
  test.setTimeout(420_000);
  const owner = `owner.${project.name}@example.org`;
  const consultant = `consultant.${project.name}@example.org`;

  await test.step('sign up and confirm', () => join(page, 'Robin Vale', owner));

  await test.step('set up a yard in two steps, with a bucket test', async () => {
    await page.getByRole('link', { name: 'Set up a yard' }).click();
    await page.getByLabel('What to call it').fill('Quince Row');
    const place = page.getByRole('combobox', { name: 'Nearest town' });
    await place.fill('White Plains');
    await page.getByRole('option', { name: /White Plains/ }).first().click();
    await expect(page.getByText('Clock: America/New_York')).toBeVisible();
    await page.getByRole('button', { name: 'Go on to tap and lawn' }).click();
    await page.getByLabel('The bucket holds').fill('5');
    await page.getByLabel('Full after').fill('60');
    await page.getByLabel('Hose length').fill('50');
    await page.getByLabel('Name', { exact: true }).fill('Back lawn');
    await page.getByLabel('One side').fill('30');
    await page.getByLabel('Other side').fill('25');
    await page.getByRole('button', { name: 'Another zone' }).click();
    const strip = page.getByLabel('Name', { exact: true }).nth(1);
    await strip.fill('New strip');
    await page.getByLabel('One side').nth(1).fill('20');
    await page.getByLabel('Other side').nth(1).fill('10');
    await page.getByRole('radio', { name: 'Newly seeded' }).nth(1).check({ force: true });
    await page.getByLabel('Sown on').fill('2026-06-08');
    await page.getByRole('button', { name: 'Make the first plan' }).click();
    await expect(page).toHaveURL(/\/today$/);
  });

  await test.step('the plan has ten days, each set and each zone without one with a reason', async () => {
    await page.getByRole('link', { name: 'Plan', exact: true }).click();
    await expect(page.getByRole('heading', { level: 1 })).toContainText('ten days');
    await expect(page.locator('.p-day')).toHaveCount(10);
    await page.locator('.p-why summary').first().click();
    await expect(page.locator('.p-why li').first()).toHaveText(/\d/);
    await page.locator('.p-without summary').first().click();
    await expect(page.locator('.p-without dd').first()).toHaveText(/\w{3,}/);
  });

  await test.step('record a catch-cup test', async () => {
    await page.getByRole('link', { name: 'Yard', exact: true }).click();
    await page.getByRole('link', { name: /^Catch-cup test of/ }).first().click();
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
    await page.getByLabel('Minutes it ran').fill('60');
    const cups = page.getByRole('textbox', { name: /^Cup \d|row \d/i });
    await expect(cups.first()).toBeVisible();
    for (let index = 0, count = await cups.count(); index < count; index += 1) {
      await cups.nth(index).fill(String(3 + (index % 3)));
    }
    await expect(page.getByText(/low-quarter uniformity/i).first()).toBeVisible();
    await page.getByRole('button', { name: 'Save this test' }).click();
    await expect(page.getByText(/in\/h/).first()).toBeVisible();
    await page.getByRole('link', { name: 'Yard', exact: true }).click();
    await expect(page.getByText('from a catch-cup test').first()).toBeVisible();
  });

  await test.step('the morning reminder comes', async () => {
    // The plan's next outing is within ten days; the clock moves to each event until its mail is there.
    let come = false;
    for (let jumps = 0; jumps < 40 && !come; jumps += 1) {
      const answer = await page.request.post('/api/demo/clock/jump', { data: { to: 'next_event' } });
      expect(answer.ok()).toBe(true);
      const mails = (await (await page.request.get('/api/demo/mails')).json()) as { mails: { to: string; subject: string }[] };
      come = mails.mails.some((mail) => mail.to.includes(owner) && /Quince Row: .* from/.test(mail.subject));
    }
    const mail = await mailTo(page, owner, /Quince Row: .* from/);
    expect(mail.text).toMatch(/Done by/);
    expect(mail.text).toMatch(/min/);
    expect(mail.text).toMatch(/ in\b/);
    await page.goto(linkIn(mail.text));
    await expect(page).toHaveURL(/\/today$/);
  });

  await test.step('run the round with its countdown and its move, and say that the water is off', async () => {
    await page.getByRole('button', { name: 'Start the round' }).click();
    await expect(page.getByRole('timer')).toBeVisible();
    await page.getByRole('button', { name: '+10 min on this set' }).click();
    for (let sets = 0; sets < 12; sets += 1) {
      await page.request.post('/api/demo/clock/jump', { data: { to: 'hour' } });
      await page.reload();
      await expect(page.getByRole('timer')).toBeVisible();
      const moved = page.getByRole('button', { name: 'Hose moved' });
      if (!(await moved.isVisible())) {
        break;
      }
      const place = await page.getByText(/^Set \d+ of \d+$/).textContent();
      await moved.click();
      await expect(page.getByText(place ?? '', { exact: true })).toHaveCount(0);
    }
    await page.getByRole('button', { name: 'Water off', exact: true }).click();
    await expect(page.getByRole('heading', { name: 'The water is off.' })).toBeVisible();
    await expect(page.getByText('Done', { exact: true }).first()).toBeVisible();
  });

  await test.step('the water budget has moved', async () => {
    await page.getByRole('link', { name: 'See the water budget' }).click();
    await expect(page).toHaveURL(/\/water$/);
    const row = await budgetToday(page);
    expect(row).toMatch(/0\.\d*[1-9]/);
  });

  await test.step('invite a consultant, who joins and sees the yard among others', async () => {
    await page.getByRole('link', { name: 'People', exact: true }).click();
    await page.getByLabel('E-mail').fill(consultant);
    await page.getByRole('radio', { name: /^Consultant/ }).check({ force: true });
    await page.getByRole('button', { name: 'Send the invitation' }).click();
    await expect(page.getByText('Invited, not here yet')).toBeVisible();
  });

  const second = await browser.newContext({ baseURL, viewport: page.viewportSize() });
  const other = await second.newPage();
  await test.step('the consultant proposes other doses with a reason', async () => {
    await join(other, 'Sage Moreno', consultant);
    const invitation = await mailTo(other, consultant, /Quince Row/);
    await other.goto(linkIn(invitation.text));
    await other.getByRole('button', { name: 'Join this yard' }).click();
    await expect(other).toHaveURL(/\/today$/);
    await other.getByRole('link', { name: 'All yards' }).click();
    await expect(other.getByRole('link', { name: 'Quince Row' })).toBeVisible();
    await other.getByRole('link', { name: 'Quince Row' }).click();
    const sowing = other.getByRole('link', { name: /doses and stages/i });
    if (!(await sowing.isVisible())) {
      await other.getByRole('link', { name: 'Yard', exact: true }).click();
    }
    await other.getByRole('link', { name: /doses and stages/i }).first().click();
    await other.getByRole('button', { name: 'Propose other doses' }).click();
    await other.getByLabel('Doses a day').first().fill('4');
    await other.getByLabel('Times').first().fill('9:30, 12:00, 14:00, 16:00');
    await other.getByLabel('Why').fill('The surface was dry by three on two afternoons.');
    await other.getByRole('button', { name: 'Send this change to the owner' }).click();
    await expect(other.getByText('Waiting for the owner')).toBeVisible();
  });

  await test.step('the owner reads why and accepts; both see it in the history', async () => {
    await mailTo(page, owner, /propos/i);
    await page.getByRole('link', { name: 'Today', exact: true }).click();
    await page.getByRole('link', { name: 'Read and answer' }).click();
    await expect(page.getByText('The surface was dry by three on two afternoons.')).toBeVisible();
    await page.getByRole('button', { name: 'Accept these doses' }).click();
    await expect(page.getByText(/^Accepted by/)).toBeVisible();
    await page.goto(`${new URL(page.url()).pathname.replace(/\/proposals$/, '/history')}`);
    await expect(page.getByText(/Proposal .*accepted/).first()).toBeVisible();
    await other.goto(new URL(page.url()).pathname);
    await expect(other.getByText(/Proposal .*accepted/).first()).toBeVisible();
  });
  await second.close();
});
