import type { Model as ModelWire } from '../../shared/wire/models';
import { personRef } from '../people/people.mapper';
import type { Model } from './model.entity';

export function modelWire(model: Model): ModelWire {
  return {
    id: model.id,
    productionId: model.productionId,
    name: model.name,
    fileName: model.fileName,
    format: model.format,
    bytes: model.bytes,
    sha256: model.sha256,
    unit: model.unit,
    unitConfirmed: model.unitConfirmed,
    patchCount: model.patchCount,
    bounds: model.bounds,
    report: model.report,
    createdAt: model.createdAt.toISOString(),
    createdBy: personRef(model.createdBy),
  };
}
