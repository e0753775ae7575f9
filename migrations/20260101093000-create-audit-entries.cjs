/** Who did what, when: rows are added and read, never changed or taken away. */
const UP = [
  `create table audit_entries (
     team_id uuid not null references teams (id),
     id bigint generated always as identity,
     at timestamptz not null default clock_timestamp(),
     person_id uuid,
     action varchar(40) not null check (action ~ '^[a-z]+[.][a-z-]+$'),
     subject_id uuid,
     detail jsonb not null default '{}' check (jsonb_typeof(detail) = 'object' and octet_length(detail::text) <= 4096),
     primary key (team_id, id),
     foreign key (team_id, person_id) references people (team_id, id)
   )`,
  `create index audit_entries_by_subject on audit_entries (team_id, subject_id, id)`,
  `create trigger audit_entries_stay before update or delete or truncate on audit_entries
     for each statement execute function refuse_rewriting()`,
];

module.exports = {
  up: ({ sequelize }) =>
    sequelize.transaction(async (transaction) => {
      for (const statement of UP) await sequelize.query(statement, { transaction });
    }),
  down: ({ sequelize }) => sequelize.query('drop table audit_entries'),
};
