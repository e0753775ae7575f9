/**
 * Teams, the people in them, how they sign in. Every key of a team's table begins with its team, so that the schema can
 * be spread over servers by team; `logins` and `sign_in_counts` are asked before a team is known.
 */
const UP = [
  `create table teams (
     id uuid primary key,
     name varchar(120) not null check (btrim(name) <> ''),
     prefix varchar(6) not null default 'OH' check (prefix ~ '^[A-Z]{1,6}$'),
     next_job integer not null default 1 check (next_job > 0),
     created_at timestamptz not null default now()
   )`,
  `create table people (
     team_id uuid not null references teams (id),
     id uuid not null,
     name varchar(80) not null check (btrim(name) <> ''),
     active boolean not null default true,
     created_at timestamptz not null default now(),
     primary key (team_id, id)
   )`,
  `create table logins (
     email varchar(254) primary key check (email = lower(email) and email ~ '^[!-~]+@[!-~]+$'),
     team_id uuid not null,
     person_id uuid not null,
     password_hash text check (password_hash like '$argon2id$%'),
     password_at timestamptz,
     unique (team_id, person_id),
     foreign key (team_id, person_id) references people (team_id, id)
   )`,
  `create table memberships (
     team_id uuid not null,
     person_id uuid not null,
     role varchar(12) not null check (role in ('apprentice', 'electrician', 'trainer', 'admin')),
     granted_at timestamptz not null default now(),
     primary key (team_id, person_id, role),
     foreign key (team_id, person_id) references people (team_id, id)
   )`,
  `create table auth_sessions (
     team_id uuid not null,
     id uuid not null,
     person_id uuid not null,
     created_at timestamptz not null default now(),
     seen_at timestamptz not null default now(),
     expires_at timestamptz not null check (expires_at > created_at),
     ended_at timestamptz,
     ended_by varchar(12) check (ended_by in ('sign-out', 'everywhere', 'password', 'admin')),
     primary key (team_id, id),
     foreign key (team_id, person_id) references people (team_id, id),
     check ((ended_at is null) = (ended_by is null))
   )`,
  `create index auth_sessions_of_person on auth_sessions (team_id, person_id, seen_at desc)`,
  `create table invitations (
     team_id uuid not null,
     id uuid not null,
     person_id uuid not null,
     token_hash char(64) not null check (token_hash ~ '^[0-9a-f]{64}$'),
     invited_by uuid not null,
     created_at timestamptz not null default now(),
     expires_at timestamptz not null check (expires_at > created_at),
     used_at timestamptz,
     primary key (team_id, id),
     unique (team_id, token_hash),
     foreign key (team_id, person_id) references people (team_id, id),
     foreign key (team_id, invited_by) references people (team_id, id)
   )`,
  `create table sign_in_counts (
     bucket char(64) primary key,
     tries integer not null check (tries > 0),
     ends_at timestamptz not null
   )`,
];
const DOWN = ['sign_in_counts', 'invitations', 'auth_sessions', 'memberships', 'logins', 'people', 'teams'];

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
