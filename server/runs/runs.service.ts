import type { DataSource, EntityManager } from 'typeorm';
import type { Role } from '../../shared/words';
import { type RunCreate, type RunTraces, runTracesSchema } from '../../shared/wire/runs';
import type { AuditService } from '../audit/audit.service';
import type { Page, PageRequest } from '../paging/cursor';
import type { Actor } from '../people/actor';
import { Conflict, type Fault, InvalidRequest, NotFound } from '../problems/domain-errors';
import type { MembershipsService } from '../productions/memberships.service';
import type { ProductionsService } from '../productions/productions.service';
import type { ScenesService } from '../scenes/scenes.service';
import { Run } from './run.entity';
import { RunCheckpoint } from './run-checkpoint.entity';
import { RunChunk } from './run-chunk.entity';
import { RunRecipe } from './run-recipe.entity';
import type { RunViews } from './run-views';
import { chunksOf, posesOf, type RunView } from './runs.mapper';

export class RunsService {
  constructor(
    private readonly data: DataSource,
    private readonly views: RunViews,
    private readonly memberships: MembershipsService,
    private readonly productions: ProductionsService,
    private readonly scenes: ScenesService,
    private readonly audit: AuditService,
  ) {}

  async start(actor: Actor, sceneId: string, wanted: RunCreate, address?: string): Promise<RunView> {
    const { productionId } = await this.scenes.get(actor, sceneId);
    await this.memberships.require(actor, productionId, 'technical-director', 'scene');
    const { revisionId, frames, framesPerSecond, provenance } = wanted;
    if (!(await this.scenes.hasRevision(sceneId, revisionId))) {
      throw new InvalidRequest('The run needs a revision of this scene.', [
        { pointer: '/revisionId', detail: 'This scene has no such revision. Save it first.' },
      ]);
    }
    const id = await this.data.transaction(async (manager) => {
      const number = await this.productions.nextRunNumber(manager, productionId);
      const values = {
        productionId,
        sceneId,
        revisionId,
        number,
        frames,
        framesPerSecond,
        provenance,
        createdById: actor.id,
      };
      const run = manager.create(Run, values);
      await manager.insert(Run, run);
      await this.record(manager, 'run-started', actor, run, address);
      return run.id;
    });
    return this.views.one(id);
  }

  async get(actor: Actor, id: string): Promise<RunView> {
    const view = await this.views.one(id);
    await this.memberships.require(actor, view.run.productionId, 'artist', 'run');
    return view;
  }

  async inProduction(actor: Actor, productionId: string, request: PageRequest): Promise<Page<RunView>> {
    await this.memberships.require(actor, productionId, 'artist');
    return this.views.page({ productionId }, request);
  }

  async ofScene(actor: Actor, sceneId: string, request: PageRequest): Promise<Page<RunView>> {
    await this.scenes.get(actor, sceneId);
    return this.views.page({ sceneId }, request);
  }

  /** @throws NotFound */
  requireMayRead(actor: Actor, id: string): Promise<void> {
    return this.require(actor, id, 'artist');
  }

  /** Asked before the bytes of a run are taken in. @throws NotFound, NotAllowed */
  requireMayBake(actor: Actor, id: string): Promise<void> {
    return this.require(actor, id, 'technical-director');
  }

  /** @throws Conflict while a chunk or the recipe is missing, or when it was completed with other traces */
  async complete(actor: Actor, id: string, traces: RunTraces, address?: string): Promise<RunView> {
    await this.requireMayBake(actor, id);
    await this.data.transaction(async (manager) => {
      const run = await this.lock(manager, id);
      const faults = lengthFaults(traces, posesOf(run));
      if (faults.length > 0) throw new InvalidRequest('The traces do not have one value a frame.', faults);
      if (run.status === 'complete') return requireSameTraces(await this.storedTraces(id), traces);
      await this.requireWhole(manager, run);
      await manager.update(Run, { id }, { status: 'complete', traces, completedAt: new Date(), activeAt: new Date() });
      await manager.delete(RunCheckpoint, { runId: id });
      await this.record(manager, 'run-completed', actor, run, address);
    });
    return this.views.one(id);
  }

  async traces(actor: Actor, id: string): Promise<RunTraces> {
    await this.requireMayRead(actor, id);
    const traces = await this.storedTraces(id);
    if (!traces) throw new NotFound('trace');
    return traces;
  }

  /** Throws an unfinished run away. @throws Conflict for a complete one */
  async remove(actor: Actor, id: string, address?: string): Promise<void> {
    await this.requireMayBake(actor, id);
    await this.data.transaction(async (manager) => {
      const run = await this.lock(manager, id);
      if (run.status === 'complete')
        throw new Conflict('A complete run is kept. Only unfinished ones can be thrown away.');
      await manager.delete(Run, { id });
      await this.record(manager, 'run-deleted', actor, run, address);
    });
  }

  private async require(actor: Actor, id: string, role: Role): Promise<void> {
    const run = await this.data.getRepository(Run).findOne({ where: { id }, select: { id: true, productionId: true } });
    if (!run) throw new NotFound('run');
    await this.memberships.require(actor, run.productionId, role, 'run');
  }

  private async lock(manager: EntityManager, id: string): Promise<Run> {
    const run = await manager.findOne(Run, { where: { id }, lock: { mode: 'pessimistic_write' } });
    if (!run) throw new NotFound('run');
    return run;
  }

  /** Hashes were checked when the bytes came, and the database holds them to it; what remains is to count. */
  private async requireWhole(manager: EntityManager, run: Run): Promise<void> {
    const arrived = await manager.countBy(RunChunk, { runId: run.id });
    const wanted = chunksOf(run);
    if (arrived < wanted)
      throw new Conflict(`${arrived} of ${wanted} chunks have arrived. Send the others, then complete the run.`);
    if (await manager.existsBy(RunRecipe, { runId: run.id })) return;
    throw new Conflict('The surface recipe has not arrived. Send it, then complete the run.');
  }

  private async storedTraces(id: string): Promise<RunTraces | null> {
    const run = await this.data.getRepository(Run).findOne({ where: { id }, select: { id: true, traces: true } });
    return run?.traces ?? null;
  }

  private record(
    manager: EntityManager,
    kind: 'run-started' | 'run-completed' | 'run-deleted',
    actor: Actor,
    run: Run,
    address?: string,
  ) {
    const details = { runId: run.id, number: run.number };
    return this.audit.record(manager, { kind, personId: actor.id, productionId: run.productionId, address, details });
  }
}

function lengthFaults(traces: RunTraces, poses: number): Fault[] {
  const lists = [
    ...traces.gauges.map(({ displacement }, i) => ({
      pointer: `/traces/gauges/${i}/displacement`,
      length: displacement.length,
    })),
    ...(['energy', 'volumeChange', 'worstCompression'] as const).map((key) => ({
      pointer: `/traces/${key}`,
      length: traces[key].length,
    })),
  ];
  return lists
    .filter(({ length }) => length !== poses)
    .map(({ pointer, length }) => ({
      pointer,
      detail: `Give ${poses} values, frame 0 included; there are ${length}.`,
    }));
}

/** Key order and -0 do not survive jsonb, so both sides go through the schema and JSON once more. */
function requireSameTraces(stored: RunTraces | null, sent: RunTraces): void {
  const plain = (traces: RunTraces | null) => JSON.stringify(runTracesSchema.nullable().parse(traces));
  if (plain(stored) !== plain(sent))
    throw new Conflict('The run is complete already, with other traces. It is kept as it is.');
}
