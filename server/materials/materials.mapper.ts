import type { MaterialPreset } from '../../shared/wire/materials';
import type { Material } from './material.entity';

export function materialWire(material: Material): MaterialPreset {
  const { youngsModulusLow: low, youngsModulusHigh: high } = material;
  return {
    id: material.id,
    version: material.version,
    name: material.name,
    family: material.family,
    law: material.law,
    youngsModulus: material.youngsModulus,
    youngsModulusRange: low === null || high === null ? null : [low, high],
    poissonsRatio: material.poissonsRatio,
    density: material.density,
    source: material.source,
    status: material.status,
    productionId: material.productionId,
  };
}
