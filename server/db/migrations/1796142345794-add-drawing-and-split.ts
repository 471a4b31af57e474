import type { MigrationInterface, QueryRunner } from 'typeorm';

export class AddDrawingAndSplit1796142345794 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      'CREATE TABLE "placement" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "frame_id" text NOT NULL, "name" text NOT NULL, "place" text NOT NULL, "position" integer NOT NULL, "revision" integer NOT NULL, "removed_at" integer)',
    );
    await runner.query(
      'CREATE INDEX "IDX_dae45d2cc7d9b94d5b86a554f8" ON "placement" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE TABLE "drawing_settings" ("installation_id" text PRIMARY KEY NOT NULL, "settings" text NOT NULL, "revision" integer NOT NULL)',
    );
    await runner.query(
      'CREATE TABLE "split" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "status" text NOT NULL, "drawing_revision" integer NOT NULL, "wish" text NOT NULL, "plan" text NOT NULL, "made_at" integer NOT NULL, "revision" integer NOT NULL)',
    );
    await runner.query(
      'CREATE INDEX "IDX_19761be2fb544b280c22dfa922" ON "split" ("installation_id", "revision") ',
    );
    await runner.query('DROP INDEX "IDX_c029590b44801c815b4216ce27"');
    await runner.query('DROP INDEX "IDX_39e2cb0a0eabaaa103b9e31fb8"');
    await runner.query(
      'CREATE TABLE "temporary_sub_assembly" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "frame_id" text NOT NULL, "template_id" text, "code" text NOT NULL, "name" text NOT NULL, "position" integer NOT NULL, "traveller_revision" integer NOT NULL, "revision" integer NOT NULL, "removed_at" integer, "kind" text NOT NULL DEFAULT (\'piece\'), "needs" text NOT NULL DEFAULT (\'[]\'), "origin" text)',
    );
    await runner.query(
      'INSERT INTO "temporary_sub_assembly"("id", "installation_id", "frame_id", "template_id", "code", "name", "position", "traveller_revision", "revision", "removed_at") SELECT "id", "installation_id", "frame_id", "template_id", "code", "name", "position", "traveller_revision", "revision", "removed_at" FROM "sub_assembly"',
    );
    await runner.query('DROP TABLE "sub_assembly"');
    await runner.query('ALTER TABLE "temporary_sub_assembly" RENAME TO "sub_assembly"');
    await runner.query(
      'CREATE INDEX "IDX_c029590b44801c815b4216ce27" ON "sub_assembly" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE UNIQUE INDEX "IDX_39e2cb0a0eabaaa103b9e31fb8" ON "sub_assembly" ("installation_id", "code") ',
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP INDEX "IDX_39e2cb0a0eabaaa103b9e31fb8"');
    await runner.query('DROP INDEX "IDX_c029590b44801c815b4216ce27"');
    await runner.query('ALTER TABLE "sub_assembly" RENAME TO "temporary_sub_assembly"');
    await runner.query(
      'CREATE TABLE "sub_assembly" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "frame_id" text NOT NULL, "template_id" text, "code" text NOT NULL, "name" text NOT NULL, "position" integer NOT NULL, "traveller_revision" integer NOT NULL, "revision" integer NOT NULL, "removed_at" integer)',
    );
    await runner.query(
      'INSERT INTO "sub_assembly"("id", "installation_id", "frame_id", "template_id", "code", "name", "position", "traveller_revision", "revision", "removed_at") SELECT "id", "installation_id", "frame_id", "template_id", "code", "name", "position", "traveller_revision", "revision", "removed_at" FROM "temporary_sub_assembly"',
    );
    await runner.query('DROP TABLE "temporary_sub_assembly"');
    await runner.query(
      'CREATE UNIQUE INDEX "IDX_39e2cb0a0eabaaa103b9e31fb8" ON "sub_assembly" ("installation_id", "code") ',
    );
    await runner.query(
      'CREATE INDEX "IDX_c029590b44801c815b4216ce27" ON "sub_assembly" ("installation_id", "revision") ',
    );
    await runner.query('DROP INDEX "IDX_19761be2fb544b280c22dfa922"');
    await runner.query('DROP TABLE "split"');
    await runner.query('DROP TABLE "drawing_settings"');
    await runner.query('DROP INDEX "IDX_dae45d2cc7d9b94d5b86a554f8"');
    await runner.query('DROP TABLE "placement"');
  }
}
