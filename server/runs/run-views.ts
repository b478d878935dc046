import { type DataSource, In, type SelectQueryBuilder } from 'typeorm';
import { type Page, type PageOrder, type PageRequest, pageOf } from '../paging/cursor';
import { NotFound } from '../problems/domain-errors';
import { Run } from './run.entity';
import { RunCheckpoint } from './run-checkpoint.entity';
import { RunChunk } from './run-chunk.entity';
import { RunRecipe } from './run-recipe.entity';
import type { RunView } from './runs.mapper';

const NEWEST_NUMBER: PageOrder<Run> = {
  column: 'run.number',
  type: 'integer',
  tie: 'run.id',
  tieType: 'uuid',
  direction: 'DESC',
  keyOf: ({ number, id }) => [number, id],
};

/** Reads runs together with what has arrived for them; never the bytes. */
export class RunViews {
  constructor(private readonly data: DataSource) {}

  /** @throws NotFound */
  async one(id: string): Promise<RunView> {
    const run = await this.query().where('run.id = :id', { id }).getOne();
    if (!run) throw new NotFound('run');
    const [view] = await this.fill([run]);
    return view!;
  }

  /** Newest number first. */
  async page(filter: { productionId: string } | { sceneId: string }, request: PageRequest): Promise<Page<RunView>> {
    const [column, value] = Object.entries(filter)[0]!;
    const page = await pageOf(this.query().where(`run.${column} = :value`, { value }), NEWEST_NUMBER, request);
    return { items: await this.fill(page.items), nextCursor: page.nextCursor };
  }

  private query(): SelectQueryBuilder<Run> {
    return this.data
      .getRepository(Run)
      .createQueryBuilder('run')
      .innerJoinAndSelect('run.scene', 'scene')
      .innerJoinAndSelect('scene.model', 'model')
      .innerJoinAndSelect('run.revision', 'revision')
      .innerJoinAndSelect('run.createdBy', 'person');
  }

  private async fill(runs: Run[]): Promise<RunView[]> {
    const where = { runId: In(runs.map(({ id }) => id)) };
    const [chunks, recipes, checkpoints] = await Promise.all([
      this.data.getRepository(RunChunk).find({ where, order: { index: 'ASC' } }),
      this.data.getRepository(RunRecipe).find({ where }),
      this.data.getRepository(RunCheckpoint).find({ where }),
    ]);
    return runs.map((run) => ({
      run,
      chunks: chunks
        .filter(({ runId }) => runId === run.id)
        .map(({ index, bytes, sha256 }) => ({ index, bytes, sha256 })),
      recipeSha256: recipes.find(({ runId }) => runId === run.id)?.sha256 ?? null,
      checkpointFrame: checkpoints.find(({ runId }) => runId === run.id)?.frame ?? null,
    }));
  }
}
