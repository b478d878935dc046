import { chromium } from 'playwright-core';

const FLAGS = [
  '--no-sandbox',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-sync',
  '--use-gl=angle',
  '--use-angle=swiftshader',
  '--enable-unsafe-swiftshader',
  '--ignore-gpu-blocklist',
];

/**
 * Drives a running Lollop with the demo in it: what a director waits for from choosing a file to the first moving
 * frame, with clicks as fast as the page takes them, and the steps a second that the workbench shows.
 */
export async function measureDesk(url: string, file: string) {
  const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: FLAGS });
  try {
    const page = await browser.newPage({ viewport: { width: 1280, height: 800 } });
    page.setDefaultTimeout(60_000);
    await page.goto(url);
    await page.getByRole('textbox', { name: 'E-mail' }).fill('joss@gannet.example');
    await page.getByRole('textbox', { name: 'Password' }).fill('bell-buoy');
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.getByRole('link', { name: 'Models', exact: true }).click();
    const choosing = page.waitForEvent('filechooser');
    await page.getByRole('button', { name: 'Bring a model in' }).click();
    const chooser = await choosing;
    const begin = performance.now();
    const elapsed = () => (performance.now() - begin) / 1000;
    await chooser.setFiles(file);
    await page.getByText('What was read').waitFor();
    const upload = elapsed();
    const confirm = page.getByRole('button', { name: /^centimetres/ });
    if (await confirm.isVisible()) await confirm.click();
    await page.waitForFunction(() => !document.querySelector('[aria-label="Set up a scene"][aria-disabled="true"]'));
    const asked = elapsed();
    await page.getByRole('button', { name: 'Set up a scene' }).click();
    await page.getByText(/^Live, [\d.]+ steps\/s$/).waitFor();
    const moving = elapsed();
    await page.getByRole('radio', { name: 'Flat out' }).click();
    await page.waitForTimeout(4000);
    const words = await page.getByText(/^Live, [\d.]+ steps\/s$/).innerText();
    const parts = page.getByRole('textbox', { name: 'Part count, typed' });
    await parts.fill('60');
    await parts.press('Enter');
    await page.getByText('60 now').waitFor();
    if (await page.getByRole('button', { name: 'Play' }).isVisible()) {
      await page.getByRole('button', { name: 'Play' }).click();
    }
    await page.waitForTimeout(5000);
    const many = await page.getByText(/^Live, [\d.]+ steps\/s$/).innerText();
    return {
      uploadToMovingSeconds: Number(moving.toFixed(2)),
      uploadSeconds: Number(upload.toFixed(2)),
      openSceneSeconds: Number((moving - asked).toFixed(2)),
      liveStepsPerSecond: Number(/[\d.]+/.exec(words)![0]),
      liveStepsPerSecondAt60Parts: Number(/[\d.]+/.exec(many)![0]),
    };
  } finally {
    await browser.close();
  }
}
