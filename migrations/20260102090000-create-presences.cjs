/**
 * Who has which drawing open now: one row a stream, kept fresh while it lives. Nothing of it has to outlive a crash, so it
 * is not written to the log of the database.
 */
const UP = [
  `create unlogged table presences (
     team_id uuid not null,
     drawing_id uuid not null,
     stream_id uuid not null,
     person_id uuid not null,
     seen_at timestamptz not null default now(),
     primary key (team_id, drawing_id, stream_id),
     foreign key (team_id, drawing_id) references drawings (team_id, id),
     foreign key (team_id, person_id) references people (team_id, id)
   ) with (autovacuum_vacuum_scale_factor = 0.02)`,
];

module.exports = {
  up: ({ sequelize }) =>
    sequelize.transaction(async (transaction) => {
      for (const statement of UP) await sequelize.query(statement, { transaction });
    }),
  down: ({ sequelize }) => sequelize.query('drop table presences'),
};
