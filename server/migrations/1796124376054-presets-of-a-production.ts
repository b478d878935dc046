import { MigrationInterface, QueryRunner } from 'typeorm';

export class PresetsOfAProduction1796124376054 implements MigrationInterface {
  name = 'PresetsOfAProduction1796124376054';

  public async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`ALTER TABLE "material" ADD "production_id" uuid`);
    await queryRunner.query(`ALTER TABLE "material" ADD "created_by_id" uuid`);
    await queryRunner.query(`CREATE INDEX "material_of_production" ON "material"  ("production_id", "name", "id") `);
    await queryRunner.query(
      `ALTER TABLE "material" ADD CONSTRAINT "material_published_by_someone" CHECK ((production_id IS NULL) = (created_by_id IS NULL))`,
    );
    await queryRunner.query(
      `ALTER TABLE "material" ADD CONSTRAINT "material_production" FOREIGN KEY ("production_id") REFERENCES "production"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "material" ADD CONSTRAINT "material_created_by" FOREIGN KEY ("created_by_id") REFERENCES "person"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
  }

  public async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`ALTER TABLE "material" DROP CONSTRAINT "material_created_by"`);
    await queryRunner.query(`ALTER TABLE "material" DROP CONSTRAINT "material_production"`);
    await queryRunner.query(`ALTER TABLE "material" DROP CONSTRAINT "material_published_by_someone"`);
    await queryRunner.query(`DROP INDEX "public"."material_of_production"`);
    await queryRunner.query(`ALTER TABLE "material" DROP COLUMN "created_by_id"`);
    await queryRunner.query(`ALTER TABLE "material" DROP COLUMN "production_id"`);
  }
}
