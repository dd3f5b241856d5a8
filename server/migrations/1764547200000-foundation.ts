import type { MigrationInterface, QueryRunner } from 'typeorm'

const TYPES = [
  `CREATE TYPE "coordinate_kind" AS ENUM('bond', 'angle', 'dihedral')`,
  `CREATE TYPE "bin_content" AS ENUM('count', 'density', 'probability')`,
  `CREATE TYPE "decision_choice" AS ENUM('joint', 'separate', 'change mapping')`,
  `CREATE TYPE "role" AS ENUM('owner', 'modeller', 'reviewer', 'collaborator')`,
]

/** In an order in which each table finds those it points to. */
const TABLES = [
  `CREATE TABLE "user" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "email" text NOT NULL,
    "name" text NOT NULL,
    "password_hash" text,
    "demo" boolean NOT NULL DEFAULT false,
    "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
    CONSTRAINT "UQ_user_email" UNIQUE ("email"),
    CONSTRAINT "PK_user" PRIMARY KEY ("id")
  )`,
  `CREATE TABLE "group" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "name" text NOT NULL,
    "demo" boolean NOT NULL DEFAULT false,
    "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
    CONSTRAINT "PK_group" PRIMARY KEY ("id")
  )`,
  `CREATE TABLE "membership" (
    "group_id" uuid NOT NULL,
    "user_id" uuid NOT NULL,
    "role" "role" NOT NULL,
    "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
    CONSTRAINT "PK_membership" PRIMARY KEY ("group_id", "user_id"),
    CONSTRAINT "FK_membership_group" FOREIGN KEY ("group_id") REFERENCES "group"("id") ON DELETE CASCADE,
    CONSTRAINT "FK_membership_user" FOREIGN KEY ("user_id") REFERENCES "user"("id") ON DELETE CASCADE
  )`,
  `CREATE TABLE "session" (
    "sid" character varying NOT NULL,
    "sess" json NOT NULL,
    "expire" TIMESTAMP(6) NOT NULL,
    CONSTRAINT "PK_session" PRIMARY KEY ("sid")
  )`,
  `CREATE TABLE "set_up_link" (
    "token_sha256" text NOT NULL,
    "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
    CONSTRAINT "PK_set_up_link" PRIMARY KEY ("token_sha256")
  )`,
  `CREATE TABLE "setting" (
    "key" text NOT NULL,
    "value" text NOT NULL,
    CONSTRAINT "PK_setting" PRIMARY KEY ("key")
  )`,
  `CREATE TABLE "polymer" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "name" text NOT NULL,
    "smiles" text NOT NULL,
    "notes" text NOT NULL,
    "formula" text NOT NULL,
    "mass" double precision NOT NULL,
    "heavy_atoms" integer NOT NULL,
    "revision" integer NOT NULL,
    "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
    CONSTRAINT "UQ_polymer_group" UNIQUE ("group_id", "id"),
    CONSTRAINT "UQ_polymer_name" UNIQUE ("group_id", "name"),
    CONSTRAINT "PK_polymer" PRIMARY KEY ("id"),
    CONSTRAINT "FK_polymer_group" FOREIGN KEY ("group_id") REFERENCES "group"("id") ON DELETE CASCADE
  )`,
  `CREATE TABLE "state_point" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "polymer_id" uuid NOT NULL,
    "temperature" double precision NOT NULL,
    "pressure" double precision,
    "phase" text NOT NULL,
    "composition" text NOT NULL,
    "notes" text NOT NULL,
    "revision" integer NOT NULL,
    "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
    CONSTRAINT "UQ_state_point_group" UNIQUE ("group_id", "id"),
    CONSTRAINT "CK_state_point_temperature" CHECK ("temperature" > 0),
    CONSTRAINT "PK_state_point" PRIMARY KEY ("id"),
    CONSTRAINT "FK_state_point_polymer" FOREIGN KEY ("polymer_id", "group_id") REFERENCES "polymer"("id","group_id") ON DELETE CASCADE
  )`,
  `CREATE TABLE "mapping" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "polymer_id" uuid NOT NULL,
    "name" text NOT NULL,
    "document" jsonb NOT NULL,
    "revision" integer NOT NULL,
    "saved_at" TIMESTAMP WITH TIME ZONE NOT NULL,
    "saved_by" uuid,
    CONSTRAINT "UQ_mapping_group" UNIQUE ("group_id", "id"),
    CONSTRAINT "UQ_mapping_name" UNIQUE ("polymer_id", "name"),
    CONSTRAINT "PK_mapping" PRIMARY KEY ("id"),
    CONSTRAINT "FK_mapping_polymer" FOREIGN KEY ("polymer_id", "group_id") REFERENCES "polymer"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_mapping_saved_by" FOREIGN KEY ("saved_by") REFERENCES "user"("id") ON DELETE SET NULL
  )`,
  `CREATE TABLE "term" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "mapping_id" uuid NOT NULL,
    "kind" "coordinate_kind" NOT NULL,
    "types" text array NOT NULL,
    "places" jsonb NOT NULL,
    "place_key" text NOT NULL,
    "position" integer NOT NULL,
    "current" boolean NOT NULL,
    "created_at" TIMESTAMP WITH TIME ZONE NOT NULL DEFAULT now(),
    CONSTRAINT "UQ_term_group" UNIQUE ("group_id", "id"),
    CONSTRAINT "PK_term" PRIMARY KEY ("id"),
    CONSTRAINT "FK_term_mapping" FOREIGN KEY ("mapping_id", "group_id") REFERENCES "mapping"("id","group_id") ON DELETE CASCADE
  )`,
  `CREATE TABLE "distribution" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "term_id" uuid NOT NULL,
    "state_point_id" uuid NOT NULL,
    "edges" double precision array NOT NULL,
    "weights" double precision array NOT NULL,
    "content" "bin_content" NOT NULL,
    "independent_samples" double precision,
    "settings" jsonb NOT NULL,
    "notes" text array NOT NULL,
    "silhouette" double precision array NOT NULL,
    "content_sha256" text NOT NULL,
    "mapping_revision" integer NOT NULL,
    "uploaded_at" TIMESTAMP WITH TIME ZONE NOT NULL,
    "uploaded_by" uuid,
    "superseded_at" TIMESTAMP WITH TIME ZONE,
    CONSTRAINT "UQ_distribution_group" UNIQUE ("group_id", "id"),
    CONSTRAINT "CK_distribution_shape" CHECK (cardinality("edges") = cardinality("weights") + 1),
    CONSTRAINT "PK_distribution" PRIMARY KEY ("id"),
    CONSTRAINT "FK_distribution_term" FOREIGN KEY ("term_id", "group_id") REFERENCES "term"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_distribution_state_point" FOREIGN KEY ("state_point_id", "group_id") REFERENCES "state_point"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_distribution_uploaded_by" FOREIGN KEY ("uploaded_by") REFERENCES "user"("id") ON DELETE SET NULL
  )`,
  `CREATE TABLE "joint_distribution" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "mapping_id" uuid NOT NULL,
    "first_term_id" uuid NOT NULL,
    "second_term_id" uuid NOT NULL,
    "state_point_id" uuid NOT NULL,
    "x_edges" double precision array NOT NULL,
    "y_edges" double precision array NOT NULL,
    "weights" double precision array NOT NULL,
    "content" "bin_content" NOT NULL,
    "independent_samples" double precision,
    "settings" jsonb NOT NULL,
    "notes" text array NOT NULL,
    "numbers" jsonb NOT NULL,
    "mapping_revision" integer NOT NULL,
    "uploaded_at" TIMESTAMP WITH TIME ZONE NOT NULL,
    "uploaded_by" uuid,
    "superseded_at" TIMESTAMP WITH TIME ZONE,
    CONSTRAINT "UQ_joint_distribution_group" UNIQUE ("group_id", "id"),
    CONSTRAINT "CK_joint_distribution_shape" CHECK (cardinality("weights") = (cardinality("x_edges") - 1) * (cardinality("y_edges") - 1)),
    CONSTRAINT "PK_joint_distribution" PRIMARY KEY ("id"),
    CONSTRAINT "FK_joint_distribution_mapping" FOREIGN KEY ("mapping_id", "group_id") REFERENCES "mapping"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_joint_distribution_first_term" FOREIGN KEY ("first_term_id", "group_id") REFERENCES "term"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_joint_distribution_second_term" FOREIGN KEY ("second_term_id", "group_id") REFERENCES "term"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_joint_distribution_state_point" FOREIGN KEY ("state_point_id", "group_id") REFERENCES "state_point"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_joint_distribution_uploaded_by" FOREIGN KEY ("uploaded_by") REFERENCES "user"("id") ON DELETE SET NULL
  )`,
  `CREATE TABLE "source_file" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "distribution_id" uuid,
    "joint_distribution_id" uuid,
    "name" text NOT NULL,
    "size" integer NOT NULL,
    "sha256" text NOT NULL,
    "gzip" bytea NOT NULL,
    CONSTRAINT "UQ_source_file_joint_distribution" UNIQUE ("group_id", "joint_distribution_id"),
    CONSTRAINT "UQ_source_file_distribution" UNIQUE ("group_id", "distribution_id"),
    CONSTRAINT "CK_source_file_owner" CHECK (num_nonnulls("distribution_id", "joint_distribution_id") = 1),
    CONSTRAINT "PK_source_file" PRIMARY KEY ("id"),
    CONSTRAINT "FK_source_file_distribution" FOREIGN KEY ("distribution_id", "group_id") REFERENCES "distribution"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_source_file_joint_distribution" FOREIGN KEY ("joint_distribution_id", "group_id") REFERENCES "joint_distribution"("id","group_id") ON DELETE CASCADE
  )`,
  `CREATE TABLE "potential" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "term_id" uuid NOT NULL,
    "state_point_id" uuid NOT NULL,
    "distribution_id" uuid NOT NULL,
    "settings" jsonb NOT NULL,
    "input_sha256" text NOT NULL,
    "silhouette" double precision array NOT NULL,
    "revision" integer NOT NULL,
    "saved_at" TIMESTAMP WITH TIME ZONE NOT NULL,
    "saved_by" uuid,
    CONSTRAINT "UQ_potential_place" UNIQUE ("term_id", "state_point_id"),
    CONSTRAINT "PK_potential" PRIMARY KEY ("id"),
    CONSTRAINT "FK_potential_term" FOREIGN KEY ("term_id", "group_id") REFERENCES "term"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_potential_state_point" FOREIGN KEY ("state_point_id", "group_id") REFERENCES "state_point"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_potential_distribution" FOREIGN KEY ("distribution_id", "group_id") REFERENCES "distribution"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_potential_saved_by" FOREIGN KEY ("saved_by") REFERENCES "user"("id") ON DELETE SET NULL
  )`,
  `CREATE TABLE "decision" (
    "id" uuid NOT NULL DEFAULT gen_random_uuid(),
    "group_id" uuid NOT NULL,
    "joint_distribution_id" uuid NOT NULL,
    "choice" "decision_choice" NOT NULL,
    "reason" text NOT NULL,
    "numbers" jsonb NOT NULL,
    "decided_at" TIMESTAMP WITH TIME ZONE NOT NULL,
    "decided_by" uuid,
    "superseded_at" TIMESTAMP WITH TIME ZONE,
    CONSTRAINT "PK_decision" PRIMARY KEY ("id"),
    CONSTRAINT "FK_decision_joint_distribution" FOREIGN KEY ("joint_distribution_id", "group_id") REFERENCES "joint_distribution"("id","group_id") ON DELETE CASCADE,
    CONSTRAINT "FK_decision_decided_by" FOREIGN KEY ("decided_by") REFERENCES "user"("id") ON DELETE SET NULL
  )`,
]

