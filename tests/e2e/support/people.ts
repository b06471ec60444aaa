import { expect, type Page } from '@playwright/test';

export interface Account { role: string; email: string; password: string }

/** The seeded account of a role. */
export function account(role: 'owner' | 'helper' | 'consultant'): Account {
  const accounts = JSON.parse(process.env.E2E_ACCOUNTS ?? '[]') as Account[];
  const found = accounts.find((one) => one.role.includes(role));
  if (!found) {
    throw new Error(`The demonstration has no ${role}.`);
  }
  return found;
}

/** Signs in through the form and waits for the list of yards (today's page for a person with one), or where the person was going. */
export async function signIn(page: Page, who: { email: string; password: string }, next?: string): Promise<void> {
  await page.goto(next === undefined ? '/sign-in' : `/sign-in?next=${encodeURIComponent(next)}`);
  await page.getByLabel('E-mail').fill(who.email);
  await page.getByLabel('Password', { exact: true }).fill(who.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page).toHaveURL(next === undefined ? /\/yards(\/[\w-]+\/today)?$/ : (url) => url.pathname === next.split('?')[0]);
}

/** The newest mail to an address whose subject matches, read from the demonstration's own mail server. Waits for it to come. */
export async function mailTo(page: Page, email: string, subject: RegExp): Promise<{ subject: string; text: string }> {
  let id = '';
  await expect.poll(async () => {
    const list = (await (await page.request.get('/api/demo/mails')).json()) as { mails: { id: string; to: string; subject: string }[] };
    id = list.mails.find((mail) => mail.to.includes(email) && subject.test(mail.subject))?.id ?? '';
    return id;
  }, { message: `a mail to ${email} about ${String(subject)}`, timeout: 15_000 }).not.toBe('');
  return (await (await page.request.get(`/api/demo/mails/${id}`)).json()) as { subject: string; text: string };
}

/** First link of a mail, as a path of this site. */
export function linkIn(text: string): string {
  const found = /https?:\/\/\S+/.exec(text)?.[0];
  if (found === undefined) {
    throw new Error('The mail has no link.');
  }
  const url = new URL(found);
  return `${url.pathname}${url.search}`;
}
