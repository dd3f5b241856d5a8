import type { MigrationInterface, QueryRunner } from 'typeorm'

const TABLES = [
  `CREATE TABLE "hand_over" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "polymer_id" uuid NOT NULL,
    "mapping_id" uuid NOT NULL,
    "mapping_revision" integer NOT NULL,
    "state_point_id" uuid NOT NULL,
    "title" text NOT NULL,
    "notes" text NOT NULL,
    "selection" jsonb NOT NULL,
    "layout" jsonb NOT NULL,
    "standing" "hand_over_standing" NOT NULL,
    "number" integer,
    "revision" integer NOT NULL,
    "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
    "changed_at" TIMESTAMP WITH TIME ZONE NOT NULL,
    "author_id" uuid,
    "reviewer_id" uuid,
    "content_sha256" text,
    "signed_off_by" uuid,
    "signed_off_at" TIMESTAMP WITH TIME ZONE,
    "released_by" uuid,
    "released_at" TIMESTAMP WITH TIME ZONE,
    "previous_id" uuid,
    "frozen" jsonb,
    "withdrawn_by" uuid,
    "withdrawn_at" TIMESTAMP WITH TIME ZONE,
    "withdrawn_reason" text,
    CONSTRAINT "UQ_hand_over_group" UNIQUE ("group_id", "id"),
    CONSTRAINT "UQ_hand_over_number" UNIQUE ("group_id", "number"),
    CONSTRAINT "CK_hand_over_released" CHECK (("standing" IN ('released', 'withdrawn')) = ("number" IS NOT NULL AND "frozen" IS NOT NULL AND "released_at" IS NOT NULL AND "signed_off_at" IS NOT NULL)),
    CONSTRAINT "CK_hand_over_withdrawn" CHECK (("standing" = 'withdrawn') = ("withdrawn_at" IS NOT NULL AND "withdrawn_reason" IS NOT NULL)),
    CONSTRAINT "PK_hand_over" PRIMARY KEY ("id"),
    CONSTRAINT "FK_hand_over_group" FOREIGN KEY ("group_id") REFERENCES "group"("id") ON DELETE CASCADE,
    CONSTRAINT "FK_hand_over_polymer" FOREIGN KEY ("polymer_id", "group_id") REFERENCES "polymer"("id","group_id"),
    CONSTRAINT "FK_hand_over_mapping" FOREIGN KEY ("mapping_id", "group_id") REFERENCES "mapping"("id","group_id"),
    CONSTRAINT "FK_hand_over_state_point" FOREIGN KEY ("state_point_id", "group_id") REFERENCES "state_point"("id","group_id"),
    CONSTRAINT "FK_hand_over_previous" FOREIGN KEY ("previous_id", "group_id") REFERENCES "hand_over"("id","group_id"),
    CONSTRAINT "FK_hand_over_author" FOREIGN KEY ("author_id") REFERENCES "user"("id") ON DELETE SET NULL,
    CONSTRAINT "FK_hand_over_reviewer" FOREIGN KEY ("reviewer_id") REFERENCES "user"("id") ON DELETE SET NULL,
    CONSTRAINT "FK_hand_over_signed_off_by" FOREIGN KEY ("signed_off_by") REFERENCES "user"("id") ON DELETE SET NULL,
    CONSTRAINT "FK_hand_over_released_by" FOREIGN KEY ("released_by") REFERENCES "user"("id") ON DELETE SET NULL,
    CONSTRAINT "FK_hand_over_withdrawn_by" FOREIGN KEY ("withdrawn_by") REFERENCES "user"("id") ON DELETE SET NULL
  )`,
  `CREATE TABLE "hand_over_review" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "hand_over_id" uuid NOT NULL,
    "content_sha256" text NOT NULL,
    "asked_by" uuid,
    "asked_at" TIMESTAMP WITH TIME ZONE NOT NULL,
    "asked_note" text NOT NULL,
    "reviewer_id" uuid,
    "outcome" "review_outcome",
    "note" text NOT NULL,
    "decided_by" uuid,
    "decided_at" TIMESTAMP WITH TIME ZONE,
    CONSTRAINT "CK_hand_over_review_decided" CHECK (("outcome" IS NULL) = ("decided_at" IS NULL)),
    CONSTRAINT "PK_hand_over_review" PRIMARY KEY ("id"),
    CONSTRAINT "FK_hand_over_review_hand_over" FOREIGN KEY ("hand_over_id", "group_id") REFERENCES "hand_over"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_hand_over_review_asked_by" FOREIGN KEY ("asked_by") REFERENCES "user"("id") ON DELETE SET NULL,
    CONSTRAINT "FK_hand_over_review_reviewer" FOREIGN KEY ("reviewer_id") REFERENCES "user"("id") ON DELETE SET NULL,
    CONSTRAINT "FK_hand_over_review_decided_by" FOREIGN KEY ("decided_by") REFERENCES "user"("id") ON DELETE SET NULL
  )`,
  `CREATE TABLE "hand_over_mark" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "hand_over_id" uuid NOT NULL,
    "term_id" uuid NOT NULL,
    "mark" "review_mark" NOT NULL,
    "content_sha256" text NOT NULL,
    "marked_by" uuid,
    "marked_at" TIMESTAMP WITH TIME ZONE NOT NULL,
    CONSTRAINT "UQ_hand_over_mark_term" UNIQUE ("hand_over_id", "term_id"),
    CONSTRAINT "PK_hand_over_mark" PRIMARY KEY ("id"),
    CONSTRAINT "FK_hand_over_mark_hand_over" FOREIGN KEY ("hand_over_id", "group_id") REFERENCES "hand_over"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_hand_over_mark_term" FOREIGN KEY ("term_id", "group_id") REFERENCES "term"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_hand_over_mark_marked_by" FOREIGN KEY ("marked_by") REFERENCES "user"("id") ON DELETE SET NULL
  )`,
  `CREATE TABLE "hand_over_comment" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "hand_over_id" uuid NOT NULL,
    "term_id" uuid,
    "text" text NOT NULL,
    "written_by" uuid,
    "written_at" TIMESTAMP WITH TIME ZONE NOT NULL,
    CONSTRAINT "PK_hand_over_comment" PRIMARY KEY ("id"),
    CONSTRAINT "FK_hand_over_comment_hand_over" FOREIGN KEY ("hand_over_id", "group_id") REFERENCES "hand_over"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_hand_over_comment_term" FOREIGN KEY ("term_id", "group_id") REFERENCES "term"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_hand_over_comment_written_by" FOREIGN KEY ("written_by") REFERENCES "user"("id") ON DELETE SET NULL
  )`,
  `CREATE TABLE "warning_answer" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "potential_id" uuid,
    "joint_distribution_id" uuid,
    "code" text NOT NULL,
    "basis_sha256" text NOT NULL,
    "reason" text NOT NULL,
    "answered_by" uuid,
    "answered_at" TIMESTAMP WITH TIME ZONE NOT NULL,
    CONSTRAINT "UQ_warning_answer_potential" UNIQUE ("potential_id", "code", "basis_sha256"),
    CONSTRAINT "UQ_warning_answer_joint_distribution" UNIQUE ("joint_distribution_id", "code", "basis_sha256"),
    CONSTRAINT "CK_warning_answer_owner" CHECK (num_nonnulls("potential_id", "joint_distribution_id") = 1),
    CONSTRAINT "PK_warning_answer" PRIMARY KEY ("id"),
    CONSTRAINT "FK_warning_answer_potential" FOREIGN KEY ("potential_id", "group_id") REFERENCES "potential"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_warning_answer_joint_distribution" FOREIGN KEY ("joint_distribution_id", "group_id") REFERENCES "joint_distribution"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_warning_answer_answered_by" FOREIGN KEY ("answered_by") REFERENCES "user"("id") ON DELETE SET NULL
  )`,
  `CREATE TABLE "hand_over_file" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "hand_over_id" uuid NOT NULL,
    "position" integer NOT NULL,
    "path" text NOT NULL,
    "media_type" text NOT NULL,
    "size" integer NOT NULL,
    "sha256" text NOT NULL,
    "bytes" bytea NOT NULL,
    CONSTRAINT "UQ_hand_over_file_path" UNIQUE ("hand_over_id", "path"),
    CONSTRAINT "PK_hand_over_file" PRIMARY KEY ("id"),
    CONSTRAINT "FK_hand_over_file_hand_over" FOREIGN KEY ("hand_over_id", "group_id") REFERENCES "hand_over"("id","group_id") ON DELETE CASCADE
  )`,
  `CREATE TABLE "hand_over_table" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "hand_over_id" uuid NOT NULL,
    "position" integer NOT NULL,
    "name" text NOT NULL,
    "path" text NOT NULL,
    "kinds" text array NOT NULL,
    "temperature" double precision NOT NULL,
    "coordinates" double precision array NOT NULL,
    "second_coordinates" double precision array,
    "energies" double precision array NOT NULL,
    "forces" double precision array NOT NULL,
    "second_forces" double precision array,
    "meta" jsonb NOT NULL,
    "silhouette" double precision array NOT NULL,
    CONSTRAINT "UQ_hand_over_table_group" UNIQUE ("group_id", "id"),
    CONSTRAINT "UQ_hand_over_table_name" UNIQUE ("hand_over_id", "name"),
    CONSTRAINT "CK_hand_over_table_shape" CHECK (cardinality("energies") = cardinality("coordinates") * coalesce(cardinality("second_coordinates"), 1) AND cardinality("forces") = cardinality("energies") AND ("second_coordinates" IS NULL) = ("second_forces" IS NULL) AND cardinality("kinds") = CASE WHEN "second_coordinates" IS NULL THEN 1 ELSE 2 END),
    CONSTRAINT "PK_hand_over_table" PRIMARY KEY ("id"),
    CONSTRAINT "FK_hand_over_table_hand_over" FOREIGN KEY ("hand_over_id", "group_id") REFERENCES "hand_over"("id","group_id") ON DELETE CASCADE
  )`,
]

