import type { DataSource } from 'typeorm';
import type { MaterialsService } from './materials/materials.service';

/** Brings tables and shipped presets up to date; safe to run at every start. */
export async function prepareDatabase(data: DataSource, materials: MaterialsService): Promise<void> {
  await data.runMigrations({ transaction: 'each' });
  await materials.addPresets();
}
