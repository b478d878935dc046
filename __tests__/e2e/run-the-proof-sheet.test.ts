import type { Browser } from 'playwright-core';
import { openBrowser, openPage, shot, sideways, signIn, type Device } from '../support/browser';
import { startDesk, type DeskServer } from '../support/desk-server';

// Anybody at the desk has the solver prove itself on the device at hand.

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

describe.each<[Device, 'light' | 'dark']>([
  ['wide', 'light'],
  ['phone', 'dark'],
])('on a %s window, %s', (device, scheme) => {
  it('runs six checks one after another, stops, runs again, and shows each beside its textbook', async () => {
    const { page, context, faults } = await openPage(browser, device, scheme);
    await signIn(page, desk.url, 'wren@gannet.example', 'paper-gull');
    await page.getByRole('link', { name: /^Proof/ }).click();
    await page.getByRole('heading', { name: 'Proof sheet' }).waitFor();
    await page.getByText('A preview for pictures.', { exact: false }).waitFor();

    // The cost is said before; stopping keeps what is done and can be taken up again.
    await page.getByRole('button', { name: /^Run the sheet, about \d+ s$/ }).click();
    await page.getByRole('progressbar', { name: 'Proof sheet' }).waitFor();
    await page.getByRole('button', { name: 'Stop, keep what is done' }).click();
    await page.getByRole('button', { name: /, stopped$/ }).first().waitFor(); // prettier-ignore
    await page.getByRole('button', { name: /^Run the sheet/ }).click();

    await page.getByText('6 of 6', { exact: true }).waitFor({ timeout: 120_000 });
    await page.getByRole('button', { name: /^Run again, about \d+ s$/ }).waitFor();
    await page.getByRole('button', { name: /^Patch test, textbook exact, here .*, to rounding$/ }).waitFor();
    await page.getByRole('button', { name: /^Cantilever, textbook 4 mm, here 4.02\d mm, 0\.\d+ % high$/ }).waitFor();
    await page.getByText('All 6 values are within what is asked of them.').waitFor();
    await page.getByText(/^About 0\.\d+ % (soft|stiff) against finer parts$/).waitFor();
    await page.getByRole('img', { name: /^deflection, mm over distance from the held end, m:/ }).waitFor();
    expect(await sideways(page)).toBe(0);
    await page.waitForTimeout(1500);
    await shot(page, `${device}-${scheme}-proof`);

    await page.getByRole('button', { name: /^Large bending, textbook 0.8106, here 0.810\d, 0\.\d+ % low$/ }).click();
    await page.getByText('elliptic integrals', { exact: false }).waitFor();
    await page.getByRole('button', { name: 'Show as a table' }).click();
    await page.getByRole('table', { name: 'down' }).waitFor();
    await page.getByRole('button', { name: 'Show as a plot' }).click();
    for (const name of ['Twist', 'Free vibration', 'Energy', 'Patch test']) {
      await page.getByRole('button', { name: new RegExp(`^${name}`) }).click();
      await page.getByRole('heading', { name, exact: true }).scrollIntoViewIfNeeded();
      await page.waitForTimeout(800);
      await shot(page, `${device}-${scheme}-proof-${name.toLowerCase().replace(/ /g, '-')}`);
    }
    await context.close();
    expect(faults).toEqual([]);
  });
});
