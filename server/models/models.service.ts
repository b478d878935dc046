import { createHash } from 'node:crypto';
import { basename, extname } from 'node:path';
import { promisify } from 'node:util';
import { gunzip } from 'node:zlib';
import type { DataSource } from 'typeorm';
import { MAX_NAME } from '../../shared/limits';
import { importReportSchema, type ModelChange } from '../../shared/wire/models';
import type { AuditService } from '../audit/audit.service';
import { newestFirst, type Page, type PageRequest, pageOf } from '../paging/cursor';
import type { Actor } from '../people/actor';
import { plainStrings, plainText } from '../plain-text';
import { NotFound, UnreadableModel } from '../problems/domain-errors';
import type { MembershipsService } from '../productions/memberships.service';
import { Model } from './model.entity';
import type { ModelReader } from './model-reader';

const unzip = promisify(gunzip);
const LONGEST_FILE_NAME = 255;

export interface Upload {
  fileName: string;
  bytes: Buffer;
  name?: string | undefined;
  address?: string | undefined;
}

export interface PatchBytes {
  bytes: Buffer;
  gzipped: boolean;
}

export class ModelsService {
  constructor(
    private readonly data: DataSource,
    private readonly memberships: MembershipsService,
    private readonly audit: AuditService,
    private readonly reader: ModelReader,
  ) {}

  /** Asked before the bytes are taken in. @throws NotFound, NotAllowed */
  async requireMayUpload(actor: Actor, productionId: string): Promise<void> {
    await this.memberships.require(actor, productionId, 'technical-director');
  }

  /** Reads the file apart from the server and keeps it whole, or keeps nothing. @throws UnreadableModel */
  async upload(actor: Actor, productionId: string, upload: Upload): Promise<Model> {
    await this.requireMayUpload(actor, productionId);
    if (upload.bytes.length === 0) throw new UnreadableModel('The file is empty. Nothing was kept; export it again.');
    const fileName = plainText(basename(upload.fileName)).slice(0, LONGEST_FILE_NAME) || 'model';
    const read = await this.reader.read({ bytes: upload.bytes, fileName });
    const report = importReportSchema.parse(JSON.parse(JSON.stringify(read.report, plainStrings)));
    const name = (upload.name ?? basename(fileName, extname(fileName))).trim().slice(0, MAX_NAME) || 'Model';

    const id = await this.data.transaction(async (manager) => {
      const model = manager.create(Model, {
        productionId,
        name,
        fileName,
        format: read.format,
        bytes: upload.bytes.length,
        sha256: createHash('sha256').update(upload.bytes).digest('hex'),
        original: upload.bytes,
        patches: Buffer.from(read.patches),
        patchCount: read.patchCount,
        unit: report.declaredUnit?.metres ?? 1,
        unitConfirmed: false,
        bounds: read.bounds,
        report,
        createdById: actor.id,
      });
      await manager.insert(Model, model);
      await this.audit.record(manager, {
        kind: 'model-uploaded',
        personId: actor.id,
        productionId,
        address: upload.address,
        details: { modelId: model.id, name, fileName, bytes: model.bytes },
      });
      return model.id;
    });
    return this.load(id);
  }

  async get(actor: Actor, id: string): Promise<Model> {
    const model = await this.load(id);
    await this.memberships.require(actor, model.productionId, 'artist', 'model');
    return model;
  }

  /** The model, when it is one of this production. For services that asked for the role already. */
  inProduction(productionId: string, id: string): Promise<Model | null> {
    return this.data.getRepository(Model).findOneBy({ id, productionId });
  }

  async list(actor: Actor, productionId: string, request: PageRequest): Promise<Page<Model>> {
    await this.memberships.require(actor, productionId, 'artist');
    const query = this.data
      .getRepository(Model)
      .createQueryBuilder('model')
      .innerJoinAndSelect('model.createdBy', 'person')
      .where('model.productionId = :productionId', { productionId });
    return pageOf(query, newestFirst('model'), request);
  }

  /** A changed unit takes an earlier confirmation back, unless the same change confirms the new one. */
  async change(actor: Actor, id: string, change: ModelChange, address?: string): Promise<Model> {
    const { productionId } = await this.load(id);
    await this.memberships.require(actor, productionId, 'technical-director', 'model');
    await this.data.transaction(async (manager) => {
      const model = await manager.findOneOrFail(Model, { where: { id }, lock: { mode: 'pessimistic_write' } });
      const unit = change.unit ?? model.unit;
      const kept = unit === model.unit && model.unitConfirmed;
      const next = { name: change.name ?? model.name, unit, unitConfirmed: change.unitConfirmed ?? kept };
      await manager.update(Model, { id }, next);
      await this.audit.record(manager, {
        kind: 'model-changed',
        personId: actor.id,
        productionId,
        address,
        details: { modelId: id, ...next, unitBefore: model.unit },
      });
    });
    return this.load(id);
  }

  /** The patches as JSON, zipped as they are kept when the reader of the answer can take that. */
  async patches(actor: Actor, id: string, takesGzip: boolean): Promise<PatchBytes> {
    await this.get(actor, id);
    const { patches } = await this.data
      .getRepository(Model)
      .findOneOrFail({ where: { id }, select: { id: true, patches: true } });
    return takesGzip ? { bytes: patches, gzipped: true } : { bytes: await unzip(patches), gzipped: false };
  }

  /** @throws NotFound */
  private async load(id: string): Promise<Model> {
    const model = await this.data.getRepository(Model).findOne({ where: { id }, relations: { createdBy: true } });
    if (!model) throw new NotFound('model');
    return model;
  }
}
