import { expectLit } from './support/pixels';
import { expect, lead, test } from './support/test';

test('a newcomer comes from the set-up link to a lit display within three minutes', async ({
  newcomer,
  openPage,
  house,
}) => {
  test.setTimeout(240_000);
  const from = Date.now();
  await newcomer.getByLabel('Crew').fill(lead.crewName);
  await newcomer.getByLabel('Your name').fill(lead.name);
  await newcomer.getByLabel('Your mail').fill(lead.email);
  await newcomer.getByLabel('Password').fill(lead.password);
  await expect(newcomer.getByLabel(/Bring the demo night/)).toBeChecked();
  await newcomer.getByRole('button', { name: 'Make the crew' }).click();
  await expect(newcomer).toHaveURL(/\/shows\/[A-Za-z0-9_-]+$/, { timeout: 120_000 });
  const showUrl = newcomer.url();

  const display = await openPage({ width: 640, height: 360 });
  const asked = display.waitForResponse((answer) => new URL(answer.url()).pathname === '/api/pairing');
  await display.goto(`${house.address}/display`);
  const { code } = (await (await asked).json()) as { code: string };
  const [word = '', digits = ''] = code.split(' ');
  await expect(display.locator('body')).toContainText(word);
  await expect(display.locator('body')).toContainText(digits);

  await newcomer.goto(`${showUrl}/outputs`);
  await newcomer.getByLabel('Code').fill(code.toLowerCase());
  await newcomer.getByRole('button', { name: 'Look it up' }).click();
  await expect(newcomer.getByText('640×360').first()).toBeVisible();
  await newcomer.getByLabel('Name it').fill('House left');
  await newcomer.getByRole('button', { name: 'Join it' }).click();
  await expect(newcomer.getByRole('heading', { name: 'House left' })).toBeVisible();
  await newcomer.getByLabel('Add a region of').selectOption({ index: 1 });
  await newcomer.getByRole('button', { name: 'Save version' }).click();
  await expect(newcomer.getByRole('button', { name: 'Go back to 1' })).toBeVisible();

  await newcomer.setViewportSize({ width: 390, height: 844 });
  await newcomer.goto(`${showUrl}/handset`);
  await newcomer.locator('[data-scene]').first().click();
  await expectLit(display, [
    [200, 120],
    [320, 180],
    [440, 240],
    [320, 120],
    [260, 200],
  ]);
  await expect(newcomer.locator('[data-scene]').first()).toHaveAttribute('data-state', /on|look/, {
    timeout: 20_000,
  });
  expect(Date.now() - from, 'time from the set-up link to a lit display, ms').toBeLessThan(180_000);
});
