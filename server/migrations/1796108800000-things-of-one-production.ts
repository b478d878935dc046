import { MigrationInterface, QueryRunner } from 'typeorm';

export class ThingsOfOneProduction1796108800000 implements MigrationInterface {
  name = 'ThingsOfOneProduction1796108800000';

  public async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`ALTER TABLE "scene" DROP CONSTRAINT "scene_model"`);
    await queryRunner.query(`ALTER TABLE "run" DROP CONSTRAINT "run_revision"`);
    await queryRunner.query(`ALTER TABLE "run" DROP CONSTRAINT "run_scene"`);
    await queryRunner.query(`ALTER TABLE "model" ADD CONSTRAINT "model_in_production" UNIQUE ("production_id", "id")`);
    await queryRunner.query(`ALTER TABLE "scene" ADD CONSTRAINT "scene_in_production" UNIQUE ("production_id", "id")`);
    await queryRunner.query(
      `ALTER TABLE "scene_revision" ADD CONSTRAINT "scene_revision_in_scene" UNIQUE ("scene_id", "id")`,
    );
    await queryRunner.query(
      `ALTER TABLE "scene" ADD CONSTRAINT "scene_model_in_production" FOREIGN KEY ("model_id", "production_id") REFERENCES "model"("id","production_id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "run" ADD CONSTRAINT "run_scene_in_production" FOREIGN KEY ("scene_id", "production_id") REFERENCES "scene"("id","production_id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "run" ADD CONSTRAINT "run_revision_of_scene" FOREIGN KEY ("revision_id", "scene_id") REFERENCES "scene_revision"("id","scene_id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
  }

  public async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`ALTER TABLE "run" DROP CONSTRAINT "run_revision_of_scene"`);
    await queryRunner.query(`ALTER TABLE "run" DROP CONSTRAINT "run_scene_in_production"`);
    await queryRunner.query(`ALTER TABLE "scene" DROP CONSTRAINT "scene_model_in_production"`);
    await queryRunner.query(`ALTER TABLE "scene_revision" DROP CONSTRAINT "scene_revision_in_scene"`);
    await queryRunner.query(`ALTER TABLE "scene" DROP CONSTRAINT "scene_in_production"`);
    await queryRunner.query(`ALTER TABLE "model" DROP CONSTRAINT "model_in_production"`);
    await queryRunner.query(
      `ALTER TABLE "run" ADD CONSTRAINT "run_scene" FOREIGN KEY ("scene_id") REFERENCES "scene"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "run" ADD CONSTRAINT "run_revision" FOREIGN KEY ("revision_id") REFERENCES "scene_revision"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "scene" ADD CONSTRAINT "scene_model" FOREIGN KEY ("model_id") REFERENCES "model"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
  }
}
