import type { Browser } from 'playwright-core';
import { openBrowser, openPage, shot, sideways, signIn, type Device } from '../support/browser';
import { startDesk, type DeskServer } from '../support/desk-server';
import { TRELOAR_1944 } from '../fixtures/treloar-1944';

// A lead has a rubber pulled in a laboratory, fits its stiffness and publishes it for the production.

jest.setTimeout(180_000);

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

/** Strip test of Treloar (1944) as a German laboratory exports it. */
const SHEET = [
  'Dehnung in %;Spannung in MPa',
  ...TRELOAR_1944.filter(({ kind }) => kind === 'uniaxial').map(({ stretch, stress }) =>
    `${((stretch - 1) * 100).toFixed(2)};${stress / 1e6}`.replaceAll('.', ','),
  ),
].join('\r\n');

describe.each<Device>(['wide', 'phone'])('on a %s window', (device) => {
  it('a lead fits a test sheet, publishes the rubber and finds it among ours; a director may use it, not change it', async () => {
    const name = `Strap rubber, ${device}`;
    const lead = await openPage(browser, device);
    await signIn(lead.page, desk.url, 'marta@gannet.example', 'tide-table');
    const { page } = lead;
    await page.getByRole('link', { name: 'Materials', exact: true }).click();
    await page.getByRole('button', { name: 'Fit from a test' }).click();
    const choosing = page.waitForEvent('filechooser');
    await page.getByRole('button', { name: /^Choose a table/ }).click();
    await (
      await choosing
    ).setFiles({ name: 'letter.txt', mimeType: 'text/plain', buffer: Buffer.from('Dear Marta,\nno.') });
    await page.getByText(/^No table was found/).waitFor();
    const again = page.waitForEvent('filechooser');
    await page.getByRole('button', { name: /^Choose a table/ }).click();
    await (await again).setFiles({ name: 'strap.csv', mimeType: 'text/csv', buffer: Buffer.from(SHEET) });

    // μ = 0.372427 MPa up to stretch 1.5 (least squares over the same data, recomputed independently): E = 3 μ.
    await page.getByRole('dialog').getByText('1.12 MPa').waitFor();
    await page.getByText('Holds up to').scrollIntoViewIfNeeded();
    await shot(page, `${device}-fit`);
    await page.getByRole('button', { name: 'Go on with this stiffness' }).click();
    await page.getByRole('button', { name: 'Publish for this production' }).click();
    await page.getByText('Give the material a name.').waitFor();
    await page.getByRole('textbox', { name: 'Name' }).fill(name);
    await page.getByRole('textbox', { name: 'Density, kg/m³' }).fill('1100');
    await page.getByRole('button', { name: 'Publish for this production' }).click();
    await page.getByText('ours, version 1').waitFor();
    await page.getByText(/^Neo-Hookean least-squares fit of strap\.csv/).waitFor();
    expect(await sideways(page)).toBe(0);
    await shot(page, `${device}-published`);
    await lead.context.close();

    const director = await openPage(browser, device);
    await signIn(director.page, desk.url, 'joss@gannet.example', 'bell-buoy');
    await director.page.getByRole('link', { name: 'Materials', exact: true }).click();
    await director.page.getByRole('radio', { name: /^Ours/ }).click();
    await director.page.getByRole('button', { name: new RegExp(`^${name}`) }).click();
    await director.page.getByRole('button', { name: 'New version' }).click();
    await director.page.getByText('Leads publish presets.').waitFor();
    expect([...lead.faults, ...director.faults]).toEqual([]);
    await director.context.close();
  });
});
