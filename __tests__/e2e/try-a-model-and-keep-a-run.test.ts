import { existsSync } from 'node:fs';
import path from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { openBrowser, openPage, shot, sideways, signIn, type Device } from '../support/browser';
import { startDesk, type DeskServer } from '../support/desk-server';

// The main job, as its users do it: a director brings a model in, sees it move, changes it and bakes; an artist
// scrubs; a lead sets two runs side by side.

const SAMPLES = process.env.LOLLOP_SAMPLES ?? path.resolve(__dirname, '../../../shared/samples');
const TEAPOT = path.join(SAMPLES, 'teapot_32patches.bpt');
const OWN = path.resolve(__dirname, '../../assets/models/gauge-beam.step');
const file = existsSync(TEAPOT) ? TEAPOT : OWN;
if (file === OWN) process.stdout.write('The sample models are not here; the gauge beam stands in for the teapot.\n');

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

async function frameOf(page: Page): Promise<number> {
  const block = await page.getByText('Frame', { exact: true }).first().locator('xpath=..').innerText();
  return Number(/Frame\s+(\d+)/.exec(block)?.[1] ?? NaN);
}

async function openCard(page: Page, device: Device, name: string): Promise<void> {
  if (device === 'phone') await page.getByRole('tab', { name }).click();
}

async function bake(page: Page): Promise<string> {
  await page.getByRole('button', { name: /^Bake/ }).click();
  await page.waitForURL(/\/runs\/[0-9a-f-]{36}$/, { timeout: 240_000 });
  return /[0-9a-f-]{36}$/.exec(page.url())![0];
}

describe.each<Device>(['wide', 'phone'])('on a %s window', (device) => {
  it('a technical director brings a model in, tunes it live, bakes twice; an artist scrubs; a lead compares', async () => {
    const { page, context, faults } = await openPage(browser, device);
    await signIn(page, desk.url, 'joss@gannet.example', 'bell-buoy');
    await page.getByRole('link', { name: 'Models', exact: true }).click();
    const choosing = page.waitForEvent('filechooser');
    await page.getByRole('button', { name: 'Bring a model in' }).click();
    await (await choosing).setFiles(file);

    // The size is asked for first; until it is answered no scene can be set up.
    await page.getByText(/^Is it .* long\?$/).waitFor();
    expect(await page.getByRole('button', { name: 'Set up a scene' }).getAttribute('aria-disabled')).toBe('true');
    if (file === TEAPOT) await page.getByText('32 of 32 surfaces').waitFor();
    expect(await sideways(page)).toBe(0);
    await shot(page, `${device}-model`);
    await page.getByRole('button', { name: /^centimetres/ }).click();
    await page.getByRole('button', { name: 'Set up a scene' }).click();

    // A first look moves by itself: the frame counter runs and the speed is shown.
    await page.getByText(/^Live, [\d.]+ steps\/s$/).waitFor({ timeout: 120_000 });
    const first = await frameOf(page);
    await page.waitForTimeout(1500);
    expect(await frameOf(page)).toBeGreaterThan(first);

    // A change of stiffness does not restart the scene; a change of part count keeps the pose.
    const stiffness = page.getByRole('textbox', { name: /Young’s modulus, typed/ });
    await stiffness.fill('40');
    await stiffness.press('Enter');
    const before = await frameOf(page);
    await page.waitForTimeout(1000);
    expect(await frameOf(page)).toBeGreaterThan(before);
    await page.getByRole('button', { name: 'Pause' }).click();
    await openCard(page, device, 'Parts');
    const parts = page.getByRole('textbox', { name: 'Part count, typed' });
    await parts.fill('10');
    await parts.press('Enter');
    await page.getByText('10 now').waitFor({ timeout: 120_000 });
    expect(await frameOf(page)).toBeGreaterThanOrEqual(before);
    await openCard(page, device, 'Time');
    const frames = page.getByRole('textbox', { name: 'Frames to bake, typed' });
    await frames.fill('30');
    await frames.press('Enter');
    await shot(page, `${device}-workbench`);
    const left = await bake(page);
    await page
      .getByText(/30 of 30|0 of 30/)
      .first()
      .waitFor();

    // A second run with another stiffness.
    await page.goBack();
    await page
      .getByText(/At hand|Not yet saved/)
      .first()
      .waitFor({ timeout: 120_000 });
    await openCard(page, device, 'Material');
    await stiffness.fill('120');
    await stiffness.press('Enter');
    const right = await bake(page);
    expect(right).not.toBe(left);
    await context.close();

    const artist = await openPage(browser, device);
    await signIn(artist.page, desk.url, 'wren@gannet.example', 'paper-gull');
    await artist.page.goto(`${desk.url}/runs/${left}`);
    await artist.page.getByText('f 0', { exact: true }).waitFor();
    await artist.page.getByRole('button', { name: '+1 frame' }).click();
    await artist.page.getByText('f 1', { exact: true }).waitFor();
    const rule = artist.page.getByRole('slider', { name: 'Frame' });
    const box = (await rule.boundingBox())!;
    await artist.page.mouse.click(box.x + box.width / 2, box.y + 30);
    await artist.page.getByText('f 15', { exact: true }).waitFor();
    await artist.page.getByRole('button', { name: 'Play' }).click();
    await artist.page.getByRole('button', { name: 'Pause' }).click();
    expect(await sideways(artist.page)).toBe(0);
    await artist.page.waitForTimeout(1500);
    await shot(artist.page, `${device}-player`);
    await artist.context.close();

    const lead = await openPage(browser, device);
    await signIn(lead.page, desk.url, 'marta@gannet.example', 'tide-table');
    await lead.page.goto(`${desk.url}/runs/side-by-side?left=${left}&right=${right}`);
    await lead.page.getByText('What differs').waitFor();
    await lead.page.getByText('Young’s modulus').waitFor();
    await lead.page.getByText('40 kPa').waitFor();
    await lead.page.getByText('120 kPa').waitFor();
    await lead.page.waitForTimeout(3000);
    expect(await sideways(lead.page)).toBe(0);
    await shot(lead.page, `${device}-side-by-side`);
    await lead.context.close();
    expect([...faults, ...artist.faults, ...lead.faults]).toEqual([]);
  });
});
