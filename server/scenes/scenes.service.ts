import type { DataSource, EntityManager, SelectQueryBuilder } from 'typeorm';
import type { z } from 'zod';
import type { SceneDocument } from '../../shared/scene-document';
import type { revisionCreateSchema, sceneCreateSchema } from '../../shared/wire/scenes';
import type { AuditService } from '../audit/audit.service';
import type { MaterialsService } from '../materials/materials.service';
import type { ModelsService } from '../models/models.service';
import { newestFirst, type Page, type PageRequest, pageOf } from '../paging/cursor';
import type { Actor } from '../people/actor';
import { Conflict, type Fault, InvalidRequest, NotFound } from '../problems/domain-errors';
import type { MembershipsService } from '../productions/memberships.service';
import { type DocumentModel, faultsAgainstModel } from './document-check';
import { Scene } from './scene.entity';
import { SceneRevision } from './scene-revision.entity';

export type SceneWithLatest = Scene & { latest: SceneRevision };
type NewRevision = Pick<SceneRevision, 'sceneId' | 'number' | 'remark' | 'document' | 'createdById'>;

export class ScenesService {
  constructor(
    private readonly data: DataSource,
    private readonly memberships: MembershipsService,
    private readonly models: ModelsService,
    private readonly materials: MaterialsService,
    private readonly audit: AuditService,
  ) {}

  /** Makes the scene with its revision 1. @throws InvalidRequest when the document does not fit its model */
  async create(
    actor: Actor,
    productionId: string,
    wanted: z.output<typeof sceneCreateSchema>,
    address?: string,
  ): Promise<SceneWithLatest> {
    await this.memberships.require(actor, productionId, 'technical-director');
    const model = await this.modelFor(productionId, wanted.document);
    await this.check(productionId, wanted.document, model);
    const id = await this.data.transaction(async (manager) => {
      const scene = manager.create(Scene, {
        productionId,
        modelId: model.id,
        name: wanted.name,
        latestNumber: 1,
        createdById: actor.id,
      });
      await manager.insert(Scene, scene);
      await this.insert(manager, {
        sceneId: scene.id,
        number: 1,
        remark: '',
        document: wanted.document,
        createdById: actor.id,
      });
      const details = { sceneId: scene.id, name: scene.name };
      await this.audit.record(manager, { kind: 'scene-created', personId: actor.id, productionId, address, details });
      return scene.id;
    });
    return this.load(id);
  }

  async get(actor: Actor, id: string): Promise<SceneWithLatest> {
    const scene = await this.load(id);
    await this.memberships.require(actor, scene.productionId, 'artist', 'scene');
    return scene;
  }

  async list(actor: Actor, productionId: string, request: PageRequest): Promise<Page<SceneWithLatest>> {
    await this.memberships.require(actor, productionId, 'artist');
    const query = this.withLatest().where('scene.productionId = :productionId', { productionId });
    return (await pageOf(query, newestFirst('scene'), request)) as Page<SceneWithLatest>;
  }

  async revisions(actor: Actor, sceneId: string, request: PageRequest): Promise<Page<SceneRevision>> {
    await this.get(actor, sceneId);
    const query = this.data
      .getRepository(SceneRevision)
      .createQueryBuilder('revision')
      .innerJoinAndSelect('revision.createdBy', 'person')
      .where('revision.sceneId = :sceneId', { sceneId });
    return pageOf(query, newestFirst('revision'), request);
  }

  /** For services that asked for the role already. */
  hasRevision(sceneId: string, id: string): Promise<boolean> {
    return this.data.getRepository(SceneRevision).existsBy({ id, sceneId });
  }

  async revision(actor: Actor, id: string): Promise<SceneRevision> {
    const revision = await this.loadRevision(id);
    await this.memberships.require(actor, revision.scene.productionId, 'artist', 'revision');
    return revision;
  }

