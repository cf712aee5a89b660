import type { Knex } from "knex";
import { roleNames } from "../cluster/roles";

/**
 * Documented changes at a bench, each of which begins a new phase of the control charts; which holds the charts raised,
 * and which of them a documented change lifted; the second unit of a bridging session. What the public sees of baselines
 * grows by qualification and bridging sessions of benches that an opened season uses: no entry runs in those.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table control_break (
      id uuid primary key default uuid_v7(),
      bench_version_id uuid not null references bench_version,
      -- null: every unit that runs on the bench version
      baseline_unit_id uuid references baseline_unit,
      kind text not null check (kind in ('unit', 'bench', 'service', 'other')),
      reason text not null check (btrim(reason) <> ''),
      from_at timestamptz not null,
      by_person uuid not null references person,
      created_at timestamptz not null default now()
    );
    create index control_break_bench on control_break (bench_version_id, from_at);
    select keep_as_written('control_break');

    alter table control_phase add column break_id uuid references control_break;
    create unique index control_phase_once on control_phase (baseline_unit_id, bench_version_id, quantity, set_speed, break_id, trial)
      nulls not distinct;

    alter table session_hold add column control boolean not null default false;
    alter table session_hold add column break_id uuid references control_break;
    alter table session_hold add constraint session_hold_break check (break_id is null or (control and lifted_at is not null));

    alter table session add column bridge_unit_id uuid references baseline_unit;
    alter table session add constraint session_bridge check (
      (purpose = 'bridge') = (bridge_unit_id is not null) and bridge_unit_id is distinct from baseline_unit_id);

    create view shown.baseline_session as
      select s.id, s.number, s.purpose, s.bench_version_id, s.baseline_unit_id, s.bridge_unit_id, s.began_at
      from session s
      where exists (select 1 from publication_session p where p.session_id = s.id)
        or (s.purpose <> 'round' and s.ended_at is not null
          and s.bench_version_id in (select id from shown.bench_version)
          and s.baseline_unit_id in (select id from shown.baseline_unit)
          and not exists (select 1 from session_hold h where h.session_id = s.id and h.lifted_at is null));
    create view shown.baseline_hold as
      select h.id, h.session_id, h.code, h.reason, h.raised_at, h.lifted_at, h.lift_note, h.break_id
      from session_hold h where h.control and h.lifted_at is not null
        and exists (select 1 from shown.baseline_session s where s.id = h.session_id);
    create or replace view shown.baseline_value as
      select v.* from baseline_value v
      where exists (select 1 from shown.baseline_session s where s.id = any (v.session_ids));
    create or replace view shown.baseline_check as
      select c.* from baseline_check c where exists (select 1 from shown.baseline_session s where s.id = c.session_id);
    create or replace view shown.bridge as
      select b.* from bridge b where exists (select 1 from shown.baseline_session s where s.id = any (b.session_ids));
    drop view shown.control_phase;
    create view shown.control_phase as
      select k.id, k.baseline_unit_id, k.bench_version_id, k.quantity, k.set_speed, k.centre, k.sigma, k.trial, k.from_at, k.reason,
        k.break_id, b.kind
      from control_phase k left join control_break b on b.id = k.break_id
      where exists (
        select 1 from shown.baseline_check c
        where c.baseline_unit_id = k.baseline_unit_id and c.bench_version_id = k.bench_version_id and c.quantity = k.quantity
          and c.set_speed is not distinct from k.set_speed and c.at >= k.from_at);

    grant select, insert on control_break to ${roleNames.app};
    grant select on shown.baseline_session, shown.baseline_hold, shown.control_phase to ${roleNames.app}, ${roleNames.public};
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop view shown.control_phase;
    create view shown.control_phase as
      select c.id, c.baseline_unit_id, c.bench_version_id, c.quantity, c.set_speed, c.centre, c.sigma, c.trial, c.from_at, c.reason
      from control_phase c where c.baseline_unit_id in (select id from shown.baseline_unit);
    create or replace view shown.bridge as
      select b.* from bridge b where exists (select 1 from publication_session p where p.session_id = any (b.session_ids));
    create or replace view shown.baseline_check as
      select c.* from baseline_check c where exists (select 1 from publication_session p where p.session_id = c.session_id);
    create or replace view shown.baseline_value as
      select v.* from baseline_value v where exists (select 1 from publication_session p where p.session_id = any (v.session_ids));
    drop view shown.baseline_hold, shown.baseline_session;
    grant select on shown.control_phase to ${roleNames.app}, ${roleNames.public};
    alter table session drop constraint session_bridge;
    alter table session drop column bridge_unit_id;
    alter table session_hold drop constraint session_hold_break;
    alter table session_hold drop column break_id;
    alter table session_hold drop column control;
    drop index control_phase_once;
    alter table control_phase drop column break_id;
    drop table control_break;
  `);
}
