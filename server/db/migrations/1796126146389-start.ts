import type { MigrationInterface, QueryRunner } from 'typeorm';

export class Start1796126146389 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      'CREATE TABLE "account" ("id" text PRIMARY KEY NOT NULL, "email" text NOT NULL, "name" text NOT NULL, "password_hash" text, "site_role" text NOT NULL, "created_at" integer NOT NULL, "disabled_at" integer)',
    );
    await runner.query('CREATE UNIQUE INDEX "IDX_4c8f96ccf523e9a3faefd5bdd4" ON "account" ("email") ');
    await runner.query(
      'CREATE TABLE "one_time_link" ("id" text PRIMARY KEY NOT NULL, "kind" text NOT NULL, "secret_hash" text NOT NULL, "account_id" text, "created_at" integer NOT NULL, "expires_at" integer NOT NULL, "used_at" integer)',
    );
    await runner.query(
      'CREATE UNIQUE INDEX "IDX_e087e8dc03595f43061e0e4fbf" ON "one_time_link" ("secret_hash") ',
    );
    await runner.query(
      'CREATE TABLE "tool" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "number" text NOT NULL, "name" text NOT NULL, "kind" text NOT NULL, "hazard" text, "traits" text NOT NULL, "condition" text NOT NULL, "tag" text, "revision" integer NOT NULL, "removed_at" integer)',
    );
    await runner.query(
      'CREATE UNIQUE INDEX "IDX_3bf7527a9680b36009378cc6c9" ON "tool" ("installation_id", "number") ',
    );
    await runner.query(
      'CREATE INDEX "IDX_8101df0e2a71a00ba3cb184edc" ON "tool" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE TABLE "checkout" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "tool_id" text NOT NULL, "person_id" text NOT NULL, "station_id" text, "out_at" integer NOT NULL, "out_by" text NOT NULL, "back_by" integer NOT NULL, "back_at" integer, "taken_back_by" text, "condition_back" text, "revision" integer NOT NULL)',
    );
    await runner.query(
      'CREATE UNIQUE INDEX "checkout_one_out" ON "checkout" ("tool_id") WHERE back_at IS NULL',
    );
    await runner.query(
      'CREATE INDEX "IDX_8682f805115bd7bc503be00a28" ON "checkout" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE TABLE "frame" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "name" text NOT NULL, "source" text NOT NULL, "geometry" text NOT NULL, "revision" integer NOT NULL, "removed_at" integer)',
    );
    await runner.query(
      'CREATE INDEX "IDX_15842b3068467fd8f6db156c90" ON "frame" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE TABLE "installation" ("id" text PRIMARY KEY NOT NULL, "name" text NOT NULL, "venue" text NOT NULL, "time_zone" text NOT NULL, "unit" text NOT NULL, "hall_limit" integer NOT NULL, "status" text NOT NULL, "join_code" text NOT NULL, "join_code_at" integer NOT NULL, "settings" text NOT NULL, "created_at" integer NOT NULL, "revision" integer NOT NULL, "own_revision" integer NOT NULL)',
    );
    await runner.query(
      'CREATE UNIQUE INDEX "IDX_a7053012246cb6f3e974a23e26" ON "installation" ("join_code") ',
    );
    await runner.query(
      'CREATE TABLE "build_day" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "date" text NOT NULL, "doors" text NOT NULL, "start" text NOT NULL, "clear_up" text NOT NULL, "end" text NOT NULL, "breaks" text NOT NULL, "revision" integer NOT NULL, "removed_at" integer)',
    );
    await runner.query(
      'CREATE INDEX "IDX_70314c4d25133f323d034aa1e6" ON "build_day" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE TABLE "station" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "name" text NOT NULL, "kind" text NOT NULL, "places" integer NOT NULL, "position" integer NOT NULL, "revision" integer NOT NULL, "removed_at" integer)',
    );
    await runner.query(
      'CREATE INDEX "IDX_9ba4f5ac1aaa299f7b54186a20" ON "station" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE TABLE "display_token" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "label" text NOT NULL, "token_hash" text NOT NULL, "created_at" integer NOT NULL, "closed_at" integer)',
    );
    await runner.query(
      'CREATE INDEX "IDX_f643eeb878d7d1514e487dbe31" ON "display_token" ("installation_id") ',
    );
    await runner.query(
      'CREATE UNIQUE INDEX "IDX_bafce7caf5a7b7dc841fbdaad8" ON "display_token" ("token_hash") ',
    );
    await runner.query(
      'CREATE TABLE "person" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "account_id" text, "number" integer NOT NULL, "first_name" text NOT NULL, "initial" text NOT NULL, "email" text, "age_band" text NOT NULL, "adult_name" text, "duties" text NOT NULL, "joined_at" integer NOT NULL, "confirmed_at" integer, "confirmed_by" text, "left_at" integer, "removed_at" integer, "erased_at" integer, "revision" integer NOT NULL)',
    );
    await runner.query(
      'CREATE UNIQUE INDEX "IDX_5542ea123faa0e6e1ef65eae33" ON "person" ("installation_id", "account_id") ',
    );
    await runner.query(
      'CREATE UNIQUE INDEX "IDX_092e8aa9f93c72ff2e49648426" ON "person" ("installation_id", "number") ',
    );
    await runner.query(
      'CREATE INDEX "IDX_4926ac326cdbed67cbb82a47ce" ON "person" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE TABLE "briefing" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "key" text NOT NULL, "title" text NOT NULL, "hazards" text NOT NULL, "validity_days" integer NOT NULL, "revision" integer NOT NULL)',
    );
    await runner.query(
      'CREATE UNIQUE INDEX "IDX_fbe9a9634170020fedf53e2dc8" ON "briefing" ("installation_id", "key") ',
    );
    await runner.query(
      'CREATE TABLE "briefing_version" ("id" text PRIMARY KEY NOT NULL, "briefing_id" text NOT NULL, "version" integer NOT NULL, "kind" text NOT NULL, "effective_from" integer NOT NULL, "what_changed" text, "body" text NOT NULL, "content_hash" text NOT NULL, "published_by" text, "second_by" text, "status" text NOT NULL, "published_at" integer NOT NULL)',
    );
    await runner.query(
      'CREATE UNIQUE INDEX "IDX_4be4492e98e65c952e29b7412c" ON "briefing_version" ("briefing_id", "version") ',
    );
    await runner.query(
      'CREATE TABLE "sign_off" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "briefing_key" text NOT NULL, "version" integer NOT NULL, "person_id" text NOT NULL, "attempts" text NOT NULL, "talk_by" text, "talk_at" integer, "passed_at" integer, "signed_at" integer, "signature" text, "countersigned_by" text, "countersigned_at" integer, "countersigned_as" text, "expires_at" integer, "revoked_at" integer, "revoked_by" text, "revoke_reason" text, "revision" integer NOT NULL)',
    );
    await runner.query(
      'CREATE INDEX "IDX_ef57a12b634558225f0a5f04c5" ON "sign_off" ("person_id", "briefing_key") ',
    );
    await runner.query(
      'CREATE INDEX "IDX_941b5395b8c483b586e3e1f184" ON "sign_off" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE TABLE "register_row" ("installation_id" text NOT NULL, "seq" integer NOT NULL, "at" integer NOT NULL, "kind" text NOT NULL, "ids" text NOT NULL, "commitment" text NOT NULL, "prev_hash" text NOT NULL, "hash" text NOT NULL, "salt" text, "personal" text, "person_id" text, PRIMARY KEY ("installation_id", "seq"))',
    );
    await runner.query('CREATE INDEX "IDX_8d887b94d53c6c2fb89ea060fa" ON "register_row" ("person_id") ');
    await runner.query(
      'CREATE TABLE "stop" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "scope" text NOT NULL, "station_id" text, "reason" text NOT NULL, "raised_by" text NOT NULL, "raised_at" integer NOT NULL, "lifted_by" text, "lifted_at" integer, "lift_note" text, "revision" integer NOT NULL)',
    );
    await runner.query(
      'CREATE INDEX "IDX_89638674098de6d9c59afa2cce" ON "stop" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE TABLE "stop_seen" ("stop_id" text NOT NULL, "person_id" text NOT NULL, "at" integer NOT NULL, PRIMARY KEY ("stop_id", "person_id"))',
    );
    await runner.query(
      'CREATE TABLE "traveller_template" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "name" text NOT NULL, "steps" text NOT NULL, "revision" integer NOT NULL)',
    );
    await runner.query(
      'CREATE INDEX "IDX_250132f7ff4fcf530f25878108" ON "traveller_template" ("installation_id") ',
    );
    await runner.query(
      'CREATE TABLE "sub_assembly" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "frame_id" text NOT NULL, "template_id" text, "code" text NOT NULL, "name" text NOT NULL, "position" integer NOT NULL, "traveller_revision" integer NOT NULL, "revision" integer NOT NULL, "removed_at" integer)',
    );
    await runner.query(
      'CREATE UNIQUE INDEX "IDX_39e2cb0a0eabaaa103b9e31fb8" ON "sub_assembly" ("installation_id", "code") ',
    );
    await runner.query(
      'CREATE INDEX "IDX_c029590b44801c815b4216ce27" ON "sub_assembly" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE TABLE "step" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "sub_assembly_id" text NOT NULL, "position" integer NOT NULL, "operation" text NOT NULL, "name" text NOT NULL, "station_id" text NOT NULL, "hazards" text NOT NULL, "tool_kinds" text NOT NULL, "crew_min" integer NOT NULL, "crew_max" integer NOT NULL, "planned_seconds" integer NOT NULL, "clocks" text, "needs_check" integer NOT NULL, "state" text NOT NULL, "held" text, "started_at" integer, "finished_at" integer, "finished_by" text, "dry_until" integer, "passed_at" integer, "passed_by" text, "rework" text, "hand_over" text, "flags" text NOT NULL, "revision" integer NOT NULL, "removed_at" integer)',
    );
    await runner.query('CREATE INDEX "IDX_b6b964dbb5bb6b2926981c2b2e" ON "step" ("state", "dry_until") ');
    await runner.query(
      'CREATE INDEX "IDX_7f3c6a4da352aac7bc87949c20" ON "step" ("sub_assembly_id", "position") ',
    );
    await runner.query(
      'CREATE INDEX "IDX_6411257d875224fae6fea4419c" ON "step" ("installation_id", "revision") ',
    );
    await runner.query(
      'CREATE TABLE "claim" ("id" text PRIMARY KEY NOT NULL, "installation_id" text NOT NULL, "step_id" text NOT NULL, "person_id" text NOT NULL, "claimed_at" integer NOT NULL, "ended_at" integer, "ended_by" text)',
    );
    await runner.query('CREATE INDEX "IDX_46b2bc7f55d1b4b4758a7f695b" ON "claim" ("person_id", "ended_at") ');
    await runner.query(
      'CREATE UNIQUE INDEX "claim_one_place" ON "claim" ("step_id", "person_id") WHERE ended_at IS NULL',
    );
    await runner.query('CREATE INDEX "IDX_2a40d96efdd745d9017e87ea5b" ON "claim" ("step_id", "person_id") ');
    await runner.query(
      'CREATE TABLE "session" ("id" text PRIMARY KEY NOT NULL, "principal" text, "data" text NOT NULL, "expires_at" integer NOT NULL)',
    );
    await runner.query('CREATE INDEX "IDX_86177a6697b9b97d7cf87c0efc" ON "session" ("principal") ');
    await runner.query(
      'CREATE TABLE "idempotency" ("actor" text NOT NULL, "key" text NOT NULL, "installation_id" text, "body_hash" text NOT NULL, "status" integer NOT NULL, "reply" text NOT NULL, "at" integer NOT NULL, PRIMARY KEY ("actor", "key"))',
    );
    await runner.query('CREATE INDEX "IDX_2db0301d33193a70de20ffda29" ON "idempotency" ("installation_id") ');
    await runner.query(
      'CREATE TABLE "day_log" ("seq" integer PRIMARY KEY AUTOINCREMENT NOT NULL, "installation_id" text, "revision" integer NOT NULL, "happened_at" integer NOT NULL, "recorded_at" integer NOT NULL, "actor" text NOT NULL, "for_person_id" text, "action" text NOT NULL, "subject" text NOT NULL, "flags" text NOT NULL)',
    );
    await runner.query(
      'CREATE INDEX "IDX_0050e4f3a0b34bfbd21dbf0766" ON "day_log" ("installation_id", "seq") ',
    );
    await runner.query(
      'CREATE TABLE "mail" ("id" text PRIMARY KEY NOT NULL, "recipient" text NOT NULL, "subject" text NOT NULL, "text" text NOT NULL, "status" text NOT NULL, "attempts" integer NOT NULL, "created_at" integer NOT NULL, "next_try_at" integer NOT NULL, "sent_at" integer)',
    );
    await runner.query('CREATE INDEX "IDX_8c9d394edbb8aaed6f924e1119" ON "mail" ("status") ');
    await runner.query(
      'CREATE TABLE "outbox_letter" ("id" text PRIMARY KEY NOT NULL, "sender" text NOT NULL, "recipient" text NOT NULL, "subject" text NOT NULL, "text" text NOT NULL, "received_at" integer NOT NULL)',
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE "outbox_letter"');
    await runner.query('DROP INDEX "IDX_8c9d394edbb8aaed6f924e1119"');
    await runner.query('DROP TABLE "mail"');
    await runner.query('DROP INDEX "IDX_0050e4f3a0b34bfbd21dbf0766"');
    await runner.query('DROP TABLE "day_log"');
    await runner.query('DROP INDEX "IDX_2db0301d33193a70de20ffda29"');
    await runner.query('DROP TABLE "idempotency"');
    await runner.query('DROP INDEX "IDX_86177a6697b9b97d7cf87c0efc"');
    await runner.query('DROP TABLE "session"');
    await runner.query('DROP INDEX "IDX_2a40d96efdd745d9017e87ea5b"');
    await runner.query('DROP INDEX "claim_one_place"');
    await runner.query('DROP INDEX "IDX_46b2bc7f55d1b4b4758a7f695b"');
    await runner.query('DROP TABLE "claim"');
    await runner.query('DROP INDEX "IDX_6411257d875224fae6fea4419c"');
    await runner.query('DROP INDEX "IDX_7f3c6a4da352aac7bc87949c20"');
    await runner.query('DROP INDEX "IDX_b6b964dbb5bb6b2926981c2b2e"');
    await runner.query('DROP TABLE "step"');
    await runner.query('DROP INDEX "IDX_c029590b44801c815b4216ce27"');
    await runner.query('DROP INDEX "IDX_39e2cb0a0eabaaa103b9e31fb8"');
    await runner.query('DROP TABLE "sub_assembly"');
    await runner.query('DROP INDEX "IDX_250132f7ff4fcf530f25878108"');
    await runner.query('DROP TABLE "traveller_template"');
    await runner.query('DROP TABLE "stop_seen"');
    await runner.query('DROP INDEX "IDX_89638674098de6d9c59afa2cce"');
    await runner.query('DROP TABLE "stop"');
    await runner.query('DROP INDEX "IDX_8d887b94d53c6c2fb89ea060fa"');
    await runner.query('DROP TABLE "register_row"');
    await runner.query('DROP INDEX "IDX_941b5395b8c483b586e3e1f184"');
    await runner.query('DROP INDEX "IDX_ef57a12b634558225f0a5f04c5"');
    await runner.query('DROP TABLE "sign_off"');
    await runner.query('DROP INDEX "IDX_4be4492e98e65c952e29b7412c"');
    await runner.query('DROP TABLE "briefing_version"');
    await runner.query('DROP INDEX "IDX_fbe9a9634170020fedf53e2dc8"');
    await runner.query('DROP TABLE "briefing"');
    await runner.query('DROP INDEX "IDX_4926ac326cdbed67cbb82a47ce"');
    await runner.query('DROP INDEX "IDX_092e8aa9f93c72ff2e49648426"');
    await runner.query('DROP INDEX "IDX_5542ea123faa0e6e1ef65eae33"');
    await runner.query('DROP TABLE "person"');
    await runner.query('DROP INDEX "IDX_bafce7caf5a7b7dc841fbdaad8"');
    await runner.query('DROP INDEX "IDX_f643eeb878d7d1514e487dbe31"');
    await runner.query('DROP TABLE "display_token"');
    await runner.query('DROP INDEX "IDX_9ba4f5ac1aaa299f7b54186a20"');
    await runner.query('DROP TABLE "station"');
    await runner.query('DROP INDEX "IDX_70314c4d25133f323d034aa1e6"');
    await runner.query('DROP TABLE "build_day"');
    await runner.query('DROP INDEX "IDX_a7053012246cb6f3e974a23e26"');
    await runner.query('DROP TABLE "installation"');
    await runner.query('DROP INDEX "IDX_15842b3068467fd8f6db156c90"');
    await runner.query('DROP TABLE "frame"');
    await runner.query('DROP INDEX "IDX_8682f805115bd7bc503be00a28"');
    await runner.query('DROP INDEX "checkout_one_out"');
    await runner.query('DROP TABLE "checkout"');
    await runner.query('DROP INDEX "IDX_8101df0e2a71a00ba3cb184edc"');
    await runner.query('DROP INDEX "IDX_3bf7527a9680b36009378cc6c9"');
    await runner.query('DROP TABLE "tool"');
    await runner.query('DROP INDEX "IDX_e087e8dc03595f43061e0e4fbf"');
    await runner.query('DROP TABLE "one_time_link"');
    await runner.query('DROP INDEX "IDX_4c8f96ccf523e9a3faefd5bdd4"');
    await runner.query('DROP TABLE "account"');
  }
}