const INDEXES = [
  `CREATE INDEX "IX_hand_over_polymer" ON "hand_over" ("polymer_id")`,
  `CREATE INDEX "IX_hand_over_mapping" ON "hand_over" ("mapping_id")`,
  `CREATE INDEX "IX_hand_over_state_point" ON "hand_over" ("state_point_id")`,
  `CREATE INDEX "IX_hand_over_review_hand_over" ON "hand_over_review" ("hand_over_id")`,
  `CREATE UNIQUE INDEX "UQ_hand_over_review_open" ON "hand_over_review" ("hand_over_id") WHERE "outcome" IS NULL`,
  `CREATE INDEX "IX_hand_over_comment_hand_over" ON "hand_over_comment" ("hand_over_id")`,
]

/** Whatever the program does: content that was released stays as it is. */
const GUARDS = [
  `CREATE FUNCTION "keep_released_hand_over"() RETURNS trigger LANGUAGE plpgsql AS $$
   DECLARE open_columns text[] := ARRAY['standing', 'revision', 'changed_at', 'withdrawn_by', 'withdrawn_at',
     'withdrawn_reason', 'author_id', 'reviewer_id', 'signed_off_by', 'released_by'];
   BEGIN
     IF OLD."number" IS NULL THEN
       RETURN CASE WHEN TG_OP = 'DELETE' THEN OLD ELSE NEW END;
     END IF;
     -- Only when its whole group is taken away does it go with it.
     IF TG_OP = 'DELETE' AND NOT EXISTS (SELECT 1 FROM "group" g WHERE g."id" = OLD."group_id") THEN
       RETURN OLD;
     END IF;
     IF TG_OP = 'DELETE' THEN
       RAISE EXCEPTION 'a released hand-over is kept' USING ERRCODE = 'restrict_violation', CONSTRAINT = 'hand_over_immutable';
     END IF;
     IF to_jsonb(NEW) - open_columns IS DISTINCT FROM to_jsonb(OLD) - open_columns
        OR OLD."standing" = 'withdrawn' AND NEW."standing" <> 'withdrawn'
        OR NEW."author_id" IS NOT NULL AND NEW."author_id" IS DISTINCT FROM OLD."author_id"
        OR NEW."reviewer_id" IS NOT NULL AND NEW."reviewer_id" IS DISTINCT FROM OLD."reviewer_id"
        OR NEW."signed_off_by" IS NOT NULL AND NEW."signed_off_by" IS DISTINCT FROM OLD."signed_off_by"
        OR NEW."released_by" IS NOT NULL AND NEW."released_by" IS DISTINCT FROM OLD."released_by" THEN
       RAISE EXCEPTION 'a released hand-over never changes' USING ERRCODE = 'restrict_violation', CONSTRAINT = 'hand_over_immutable';
     END IF;
     RETURN NEW;
   END $$`,
  `CREATE TRIGGER "keep_released" BEFORE UPDATE OR DELETE ON "hand_over"
   FOR EACH ROW EXECUTE FUNCTION "keep_released_hand_over"()`,
  `CREATE FUNCTION "keep_released_content"() RETURNS trigger LANGUAGE plpgsql AS $$
   BEGIN
     IF TG_OP = 'INSERT' AND NOT EXISTS (
       SELECT 1 FROM "hand_over" h WHERE h."id" = NEW."hand_over_id" AND h."number" IS NOT NULL) THEN
       RETURN NEW;
     END IF;
     IF TG_OP = 'DELETE' AND NOT EXISTS (SELECT 1 FROM "hand_over" h WHERE h."id" = OLD."hand_over_id") THEN
       RETURN OLD;
     END IF;
     RAISE EXCEPTION 'the content of a hand-over never changes' USING ERRCODE = 'restrict_violation', CONSTRAINT = 'hand_over_immutable';
   END $$`,
  ...['hand_over_file', 'hand_over_table'].map(
    (table) => `CREATE TRIGGER "keep_released" BEFORE INSERT OR UPDATE OR DELETE ON "${table}"
      FOR EACH ROW EXECUTE FUNCTION "keep_released_content"()`,
  ),
]

