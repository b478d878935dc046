import type { Browser } from 'playwright-core';
import { openBrowser, openPage, shot, sideways, signIn, type Device } from '../support/browser';
import { startDesk, type DeskServer } from '../support/desk-server';

// A director asks whether the part count is enough, while the body goes on moving.

jest.setTimeout(240_000);

let desk: DeskServer;
let browser: Browser;

beforeAll(async () => {
  desk = await startDesk();
  browser = await openBrowser();
});
afterAll(async () => {
  await browser?.close();
  await desk?.stop();
});

it.each<Device>(['wide', 'phone'])(
  'on a %s window: cost said before, an answer in words and number',
  async (device) => {
    const { page, context, faults } = await openPage(browser, device);
    await signIn(page, desk.url, 'joss@gannet.example', 'bell-buoy');
    await page.getByRole('link', { name: 'Scenes', exact: true }).click();
    await page.getByRole('link', { name: /^Pudding wobble/ }).click();
    await page.getByRole('button', { name: 'Play' }).click({ timeout: 120_000 });
    await page.getByText(/^Live, [\d.]+ steps\/s$/).waitFor({ timeout: 120_000 });

    if (device === 'phone') await page.getByRole('tab', { name: 'Parts' }).click();
    const compare = page.getByRole('button', { name: /^Compare with finer parts, about \d+ s$/ });
    await compare.click();
    await page.getByRole('progressbar', { name: 'Comparing with finer parts' }).waitFor();
    await page.getByRole('button', { name: 'Stop comparing' }).click();
    await compare.click();
    await page.getByText(/^(About [\d.]+ % (soft|stiff) against|The same with|As soft as with) finer parts/).waitFor({ timeout: 120_000 }); // prettier-ignore
    await page.getByText(/^\d+ parts beside \d+, at [\d.]+ s, the farthest pose;/).waitFor();
    await page.getByText(/^Live, [\d.]+ steps\/s$/).waitFor();
    expect(await sideways(page)).toBe(0);
    await shot(page, `${device}-converged`);

    // Another part count is another question.
    const parts = page.getByRole('textbox', { name: 'Part count, typed' });
    await parts.fill('12');
    await parts.press('Enter');
    await compare.waitFor();
    await context.close();
    expect(faults).toEqual([]);
  },
);
