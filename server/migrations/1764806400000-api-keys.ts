import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Keys by which scripts act for people, and attempts counted for all server processes. */
export class ApiKeys1764806400000 implements MigrationInterface {
  name = 'ApiKeys1764806400000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE "api_key" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "user_id" uuid NOT NULL,
      "name" text NOT NULL,
      "scopes" text array NOT NULL,
      "prefix" text NOT NULL,
      "sha256" text NOT NULL,
      "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
      "expires_at" TIMESTAMP WITH TIME ZONE,
      "last_used_at" TIMESTAMP WITH TIME ZONE,
      "revoked_at" TIMESTAMP WITH TIME ZONE,
      CONSTRAINT "UQ_api_key_sha256" UNIQUE ("sha256"),
      CONSTRAINT "PK_api_key" PRIMARY KEY ("id"),
      CONSTRAINT "FK_api_key_user" FOREIGN KEY ("user_id") REFERENCES "user"("id") ON DELETE CASCADE
    )`)
    await runner.query(`CREATE INDEX "IX_api_key_user" ON "api_key" ("user_id", "created_at")`)
    await runner.query(`CREATE TABLE "attempt" (
      "key" text NOT NULL,
      "count" integer NOT NULL,
      "ends_at" TIMESTAMP WITH TIME ZONE NOT NULL,
      CONSTRAINT "PK_attempt" PRIMARY KEY ("key")
    )`)
    await runner.query(`CREATE INDEX "IX_attempt_ends" ON "attempt" ("ends_at")`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE "attempt"`)
    await runner.query(`DROP TABLE "api_key"`)
  }
}
