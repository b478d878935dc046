import type { DataSource } from 'typeorm';
import { z } from 'zod';
import { materialPresetSchema } from '../../shared/wire/materials';
import { type Page, type PageOrder, type PageRequest, pageOf } from '../paging/cursor';
import type { Actor } from '../people/actor';
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
  ) {}

  /** Adds the shipped versions that are not there yet; those that are stay as they are. */
  async addPresets(): Promise<void> {
    const rows = z
      .array(materialPresetSchema)
      .parse(presets)
      .map(({ youngsModulusRange, ...rest }) => ({
        ...rest,
        youngsModulusLow: youngsModulusRange?.[0] ?? null,
        youngsModulusHigh: youngsModulusRange?.[1] ?? null,
      }));
    await this.data.createQueryBuilder().insert().into(Material).values(rows).orIgnore().execute();
  }

  /** The newest version of each. */
  async list(actor: Actor, productionId: string, request: PageRequest): Promise<Page<Material>> {
    await this.memberships.require(actor, productionId, 'artist');
    const query = this.data.getRepository(Material).createQueryBuilder('material');
    const newer = query
      .subQuery()
      .select('1')
      .from(Material, 'newer')
      .where('newer.id = material.id AND newer.version > material.version');
    return pageOf(query.where(`NOT EXISTS ${newer.getQuery()}`), BY_NAME, request);
  }

  /** Whether this very version is in the library. */
  exists({ id, version }: PresetRef): Promise<boolean> {
    if (!z.uuid().safeParse(id).success) return Promise.resolve(false);
    return this.data.getRepository(Material).existsBy({ id, version });
  }
}
