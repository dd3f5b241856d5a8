import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Who a hand-over was sent to, what they took, asked and sent back. */
export class Deliveries1765065600000 implements MigrationInterface {
  name = 'Deliveries1765065600000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TYPE "delivery_way" AS ENUM ('link', 'account')`)
    await runner.query(`CREATE TYPE "return_standing" AS ENUM ('new', 'taken', 'set aside')`)
    await runner.query(`CREATE TABLE "recipient" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "group_id" uuid NOT NULL,
      "hand_over_id" uuid NOT NULL,
      "name" text NOT NULL,
      "email" text NOT NULL,
      "user_id" uuid,
      "token_sha256" text NOT NULL,
      "past_tokens_sha256" text array NOT NULL,
      "sent" integer NOT NULL,
      "sent_at" TIMESTAMP WITH TIME ZONE NOT NULL,
      "sent_by" uuid,
      "expires_at" TIMESTAMP WITH TIME ZONE NOT NULL,
      "revoked_at" TIMESTAMP WITH TIME ZONE,
      "opened_at" TIMESTAMP WITH TIME ZONE,
      "acknowledged_at" TIMESTAMP WITH TIME ZONE,
      "acknowledged_by" text,
      "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
      CONSTRAINT "UQ_recipient_group" UNIQUE ("group_id", "id"),
      CONSTRAINT "UQ_recipient_email" UNIQUE ("hand_over_id", "email"),
      CONSTRAINT "UQ_recipient_token" UNIQUE ("token_sha256"),
      CONSTRAINT "CK_recipient_acknowledged" CHECK (("acknowledged_at" IS NULL) = ("acknowledged_by" IS NULL)),
      CONSTRAINT "PK_recipient" PRIMARY KEY ("id"),
      CONSTRAINT "FK_recipient_hand_over" FOREIGN KEY ("hand_over_id", "group_id") REFERENCES "hand_over"("id","group_id") ON DELETE CASCADE,
      CONSTRAINT "FK_recipient_user" FOREIGN KEY ("user_id") REFERENCES "user"("id") ON DELETE SET NULL,
      CONSTRAINT "FK_recipient_sent_by" FOREIGN KEY ("sent_by") REFERENCES "user"("id") ON DELETE SET NULL
    )`)
    await runner.query(`CREATE TABLE "delivery_download" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "group_id" uuid NOT NULL,
      "recipient_id" uuid NOT NULL,
      "file" text NOT NULL,
      "layout" text NOT NULL,
      "via" "delivery_way" NOT NULL,
      "at" TIMESTAMP WITH TIME ZONE NOT NULL,
      CONSTRAINT "PK_delivery_download" PRIMARY KEY ("id"),
      CONSTRAINT "FK_delivery_download_recipient" FOREIGN KEY ("recipient_id", "group_id") REFERENCES "recipient"("id","group_id") ON DELETE CASCADE
    )`)
    await runner.query(`CREATE TABLE "question" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "group_id" uuid NOT NULL,
      "hand_over_id" uuid NOT NULL,
      "table_name" text,
      "text" text NOT NULL,
      "recipient_id" uuid,
      "asked_by" uuid,
      "asked_at" TIMESTAMP WITH TIME ZONE NOT NULL,
      "answer" text,
      "answered_by" uuid,
      "answered_at" TIMESTAMP WITH TIME ZONE,
      CONSTRAINT "CK_question_answered" CHECK (("answer" IS NULL) = ("answered_at" IS NULL) AND ("answered_by" IS NULL OR "answer" IS NOT NULL)),
      CONSTRAINT "PK_question" PRIMARY KEY ("id"),
      CONSTRAINT "FK_question_hand_over" FOREIGN KEY ("hand_over_id", "group_id") REFERENCES "hand_over"("id","group_id") ON DELETE CASCADE,
      CONSTRAINT "FK_question_recipient" FOREIGN KEY ("recipient_id", "group_id") REFERENCES "recipient"("id","group_id") ON DELETE CASCADE,
      CONSTRAINT "FK_question_asked_by" FOREIGN KEY ("asked_by") REFERENCES "user"("id") ON DELETE SET NULL,
      CONSTRAINT "FK_question_answered_by" FOREIGN KEY ("answered_by") REFERENCES "user"("id") ON DELETE SET NULL
    )`)
    await runner.query(`CREATE TABLE "returned_file" (
      "id" uuid NOT NULL DEFAULT gen_random_uuid(),
      "group_id" uuid NOT NULL,
      "recipient_id" uuid NOT NULL,
      "table_name" text NOT NULL,
      "name" text NOT NULL,
      "size" integer NOT NULL,
      "sha256" text NOT NULL,
      "gzip" bytea NOT NULL,
      "note" text NOT NULL,
      "reading" text NOT NULL,
      "returned_at" TIMESTAMP WITH TIME ZONE NOT NULL,
      "standing" "return_standing" NOT NULL,
      "settled_by" uuid,
      "settled_at" TIMESTAMP WITH TIME ZONE,
      CONSTRAINT "CK_returned_file_settled" CHECK (("standing" = 'new') = ("settled_at" IS NULL)),
      CONSTRAINT "PK_returned_file" PRIMARY KEY ("id"),
      CONSTRAINT "FK_returned_file_recipient" FOREIGN KEY ("recipient_id", "group_id") REFERENCES "recipient"("id","group_id") ON DELETE CASCADE,
      CONSTRAINT "FK_returned_file_settled_by" FOREIGN KEY ("settled_by") REFERENCES "user"("id") ON DELETE SET NULL
    )`)
    await runner.query(
      `CREATE INDEX "IX_delivery_download_recipient" ON "delivery_download" ("recipient_id", "at")`,
    )
    await runner.query(`CREATE INDEX "IX_question_hand_over" ON "question" ("hand_over_id")`)
    await runner.query(`CREATE INDEX "IX_returned_file_recipient" ON "returned_file" ("recipient_id")`)
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const table of ['returned_file', 'question', 'delivery_download', 'recipient']) {
      await runner.query(`DROP TABLE "${table}"`)
    }
    for (const type of ['return_standing', 'delivery_way']) await runner.query(`DROP TYPE "${type}"`)
  }
}
