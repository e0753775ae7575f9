/**
 * Photographs and plans of a job. The row says what there is; the bytes lie with the storage driver under a key made of
 * team, job and id. A row without `stored_at` is one whose bytes never arrived; a removed one can be brought back for a while.
 */
const UP = [
  `create table uploads (
     team_id uuid not null,
     id uuid not null,
     job_id uuid not null,
     person_id uuid not null,
     subject varchar(8) not null check (subject in ('board', 'meter', 'room', 'plan', 'other')),
     place varchar(64) check (place ~ '^[A-Za-z0-9_.:-]+$'),
     caption varchar(200) not null default '',
     width integer not null check (width between 1 and 20000),
     height integer not null check (height between 1 and 20000),
     bytes integer not null check (bytes > 0),
     sha256 char(64) not null check (sha256 ~ '^[0-9a-f]{64}$'),
     at timestamptz not null default now(),
     stored_at timestamptz,
     removed_at timestamptz,
     primary key (team_id, id),
     foreign key (team_id, job_id) references jobs (team_id, id),
     foreign key (team_id, person_id) references people (team_id, id),
     check (place is null or subject = 'room')
   )`,
  `create index uploads_of_job on uploads (team_id, job_id, at)`,
  `create index uploads_to_sweep on uploads (at) where stored_at is null or removed_at is not null`,
];

module.exports = {
  up: ({ sequelize }) =>
    sequelize.transaction(async (transaction) => {
      for (const statement of UP) await sequelize.query(statement, { transaction });
    }),
  down: ({ sequelize }) => sequelize.query('drop table uploads'),
};
