import { type ChildProcess, fork } from 'node:child_process';
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { UnreadableModel } from '../problems/domain-errors';
import { Gate } from './gate';
import type { ReadAnswer, ReadRequest, ReadResult } from './read-result';

export interface ReaderLimits {
  seconds: number;
  /** Resident memory of the child. */
  megabytes: number;
  /** Files read at the same time; the others wait. */
  readers: number;
}

const MEGABYTE = 1024 * 1024;
const WATCH_MILLISECONDS = 100;

/** From the sources the child is TypeScript; in the bundle it lies beside main.js. */
const CHILD = join(__dirname, __filename.endsWith('.ts') ? 'read-model.child.ts' : 'read-model.child.js');

/** Resident bytes of a process, or 0 where the system does not tell (then the heap limit alone holds). */
async function residentBytes(pid: number): Promise<number> {
  const status = await readFile(`/proc/${pid}/status`, 'utf8').catch(() => '');
  return Number(/^VmRSS:\s+(\d+) kB$/m.exec(status)?.[1] ?? 0) * 1024;
}

/**
 * Reads uploaded files in a child process that may crash, hang or eat memory without harm to the
 * server: it is killed at the limits and each file gets its own.
 */
export class ModelReader {
  private readonly gate: Gate;

  constructor(
    private readonly limits: ReaderLimits,
    private readonly child = CHILD,
  ) {
    this.gate = new Gate(limits.readers);
  }

  /** @throws UnreadableModel with a sentence for the person, also when the child had to be killed */
  read(request: ReadRequest): Promise<ReadResult> {
    return this.gate.pass(async () => {
      const answer = await this.ask(request);
      if (answer.kind === 'unreadable') throw new UnreadableModel(answer.detail);
      return answer.result;
    });
  }

  private start(): ChildProcess {
    const { PATH, NODE_ENV, TZ } = process.env;
    const register = this.child.endsWith('.ts') ? ['-r', '@swc-node/register'] : [];
    return fork(this.child, {
      execArgv: [`--max-old-space-size=${this.limits.megabytes}`, ...register],
      // No secrets: the child handles bytes from strangers.
      env: { PATH, NODE_ENV, TZ },
      serialization: 'advanced',
      stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
    });
  }

  private ask(request: ReadRequest): Promise<ReadAnswer> {
    const child = this.start();
    const { seconds, megabytes } = this.limits;
    const unreadable = (detail: string): ReadAnswer => ({ kind: 'unreadable', detail });

    return new Promise<ReadAnswer>((resolve) => {
      const finish = (answer: ReadAnswer) => {
        clearTimeout(clock);
        clearInterval(watch);
        child.kill('SIGKILL');
        resolve(answer);
      };
      const clock = setTimeout(
        () =>
          finish(
            unreadable(
              `Reading the file took longer than ${seconds} s and was stopped. Nothing was kept. Export fewer surfaces at a time.`,
            ),
          ),
        seconds * 1000,
      );
      const watch = setInterval(async () => {
        if (child.pid === undefined || (await residentBytes(child.pid)) <= megabytes * MEGABYTE) return;
        finish(
          unreadable(
            `Reading the file took more than ${megabytes} MB of memory and was stopped. Nothing was kept. Export fewer surfaces at a time.`,
          ),
        );
      }, WATCH_MILLISECONDS);

      const broken = () =>
        finish(
          unreadable(
            'The reader gave up on this file. Nothing was kept. Export it again, as STEP or as Bézier patches.',
          ),
        );
      child.once('message', (answer) => finish(answer as ReadAnswer));
      child.once('error', broken);
      child.once('exit', broken);
      child.send(request, (error) => error && broken());
    });
  }
}
