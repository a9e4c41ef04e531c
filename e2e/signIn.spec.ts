import { expect, lead, test } from './support/test';

test('a person without a session is asked to sign in, and is let in', async ({
  openPage,
  signedIn,
  house,
}) => {
  await expect(signedIn).toHaveURL(/\/shows$/);
  const page = await openPage({ width: 390, height: 844 });
  await page.goto(`${house.address}/shows`);
  await expect(page).toHaveURL(/\/sign-in/);
  await page.getByLabel('Mail').fill(lead.email);
  await page.getByLabel('Password').fill('not the right words');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('alert')).toBeVisible();
  await expect(page.getByLabel('Mail')).toHaveValue(lead.email);
  await page.getByLabel('Password').fill(lead.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page).toHaveURL(/\/shows$/);
});
