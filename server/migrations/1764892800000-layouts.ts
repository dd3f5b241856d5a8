import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Layouts of a group in versions, and the one it takes where nobody chooses. */
export class Layouts1764892800000 implements MigrationInterface {
  name = 'Layouts1764892800000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE "layout" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "group_id" uuid NOT NULL,
      "name" text NOT NULL,
      "version" integer NOT NULL,
      "archived_at" TIMESTAMP WITH TIME ZONE,
      "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
      CONSTRAINT "UQ_layout_name" UNIQUE ("group_id", "name"),
      CONSTRAINT "UQ_layout_group" UNIQUE ("group_id", "id"),
      CONSTRAINT "PK_layout" PRIMARY KEY ("id"),
      CONSTRAINT "FK_layout_group" FOREIGN KEY ("group_id") REFERENCES "group"("id") ON DELETE CASCADE
    )`)
    await runner.query(`CREATE TABLE "layout_version" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "group_id" uuid NOT NULL,
      "layout_id" uuid NOT NULL,
      "version" integer NOT NULL,
      "name" text NOT NULL,
      "document" jsonb NOT NULL,
      "saved_at" TIMESTAMP WITH TIME ZONE NOT NULL,
      "saved_by" uuid,
      CONSTRAINT "UQ_layout_version" UNIQUE ("layout_id", "version"),
      CONSTRAINT "PK_layout_version" PRIMARY KEY ("id"),
      CONSTRAINT "FK_layout_version_layout" FOREIGN KEY ("layout_id", "group_id") REFERENCES "layout"("id", "group_id") ON DELETE CASCADE,
      CONSTRAINT "FK_layout_version_saved_by" FOREIGN KEY ("saved_by") REFERENCES "user"("id") ON DELETE SET NULL
    )`)
    await runner.query(`ALTER TABLE "group" ADD "default_layout" text`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE "group" DROP "default_layout"`)
    for (const table of ['layout_version', 'layout']) await runner.query(`DROP TABLE "${table}"`)
  }
}