  /** Adds a revision on top of the newest. @throws Conflict when `basedOn` is not the newest any more */
  async addRevision(
    actor: Actor,
    sceneId: string,
    wanted: z.output<typeof revisionCreateSchema>,
    address?: string,
  ): Promise<SceneRevision> {
    const { productionId, model } = await this.get(actor, sceneId);
    await this.memberships.require(actor, productionId, 'technical-director', 'scene');
    await this.check(productionId, wanted.document, model);
    const id = await this.data.transaction(async (manager) => {
      // The lock makes the second of two saves wait, and then see that it is not based on the newest.
      const { latestNumber } = await manager.findOneOrFail(Scene, {
        where: { id: sceneId },
        lock: { mode: 'pessimistic_write' },
      });
      if (wanted.basedOn !== latestNumber) {
        throw new Conflict(
          `The newest revision is ${latestNumber}, and these changes were made on ${wanted.basedOn}. ` +
            `Nothing was overwritten: look at revision ${latestNumber}, then save on top of it.`,
        );
      }
      const number = latestNumber + 1;
      const { remark, document } = wanted;
      const revisionId = await this.insert(manager, { sceneId, number, remark, document, createdById: actor.id });
      await manager.update(Scene, { id: sceneId }, { latestNumber: number });
      const details = { sceneId, number };
      await this.audit.record(manager, { kind: 'revision-saved', personId: actor.id, productionId, address, details });
      return revisionId;
    });
    return this.loadRevision(id);
  }

  /** The model a new document names, when it is one of this production. */
  private async modelFor(productionId: string, { geometry }: SceneDocument): Promise<DocumentModel> {
    const model = geometry.kind === 'model' ? await this.models.inProduction(productionId, geometry.modelId) : null;
    if (model) return model;
    const pointer = geometry.kind === 'model' ? '/document/geometry/modelId' : '/document/geometry';
    throw new InvalidRequest('The scene needs a model of this production.', [
      { pointer, detail: 'Choose a model of this production.' },
    ]);
  }

  private async check(productionId: string, document: SceneDocument, model: DocumentModel): Promise<void> {
    const faults = faultsAgainstModel(document, model);
    for (const [index, { preset }] of document.materials.entries()) {
      if (preset && !(await this.materials.exists(preset, productionId))) faults.push(unknownPreset(index));
    }
    if (faults.length > 0)
      throw new InvalidRequest('The scene does not fit. Mend what is marked and save again.', faults);
  }

  private async insert(manager: EntityManager, values: NewRevision): Promise<string> {
    const revision = manager.create(SceneRevision, values);
    await manager.insert(SceneRevision, revision);
    return revision.id;
  }

  private withLatest(): SelectQueryBuilder<Scene> {
    return this.data
      .getRepository(Scene)
      .createQueryBuilder('scene')
      .innerJoinAndSelect('scene.model', 'model')
      .innerJoinAndMapOne(
        'scene.latest',
        SceneRevision,
        'latest',
        'latest.sceneId = scene.id AND latest.number = scene.latestNumber',
      )
      .innerJoinAndSelect('latest.createdBy', 'latestBy');
  }

  /** @throws NotFound */
  private async load(id: string): Promise<SceneWithLatest> {
    const scene = await this.withLatest().where('scene.id = :id', { id }).getOne();
    if (!scene) throw new NotFound('scene');
    return scene as SceneWithLatest;
  }

  /** @throws NotFound */
  private async loadRevision(id: string): Promise<SceneRevision> {
    const revision = await this.data
      .getRepository(SceneRevision)
      .createQueryBuilder('revision')
      .addSelect('revision.document')
      .innerJoinAndSelect('revision.createdBy', 'person')
      .innerJoinAndSelect('revision.scene', 'scene')
      .where('revision.id = :id', { id })
      .getOne();
    if (!revision) throw new NotFound('revision');
    return revision;
  }
}

function unknownPreset(index: number): Fault {
  return {
    pointer: `/document/materials/${index}/preset`,
    detail: 'The library has no such preset in this version. Choose one, or give own numbers.',
  };
}
