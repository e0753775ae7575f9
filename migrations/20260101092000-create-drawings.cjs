/**
 * A drawing is a narrow head, a log of changes chained by hash, and snapshots. A change is never edited and a snapshot
 * never rewritten: the triggers say so even to the app's own role. A change holds a whole imported home, 512 kB at most.
 */
const UP = [
  `create table drawings (
     team_id uuid not null,
     id uuid not null,
     job_id uuid not null,
     rev integer not null default 0 check (rev >= 0),
     state varchar(9) not null default 'open' check (state in ('open', 'submitted', 'issued')),
     snapshot_rev integer not null default 0 check (snapshot_rev between 0 and rev),
     head_hash char(64) not null check (head_hash ~ '^[0-9a-f]{64}$'),
     primary key (team_id, id),
     unique (team_id, job_id),
     foreign key (team_id, job_id) references jobs (team_id, id)
   ) with (fillfactor = 70)`,
  `create table drawing_changes (
     team_id uuid not null,
     drawing_id uuid not null,
     rev integer not null check (rev > 0),
     save_id uuid not null,
     person_id uuid not null,
     at timestamptz(3) not null,
     label varchar(160) not null check (label <> ''),
     patch text not null check (octet_length(patch) <= 524288),
     prev_hash char(64) not null,
     hash char(64) not null check (hash ~ '^[0-9a-f]{64}$'),
     primary key (team_id, drawing_id, rev),
     unique (team_id, drawing_id, save_id),
     foreign key (team_id, drawing_id) references drawings (team_id, id),
     foreign key (team_id, person_id) references people (team_id, id)
   ) with (autovacuum_vacuum_scale_factor = 0.02)`,
  `alter table drawing_changes alter column patch set compression lz4`,
  `create table drawing_snapshots (
     team_id uuid not null,
     drawing_id uuid not null,
     rev integer not null check (rev >= 0),
     body text not null,
     sha256 char(64) not null check (sha256 ~ '^[0-9a-f]{64}$'),
     at timestamptz not null default now(),
     primary key (team_id, drawing_id, rev),
     foreign key (team_id, drawing_id) references drawings (team_id, id)
   )`,
  `alter table drawing_snapshots alter column body set compression lz4`,
  `create table revisions (
     team_id uuid not null,
     id uuid not null,
     drawing_id uuid not null,
     letter varchar(3) not null check (letter ~ '^[A-Z]{1,3}$'),
     rev integer not null,
     note varchar(200) not null check (btrim(note) <> ''),
     state varchar(9) not null default 'draft'
       check (state in ('draft', 'submitted', 'returned', 'approved', 'issued')),
     sha256 char(64) not null,
     person_id uuid not null,
     at timestamptz not null default now(),
     primary key (team_id, id),
     unique (team_id, drawing_id, letter),
     unique (team_id, drawing_id, rev),
     foreign key (team_id, drawing_id, rev) references drawing_snapshots (team_id, drawing_id, rev),
     foreign key (team_id, person_id) references people (team_id, id)
   )`,
  `create table examinations (
     team_id uuid not null,
     drawing_id uuid not null,
     rev integer not null check (rev >= 0),
     danger integer not null check (danger >= 0),
     defect integer not null check (defect >= 0),
     advice integer not null check (advice >= 0),
     at timestamptz not null default now(),
     primary key (team_id, drawing_id),
     foreign key (team_id, drawing_id) references drawings (team_id, id)
   )`,
  `create function refuse_rewriting() returns trigger language plpgsql as $$
   begin
     raise exception '% is written once and never changed', tg_table_name using errcode = 'integrity_constraint_violation';
   end $$`,
  `create trigger drawing_changes_stay before update on drawing_changes
     for each statement execute function refuse_rewriting()`,
  `create trigger drawing_snapshots_stay before update on drawing_snapshots
     for each statement execute function refuse_rewriting()`,
];
const DOWN = [
  'drop table examinations',
  'drop table revisions',
  'drop table drawing_snapshots',
  'drop table drawing_changes',
  'drop table drawings',
  'drop function refuse_rewriting()',
];

module.exports = {
  up: ({ sequelize }) =>
    sequelize.transaction(async (transaction) => {
      for (const statement of UP) await sequelize.query(statement, { transaction });
    }),
  down: ({ sequelize }) =>
    sequelize.transaction(async (transaction) => {
      for (const statement of DOWN) await sequelize.query(statement, { transaction });
    }),
};
