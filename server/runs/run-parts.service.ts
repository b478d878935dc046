import { createHash } from 'node:crypto';
import type { DataSource, EntityManager } from 'typeorm';
import { FRAMES_PER_CHUNK } from '../../shared/limits';
import type { Actor } from '../people/actor';
import { ChecksumMismatch, Conflict, InvalidRequest, NotFound } from '../problems/domain-errors';
import { Run } from './run.entity';
import { RunCheckpoint } from './run-checkpoint.entity';
import { RunChunk } from './run-chunk.entity';
import { RunRecipe } from './run-recipe.entity';
import { chunksOf, posesOf } from './runs.mapper';
import type { RunsService } from './runs.service';

/** Bytes as they were sent, with the hash the sender took of them. */
export interface Sent {
  bytes: Buffer;
  sha256: string;
}

/** The hash at once, the bytes only when somebody still wants them. */
export interface Kept {
  sha256: string;
  read: () => Promise<Buffer>;
}

/** The bytes of a run: chunks in order, the recipe once, the checkpoint that replaces itself. */
export class RunPartsService {
  constructor(
    private readonly data: DataSource,
    private readonly runs: RunsService,
  ) {}

  /** The same bytes again are fine. @throws ChecksumMismatch; Conflict out of order, for other bytes, when complete */
  async putChunk(actor: Actor, runId: string, index: number, sent: Sent): Promise<void> {
    await this.change(actor, runId, sent, async (manager, run, content) => {
      const wanted = chunksOf(run);
      if (index >= wanted) {
        throw new InvalidRequest(`The run has ${wanted} chunks.`, [
          { pointer: '/path/index', detail: `Count from 0 to ${wanted - 1}.` },
        ]);
      }
      const kept = await manager.findOneBy(RunChunk, { runId, index });
      if (kept) return requireSame(kept.sha256, sent.sha256, `Chunk ${index}`);
      requireUnfinished(run);
      const arrived = await manager.countBy(RunChunk, { runId });
      if (index !== arrived) throw new Conflict(`Chunks come in order. Send chunk ${arrived} next.`);
      await manager.insert(RunChunk, { runId, index, ...content });
    });
  }

  async putRecipe(actor: Actor, runId: string, sent: Sent): Promise<void> {
    await this.change(actor, runId, sent, async (manager, run, content) => {
      const kept = await manager.findOneBy(RunRecipe, { runId });
      if (kept) return requireSame(kept.sha256, sent.sha256, 'The surface recipe');
      requireUnfinished(run);
      await manager.insert(RunRecipe, { runId, ...content });
    });
  }

  /** @throws Conflict when the chunks do not reach up to `frame`: going on from there would leave a hole */
  async putCheckpoint(actor: Actor, runId: string, frame: number, sent: Sent): Promise<void> {
    await this.change(actor, runId, sent, async (manager, run, content) => {
      requireUnfinished(run);
      const poses = Math.min(posesOf(run), FRAMES_PER_CHUNK * (await manager.countBy(RunChunk, { runId })));
      if (frame > poses)
        throw new Conflict(`The chunks that have arrived hold ${poses} poses. Send those up to frame ${frame} first.`);
      await manager.upsert(RunCheckpoint, { runId, frame, ...content }, ['runId']);
    });
  }

  async chunk(actor: Actor, runId: string, index: number): Promise<Kept> {
    await this.runs.requireMayRead(actor, runId);
    const chunks = this.data.getRepository(RunChunk);
    const where = { runId, index };
    const read = async () =>
      (await chunks.findOneOrFail({ where, select: { runId: true, index: true, content: true } })).content;
    return kept(await chunks.findOneBy(where), 'chunk', read);
  }

  async recipe(actor: Actor, runId: string): Promise<Kept> {
    await this.runs.requireMayRead(actor, runId);
    const recipes = this.data.getRepository(RunRecipe);
    const read = async () =>
      (await recipes.findOneOrFail({ where: { runId }, select: { runId: true, content: true } })).content;
    return kept(await recipes.findOneBy({ runId }), 'surface recipe', read);
  }

  /** Hash and bytes in one reading: it may be replaced at any time. */
  async checkpoint(actor: Actor, runId: string): Promise<Kept & { frame: number }> {
    await this.runs.requireMayRead(actor, runId);
    const select = { runId: true, frame: true, sha256: true, content: true } as const;
    const found = await this.data.getRepository(RunCheckpoint).findOne({ where: { runId }, select });
    if (!found) throw new NotFound('checkpoint');
    return { frame: found.frame, sha256: found.sha256, read: () => Promise.resolve(found.content) };
  }

  /** Checks who and what, then runs `work` with the run locked, so that parts of one run come one after another. */
  private async change(
    actor: Actor,
    runId: string,
    { bytes, sha256 }: Sent,
    work: (
      manager: EntityManager,
      run: Run,
      content: { bytes: number; sha256: string; content: Buffer },
    ) => Promise<void>,
  ): Promise<void> {
    await this.runs.requireMayBake(actor, runId);
    if (createHash('sha256').update(bytes).digest('hex') !== sha256) throw new ChecksumMismatch();
    await this.data.transaction(async (manager) => {
      const run = await manager.findOne(Run, { where: { id: runId }, lock: { mode: 'pessimistic_write' } });
      if (!run) throw new NotFound('run');
      await work(manager, run, { bytes: bytes.length, sha256, content: bytes });
      if (run.status === 'baking') await manager.update(Run, { id: runId }, { activeAt: new Date() });
    });
  }
}

function requireSame(keptHash: string, sentHash: string, what: string): void {
  if (keptHash !== sentHash) throw new Conflict(`${what} is here already with other bytes. It is kept as it is.`);
}

function requireUnfinished(run: Run): void {
  if (run.status === 'complete') throw new Conflict('The run is complete. It is kept as it is.');
}

function kept(found: { sha256: string } | null, what: string, read: () => Promise<Buffer>): Kept {
  if (!found) throw new NotFound(what);
  return { sha256: found.sha256, read };
}
