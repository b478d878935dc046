import { mkdtempSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import type { Browser } from 'playwright-core';
import { openBrowser, openPage, shot, signIn } from '../support/browser';
import { startDesk, type DeskServer } from '../support/desk-server';

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

it('a wrong password is refused without saying which half was wrong', async () => {
  const { page, context } = await openPage(browser, 'phone');
  await page.goto(desk.url);
  await page.getByRole('textbox', { name: 'E-mail' }).fill('joss@gannet.example');
  await page.getByRole('textbox', { name: 'Password' }).fill('not it');
  await page.getByRole('button', { name: 'Sign in' }).click();
  const words = await page.getByRole('alert').first().innerText();
  expect(words.length).toBeGreaterThan(10);
  expect(words).not.toMatch(/unknown|no such|not found/i);
  await shot(page, 'phone-sign-in-refused');
  await context.close();
});

it('an artist opens a scene live but is offered neither saving nor baking, and the server refuses both', async () => {
  const { page, context } = await openPage(browser, 'wide');
  await signIn(page, desk.url, 'wren@gannet.example', 'paper-gull');
  await page.getByRole('link', { name: 'Scenes', exact: true }).click();
  await page.getByRole('link', { name: 'Beam, held at one end' }).click();
  await page.getByText('At hand.').waitFor({ timeout: 120_000 });
  await page.getByRole('button', { name: 'Play' }).click();
  await page.getByText(/^Live, [\d.]+ steps\/s$/).waitFor();
  expect(await page.getByRole('button', { name: /^Save revision/ }).count()).toBe(0);
  expect(await page.getByRole('button', { name: /^Bake/ }).getAttribute('aria-disabled')).toBe('true');
  await page.getByText('Technical directors bake.').waitFor();
  const sceneId = /scenes\/([0-9a-f-]{36})/.exec(page.url())![1];
  const status = await page.evaluate(async (id) => {
    const renewed = await fetch('/api/session/refresh', { method: 'POST', headers: { 'X-Lollop': '1' } });
    const { accessToken } = (await renewed.json()) as { accessToken: string };
    const Authorization = `Bearer ${accessToken}`;
    const scene = await (await fetch(`/api/scenes/${id}`, { headers: { Authorization } })).json();
    const revision = await (
      await fetch(`/api/revisions/${scene.latestRevision.id}`, { headers: { Authorization } })
    ).json();
    const answer = await fetch(`/api/scenes/${id}/revisions`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json', Authorization },
      body: JSON.stringify({ basedOn: 1, remark: '', document: revision.document }),
    });
    return answer.status;
  }, sceneId);
  expect(status).toBe(403);
  await context.close();
});

it('a file that is no model, and a connection lost on the way, are each told in a sentence and keep nothing', async () => {
  const folder = mkdtempSync(path.join(os.tmpdir(), 'lollop-e2e-'));
  const wrong = path.join(folder, 'holiday.stp');
  writeFileSync(wrong, 'not a model at all');
  const { page, context } = await openPage(browser, 'wide');
  await signIn(page, desk.url, 'joss@gannet.example', 'bell-buoy');
  await page.getByRole('link', { name: 'Models', exact: true }).click();
  await page.getByText('Steamed pudding').first().waitFor();
  const bring = async () => {
    const choosing = page.waitForEvent('filechooser');
    await page.getByRole('button', { name: 'Bring a model in' }).click();
    await (await choosing).setFiles(wrong);
  };
  await bring();
  await page.getByText('This file was not taken in.').waitFor();
  await page.getByText(/neither STEP nor Bézier-patch text/).waitFor();
  await shot(page, 'wide-upload-refused');
  await context.setOffline(true);
  await bring();
  await page.getByText(/No connection to the studio's server/).waitFor();
  await context.setOffline(false);
  await page.reload();
  await page.getByText('Steamed pudding').first().waitFor();
  expect(await page.getByText('holiday').count()).toBe(0);
  await context.close();
});
