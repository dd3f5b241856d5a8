import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Invitations, new passwords, e-mail, the group's defaults, and the history of who did what. */
export class People1764720000000 implements MigrationInterface {
  name = 'People1764720000000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE "event" (
      "id" bigint GENERATED ALWAYS AS IDENTITY NOT NULL,
      "group_id" uuid NOT NULL,
      "at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
      "user_id" uuid,
      "by" text,
      "action" text NOT NULL,
      "subject_kind" text NOT NULL,
      "subject_id" uuid,
      "subject_name" text NOT NULL,
      "details" jsonb NOT NULL,
      CONSTRAINT "PK_event" PRIMARY KEY ("id"),
      CONSTRAINT "FK_event_group" FOREIGN KEY ("group_id") REFERENCES "group"("id") ON DELETE CASCADE,
      CONSTRAINT "FK_event_user" FOREIGN KEY ("user_id") REFERENCES "user"("id") ON DELETE SET NULL
    )`)
    await runner.query(`CREATE INDEX "IX_event_group" ON "event" ("group_id", "id")`)
    await runner.query(`CREATE TABLE "mail" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "event_key" text NOT NULL,
      "group_id" uuid,
      "to" text NOT NULL,
      "subject" text NOT NULL,
      "text" text NOT NULL,
      "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
      "sent_at" TIMESTAMP WITH TIME ZONE,
      "failed_at" TIMESTAMP WITH TIME ZONE,
      "last_error" text,
      CONSTRAINT "UQ_mail_event_key" UNIQUE ("event_key"),
      CONSTRAINT "PK_mail" PRIMARY KEY ("id"),
      CONSTRAINT "FK_mail_group" FOREIGN KEY ("group_id") REFERENCES "group"("id") ON DELETE SET NULL
    )`)
    await runner.query(`CREATE INDEX "IX_mail_group" ON "mail" ("group_id", "created_at")`)
    await runner.query(`CREATE TABLE "caught_mail" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "caught_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
      "message_id" text NOT NULL,
      "from" text NOT NULL,
      "to" text NOT NULL,
      "subject" text NOT NULL,
      "text" text NOT NULL,
      CONSTRAINT "UQ_caught_mail_message_id" UNIQUE ("message_id"),
      CONSTRAINT "PK_caught_mail" PRIMARY KEY ("id")
    )`)
    await runner.query(`CREATE TABLE "invitation" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "group_id" uuid NOT NULL,
      "email" text NOT NULL,
      "role" "role" NOT NULL,
      "token_sha256" text NOT NULL,
      "sent" integer NOT NULL,
      "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
      "expires_at" TIMESTAMP WITH TIME ZONE NOT NULL,
      "accepted_at" TIMESTAMP WITH TIME ZONE,
      "revoked_at" TIMESTAMP WITH TIME ZONE,
      "invited_by" uuid,
      CONSTRAINT "UQ_invitation_group" UNIQUE ("group_id", "id"),
      CONSTRAINT "UQ_invitation_token" UNIQUE ("token_sha256"),
      CONSTRAINT "PK_invitation" PRIMARY KEY ("id"),
      CONSTRAINT "FK_invitation_group" FOREIGN KEY ("group_id") REFERENCES "group"("id") ON DELETE CASCADE,
      CONSTRAINT "FK_invitation_invited_by" FOREIGN KEY ("invited_by") REFERENCES "user"("id") ON DELETE SET NULL
    )`)
    await runner.query(
      `CREATE UNIQUE INDEX "UQ_invitation_open" ON "invitation" ("group_id", "email") WHERE "accepted_at" IS NULL AND "revoked_at" IS NULL`,
    )
    await runner.query(`CREATE TABLE "password_reset" (
      "token_sha256" text NOT NULL,
      "user_id" uuid NOT NULL,
      "expires_at" TIMESTAMP WITH TIME ZONE NOT NULL,
      CONSTRAINT "PK_password_reset" PRIMARY KEY ("token_sha256"),
      CONSTRAINT "FK_password_reset_user" FOREIGN KEY ("user_id") REFERENCES "user"("id") ON DELETE CASCADE
    )`)
    await runner.query(
      `ALTER TABLE "group" ADD "defaults" jsonb NOT NULL DEFAULT '{}', ADD "revision" integer NOT NULL DEFAULT 1`,
    )
    await runner.query(`ALTER TABLE "user" ADD "current_group_id" uuid,
      ADD CONSTRAINT "FK_user_current_group" FOREIGN KEY ("current_group_id") REFERENCES "group"("id") ON DELETE SET NULL`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE "user" DROP CONSTRAINT "FK_user_current_group", DROP "current_group_id"`)
    await runner.query(`ALTER TABLE "group" DROP "revision", DROP "defaults"`)
    for (const table of ['password_reset', 'invitation', 'caught_mail', 'mail', 'event']) {
      await runner.query(`DROP TABLE "${table}"`)
    }
  }
}
