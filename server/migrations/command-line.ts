import { createDataSource } from '../data-source';

/**
 * For TypeORM's own command line only, which wants one exported data source:
 *   node -r @swc-node/register node_modules/typeorm/cli.js migration:generate -d server/migrations/command-line.ts server/migrations/name
 */
export const dataSource = createDataSource(process.env.DATABASE_URL ?? '');
