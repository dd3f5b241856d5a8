import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Distributions may come with the counts of their blocks or chains, and keep what raw samples say about correlation. */
export class Blocks1764633600000 implements MigrationInterface {
  name = 'Blocks1764633600000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE "distribution" ADD "blocks" jsonb, ADD "sample_inefficiency" jsonb`)
    await runner.query(`CREATE TYPE "block_kind" AS ENUM ('time', 'chain')`)
    await runner.query(`CREATE TABLE "distribution_block" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "group_id" uuid NOT NULL,
      "distribution_id" uuid NOT NULL,
      "kind" "block_kind" NOT NULL,
      "position" integer NOT NULL,
      "counts" double precision array NOT NULL,
      "name" text,
      "sha256" text,
      "gzip" bytea,
      CONSTRAINT "PK_distribution_block" PRIMARY KEY ("id"),
      CONSTRAINT "FK_distribution_block_distribution" FOREIGN KEY ("distribution_id", "group_id") REFERENCES "distribution"("id","group_id") ON DELETE CASCADE
    )`)
    await runner.query(
      `CREATE INDEX "IX_distribution_block_distribution" ON "distribution_block" ("distribution_id")`,
    )
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE "distribution_block"`)
    await runner.query(`DROP TYPE "block_kind"`)
    await runner.query(`ALTER TABLE "distribution" DROP "sample_inefficiency", DROP "blocks"`)
  }
}
