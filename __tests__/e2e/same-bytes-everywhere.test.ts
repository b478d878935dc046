import { readdirSync } from 'node:fs';
import path from 'node:path';
import type { Browser, Page } from 'playwright-core';
import type { Request, Response } from '../../solver/index';
import { openBrowser, openPage } from '../support/browser';
import { startDesk, type DeskServer } from '../support/desk-server';
import { bakeHash, bakeRequests, REPEATABLE } from '../support/repeatable-bakes';

// A bake on a person's machine and one on a bake worker give the same run: Node and the built worker in Chromium.

jest.setTimeout(240_000);

const BUNDLES = '_expo/static/js/web';
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

/** Bakes in the built worker, in the page, and hashes what it sends just as bakeHash does. */
function bakeInPage(page: Page, worker: string, requests: Request[]): Promise<string> {
  // Typed arrays do not survive the way into the page; they travel as lists with their kind.
  const wire = JSON.stringify(requests, (_, value: unknown) =>
    ArrayBuffer.isView(value) ? { array: value.constructor.name, values: [...(value as Float64Array)] } : value,
  );
  return page.evaluate(
    async ([url, text]) => {
      const asked = JSON.parse(text!, (_, value) =>
        value?.array === 'Float64Array' ? Float64Array.from(value.values as number[]) : value,
      ) as Request[];
      const kept: Uint8Array[] = [];
      await new Promise<void>((resolve, reject) => {
        const solver = new Worker(url!);
        solver.onerror = (event) => reject(new Error(`The worker failed: ${event.message}`));
        solver.onmessage = ({ data }: MessageEvent<Response>) => {
          if (data.type === 'error') reject(new Error(data.message));
          if (data.type === 'ready') kept.push(data.ready.recipe);
          if (data.type === 'chunk') kept.push(data.bytes, new Uint8Array(data.state.buffer, data.state.byteOffset, data.state.byteLength)); // prettier-ignore
          if (data.type === 'baked') resolve();
        };
        for (const request of asked) solver.postMessage(request);
      });
      const all = new Uint8Array(kept.reduce((sum, bytes) => sum + bytes.length, 0));
      let at = 0;
      for (const bytes of kept) {
        all.set(bytes, at);
        at += bytes.length;
      }
      const digest = new Uint8Array(await crypto.subtle.digest('SHA-256', all));
      return [...digest].map((byte) => byte.toString(16).padStart(2, '0')).join('');
    },
    [`${desk.url}/${BUNDLES}/${worker}`, wire] as const,
  );
}

it.each(Object.entries(REPEATABLE))('%s: the same bytes in Node and in the browser’s worker', async (_, scene) => {
  const workers = readdirSync(path.resolve(__dirname, '../../dist', BUNDLES)).filter((name) =>
    /^solver-.*\.js$/.test(name),
  );
  expect(workers).toHaveLength(1);
  const { page, context } = await openPage(browser, 'wide');
  await page.goto(`${desk.url}/sign-in`);
  const there = await bakeInPage(page, workers[0]!, bakeRequests(scene));
  await context.close();
  expect(there).toBe(bakeHash(scene));
});
