/** Clients and their jobs, and which of the team's people a job is given to. */
const UP = [
  `create table clients (
     team_id uuid not null references teams (id),
     id uuid not null,
     name varchar(120) not null check (btrim(name) <> ''),
     phone varchar(40) not null default '',
     email varchar(254) not null default '',
     created_at timestamptz not null default now(),
     primary key (team_id, id)
   )`,
  `create unique index clients_by_name on clients (team_id, lower(name))`,
  `create table jobs (
     team_id uuid not null references teams (id),
     id uuid not null,
     number integer not null check (number > 0),
     title varchar(120) not null check (btrim(title) <> ''),
     client_id uuid not null,
     address varchar(300) not null default '',
     hours_wanted double precision not null default 0 check (hours_wanted between 0 and 72),
     due date,
     archived_at timestamptz,
     version integer not null default 0 check (version >= 0),
     created_by uuid not null,
     created_at timestamptz not null default now(),
     updated_at timestamptz not null default now(),
     primary key (team_id, id),
     unique (team_id, number),
     foreign key (team_id, client_id) references clients (team_id, id),
     foreign key (team_id, created_by) references people (team_id, id)
   )`,
  `create table job_people (
     team_id uuid not null,
     job_id uuid not null,
     person_id uuid not null,
     primary key (team_id, job_id, person_id),
     foreign key (team_id, job_id) references jobs (team_id, id),
     foreign key (team_id, person_id) references people (team_id, id)
   )`,
  `create index job_people_by_person on job_people (team_id, person_id)`,
];
const DOWN = ['job_people', 'jobs', 'clients'];

module.exports = {
  up: ({ sequelize }) =>
    sequelize.transaction(async (transaction) => {
      for (const statement of UP) await sequelize.query(statement, { transaction });
    }),
  down: ({ sequelize }) =>
    sequelize.transaction(async (transaction) => {
      for (const table of DOWN) await sequelize.query(`drop table ${table}`, { transaction });
    }),
};
