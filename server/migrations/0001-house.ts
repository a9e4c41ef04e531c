import type { QueryInterface } from 'sequelize';

/** Tables of people and how they get in. */
const people = `
create table crews (
  id text primary key,
  name text not null,
  created_at timestamptz not null default now()
);
create table users (
  id text primary key,
  name text not null,
  email text not null unique,
  password_hash text not null,
  last_sign_in_at timestamptz,
  created_at timestamptz not null default now()
);
create table memberships (
  user_id text primary key references users on delete cascade,
  crew_id text not null references crews on delete cascade,
  role text not null check (role in ('lead', 'vj', 'operator', 'assistant')),
  created_at timestamptz not null default now()
);
create index memberships_crew on memberships (crew_id);
create table invitations (
  id text primary key,
  crew_id text not null references crews on delete cascade,
  email text not null,
  role text not null check (role in ('lead', 'vj', 'operator', 'assistant')),
  token_hash text not null unique,
  invited_by text references users on delete set null,
  expires_at timestamptz not null,
  accepted_at timestamptz,
  created_at timestamptz not null default now()
);
create index invitations_crew on invitations (crew_id);
create table links (
  token_hash text primary key,
  purpose text not null,
  object text,
  expires_at timestamptz,
  used_at timestamptz,
  created_at timestamptz not null default now()
);
create index links_object on links (purpose, object);
create table session (
  sid varchar not null primary key,
  sess json not null,
  expire timestamp(6) not null
);
create index session_expire on session (expire);
create index session_by_user on session ((sess->>'userId'));
create table audit_log (
  id bigserial primary key,
  at timestamptz not null default now(),
  crew_id text,
  user_id text,
  action text not null,
  object text,
  device text,
  result text not null
);
`;

/** What a crew owns. */
const things = `
create table venues (
  id text primary key,
  crew_id text not null references crews on delete cascade,
  name text not null,
  body jsonb not null,
  created_at timestamptz not null default now()
);
create table assets (
  id text primary key,
  crew_id text not null references crews on delete cascade,
  name text not null,
  original_name text not null default '',
  kind text not null check (kind in ('clip', 'still', 'mark')),
  state text not null check (state in ('waiting', 'working', 'ready', 'failed')),
  progress double precision not null default 0,
  fault text,
  hash text not null default '',
  bytes double precision not null default 0,
  width integer,
  height integer,
  duration_s double precision,
  fps double precision,
  codec jsonb,
  file text,
  poster_file text,
  added_by text references users on delete set null,
  added_at timestamptz not null default now()
);
create index assets_crew on assets (crew_id, added_at);
create index assets_file on assets (file);
create index assets_poster on assets (poster_file);
create table brands (
  id text primary key,
  crew_id text not null references crews on delete cascade,
  name text not null,
  palette jsonb not null default '[]',
  mark_asset_id text references assets on delete set null,
  created_at timestamptz not null default now()
);
create table shows (
  id text primary key,
  crew_id text not null references crews on delete cascade,
  name text not null,
  date date not null,
  mode text not null default 'plan' check (mode in ('plan', 'live', 'closed')),
  venue_id text references venues on delete restrict,
  brand_id text references brands on delete set null,
  client text not null default '',
  picture_delay_ms double precision not null default 0,
  opened_at timestamptz,
  closed_at timestamptz,
  created_at timestamptz not null default now()
);
create index shows_crew on shows (crew_id, date);
create table phases (
  id text primary key,
  show_id text not null references shows on delete cascade,
  name text not null,
  colour text not null,
  starts_at text not null,
  energy integer not null,
  brightness double precision not null,
  flashes double precision not null,
  position integer not null
);
create index phases_show on phases (show_id, position);
create table scenes (
  id text primary key,
  show_id text not null references shows on delete cascade,
  name text not null,
  phase_id text references phases on delete set null,
  energy integer not null,
  position integer not null,
  version integer not null,
  deleted_at timestamptz,
  created_at timestamptz not null default now()
);
create index scenes_show on scenes (show_id, position);
create table scene_versions (
  scene_id text not null references scenes on delete cascade,
  version integer not null,
  body jsonb not null,
  by text,
  at timestamptz not null default now(),
  primary key (scene_id, version)
);
`;

/** Displays, and how they join. */
const displays = `
create table displays (
  id text primary key,
  show_id text not null references shows on delete cascade,
  name text not null,
  token_hash text unique,
  raster jsonb,
  map_version integer not null default 0,
  joined_by text,
  joined_at timestamptz not null default now(),
  last_seen_at timestamptz
);
create index displays_show on displays (show_id);
create table output_maps (
  display_id text not null references displays on delete cascade,
  version integer not null,
  map jsonb not null,
  note text not null default '',
  by text,
  at timestamptz not null default now(),
  primary key (display_id, version)
);
create table pairing_codes (
  code text primary key,
  secret_hash text not null unique,
  raster jsonb not null,
  address text not null,
  browser text not null default '',
  interval_ms integer not null,
  polled_at timestamptz,
  display_id text references displays on delete cascade,
  expires_at timestamptz not null,
  created_at timestamptz not null default now()
);
`;

/** The night: what was ordered and what was drawn. Hub times are double precision ms. */
const night = `
create table show_epochs (
  show_id text not null references shows on delete cascade,
  room text not null check (room in ('live', 'rehearsal')),
  epoch integer not null,
  primary key (show_id, room)
);
create table show_events (
  show_id text not null references shows on delete cascade,
  room text not null check (room in ('live', 'rehearsal')),
  epoch integer not null,
  revision integer not null,
  at double precision not null,
  command_id text,
  by text,
  body jsonb not null,
  primary key (show_id, room, epoch, revision),
  unique (show_id, room, command_id)
);
create table snapshots (
  show_id text not null references shows on delete cascade,
  room text not null check (room in ('live', 'rehearsal')),
  epoch integer not null,
  revision integer not null,
  state jsonb not null,
  primary key (show_id, room, epoch, revision)
);
create table as_run (
  show_id text not null references shows on delete cascade,
  room text not null check (room in ('live', 'rehearsal')),
  display_id text not null,
  seq integer not null,
  screen_id text not null,
  run_id text,
  scene_id text,
  scene_version integer,
  at double precision not null,
  late_ms double precision not null,
  primary key (show_id, room, display_id, seq, at)
);
create index as_run_time on as_run (show_id, room, at);
`;

/** The first house. */
export async function up(query: QueryInterface): Promise<void> {
  for (const part of [people, things, displays, night]) await query.sequelize.query(part);
}
