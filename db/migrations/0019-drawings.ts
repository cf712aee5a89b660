import type { Knex } from "knex";
import { roleNames } from "../cluster/roles";

/**
 * The line drawing of a model's mesh, made with its reading and kept beside it: views with dimensions, and a small one
 * without. What is public of it follows the file: a revision that is published, and a file that wasn't taken down. An
 * upload may say in which unit its model was drawn, as a person who looked at it knows. The files of keep-out solids are
 * public with their bench version.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table mesh_drawing (
      id uuid primary key default uuid_v7(),
      file_id uuid not null references file,
      reader_version text not null,
      drawing jsonb not null check (jsonb_typeof(drawing) = 'object'),
      thumbnail jsonb not null check (jsonb_typeof(thumbnail) = 'object'),
      at timestamptz not null default now(),
      unique (file_id, reader_version)
    );
    select keep_as_written('mesh_drawing');

    create view shown.mesh_drawing as
      select d.file_id, a.id as attachment_id, a.revision_id, a.ordinal, d.reader_version, d.drawing, d.thumbnail, d.at
      from mesh_drawing d
        join file f on f.id = d.file_id and f.state = 'read'
        join attachment a on a.file_id = d.file_id and a.role = 'model'
      where exists (select 1 from published_entry p where p.revision_id = a.revision_id);

    create view shown.keep_out_file as
      select k.id as keep_out_id, f.id as file_id, f.sha256, f.bytes, f.kind, f.storage_key
      from shown.keep_out k join file f on f.id = k.file_id where f.state = 'read';

    alter table upload add column mm_per_unit double precision check (mm_per_unit > 0 and mm_per_unit <= 1000);

    grant select, insert on mesh_drawing to ${roleNames.app};
    grant select on shown.mesh_drawing, shown.keep_out_file to ${roleNames.app}, ${roleNames.public};
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table upload drop column mm_per_unit;
    drop view shown.keep_out_file, shown.mesh_drawing;
    drop table mesh_drawing;
  `);
}
