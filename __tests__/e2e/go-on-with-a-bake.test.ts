import type { Browser } from 'playwright-core';
import { openBrowser, openPage, shot, signIn } from '../support/browser';
import { startDesk, type DeskServer } from '../support/desk-server';

jest.setTimeout(300_000);

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

it('a bake goes on after its tab was closed, and waits while there is no connection', async () => {
  const { page, context } = await openPage(browser, 'wide');
  await signIn(page, desk.url, 'joss@gannet.example', 'bell-buoy');
  await page.getByRole('link', { name: 'Scenes', exact: true }).click();
  await page.getByRole('link', { name: 'Beam, held at one end' }).click();
  await page.getByText('At hand.').waitFor({ timeout: 120_000 });
  const scene = page.url();
  const frames = page.getByRole('textbox', { name: 'Frames to bake, typed' });
  await frames.fill('400');
  await frames.press('Enter');
  await page.getByRole('button', { name: /^Bake/ }).click();
  await page.waitForFunction(
    () => Number(/(\d+) of 401 frames/.exec(document.body.innerText)?.[1] ?? 0) > 60,
    undefined,
    {
      timeout: 180_000,
    },
  );
  await page.close();

  const again = await context.newPage();
  again.setDefaultTimeout(120_000);
  await again.goto(scene);
  await again.getByText(/was broken off/).waitFor();
  await again.getByText('At hand.').waitFor();
  await again.getByRole('button', { name: 'Continue bake' }).click();
  const progress = again.getByText(/of 401 frames/).first();
  await progress.waitFor();
  // It goes on behind the chunks that were kept, not from the start.
  expect(Number(/^(\d+) of/.exec(await progress.innerText())![1])).toBeGreaterThanOrEqual(24);
  await context.setOffline(true);
  await again.getByText(/no connection, kept here/).waitFor();
  await shot(again, 'wide-bake-waiting');
  await context.setOffline(false);
  await again.waitForURL(/\/runs\/[0-9a-f-]{36}$/);
  await again.getByText('0 of 400').waitFor();
  await context.close();
});