const INDEXES = [
  `CREATE INDEX "IX_state_point_polymer" ON "state_point" ("polymer_id")`,
  `CREATE INDEX "IX_term_mapping" ON "term" ("mapping_id")`,
  `CREATE UNIQUE INDEX "UQ_term_sequence" ON "term" ("mapping_id", "kind", "types", "place_key") WHERE "current"`,
  `CREATE INDEX "IX_joint_distribution_state_point" ON "joint_distribution" ("state_point_id")`,
  `CREATE INDEX "IX_joint_distribution_second_term" ON "joint_distribution" ("second_term_id")`,
  `CREATE INDEX "IX_joint_distribution_mapping" ON "joint_distribution" ("mapping_id")`,
  `CREATE UNIQUE INDEX "UQ_joint_distribution_current" ON "joint_distribution" ("first_term_id", "second_term_id", "state_point_id") WHERE "superseded_at" IS NULL`,
  `CREATE UNIQUE INDEX "UQ_decision_current" ON "decision" ("joint_distribution_id") WHERE "superseded_at" IS NULL`,
  `CREATE INDEX "IX_distribution_state_point" ON "distribution" ("state_point_id")`,
  `CREATE INDEX "IX_distribution_term" ON "distribution" ("term_id")`,
  `CREATE UNIQUE INDEX "UQ_distribution_current" ON "distribution" ("term_id", "state_point_id") WHERE "superseded_at" IS NULL`,
  `CREATE INDEX "IX_membership_user" ON "membership" ("user_id")`,
  `CREATE INDEX "IX_potential_state_point" ON "potential" ("state_point_id")`,
  `CREATE INDEX "IX_potential_distribution" ON "potential" ("distribution_id")`,
  `CREATE INDEX "IX_session_expire" ON "session" ("expire")`,
]

/** The first schema: people and groups, polymers, mappings with their terms, distributions, potentials and decisions. */
export class Foundation1764547200000 implements MigrationInterface {
  name = 'Foundation1764547200000'

  async up(runner: QueryRunner): Promise<void> {
    for (const statement of [...TYPES, ...TABLES, ...INDEXES]) await runner.query(statement)
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const table of [
      'decision',
      'potential',
      'source_file',
      'joint_distribution',
      'distribution',
      'term',
      'mapping',
      'state_point',
      'polymer',
      'setting',
      'set_up_link',
      'session',
      'membership',
      'group',
      'user',
    ]) {
      await runner.query(`DROP TABLE "${table}"`)
    }
    for (const type of ['decision_choice', 'bin_content', 'coordinate_kind', 'role']) {
      await runner.query(`DROP TYPE "${type}"`)
    }
  }
}
