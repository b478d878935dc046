import { createDataSource } from '../../server/data-source';
import { scratchDatabase } from './support/database';
import { type Desk, openDesk } from './support/desk';
import { aModel, aRun, aScene, sha256, someBytes } from './support/things';

let desk: Desk;

beforeAll(async () => {
  desk = await openDesk();
});
afterAll(() => desk?.close());

test('the migrations make exactly what the entities say', async () => {
  const { upQueries } = await desk.data.driver.createSchemaBuilder().log();
  expect(upQueries.map(({ query }) => query)).toEqual([]);
});

test('the migrations can be taken back one by one, and run again', async () => {
  const scratch = await scratchDatabase();
  const data = await createDataSource(scratch.url).initialize();
  await data.runMigrations({ transaction: 'each' });
  for (const _ of data.migrations) await data.undoLastMigration({ transaction: 'each' });
  const left = await data.query(
    "SELECT table_name FROM information_schema.tables WHERE table_schema = 'public' AND table_name <> 'migrations'",
  );
  expect(left).toEqual([]);
  await data.runMigrations({ transaction: 'each' });
  await data.destroy();
  await scratch.drop();
});

describe('the database itself refuses', () => {
  const refused = (sql: string, values: unknown[], constraint: string) =>
    expect(desk.rows(sql, values)).rejects.toMatchObject({ driverError: { constraint } });

  test('an address in capitals, twice, or a role nobody knows', async () => {
    await refused(
      "INSERT INTO person (name, email, password_hash) VALUES ('A', 'A@x.example', 'h')",
      [],
      'person_email_lower',
    );
    await refused(
      "INSERT INTO person (name, email, password_hash) VALUES ('A', $1, 'h')",
      [desk.people.artist.email],
      'person_email_once',
    );
    await refused(
      "UPDATE membership SET role = 'owner' WHERE person_id = $1",
      [desk.people.artist.id],
      'membership_role_known',
    );
  });

  test('bytes that do not fit their hash or size, in models and chunks', async () => {
    const model = await aModel(desk);
    await refused("UPDATE model SET original = 'x' WHERE id = $1", [model], 'model_bytes_fit');
    await refused("UPDATE model SET sha256 = repeat('0', 64) WHERE id = $1", [model], 'model_sha256_fits');
    const run = await aRun(desk);
    const insert = 'INSERT INTO run_chunk (run_id, index, bytes, sha256, content) VALUES ($1, $2, $3, $4, $5)';
    const bytes = someBytes(1);
    await refused(insert, [run, 0, 64, sha256(someBytes(2)), bytes], 'run_chunk_sha256_fits');
    await refused(insert, [run, 0, 63, sha256(bytes), bytes], 'run_chunk_bytes_fit');
    await refused(insert, [run, -1, 64, sha256(bytes), bytes], 'run_chunk_index_counts');
    await desk.rows(insert, [run, 0, 64, sha256(bytes), bytes]);
    await refused(insert, [run, 0, 64, sha256(bytes), bytes], 'run_chunk_pk');
  });

  test('a run number or a revision number twice, and a complete run without traces', async () => {
    const { sceneId } = await aScene(desk);
    await refused(
      `INSERT INTO scene_revision (scene_id, number, remark, document, created_by_id)
       SELECT scene_id, number, remark, document, created_by_id FROM scene_revision WHERE scene_id = $1`,
      [sceneId],
      'scene_revision_number_once',
    );
    const run = await aRun(desk);
    const other = await aRun(desk);
    await refused(
      'UPDATE run SET number = (SELECT number FROM run WHERE id = $2) WHERE id = $1',
      [run, other],
      'run_number_once',
    );
    await refused(
      "UPDATE run SET status = 'complete', completed_at = now() WHERE id = $1",
      [run],
      'run_complete_whole',
    );
  });

  test('to lose a model that scenes stand on, or a person who made something', async () => {
    const { modelId } = await aScene(desk);
    await refused('DELETE FROM model WHERE id = $1', [modelId], 'scene_model_in_production');
    await expect(desk.rows('DELETE FROM person WHERE id = $1', [desk.people.technicalDirector.id])).rejects.toThrow(
      'violates foreign key',
    );
  });

  test('a scene with a model of another production, and a run of a revision of another scene', async () => {
    const { sceneId } = await aScene(desk);
    const foreign = await aModel(desk, desk.elsewhere, 'outsider');
    await refused('UPDATE scene SET model_id = $2 WHERE id = $1', [sceneId, foreign], 'scene_model_in_production');
    const other = await aScene(desk);
    const run = await aRun(desk);
    await refused('UPDATE run SET revision_id = $2 WHERE id = $1', [run, other.revisionId], 'run_revision_of_scene');
    await refused(
      'UPDATE run SET production_id = $2, number = 999 WHERE id = $1',
      [run, desk.elsewhere],
      'run_scene_in_production',
    );
  });

  test('a unit that is no length', async () => {
    const model = await aModel(desk);
    for (const unit of ['0', '-1', 'Infinity', 'NaN']) {
      await refused('UPDATE model SET unit = $2 WHERE id = $1', [model, unit], 'model_unit_positive');
    }
  });
});
