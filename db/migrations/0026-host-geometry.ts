import type { Knex } from "knex";
import { roleNames } from "../cluster/roles";

/**
 * What a host sets of geometry. Keep-out solids stand once an opened season or a published session stands on their bench
 * version, frames once an opened season or a revision that was sent in uses them: designers worked to those figures. The
 * rows that could begin such a use are held meanwhile, so that a season opening at the same moment waits.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create function keep_out_frozen() returns trigger language plpgsql as $$
    declare touched uuid[] := array[old.bench_version_id, new.bench_version_id];
    begin
      perform 1 from season s join season_bench b on b.season_id = s.id where b.bench_version_id = any(touched) for share of s;
      if exists (select 1 from season s join season_bench b on b.season_id = s.id
          where b.bench_version_id = any(touched) and s.opened_at is not null)
        or exists (select 1 from session s join publication_session p on p.session_id = s.id where s.bench_version_id = any(touched)) then
        raise exception 'the bench version is in use: what stands around its cooler is changed by a new version'
          using errcode = 'restrict_violation';
      end if;
      return coalesce(new, old);
    end $$;
    create trigger keep_out_frozen before insert or update or delete on keep_out
      for each row execute function keep_out_frozen();
    grant delete on keep_out to ${roleNames.app};

    alter table keep_out
      add column extent_min_mm double precision[] check (cardinality(extent_min_mm) = 3),
      add column extent_max_mm double precision[] check (cardinality(extent_max_mm) = 3),
      add constraint keep_out_extent check (
        (extent_min_mm is null) = (extent_max_mm is null) and (shape = 'mesh' or extent_min_mm is null));

    create function frame_frozen() returns trigger language plpgsql as $$
    begin
      perform 1 from season s join season_frame f on f.season_id = s.id where f.frame_id = old.id for share of s;
      perform 1 from revision r join revision_trait t on t.revision_id = r.id where t.frame_id = old.id for share of r;
      if exists (select 1 from season s join season_frame f on f.season_id = s.id where f.frame_id = old.id and s.opened_at is not null)
        or exists (select 1 from revision r join revision_trait t on t.revision_id = r.id
          where t.frame_id = old.id and r.sent_in_at is not null) then
        raise exception 'the frame is in use: designs were drawn to its figures; another one is added beside it'
          using errcode = 'restrict_violation';
      end if;
      return new;
    end $$;
    create trigger frame_frozen before update on frame for each row execute function frame_frozen();

    alter table frame drop constraint frame_key_check,
      add constraint frame_key_check check (key ~ '^[0-9]+x[0-9]+(-[a-z0-9]{1,12}){0,1}$');
  `);
}

export async function down(knex: Knex): Promise<void> {
  // Frames of one size that were told apart by a word keep it: the older check holds for what comes after.
  await knex.raw(`
    alter table frame drop constraint frame_key_check,
      add constraint frame_key_check check (key ~ '^[0-9]+x[0-9]+$') not valid;
    drop trigger frame_frozen on frame;
    drop function frame_frozen();
    alter table keep_out drop constraint keep_out_extent, drop column extent_min_mm, drop column extent_max_mm;
    revoke delete on keep_out from ${roleNames.app};
    drop trigger keep_out_frozen on keep_out;
    drop function keep_out_frozen();
  `);
}
