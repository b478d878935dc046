import { MigrationInterface, QueryRunner } from 'typeorm';

export class ModelsScenesAndRuns1796107000000 implements MigrationInterface {
  name = 'ModelsScenesAndRuns1796107000000';

  public async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(
      `CREATE TABLE "material" ("id" uuid NOT NULL, "version" integer NOT NULL, "name" character varying(120) NOT NULL, "family" character varying(40) NOT NULL, "law" character varying(20) NOT NULL, "youngs_modulus" double precision NOT NULL, "youngs_modulus_low" double precision, "youngs_modulus_high" double precision, "poissons_ratio" double precision NOT NULL, "density" double precision NOT NULL, "source" text NOT NULL, "status" text NOT NULL, "created_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), CONSTRAINT "material_range_ordered" CHECK ((youngs_modulus_low IS NULL) = (youngs_modulus_high IS NULL) AND (youngs_modulus_low IS NULL OR (youngs_modulus_low > 0 AND youngs_modulus_low <= youngs_modulus_high))), CONSTRAINT "material_poisson_fits" CHECK (poissons_ratio >= 0 AND poissons_ratio < 0.5), CONSTRAINT "material_density_positive" CHECK (density > 0), CONSTRAINT "material_modulus_positive" CHECK (youngs_modulus > 0), CONSTRAINT "material_law_known" CHECK (law IN ('stable-neo-hookean', 'neo-hookean-a', 'neo-hookean-b')), CONSTRAINT "material_source_given" CHECK (length(trim(source)) > 0), CONSTRAINT "material_name_given" CHECK (length(trim(name)) > 0), CONSTRAINT "material_version_counts" CHECK (version >= 1), CONSTRAINT "material_pk" PRIMARY KEY ("id", "version"))`,
    );
    await queryRunner.query(
      `CREATE TABLE "model" ("id" uuid NOT NULL DEFAULT gen_random_uuid(), "production_id" uuid NOT NULL, "name" character varying(120) NOT NULL, "file_name" character varying(255) NOT NULL, "format" character varying(20) NOT NULL, "bytes" integer NOT NULL, "sha256" character(64) NOT NULL, "original" bytea NOT NULL, "patches" bytea NOT NULL, "patch_count" integer NOT NULL, "unit" double precision NOT NULL, "unit_confirmed" boolean NOT NULL DEFAULT false, "bounds" jsonb NOT NULL, "report" jsonb NOT NULL, "created_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), "created_by_id" uuid NOT NULL, CONSTRAINT "model_has_patches" CHECK (patch_count > 0), CONSTRAINT "model_unit_positive" CHECK (unit > 0 AND unit < 'Infinity'::double precision), CONSTRAINT "model_sha256_fits" CHECK (sha256 = encode(sha256(original), 'hex')), CONSTRAINT "model_bytes_fit" CHECK (bytes > 0 AND bytes = octet_length(original)), CONSTRAINT "model_name_given" CHECK (length(trim(name)) > 0), CONSTRAINT "model_format_known" CHECK (format IN ('bezier-patch-text', 'step')), CONSTRAINT "model_pk" PRIMARY KEY ("id"))`,
    );
    await queryRunner.query(`CREATE INDEX "model_of_production" ON "model"  ("production_id", "created_at", "id") `);
    await queryRunner.query(
      `CREATE TABLE "scene" ("id" uuid NOT NULL DEFAULT gen_random_uuid(), "production_id" uuid NOT NULL, "model_id" uuid NOT NULL, "name" character varying(120) NOT NULL, "latest_number" integer NOT NULL DEFAULT '1', "created_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), "created_by_id" uuid NOT NULL, CONSTRAINT "scene_latest_counts" CHECK (latest_number >= 1), CONSTRAINT "scene_name_given" CHECK (length(trim(name)) > 0), CONSTRAINT "scene_pk" PRIMARY KEY ("id"))`,
    );
    await queryRunner.query(`CREATE INDEX "scene_of_production" ON "scene"  ("production_id", "created_at", "id") `);
    await queryRunner.query(
      `CREATE TABLE "scene_revision" ("id" uuid NOT NULL DEFAULT gen_random_uuid(), "scene_id" uuid NOT NULL, "number" integer NOT NULL, "remark" character varying(500) NOT NULL, "document" jsonb NOT NULL, "created_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), "created_by_id" uuid NOT NULL, CONSTRAINT "scene_revision_number_once" UNIQUE ("scene_id", "number"), CONSTRAINT "scene_revision_document_object" CHECK (jsonb_typeof(document) = 'object'), CONSTRAINT "scene_revision_number_counts" CHECK (number >= 1), CONSTRAINT "scene_revision_pk" PRIMARY KEY ("id"))`,
    );
    await queryRunner.query(
      `CREATE TABLE "run" ("id" uuid NOT NULL DEFAULT gen_random_uuid(), "production_id" uuid NOT NULL, "scene_id" uuid NOT NULL, "revision_id" uuid NOT NULL, "number" integer NOT NULL, "status" character varying(10) NOT NULL DEFAULT 'baking', "frames" integer NOT NULL, "frames_per_second" double precision NOT NULL, "provenance" jsonb NOT NULL, "traces" jsonb, "active_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), "created_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), "completed_at" TIMESTAMP(3) WITH TIME ZONE, "created_by_id" uuid NOT NULL, CONSTRAINT "run_number_once" UNIQUE ("production_id", "number"), CONSTRAINT "run_rate_fits" CHECK (frames_per_second BETWEEN 1 AND 240), CONSTRAINT "run_frames_fit" CHECK (frames BETWEEN 1 AND 4800), CONSTRAINT "run_complete_whole" CHECK ((status = 'complete') = (completed_at IS NOT NULL) AND (status = 'complete') = (traces IS NOT NULL)), CONSTRAINT "run_status_known" CHECK (status IN ('baking', 'complete')), CONSTRAINT "run_number_counts" CHECK (number >= 1), CONSTRAINT "run_pk" PRIMARY KEY ("id"))`,
    );
    await queryRunner.query(`CREATE INDEX "run_of_scene" ON "run"  ("scene_id") `);
    await queryRunner.query(
      `CREATE TABLE "run_checkpoint" ("run_id" uuid NOT NULL, "frame" integer NOT NULL, "bytes" integer NOT NULL, "sha256" character(64) NOT NULL, "content" bytea NOT NULL, CONSTRAINT "run_checkpoint_sha256_fits" CHECK (sha256 = encode(sha256(content), 'hex')), CONSTRAINT "run_checkpoint_bytes_fit" CHECK (bytes > 0 AND bytes = octet_length(content)), CONSTRAINT "run_checkpoint_frame_counts" CHECK (frame >= 0), CONSTRAINT "run_checkpoint_pk" PRIMARY KEY ("run_id"))`,
    );
    await queryRunner.query(
      `CREATE TABLE "run_chunk" ("run_id" uuid NOT NULL, "index" integer NOT NULL, "bytes" integer NOT NULL, "sha256" character(64) NOT NULL, "content" bytea NOT NULL, CONSTRAINT "run_chunk_sha256_fits" CHECK (sha256 = encode(sha256(content), 'hex')), CONSTRAINT "run_chunk_bytes_fit" CHECK (bytes > 0 AND bytes <= 8388608 AND bytes = octet_length(content)), CONSTRAINT "run_chunk_index_counts" CHECK (index >= 0), CONSTRAINT "run_chunk_pk" PRIMARY KEY ("run_id", "index"))`,
    );
    await queryRunner.query(
      `CREATE TABLE "run_recipe" ("run_id" uuid NOT NULL, "bytes" integer NOT NULL, "sha256" character(64) NOT NULL, "content" bytea NOT NULL, CONSTRAINT "run_recipe_sha256_fits" CHECK (sha256 = encode(sha256(content), 'hex')), CONSTRAINT "run_recipe_bytes_fit" CHECK (bytes > 0 AND bytes = octet_length(content)), CONSTRAINT "run_recipe_pk" PRIMARY KEY ("run_id"))`,
    );
    await queryRunner.query(
      `ALTER TABLE "model" ADD CONSTRAINT "model_production" FOREIGN KEY ("production_id") REFERENCES "production"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "model" ADD CONSTRAINT "model_created_by" FOREIGN KEY ("created_by_id") REFERENCES "person"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "scene" ADD CONSTRAINT "scene_production" FOREIGN KEY ("production_id") REFERENCES "production"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "scene" ADD CONSTRAINT "scene_model" FOREIGN KEY ("model_id") REFERENCES "model"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "scene" ADD CONSTRAINT "scene_created_by" FOREIGN KEY ("created_by_id") REFERENCES "person"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "scene_revision" ADD CONSTRAINT "scene_revision_scene" FOREIGN KEY ("scene_id") REFERENCES "scene"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "scene_revision" ADD CONSTRAINT "scene_revision_created_by" FOREIGN KEY ("created_by_id") REFERENCES "person"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "run" ADD CONSTRAINT "run_production" FOREIGN KEY ("production_id") REFERENCES "production"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "run" ADD CONSTRAINT "run_scene" FOREIGN KEY ("scene_id") REFERENCES "scene"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "run" ADD CONSTRAINT "run_revision" FOREIGN KEY ("revision_id") REFERENCES "scene_revision"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "run" ADD CONSTRAINT "run_created_by" FOREIGN KEY ("created_by_id") REFERENCES "person"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "run_checkpoint" ADD CONSTRAINT "run_checkpoint_run" FOREIGN KEY ("run_id") REFERENCES "run"("id") ON DELETE CASCADE ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "run_chunk" ADD CONSTRAINT "run_chunk_run" FOREIGN KEY ("run_id") REFERENCES "run"("id") ON DELETE CASCADE ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "run_recipe" ADD CONSTRAINT "run_recipe_run" FOREIGN KEY ("run_id") REFERENCES "run"("id") ON DELETE CASCADE ON UPDATE NO ACTION`,
    );
  }

  public async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`ALTER TABLE "run_recipe" DROP CONSTRAINT "run_recipe_run"`);
    await queryRunner.query(`ALTER TABLE "run_chunk" DROP CONSTRAINT "run_chunk_run"`);
    await queryRunner.query(`ALTER TABLE "run_checkpoint" DROP CONSTRAINT "run_checkpoint_run"`);
    await queryRunner.query(`ALTER TABLE "run" DROP CONSTRAINT "run_created_by"`);
    await queryRunner.query(`ALTER TABLE "run" DROP CONSTRAINT "run_revision"`);
    await queryRunner.query(`ALTER TABLE "run" DROP CONSTRAINT "run_scene"`);
    await queryRunner.query(`ALTER TABLE "run" DROP CONSTRAINT "run_production"`);
    await queryRunner.query(`ALTER TABLE "scene_revision" DROP CONSTRAINT "scene_revision_created_by"`);
    await queryRunner.query(`ALTER TABLE "scene_revision" DROP CONSTRAINT "scene_revision_scene"`);
    await queryRunner.query(`ALTER TABLE "scene" DROP CONSTRAINT "scene_created_by"`);
    await queryRunner.query(`ALTER TABLE "scene" DROP CONSTRAINT "scene_model"`);
    await queryRunner.query(`ALTER TABLE "scene" DROP CONSTRAINT "scene_production"`);
    await queryRunner.query(`ALTER TABLE "model" DROP CONSTRAINT "model_created_by"`);
    await queryRunner.query(`ALTER TABLE "model" DROP CONSTRAINT "model_production"`);
    await queryRunner.query(`DROP TABLE "run_recipe"`);
    await queryRunner.query(`DROP TABLE "run_chunk"`);
    await queryRunner.query(`DROP TABLE "run_checkpoint"`);
    await queryRunner.query(`DROP INDEX "public"."run_of_scene"`);
    await queryRunner.query(`DROP TABLE "run"`);
    await queryRunner.query(`DROP TABLE "scene_revision"`);
    await queryRunner.query(`DROP INDEX "public"."scene_of_production"`);
    await queryRunner.query(`DROP TABLE "scene"`);
    await queryRunner.query(`DROP INDEX "public"."model_of_production"`);
    await queryRunner.query(`DROP TABLE "model"`);
    await queryRunner.query(`DROP TABLE "material"`);
  }
}
