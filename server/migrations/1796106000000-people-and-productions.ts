import { MigrationInterface, QueryRunner } from 'typeorm';

export class PeopleAndProductions1796106000000 implements MigrationInterface {
  name = 'PeopleAndProductions1796106000000';

  public async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(
      `CREATE TABLE "person" ("id" uuid NOT NULL DEFAULT gen_random_uuid(), "name" character varying(120) NOT NULL, "email" character varying(254) NOT NULL, "password_hash" character varying(60) NOT NULL, "administrator" boolean NOT NULL DEFAULT false, "created_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), CONSTRAINT "person_email_once" UNIQUE ("email"), CONSTRAINT "person_name_given" CHECK (length(trim(name)) > 0), CONSTRAINT "person_email_lower" CHECK (email = lower(email)), CONSTRAINT "person_pk" PRIMARY KEY ("id"))`,
    );
    await queryRunner.query(
      `CREATE TABLE "production" ("id" uuid NOT NULL DEFAULT gen_random_uuid(), "name" character varying(120) NOT NULL, "last_run_number" integer NOT NULL DEFAULT '0', "created_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), CONSTRAINT "production_name_once" UNIQUE ("name"), CONSTRAINT "production_last_run_counts" CHECK (last_run_number >= 0), CONSTRAINT "production_name_given" CHECK (length(trim(name)) > 0), CONSTRAINT "production_pk" PRIMARY KEY ("id"))`,
    );
    await queryRunner.query(
      `CREATE TABLE "audit_event" ("id" uuid NOT NULL DEFAULT gen_random_uuid(), "created_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), "kind" character varying(40) NOT NULL, "person_id" uuid, "production_id" uuid, "address" character varying(64), "details" jsonb NOT NULL, CONSTRAINT "audit_event_details_object" CHECK (jsonb_typeof(details) = 'object'), CONSTRAINT "audit_event_pk" PRIMARY KEY ("id"))`,
    );
    await queryRunner.query(`CREATE INDEX "audit_event_newest" ON "audit_event"  ("created_at", "id") `);
    await queryRunner.query(
      `CREATE TABLE "membership" ("production_id" uuid NOT NULL, "person_id" uuid NOT NULL, "role" character varying(20) NOT NULL, "created_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), CONSTRAINT "membership_role_known" CHECK (role IN ('lead', 'technical-director', 'artist')), CONSTRAINT "membership_pk" PRIMARY KEY ("production_id", "person_id"))`,
    );
    await queryRunner.query(`CREATE INDEX "membership_of_person" ON "membership"  ("person_id") `);
    await queryRunner.query(
      `CREATE TABLE "refresh_session" ("id" uuid NOT NULL DEFAULT gen_random_uuid(), "person_id" uuid NOT NULL, "created_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), "expires_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL, "revoked_at" TIMESTAMP(3) WITH TIME ZONE, CONSTRAINT "refresh_session_expires_later" CHECK (expires_at > created_at), CONSTRAINT "refresh_session_pk" PRIMARY KEY ("id"))`,
    );
    await queryRunner.query(`CREATE INDEX "refresh_session_of_person" ON "refresh_session"  ("person_id") `);
    await queryRunner.query(
      `CREATE TABLE "refresh_token" ("hash" character(64) NOT NULL, "session_id" uuid NOT NULL, "created_at" TIMESTAMP(3) WITH TIME ZONE NOT NULL DEFAULT now(), "used_at" TIMESTAMP(3) WITH TIME ZONE, CONSTRAINT "refresh_token_hash_form" CHECK (hash ~ '^[0-9a-f]{64}$'), CONSTRAINT "refresh_token_pk" PRIMARY KEY ("hash"))`,
    );
    await queryRunner.query(`CREATE INDEX "refresh_token_of_session" ON "refresh_token"  ("session_id") `);
    await queryRunner.query(
      `ALTER TABLE "audit_event" ADD CONSTRAINT "audit_event_person" FOREIGN KEY ("person_id") REFERENCES "person"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "audit_event" ADD CONSTRAINT "audit_event_production" FOREIGN KEY ("production_id") REFERENCES "production"("id") ON DELETE RESTRICT ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "membership" ADD CONSTRAINT "membership_production" FOREIGN KEY ("production_id") REFERENCES "production"("id") ON DELETE CASCADE ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "membership" ADD CONSTRAINT "membership_person" FOREIGN KEY ("person_id") REFERENCES "person"("id") ON DELETE CASCADE ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "refresh_session" ADD CONSTRAINT "refresh_session_person" FOREIGN KEY ("person_id") REFERENCES "person"("id") ON DELETE CASCADE ON UPDATE NO ACTION`,
    );
    await queryRunner.query(
      `ALTER TABLE "refresh_token" ADD CONSTRAINT "refresh_token_session" FOREIGN KEY ("session_id") REFERENCES "refresh_session"("id") ON DELETE CASCADE ON UPDATE NO ACTION`,
    );
  }

  public async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`ALTER TABLE "refresh_token" DROP CONSTRAINT "refresh_token_session"`);
    await queryRunner.query(`ALTER TABLE "refresh_session" DROP CONSTRAINT "refresh_session_person"`);
    await queryRunner.query(`ALTER TABLE "membership" DROP CONSTRAINT "membership_person"`);
    await queryRunner.query(`ALTER TABLE "membership" DROP CONSTRAINT "membership_production"`);
    await queryRunner.query(`ALTER TABLE "audit_event" DROP CONSTRAINT "audit_event_production"`);
    await queryRunner.query(`ALTER TABLE "audit_event" DROP CONSTRAINT "audit_event_person"`);
    await queryRunner.query(`DROP INDEX "public"."refresh_token_of_session"`);
    await queryRunner.query(`DROP TABLE "refresh_token"`);
    await queryRunner.query(`DROP INDEX "public"."refresh_session_of_person"`);
    await queryRunner.query(`DROP TABLE "refresh_session"`);
    await queryRunner.query(`DROP INDEX "public"."membership_of_person"`);
    await queryRunner.query(`DROP TABLE "membership"`);
    await queryRunner.query(`DROP INDEX "public"."audit_event_newest"`);
    await queryRunner.query(`DROP TABLE "audit_event"`);
    await queryRunner.query(`DROP TABLE "production"`);
    await queryRunner.query(`DROP TABLE "person"`);
  }
}
