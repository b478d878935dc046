import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { buildServer, buildWeb } from './build.mjs';
import { checkNode, ensurePackages } from './packages.mjs';
import { dataFolder, startPostgres } from './postgres.mjs';
import { findProgram, installDebian, root } from './processes.mjs';
import { runSetup, say } from './say.mjs';

const PROJECTS = ['node', 'web', 'e2e'];

/** Runs one jest project, or its tests whose path matches; resolves to its counts. */
function runJest(project, paths, env, report) {
  const args = [
    'jest',
    '--selectProjects',
    project,
    '--json',
    `--outputFile=${report}`,
    '--testLocationInResults=false',
    ...paths.map((each) => `--testPathPattern=${each}`),
  ];
  const workers = project === 'e2e' ? ['--runInBand'] : ['--maxWorkers=2'];
  return new Promise((resolve) => {
    const child = spawn('npx', [...args, ...workers], {
      cwd: root,
      stdio: ['ignore', 'ignore', 'inherit'],
      env: { ...process.env, ...env },
    });
    child.once('exit', (code) => {
      try {
        const result = JSON.parse(readFileSync(report, 'utf8'));
        // A file that does not even load has no failed test of its own; count it as one.
        const failed = result.numFailedTests + result.numRuntimeErrorTestSuites;
        resolve({
          passed: result.numPassedTests,
          failed: failed || (code === 0 ? 0 : 1),
          skipped: result.numPendingTests,
        });
      } catch {
        resolve({ passed: 0, failed: 1, skipped: 0 });
      }
    });
  });
}

await runSetup(async () => {
  checkNode();
  ensurePackages();
  if (!findProgram('chromium')) {
    say('Installing Chromium for the end-to-end tests …');
    installDebian('chromium', 'Chromium');
  }
  const postgres = await startPostgres(path.join(dataFolder(), 'test'));
  const reports = mkdtempSync(path.join(os.tmpdir(), 'lollop-test-'));
  for (const signal of ['SIGINT', 'SIGTERM']) {
    process.once(signal, () => {
      postgres.stop();
      process.exit(1);
    });
  }
  const total = { passed: 0, failed: 0, skipped: 0 };
  try {
    buildWeb();
    await buildServer();
    const env = { LOLLOP_TEST_DATABASE_URL: `${postgres.url}/postgres` };
    const asked = process.argv.slice(2);
    const only = asked.filter((each) => PROJECTS.includes(each));
    const paths = asked.filter((each) => !PROJECTS.includes(each));
    for (const project of only.length > 0 ? only : PROJECTS) {
      say(`\n${project} tests`);
      const counts = await runJest(project, paths, env, path.join(reports, `${project}.json`));
      for (const key of Object.keys(total)) total[key] += counts[key];
    }
  } finally {
    postgres.stop();
    rmSync(reports, { recursive: true, force: true });
  }
  process.exitCode = total.failed > 0 || total.passed === 0 ? 1 : 0;
  say(`\n${total.passed} passed, ${total.failed} failed${total.skipped > 0 ? `, ${total.skipped} skipped` : ''}`);
});
