import { randomUUID } from 'node:crypto';
import { type DataSource, type EntityManager, IsNull } from 'typeorm';
import { z } from 'zod';
import { type PresetCreate, type PresetVersion, shippedPresetSchema } from '../../shared/wire/materials';
import type { AuditService } from '../audit/audit.service';
import { type Page, type PageOrder, type PageRequest, pageOf } from '../paging/cursor';
import type { Actor } from '../people/actor';
import { Conflict, NotAllowed, NotFound } from '../problems/domain-errors';
import type { MembershipsService } from '../productions/memberships.service';
import { Material } from './material.entity';
import presets from './presets.json';

export interface PresetRef {
  id: string;
  version: number;
}

const BY_NAME: PageOrder<Material> = {
  column: 'material.name',
  type: 'text',
  tie: 'material.id',
  tieType: 'uuid',
  direction: 'ASC',
  keyOf: ({ name, id }) => [name, id],
};

export class MaterialsService {
  constructor(
    private readonly data: DataSource,
    private readonly memberships: MembershipsService,
    private readonly audit: AuditService,
  ) {}

  /** Adds the shipped versions that are not there yet; those that are stay as they are. */
  async addPresets(): Promise<void> {
    const rows = z
      .array(shippedPresetSchema)
      .parse(presets)
      .map(({ youngsModulusRange, ...rest }) => ({
        ...rest,
        youngsModulusLow: youngsModulusRange?.[0] ?? null,
        youngsModulusHigh: youngsModulusRange?.[1] ?? null,
      }));
    await this.data.createQueryBuilder().insert().into(Material).values(rows).orIgnore().execute();
  }

  /** The newest version of each: the studio's and the production's own. */
  async list(actor: Actor, productionId: string, request: PageRequest): Promise<Page<Material>> {
    await this.memberships.require(actor, productionId, 'artist');
    const query = this.data.getRepository(Material).createQueryBuilder('material');
    const newer = query
      .subQuery()
      .select('1')
      .from(Material, 'newer')
      .where('newer.id = material.id AND newer.version > material.version');
    const own = '(material.productionId IS NULL OR material.productionId = :productionId)';
    return pageOf(query.where(`NOT EXISTS ${newer.getQuery()} AND ${own}`, { productionId }), BY_NAME, request);
  }

  /** A new preset of the production. @throws NotFound, NotAllowed */
  async publish(actor: Actor, productionId: string, wanted: PresetCreate, address?: string): Promise<Material> {
    await this.memberships.require(actor, productionId, 'lead');
    return this.data.transaction((manager) =>
      this.insert(manager, actor, { ...wanted, id: randomUUID(), version: 1, productionId }, address),
    );
  }

  /** The next version of a production's own preset. @throws NotFound, NotAllowed, Conflict */
  async addVersion(actor: Actor, id: string, { basedOn, ...wanted }: PresetVersion, address?: string) {
    return this.data.transaction(async (manager) => {
      const newest = await manager.findOne(Material, {
        where: { id },
        order: { version: 'DESC' },
        lock: { mode: 'pessimistic_write' },
      });
      if (!newest) throw new NotFound('material');
      if (newest.productionId === null)
        throw new NotAllowed('The studio’s presets do not change. Publish one of the production’s own instead.');
      await this.memberships.require(actor, newest.productionId, 'lead', 'material');
      if (newest.version !== basedOn)
        throw new Conflict(
          `Version ${newest.version} was published meanwhile. Look at it, then publish yours on top of it.`,
        );
      const next = { ...wanted, id, version: basedOn + 1, productionId: newest.productionId };
      return this.insert(manager, actor, next, address);
    });
  }

  private async insert(
    manager: EntityManager,
    actor: Actor,
    { youngsModulusRange: range, ...rest }: PresetCreate & { id: string; version: number; productionId: string },
    address?: string,
  ): Promise<Material> {
    const material = manager.create(Material, {
      ...rest,
      youngsModulusLow: range?.[0] ?? null,
      youngsModulusHigh: range?.[1] ?? null,
      createdById: actor.id,
    });
    await manager.insert(Material, material);
    await this.audit.record(manager, {
      kind: 'material-published',
      personId: actor.id,
      productionId: rest.productionId,
      address,
      details: { materialId: rest.id, version: rest.version, name: rest.name },
    });
    return material;
  }

  /** Whether this very version is in the library of the production. */
  exists({ id, version }: PresetRef, productionId: string): Promise<boolean> {
    if (!z.uuid().safeParse(id).success) return Promise.resolve(false);
    return this.data.getRepository(Material).existsBy([
      { id, version, productionId: IsNull() },
      { id, version, productionId },
    ]);
  }
}
