import type { MigrationInterface, QueryRunner } from 'typeorm';

/** What must never change once written, and which changes are refused. */
const GUARDS: { table: string; on: string; when?: string }[] = [
  { table: 'scene_revision', on: 'UPDATE OR DELETE' },
  { table: 'audit_event', on: 'UPDATE OR DELETE' },
  { table: 'material', on: 'UPDATE OR DELETE' },
  { table: 'run_chunk', on: 'UPDATE' },
  { table: 'run_recipe', on: 'UPDATE' },
  { table: 'run', on: 'UPDATE', when: "OLD.status = 'complete'" },
];

/** Written by hand: TypeORM does not know triggers. */
export class KeepWhatIsWritten1796107100000 implements MigrationInterface {
  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`
      CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN
        RAISE EXCEPTION 'rows of % are written once', TG_TABLE_NAME USING ERRCODE = 'restrict_violation';
      END
      $$`);
    for (const { table, on, when } of GUARDS) {
      await queryRunner.query(`
        CREATE TRIGGER ${table}_written_once BEFORE ${on} ON "${table}"
        FOR EACH ROW ${when ? `WHEN (${when})` : ''} EXECUTE FUNCTION refuse_change()`);
    }
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    for (const { table } of GUARDS) await queryRunner.query(`DROP TRIGGER ${table}_written_once ON "${table}"`);
    await queryRunner.query('DROP FUNCTION refuse_change()');
  }
}
