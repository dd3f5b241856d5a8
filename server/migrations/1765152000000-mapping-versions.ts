import type { MigrationInterface, QueryRunner } from 'typeorm'

/**
 * A mapping with data is frozen as a version before its beads change; data remember the version they were measured under.
 * Nobody kept what mappings looked like before: data that are there already count as measured on version 1, as it stands.
 */
export class MappingVersions1765152000000 implements MigrationInterface {
  name = 'MappingVersions1765152000000'

  async up(runner: QueryRunner): Promise<void> {
    for (const [table, column] of [
      ['mapping', 'version'],
      ['distribution', 'mapping_version'],
      ['joint_distribution', 'mapping_version'],
    ]) {
      await runner.query(`ALTER TABLE "${table}" ADD "${column}" integer NOT NULL DEFAULT 1`)
      await runner.query(`ALTER TABLE "${table}" ALTER "${column}" DROP DEFAULT`)
    }
    await runner.query(`CREATE TABLE "mapping_version" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "group_id" uuid NOT NULL,
      "mapping_id" uuid NOT NULL,
      "number" integer NOT NULL,
      "document" jsonb NOT NULL,
      "terms" jsonb NOT NULL,
      "saved_at" TIMESTAMP WITH TIME ZONE NOT NULL,
      "saved_by" uuid,
      CONSTRAINT "UQ_mapping_version_number" UNIQUE ("mapping_id", "number"),
      CONSTRAINT "PK_mapping_version" PRIMARY KEY ("id"),
      CONSTRAINT "FK_mapping_version_mapping" FOREIGN KEY ("mapping_id", "group_id") REFERENCES "mapping"("id","group_id") ON DELETE CASCADE,
      CONSTRAINT "FK_mapping_version_saved_by" FOREIGN KEY ("saved_by") REFERENCES "user"("id") ON DELETE SET NULL
    )`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE "mapping_version"`)
    await runner.query(`ALTER TABLE "joint_distribution" DROP "mapping_version"`)
    await runner.query(`ALTER TABLE "distribution" DROP "mapping_version"`)
    await runner.query(`ALTER TABLE "mapping" DROP "version"`)
  }
}
