import type { Knex } from "knex";

/**
 * What the world may read, and nothing else: the views of the schema "shown" start from published_entry, from what a
 * publication reached, or from a row that says opened, answered or published. They run with their owner's rights, so
 * the public role needs no right on any table.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create schema shown;

    create view shown.entry as
      select p.*, case when p.stages = 1 then 'single' when p.counter_rotating then 'counter' else 'co' end as rotation,
        p.spacer_mm > 0 as spacer, 100 * p.equal_noise_ratio as equal_noise_percent, 100 * p.u_equal_noise_ratio as u_equal_noise_percent,
        d.number as design_number, d.slug as design_slug, d.name as design_name, r.letter as revision_letter,
        s.number as season_number, s.slug as season_slug, s.title as season_title, n.number as round_number,
        (select array_agg(coalesce(h.handle, 'former member') order by o.from_at, o.id)
          from design_owner o join person h on h.id = o.person_id where o.design_id = p.design_id and o.until_at is null) as designers
      from published_entry p
        join design d on d.id = p.design_id
        join revision r on r.id = p.revision_id
        join season s on s.id = p.season_id
        join round n on n.id = p.round_id;

    create view shown.publication as
      select b.id, b.entry_id, b.number, b.round_id, b.snapshot, b.schema_version, b.sha256, b.method_version, b.published_at,
        (p.publication_id = b.id) as current
      from publication b left join published_entry p on p.entry_id = b.entry_id
      where p.entry_id is not null;

    create view shown.design as
      select d.id, d.number, d.slug, d.name, d.summary,
        (select array_agg(coalesce(h.handle, 'former member') order by o.from_at, o.id)
          from design_owner o join person h on h.id = o.person_id where o.design_id = d.id and o.until_at is null) as designers
      from design d
      where exists (select 1 from published_entry p where p.design_id = d.id)
        or exists (select 1 from withdrawal w join entry e on e.id = w.entry_id join revision r on r.id = e.revision_id
          where r.design_id = d.id and e.ever_published);

    create view shown.design_name as
      select n.design_id, n.name, n.at from design_name n where exists (select 1 from published_entry p where p.design_id = n.design_id);

    create view shown.revision as
      select r.id, r.design_id, r.letter, r.licence, r.changes, r.print_notes, r.sent_in_at
      from revision r where exists (select 1 from published_entry p where p.revision_id = r.id);
    create view shown.revision_trait as
      select t.*, f.key as frame_key from revision_trait t join frame f on f.id = t.frame_id
      where exists (select 1 from published_entry p where p.revision_id = t.revision_id);
    create view shown.rotor as
      select t.* from rotor t where exists (select 1 from published_entry p where p.revision_id = t.revision_id);
    create view shown.derivation as
      select v.revision_id, v.from_revision_id, v.note from derivation v
      where exists (select 1 from published_entry p where p.revision_id = v.revision_id)
        and exists (select 1 from published_entry p where p.revision_id = v.from_revision_id);
    create view shown.attachment as
      select a.id, a.revision_id, a.role, a.name, a.ordinal, f.id as file_id, f.sha256, f.bytes, f.kind, f.state, f.storage_key,
        f.taken_down_at, case when f.state = 'taken_down' then f.reason end as reason
      from attachment a join file f on f.id = a.file_id
      where f.state in ('read', 'taken_down') and exists (select 1 from published_entry p where p.revision_id = a.revision_id);
    create view shown.mesh_reading as
      select m.file_id, m.reader_version, m.result, m.at from mesh_reading m
      where exists (select 1 from attachment a join published_entry p on p.revision_id = a.revision_id where a.file_id = m.file_id);

    create view shown.frame as select * from frame;
    create view shown.season as
      select id, number, slug, title, summary, rules, protocol_version_id, scoring_rule_version_id, levels_dba, headline_dba,
        total_depth_max_mm, inlet_stack_max_mm, opens_at, closes_at, opened_at, closed_at, frozen_at
      from season where opened_at is not null;
    create view shown.season_frame as
      select sf.season_id, f.* from season_frame sf join frame f on f.id = sf.frame_id join season s on s.id = sf.season_id
      where s.opened_at is not null;
    create view shown.season_bench as
      select b.season_id, b.bench_version_id, b.budget_version_id, b.from_at, b.reason
      from season_bench b join season s on s.id = b.season_id where s.opened_at is not null;
    create view shown.season_baseline as
      select b.season_id, b.baseline_unit_id, b.from_at from season_baseline b join season s on s.id = b.season_id
      where s.opened_at is not null;
    create view shown.round as
      select id, season_id, number, title, published_at from round where state = 'published';
    create view shown.protocol_version as
      select v.*, p.slug as protocol_slug, p.name as protocol_name from protocol_version v join protocol p on p.id = v.protocol_id
      where exists (select 1 from season s where s.protocol_version_id = v.id and s.opened_at is not null);
    create view shown.scoring_rule_version as
      select v.id, v.rule_id, v.number, v.kind, v.formula, v.parameters, v.properties, v.created_at, r.key as rule_key, r.name as rule_name
      from scoring_rule_version v join scoring_rule r on r.id = v.rule_id;

    create view shown.bench_version as
      select v.id, v.bench_id, v.number, v.cooler, v.heat_source, v.temperature_sensors, v.microphone, v.calibrator,
        v.microphone_distance_mm, v.valid_from, v.change_reason, b.slug as bench_slug, b.name as bench_name
      from bench_version v join bench b on b.id = v.bench_id
      where exists (select 1 from season_bench sb join season s on s.id = sb.season_id where sb.bench_version_id = v.id and s.opened_at is not null);
    create view shown.microphone_position as
      select m.* from microphone_position m where m.bench_version_id in (select id from shown.bench_version);
    create view shown.keep_out as
      select k.* from keep_out k where k.bench_version_id in (select id from shown.bench_version);
    create view shown.budget_part as
      select t.*, v.number as budget_number, v.bench_version_id from budget_part t join budget_version v on v.id = t.budget_version_id
      where exists (select 1 from season_bench sb join season s on s.id = sb.season_id where sb.budget_version_id = v.id and s.opened_at is not null);

    create view shown.session as
      select s.id, s.number, s.bench_id, s.bench_version_id, s.protocol_version_id, s.budget_version_id, s.baseline_unit_id, s.round_id,
        s.purpose, s.began_at, s.ended_at
      from session s where exists (select 1 from publication_session p where p.session_id = s.id);
    create view shown.run as
      select r.id, r.session_id, r.entry_id, r.specimen_id, r.baseline_unit_id, r.set_speed, r.mount_number, r.repeat_number, r.ordinal,
        r.state, r.reason, r.began_at
      from run r where exists (
        select 1 from publication_session p where p.session_id = r.session_id and (r.entry_id is null or r.entry_id = p.entry_id));
    create view shown.run_speed as
      select v.run_id, v.rotor_position, v.speed_rpm, v.source from run_speed v where exists (select 1 from shown.run r where r.id = v.run_id);
    create view shown.reading as
      select d.id, d.session_id, d.run_id, d.position_id, d.quantity, d.phase, d.rotor_position, d.value, d.unit, d.source, d.log_file_id,
        d.detail, d.supersedes, d.correction_id, d.reason, d.taken_at
      from reading d
      where (d.correction_id is null or exists (select 1 from correction c where c.id = d.correction_id and c.published_at is not null))
        and (case when d.run_id is null
          then exists (select 1 from publication_session p where p.session_id = d.session_id)
          else exists (select 1 from run r join publication_session p on p.session_id = r.session_id
            where r.id = d.run_id and (r.entry_id is null or r.entry_id = p.entry_id)) end);
    create view shown.specimen as
      select distinct p.id, p.revision_id, p.number, p.material, p.colour, p.layer_height_mm, p.nozzle_mm, p.infill_percent, p.walls,
        p.layers_across_axis, p.print_time_min, p.printed_at, p.note
      from specimen p where exists (select 1 from shown.run r where r.specimen_id = p.id);

    create view shown.standing as
      select t.id, t.season_id, t.round_id, t.rule_version_id, t.number, t.as_of, t.draws, t.seed, t.method_version
      from standing t join season s on s.id = t.season_id where s.opened_at is not null;
    create view shown.standing_row as
      select r.* from standing_row r
      where exists (select 1 from published_entry p where p.entry_id = r.entry_id)
        or exists (select 1 from withdrawal w where w.entry_id = r.entry_id);

    create view shown.baseline as select id, slug, name, description, blades from baseline b
      where exists (select 1 from baseline_unit u join season_baseline sb on sb.baseline_unit_id = u.id join season s on s.id = sb.season_id
        where u.baseline_id = b.id and s.opened_at is not null);
    create view shown.baseline_unit as
      select u.id, u.baseline_id, u.serial, u.in_service_from, u.retired_at, u.retired_reason
      from baseline_unit u where u.baseline_id in (select id from shown.baseline);
    create view shown.baseline_value as
      select v.* from baseline_value v
      where exists (select 1 from publication_session p where p.session_id = any (v.session_ids));
    create view shown.baseline_check as
      select c.* from baseline_check c where exists (select 1 from publication_session p where p.session_id = c.session_id);
    create view shown.bridge as
      select b.* from bridge b where exists (select 1 from publication_session p where p.session_id = any (b.session_ids));
    create view shown.control_phase as
      select c.id, c.baseline_unit_id, c.bench_version_id, c.quantity, c.set_speed, c.centre, c.sigma, c.trial, c.from_at, c.reason
      from control_phase c where c.baseline_unit_id in (select id from shown.baseline_unit);

    create view shown.question as
      select q.id, q.publication_id, p.entry_id, q.figure, q.body, q.answer, q.answered_at, coalesce(h.handle, 'former member') as by_handle
      from question q join publication p on p.id = q.publication_id join person h on h.id = q.by_person
      where q.state = 'answered' and exists (select 1 from published_entry e where e.entry_id = p.entry_id);
    create view shown.correction as
      select id, number, what, why, question_id, published_at from correction where published_at is not null;
    create view shown.correction_publication as
      select cp.correction_id, cp.old_publication_id, cp.new_publication_id, b.entry_id
      from correction_publication cp join correction c on c.id = cp.correction_id join publication b on b.id = cp.old_publication_id
      where c.published_at is not null;
    create view shown.withdrawal as
      select w.entry_id, w.reason, w.at, d.slug as design_slug, d.name as design_name, r.letter as revision_letter, e.season_id
      from withdrawal w join entry e on e.id = w.entry_id join revision r on r.id = e.revision_id join design d on d.id = r.design_id
      where e.ever_published;
    create view shown.ballot as
      select id, season_id, title, method, tie_rule, opens_at, closes_at, opened_at, closed_at,
        case when closed_at is not null then (select count(*) from vote v where v.ballot_id = b.id) end as votes
      from ballot b where opened_at is not null;
    create view shown.ballot_option as
      select o.* from ballot_option o join ballot b on b.id = o.ballot_id where b.opened_at is not null;
    create view shown.method_version as select number, note, from_at from method_version;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop schema shown cascade`);
}