/** Hand-overs from draft to withdrawn, their reviews, the answers to warnings, and the content that a release freezes. */
export class HandOvers1764979200000 implements MigrationInterface {
  name = 'HandOvers1764979200000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `CREATE TYPE "hand_over_standing" AS ENUM ('draft', 'in review', 'sent back', 'signed off', 'released', 'withdrawn')`,
    )
    await runner.query(
      `CREATE TYPE "review_outcome" AS ENUM ('signed off', 'sent back', 'taken back', 'lapsed')`,
    )
    await runner.query(`CREATE TYPE "review_mark" AS ENUM ('questioned', 'accepted')`)
    await runner.query(
      `ALTER TABLE "potential" ADD CONSTRAINT "UQ_potential_group" UNIQUE ("group_id", "id")`,
    )
    for (const statement of [...TABLES, ...INDEXES, ...GUARDS]) await runner.query(statement)
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const table of [
      'hand_over_table',
      'hand_over_file',
      'warning_answer',
      'hand_over_comment',
      'hand_over_mark',
      'hand_over_review',
      'hand_over',
    ]) {
      await runner.query(`DROP TABLE "${table}"`)
    }
    await runner.query(`DROP FUNCTION "keep_released_content"`)
    await runner.query(`DROP FUNCTION "keep_released_hand_over"`)
    await runner.query(`ALTER TABLE "potential" DROP CONSTRAINT "UQ_potential_group"`)
    for (const type of ['review_mark', 'review_outcome', 'hand_over_standing']) {
      await runner.query(`DROP TYPE "${type}"`)
    }
  }
}
