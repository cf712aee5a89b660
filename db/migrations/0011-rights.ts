import type { Knex } from "knex";

const insertOnly = [
  "scoring_rule_version",
  "round_move",
  "round_transition",
  "entry_move",
  "entry_transition",
  "reading",
  "baseline_value",
  "bridge",
  "method_version",
  "standing",
  "standing_row",
  "vote",
  "review",
  "review_entry",
  "publication",
  "publication_session",
  "withdrawal",
  "event",
  "audit",
];
/** What the application may delete: recomputable rows, machinery, and a person's own lists and drafts. */
const deletable = [
  "result",
  "comparison",
  "curve",
  "baseline_check",
  "published_entry",
  "search_outbox",
  "search_dead_letter",
  "search_build",
  "sign_in_attempt",
  "mail_token",
  "rate_window",
  "idempotency_key",
  "saved_comparison",
  "saved_search",
  "watch",
  "mail_choice",
  "review_loan",
  "attachment",
  "rotor",
  "revision_trait",
  "derivation",
  "budget_part",
  "season_frame",
  "season_bench",
  "season_baseline",
  "upload",
  "run_speed",
];

/** Three roles: the owner migrates, the application owns nothing, the public reader sees the views of "shown" alone. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    revoke all on schema public from public;
    grant usage on schema public to fanfold_app;
    grant usage on schema shown to fanfold_app, fanfold_public;
    grant select on all tables in schema shown to fanfold_app, fanfold_public;
    grant select, insert, update on all tables in schema public to fanfold_app;
    grant usage, select on all sequences in schema public to fanfold_app;
    revoke update on ${insertOnly.join(", ")} from fanfold_app;
    revoke insert on round_transition, entry_transition from fanfold_app;
    revoke update on demo_seed from fanfold_app;
    do $$ begin
      if to_regclass('public.schema_migration') is not null then
        revoke all on schema_migration, schema_migration_lock from fanfold_app;
      end if;
    end $$;
    grant delete on ${deletable.join(", ")} to fanfold_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    revoke all on all tables in schema public from fanfold_app;
    revoke all on all sequences in schema public from fanfold_app;
    revoke all on all tables in schema shown from fanfold_app, fanfold_public;
    revoke usage on schema shown from fanfold_app, fanfold_public;
    revoke usage on schema public from fanfold_app;
  `);
}
