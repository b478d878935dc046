import type { DataSource } from 'typeorm';

/** Brings the tables up to date; safe to run at every start. */
export async function prepareDatabase(data: DataSource): Promise<void> {
  await data.runMigrations({ transaction: 'each' });
}
