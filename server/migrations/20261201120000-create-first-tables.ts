import type { QueryInterface } from 'sequelize';

/**
 * Every table that belongs to a yard carries yard_id, and foreign keys between such tables include it, so that
 * no row can point into another yard and the schema can later be distributed by yard.
 */
const UP = `
CREATE TABLE users (
  id uuid PRIMARY KEY,
  name text NOT NULL CHECK (length(name) BETWEEN 1 AND 80),
  email text NOT NULL,
  password_hash text NOT NULL,
  email_confirmed_at timestamptz,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL
);
-- one account per address whatever its case
CREATE UNIQUE INDEX users_email_key ON users (lower(email));

CREATE TABLE sessions (
  id uuid PRIMARY KEY,
  user_id uuid NOT NULL REFERENCES users ON DELETE CASCADE,
  token_hash text NOT NULL UNIQUE,
  previous_token_hash text,
  -- when token_hash took the place of previous_token_hash
  replaced_at timestamptz,
  device text NOT NULL,
  created_at timestamptz NOT NULL,
  last_used_at timestamptz NOT NULL,
  expires_at timestamptz NOT NULL,
  ended_at timestamptz,
  ended_because text
);
CREATE INDEX sessions_user_idx ON sessions (user_id);

-- attempts at a password by address, so that guessing slows down on every server at once; the address itself is not kept
CREATE TABLE sign_in_failures (
  address_hash text PRIMARY KEY,
  failures integer NOT NULL CHECK (failures > 0),
  last_failed_at timestamptz NOT NULL,
  blocked_until timestamptz
);
CREATE INDEX sign_in_failures_age_idx ON sign_in_failures (last_failed_at);

CREATE TABLE email_tokens (
  id uuid PRIMARY KEY,
  user_id uuid NOT NULL REFERENCES users ON DELETE CASCADE,
  purpose text NOT NULL CHECK (purpose IN ('confirm_email', 'reset_password')),
  token_hash text NOT NULL UNIQUE,
  created_at timestamptz NOT NULL,
  expires_at timestamptz NOT NULL,
  used_at timestamptz
);
CREATE INDEX email_tokens_user_idx ON email_tokens (user_id, purpose);

CREATE TABLE yards (
  id uuid PRIMARY KEY,
  name text NOT NULL CHECK (length(name) BETWEEN 1 AND 80),
  place_name text NOT NULL,
  latitude_deg double precision NOT NULL CHECK (latitude_deg BETWEEN -66 AND 66),
  longitude_deg double precision NOT NULL CHECK (longitude_deg BETWEEN -180 AND 180),
  elevation_m double precision NOT NULL CHECK (elevation_m BETWEEN -430 AND 6000),
  elevation_is_default boolean NOT NULL,
  time_zone text NOT NULL,
  units text NOT NULL CHECK (units IN ('us', 'metric')),
  move_minutes integer NOT NULL CHECK (move_minutes BETWEEN 1 AND 60),
  move_minutes_is_default boolean NOT NULL,
  reminder_lead_minutes integer NOT NULL CHECK (reminder_lead_minutes BETWEEN 0 AND 720),
  address_digit integer CHECK (address_digit BETWEEN 0 AND 9),
  water_stage integer NOT NULL DEFAULT 0 CHECK (water_stage BETWEEN 0 AND 5),
  water_stage_is_default boolean NOT NULL DEFAULT true,
  supply_kind text CHECK (supply_kind IN ('house', 'well')),
  supply_flow_lpm double precision CHECK (supply_flow_lpm > 0),
  supply_rest_minutes integer CHECK (supply_rest_minutes >= 0),
  supply_draw_minutes integer CHECK (supply_draw_minutes > 0),
  CHECK ((supply_kind IS NULL) = (supply_flow_lpm IS NULL) AND (supply_kind IS NULL) = (supply_rest_minutes IS NULL) AND (supply_kind IS NOT NULL OR supply_draw_minutes IS NULL)),
  facts_version integer NOT NULL DEFAULT 0,
  budget_stale_from date,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL
);

CREATE TABLE memberships (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  user_id uuid NOT NULL REFERENCES users ON DELETE CASCADE,
  role text NOT NULL CHECK (role IN ('owner', 'helper', 'consultant')),
  wants_morning_email boolean NOT NULL DEFAULT true,
  wants_move_email boolean NOT NULL DEFAULT true,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  UNIQUE (yard_id, user_id)
);
CREATE INDEX memberships_user_idx ON memberships (user_id);

CREATE TABLE invitations (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  email text NOT NULL,
  role text NOT NULL CHECK (role IN ('owner', 'helper', 'consultant')),
  token_hash text NOT NULL UNIQUE,
  invited_by uuid REFERENCES users ON DELETE SET NULL,
  created_at timestamptz NOT NULL,
  expires_at timestamptz NOT NULL,
  accepted_at timestamptz,
  accepted_by uuid REFERENCES users ON DELETE SET NULL,
  withdrawn_at timestamptz
);
CREATE INDEX invitations_yard_idx ON invitations (yard_id);

CREATE TABLE home_windows (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  weekday integer NOT NULL CHECK (weekday BETWEEN 0 AND 6),
  from_minutes integer NOT NULL CHECK (from_minutes BETWEEN 0 AND 1439),
  to_minutes integer NOT NULL CHECK (to_minutes BETWEEN 1 AND 1440),
  is_default boolean NOT NULL,
  CHECK (from_minutes < to_minutes)
);
CREATE INDEX home_windows_yard_idx ON home_windows (yard_id, weekday);

CREATE TABLE water_rules (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  name text NOT NULL,
  weekdays integer[],
  date_parity text CHECK (date_parity IN ('odd', 'even')),
  windows jsonb,
  weekdays_by_digit jsonb,
  attended boolean NOT NULL DEFAULT false,
  devices text[],
  stage integer CHECK (stage BETWEEN 1 AND 5),
  exempt_seeded boolean NOT NULL DEFAULT false,
  season_from text,
  season_to text,
  source text NOT NULL,
  source_on date NOT NULL,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  UNIQUE (yard_id, id)
);

CREATE TABLE permits (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  name text NOT NULL,
  zone_ids uuid[] NOT NULL,
  from_on date NOT NULL,
  to_on date NOT NULL,
  blackout_months integer[] NOT NULL,
  windows jsonb,
  -- null lifts every rule
  lifts_rule_ids uuid[],
  source text NOT NULL,
  source_on date NOT NULL,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  UNIQUE (yard_id, id),
  CHECK (from_on <= to_on)
);

CREATE TABLE taps (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  name text NOT NULL,
  flow_lpm double precision NOT NULL CHECK (flow_lpm > 0 AND flow_lpm <= 200),
  flow_is_default boolean NOT NULL,
  shut_off_timer boolean NOT NULL DEFAULT false,
  archived_at timestamptz,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  UNIQUE (yard_id, id)
);

CREATE TABLE hoses (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  name text NOT NULL,
  length_m double precision NOT NULL CHECK (length_m > 0 AND length_m <= 300),
  bore_mm double precision NOT NULL CHECK (bore_mm BETWEEN 6 AND 60),
  -- when length or bore last became another: tests made before then no longer describe it
  changed_at timestamptz,
  archived_at timestamptz,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  UNIQUE (yard_id, id)
);

CREATE TABLE sprinklers (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  name text NOT NULL,
  kind text NOT NULL,
  changed_at timestamptz,
  archived_at timestamptz,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  UNIQUE (yard_id, id)
);

CREATE TABLE zones (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  name text NOT NULL,
  area_m2 double precision NOT NULL CHECK (area_m2 > 0 AND area_m2 <= 20000),
  side_a_m double precision,
  side_b_m double precision,
  grass text NOT NULL,
  grass_is_default boolean NOT NULL,
  soil text NOT NULL,
  soil_is_default boolean NOT NULL,
  slope_pct double precision NOT NULL CHECK (slope_pct BETWEEN 0 AND 60),
  slope_is_default boolean NOT NULL,
  sun_hours double precision NOT NULL CHECK (sun_hours BETWEEN 0 AND 24),
  sun_hours_is_default boolean NOT NULL,
  -- the day on which those hours were seen; without one they hold on every day as they are
  sun_hours_on date,
  sun_hours_on_is_default boolean NOT NULL DEFAULT true,
  compaction text NOT NULL DEFAULT 'loose' CHECK (compaction IN ('loose', 'firm', 'hard')),
  compaction_is_default boolean NOT NULL DEFAULT true,
  tree_root_share double precision NOT NULL DEFAULT 0 CHECK (tree_root_share BETWEEN 0 AND 1),
  tree_root_share_is_default boolean NOT NULL DEFAULT true,
  cover_fraction double precision NOT NULL DEFAULT 1 CHECK (cover_fraction BETWEEN 0.1 AND 1),
  cover_fraction_is_default boolean NOT NULL DEFAULT true,
  -- height of what hides the sky for each whole degree of azimuth, from the zone's sun diary; null without one
  horizon_deg jsonb CHECK (horizon_deg IS NULL OR jsonb_array_length(horizon_deg) = 360),
  seeded_on date,
  mulch text NOT NULL DEFAULT 'none',
  resting boolean NOT NULL DEFAULT false,
  priority integer NOT NULL DEFAULT 100,
  archived_at timestamptz,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  UNIQUE (yard_id, id)
);

CREATE TABLE positions (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  zone_id uuid NOT NULL,
  tap_id uuid NOT NULL,
  hose_id uuid,
  sprinkler_id uuid NOT NULL,
  name text NOT NULL,
  mark text NOT NULL DEFAULT '',
  wetted_area_m2 double precision NOT NULL CHECK (wetted_area_m2 > 0 AND wetted_area_m2 <= 20000),
  wetted_area_is_default boolean NOT NULL,
  height_m double precision CHECK (height_m BETWEEN 0 AND 100),
  weekly_limit_over text CHECK (weekly_limit_over IN ('drain_field', 'well_head')),
  weekly_limit_mm double precision CHECK (weekly_limit_mm BETWEEN 0 AND 200),
  weekly_limit_source text,
  alternate_sets boolean NOT NULL DEFAULT false,
  sort_order integer NOT NULL,
  archived_at timestamptz,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  UNIQUE (yard_id, id),
  CHECK ((weekly_limit_over IS NULL) = (weekly_limit_mm IS NULL) AND (weekly_limit_over IS NULL) = (weekly_limit_source IS NULL)),
  FOREIGN KEY (yard_id, zone_id) REFERENCES zones (yard_id, id) ON DELETE CASCADE,
  FOREIGN KEY (yard_id, tap_id) REFERENCES taps (yard_id, id),
  FOREIGN KEY (yard_id, hose_id) REFERENCES hoses (yard_id, id),
  FOREIGN KEY (yard_id, sprinkler_id) REFERENCES sprinklers (yard_id, id)
);
CREATE INDEX positions_zone_idx ON positions (yard_id, zone_id);

CREATE TABLE bucket_tests (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  tap_id uuid NOT NULL,
  hose_id uuid,
  sprinkler_id uuid,
  volume_l double precision NOT NULL CHECK (volume_l > 0),
  seconds double precision NOT NULL CHECK (seconds > 0),
  flow_lpm double precision NOT NULL CHECK (flow_lpm > 0),
  flow_low_lpm double precision NOT NULL,
  flow_high_lpm double precision NOT NULL,
  tested_at timestamptz NOT NULL,
  tested_by uuid REFERENCES users ON DELETE SET NULL,
  created_at timestamptz NOT NULL,
  FOREIGN KEY (yard_id, tap_id) REFERENCES taps (yard_id, id) ON DELETE CASCADE
);
CREATE INDEX bucket_tests_tap_idx ON bucket_tests (yard_id, tap_id, tested_at DESC);

CREATE TABLE catch_tests (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  position_id uuid NOT NULL,
  layout jsonb NOT NULL,
  reading jsonb NOT NULL,
  readings jsonb NOT NULL,
  minutes double precision NOT NULL CHECK (minutes > 0 AND minutes <= 600),
  wind text NOT NULL,
  note text NOT NULL DEFAULT '',
  rate_mm_per_hour double precision NOT NULL CHECK (rate_mm_per_hour > 0),
  low_quarter_uniformity double precision NOT NULL CHECK (low_quarter_uniformity BETWEEN 0 AND 1),
  run_time_multiplier double precision NOT NULL CHECK (run_time_multiplier >= 1),
  result jsonb NOT NULL,
  -- what the water ran through, so that a change of it can end the test
  tap_id uuid,
  hose_id uuid,
  sprinkler_id uuid,
  tested_at timestamptz NOT NULL,
  tested_by uuid REFERENCES users ON DELETE SET NULL,
  created_at timestamptz NOT NULL,
  FOREIGN KEY (yard_id, position_id) REFERENCES positions (yard_id, id) ON DELETE CASCADE
);
CREATE INDEX catch_tests_position_idx ON catch_tests (yard_id, position_id, tested_at DESC);

CREATE TABLE weather_days (
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  "on" date NOT NULL,
  is_forecast boolean NOT NULL,
  tmin_c double precision,
  tmax_c double precision,
  tdew_c double precision,
  rh_max_pct double precision,
  rh_min_pct double precision,
  wind_mps double precision,
  wind_height_m double precision,
  solar_mj_m2 double precision,
  precipitation_mm double precision CHECK (precipitation_mm >= 0),
  rain_probability_pct double precision,
  source text NOT NULL,
  fetched_at timestamptz NOT NULL,
  PRIMARY KEY (yard_id, "on")
);

-- when each yard's weather was last asked for and last answered
CREATE TABLE weather_fetches (
  yard_id uuid PRIMARY KEY REFERENCES yards ON DELETE CASCADE,
  asked_at timestamptz NOT NULL,
  answered_at timestamptz,
  source text,
  sample boolean NOT NULL DEFAULT false,
  last_error text
);

CREATE TABLE rain_entries (
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  "on" date NOT NULL,
  depth_mm double precision NOT NULL CHECK (depth_mm BETWEEN 0 AND 1000),
  entered_by uuid REFERENCES users ON DELETE SET NULL,
  updated_at timestamptz NOT NULL,
  PRIMARY KEY (yard_id, "on")
);

-- when the sun fell on a zone on one day; it overrules the typed hours of sun
CREATE TABLE sun_diary_pages (
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  zone_id uuid NOT NULL,
  "on" date NOT NULL,
  sunny_hours integer[] NOT NULL,
  noted_by uuid REFERENCES users ON DELETE SET NULL,
  updated_at timestamptz NOT NULL,
  PRIMARY KEY (yard_id, zone_id, "on"),
  FOREIGN KEY (yard_id, zone_id) REFERENCES zones (yard_id, id) ON DELETE CASCADE
);

-- what somebody found in the ground on the morning of a day
CREATE TABLE observations (
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  zone_id uuid NOT NULL,
  "on" date NOT NULL,
  kind text NOT NULL CHECK (kind IN ('screwdriver', 'probe')),
  feel text CHECK (feel IN ('easy', 'firm', 'hard')),
  water_content double precision CHECK (water_content BETWEEN 0 AND 0.7),
  seen_by uuid REFERENCES users ON DELETE SET NULL,
  updated_at timestamptz NOT NULL,
  PRIMARY KEY (yard_id, zone_id, "on"),
  FOREIGN KEY (yard_id, zone_id) REFERENCES zones (yard_id, id) ON DELETE CASCADE,
  CHECK ((kind = 'screwdriver') = (feel IS NOT NULL) AND (kind = 'probe') = (water_content IS NOT NULL))
);

-- stages of a sowing that somebody saw; they overrule the heat sum
CREATE TABLE seen_stages (
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  zone_id uuid NOT NULL,
  "on" date NOT NULL,
  stage text NOT NULL CHECK (stage IN ('sown', 'coming_up', 'rooting', 'taper', 'established')),
  seen_by uuid REFERENCES users ON DELETE SET NULL,
  updated_at timestamptz NOT NULL,
  PRIMARY KEY (yard_id, zone_id, "on"),
  FOREIGN KEY (yard_id, zone_id) REFERENCES zones (yard_id, id) ON DELETE CASCADE
);

-- temperatures and rain of past years for the season's windows and the year's hose-hours, one row a yard: whole years of days in order from from_on
CREATE TABLE climate_records (
  yard_id uuid PRIMARY KEY REFERENCES yards ON DELETE CASCADE,
  from_on date NOT NULL,
  tmin_c double precision[] NOT NULL,
  tmax_c double precision[] NOT NULL,
  rain_mm double precision[] NOT NULL,
  source text NOT NULL,
  sample boolean NOT NULL,
  fetched_at timestamptz NOT NULL,
  CHECK (array_length(tmin_c, 1) = array_length(tmax_c, 1) AND array_length(tmin_c, 1) = array_length(rain_mm, 1))
);

CREATE TABLE budget_days (
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  zone_id uuid NOT NULL,
  "on" date NOT NULL,
  is_forecast boolean NOT NULL,
  et0_mm double precision NOT NULL,
  shaded_et0_mm double precision NOT NULL,
  crop_coefficient double precision NOT NULL,
  stress_coefficient double precision NOT NULL CHECK (stress_coefficient BETWEEN 0 AND 1),
  etc_mm double precision NOT NULL CHECK (etc_mm >= 0),
  -- parts of etc_mm: from bare ground, and by the roots of trees
  evaporation_mm double precision NOT NULL DEFAULT 0 CHECK (evaporation_mm >= 0),
  tree_uptake_mm double precision NOT NULL DEFAULT 0 CHECK (tree_uptake_mm >= 0),
  rain_mm double precision NOT NULL CHECK (rain_mm >= 0),
  rain_loss_mm double precision NOT NULL,
  -- part of rain_loss_mm that ran off
  runoff_mm double precision NOT NULL DEFAULT 0 CHECK (runoff_mm >= 0),
  effective_rain_mm double precision NOT NULL,
  irrigation_mm double precision NOT NULL CHECK (irrigation_mm >= 0),
  drainage_mm double precision NOT NULL CHECK (drainage_mm >= 0),
  root_growth_mm double precision NOT NULL,
  -- change because somebody looked into the ground
  observation_mm double precision NOT NULL DEFAULT 0,
  depletion_start_mm double precision NOT NULL,
  depletion_end_mm double precision NOT NULL,
  total_available_mm double precision NOT NULL,
  refill_line_mm double precision NOT NULL,
  root_depth_m double precision NOT NULL,
  -- depletion of the surface layer of thin and seeded ground at the end of the day
  surface_depletion_mm double precision CHECK (surface_depletion_mm >= 0),
  rain_source text NOT NULL,
  inputs jsonb NOT NULL,
  computed_at timestamptz NOT NULL,
  PRIMARY KEY (yard_id, zone_id, "on"),
  FOREIGN KEY (yard_id, zone_id) REFERENCES zones (yard_id, id) ON DELETE CASCADE,
  -- water is conserved: what the day took and gave accounts for the change of depletion within 0.01 mm
  CONSTRAINT budget_day_closes CHECK (
    abs(depletion_start_mm + etc_mm + root_growth_mm + observation_mm - effective_rain_mm - irrigation_mm + drainage_mm - depletion_end_mm) <= 0.01
  ),
  CONSTRAINT budget_rain_splits CHECK (abs(rain_mm - rain_loss_mm - effective_rain_mm) <= 0.01 AND runoff_mm <= rain_loss_mm + 0.01),
  CONSTRAINT budget_use_splits CHECK (evaporation_mm + tree_uptake_mm <= etc_mm + 0.01)
);

CREATE TABLE establishment_schedules (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  zone_id uuid NOT NULL,
  schedule jsonb NOT NULL,
  is_default boolean NOT NULL,
  proposal_id uuid,
  valid_from timestamptz NOT NULL,
  created_at timestamptz NOT NULL,
  FOREIGN KEY (yard_id, zone_id) REFERENCES zones (yard_id, id) ON DELETE CASCADE
);
CREATE INDEX establishment_schedules_zone_idx ON establishment_schedules (yard_id, zone_id, valid_from DESC);

CREATE TABLE proposals (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  zone_id uuid NOT NULL,
  author_id uuid REFERENCES users ON DELETE SET NULL,
  reason text NOT NULL CHECK (length(reason) BETWEEN 1 AND 2000),
  schedule_before jsonb NOT NULL,
  schedule jsonb NOT NULL,
  status text NOT NULL CHECK (status IN ('open', 'accepted', 'declined', 'withdrawn')),
  answer text NOT NULL DEFAULT '',
  decided_by uuid REFERENCES users ON DELETE SET NULL,
  decided_at timestamptz,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  UNIQUE (yard_id, id),
  FOREIGN KEY (yard_id, zone_id) REFERENCES zones (yard_id, id) ON DELETE CASCADE
);
CREATE INDEX proposals_yard_idx ON proposals (yard_id, created_at DESC);
-- one open proposal per zone, so accepting is never ambiguous
CREATE UNIQUE INDEX proposals_open_key ON proposals (yard_id, zone_id) WHERE status = 'open';

CREATE TABLE plans (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  version integer NOT NULL,
  from_on date NOT NULL,
  to_on date NOT NULL,
  cause text NOT NULL,
  planner text NOT NULL,
  facts_version integer NOT NULL,
  weather_as_of timestamptz,
  result jsonb NOT NULL,
  -- what the day's first screen shows of the result, so that it need not unpack the whole
  missing jsonb GENERATED ALWAYS AS (result->'missing') STORED,
  without_today jsonb GENERATED ALWAYS AS (result#>'{days,0,zonesWithout}') STORED,
  -- how it differs from the version before, in the days that both have
  difference jsonb NOT NULL DEFAULT '{"added": [], "dropped": [], "changed": []}',
  created_at timestamptz NOT NULL,
  UNIQUE (yard_id, version),
  UNIQUE (yard_id, id)
);

CREATE TABLE plan_wishes (
  yard_id uuid PRIMARY KEY REFERENCES yards ON DELETE CASCADE,
  priority text NOT NULL CHECK (priority IN ('keep_green', 'spare_water', 'spare_me', 'let_rest')),
  preferred_windows jsonb NOT NULL,
  month_cap_litres double precision CHECK (month_cap_litres > 0),
  updated_at timestamptz NOT NULL
);

-- days on which somebody is away, or there for longer, whatever the weekday says
CREATE TABLE day_changes (
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  "on" date NOT NULL,
  day_off boolean NOT NULL,
  extra_windows jsonb NOT NULL,
  PRIMARY KEY (yard_id, "on")
);

CREATE TABLE set_locks (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  position_id uuid NOT NULL,
  "on" date NOT NULL,
  start_minutes integer NOT NULL CHECK (start_minutes BETWEEN 0 AND 1439),
  minutes integer NOT NULL CHECK (minutes BETWEEN 1 AND 720),
  reason text NOT NULL,
  locked_by uuid REFERENCES users ON DELETE SET NULL,
  created_at timestamptz NOT NULL,
  UNIQUE (yard_id, position_id, "on", start_minutes),
  FOREIGN KEY (yard_id, position_id) REFERENCES positions (yard_id, id) ON DELETE CASCADE
);

CREATE TABLE plan_sets (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  plan_id uuid NOT NULL,
  zone_id uuid NOT NULL,
  position_id uuid NOT NULL,
  tap_id uuid NOT NULL,
  kind text NOT NULL CHECK (kind IN ('set', 'dose')),
  "on" date NOT NULL,
  round_index integer NOT NULL,
  sort_order integer NOT NULL,
  start_minutes integer NOT NULL CHECK (start_minutes BETWEEN 0 AND 1439),
  minutes double precision NOT NULL CHECK (minutes > 0),
  start_at timestamptz NOT NULL,
  end_at timestamptz NOT NULL,
  depth_mm double precision NOT NULL CHECK (depth_mm > 0),
  gross_mm double precision NOT NULL CHECK (gross_mm > 0),
  half_way boolean NOT NULL DEFAULT false,
  reasons jsonb NOT NULL,
  UNIQUE (yard_id, id),
  FOREIGN KEY (yard_id, plan_id) REFERENCES plans (yard_id, id) ON DELETE CASCADE,
  FOREIGN KEY (yard_id, zone_id) REFERENCES zones (yard_id, id) ON DELETE CASCADE,
  FOREIGN KEY (yard_id, position_id) REFERENCES positions (yard_id, id) ON DELETE CASCADE
);
CREATE INDEX plan_sets_plan_idx ON plan_sets (yard_id, plan_id, "on", sort_order);

CREATE TABLE rounds (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  "on" date NOT NULL,
  round_index integer NOT NULL,
  plan_id uuid,
  status text NOT NULL CHECK (status IN ('running', 'ended')),
  started_by uuid REFERENCES users ON DELETE SET NULL,
  started_at timestamptz NOT NULL,
  ended_at timestamptz,
  water_off_by uuid REFERENCES users ON DELETE SET NULL,
  water_off_at timestamptz,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  UNIQUE (yard_id, id)
);
CREATE INDEX rounds_yard_idx ON rounds (yard_id, started_at DESC);

CREATE TABLE round_sets (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  round_id uuid,
  zone_id uuid NOT NULL,
  position_id uuid NOT NULL,
  kind text NOT NULL CHECK (kind IN ('set', 'dose')),
  "on" date NOT NULL,
  round_index integer NOT NULL,
  sort_order integer NOT NULL,
  planned_start_at timestamptz NOT NULL,
  planned_minutes double precision NOT NULL CHECK (planned_minutes > 0),
  added_minutes double precision NOT NULL DEFAULT 0 CHECK (added_minutes >= 0),
  rate_mm_per_hour double precision NOT NULL CHECK (rate_mm_per_hour > 0),
  run_time_multiplier double precision NOT NULL CHECK (run_time_multiplier >= 1),
  zone_share double precision NOT NULL CHECK (zone_share > 0 AND zone_share <= 1),
  half_way boolean NOT NULL DEFAULT false,
  status text NOT NULL CHECK (status IN ('waiting', 'running', 'done', 'cut_short', 'skipped')),
  skip_cause text,
  started_at timestamptz,
  ended_at timestamptz,
  minutes_run double precision CHECK (minutes_run >= 0),
  applied_mm double precision CHECK (applied_mm >= 0),
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  UNIQUE (yard_id, id),
  FOREIGN KEY (yard_id, round_id) REFERENCES rounds (yard_id, id) ON DELETE CASCADE,
  FOREIGN KEY (yard_id, zone_id) REFERENCES zones (yard_id, id) ON DELETE CASCADE,
  FOREIGN KEY (yard_id, position_id) REFERENCES positions (yard_id, id) ON DELETE CASCADE
);
CREATE INDEX round_sets_day_idx ON round_sets (yard_id, "on");
CREATE INDEX round_sets_round_idx ON round_sets (yard_id, round_id, sort_order);
-- one tap, one sprinkler is the rule of the first planner; one running round per yard keeps the alarm unambiguous
CREATE UNIQUE INDEX rounds_running_key ON rounds (yard_id) WHERE status = 'running';

CREATE TABLE reminders (
  id uuid PRIMARY KEY,
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  user_id uuid NOT NULL REFERENCES users ON DELETE CASCADE,
  kind text NOT NULL CHECK (kind IN ('morning', 'move', 'water_off', 'still_on')),
  subject_key text NOT NULL,
  due_at timestamptz NOT NULL,
  drop_after timestamptz NOT NULL,
  status text NOT NULL CHECK (status IN ('waiting', 'claimed', 'sent', 'dropped', 'cancelled', 'failed')),
  claimed_by text,
  lease_until timestamptz,
  attempts integer NOT NULL DEFAULT 0,
  message_id text NOT NULL UNIQUE,
  late_minutes double precision,
  last_error text,
  sent_at timestamptz,
  created_at timestamptz NOT NULL,
  updated_at timestamptz NOT NULL,
  -- the same reminder is never made twice, however many servers plan it
  UNIQUE (yard_id, user_id, kind, subject_key)
);
CREATE INDEX reminders_due_idx ON reminders (due_at) WHERE status IN ('waiting', 'claimed');

-- mails that follow what somebody did, until the mail server has taken them
CREATE TABLE outgoing_mails (
  id uuid PRIMARY KEY,
  message_id text NOT NULL UNIQUE,
  "to" text NOT NULL,
  subject text NOT NULL,
  text text NOT NULL,
  html text NOT NULL,
  -- a mail is the asking server's own for this long, then anybody's
  lease_until timestamptz NOT NULL DEFAULT clock_timestamp() + interval '30 seconds',
  attempts integer NOT NULL DEFAULT 0,
  created_at timestamptz NOT NULL
);
CREATE INDEX outgoing_mails_lease_idx ON outgoing_mails (lease_until);

CREATE TABLE daily_runs (
  yard_id uuid NOT NULL REFERENCES yards ON DELETE CASCADE,
  "on" date NOT NULL,
  status text NOT NULL CHECK (status IN ('claimed', 'done', 'failed')),
  claimed_by text NOT NULL,
  lease_until timestamptz NOT NULL,
  attempts integer NOT NULL,
  last_error text,
  finished_at timestamptz,
  PRIMARY KEY (yard_id, "on")
);

CREATE TABLE events (
  id uuid PRIMARY KEY,
  yard_id uuid REFERENCES yards ON DELETE CASCADE,
  user_id uuid REFERENCES users ON DELETE SET NULL,
  verb text NOT NULL,
  subject_kind text NOT NULL,
  subject_id uuid,
  data jsonb NOT NULL,
  at timestamptz NOT NULL
);
CREATE INDEX events_yard_idx ON events (yard_id, at DESC);

CREATE TABLE idempotency_keys (
  user_id uuid NOT NULL REFERENCES users ON DELETE CASCADE,
  key text NOT NULL,
  request_hash text NOT NULL,
  status integer NOT NULL,
  response jsonb NOT NULL,
  created_at timestamptz NOT NULL,
  PRIMARY KEY (user_id, key)
);
CREATE INDEX idempotency_keys_age_idx ON idempotency_keys (created_at);

CREATE TABLE demonstration_clock (
  only_row boolean PRIMARY KEY DEFAULT true CHECK (only_row),
  offset_ms double precision NOT NULL,
  last_seen_at timestamptz NOT NULL
);

-- what the local mail server of the demonstration received; belongs to no yard
CREATE TABLE archived_mails (
  id uuid PRIMARY KEY,
  arrival bigint GENERATED ALWAYS AS IDENTITY UNIQUE,
  to_address text NOT NULL,
  from_address text NOT NULL,
  subject text NOT NULL,
  text text NOT NULL,
  html text,
  message_id text NOT NULL,
  received_at timestamptz NOT NULL
);
`;

const TABLES = [
  'archived_mails', 'outgoing_mails', 'demonstration_clock', 'idempotency_keys', 'events', 'daily_runs', 'reminders', 'round_sets', 'rounds', 'plan_sets', 'set_locks', 'day_changes', 'plan_wishes', 'plans', 'proposals',
  'establishment_schedules', 'budget_days', 'climate_records', 'seen_stages', 'observations', 'sun_diary_pages', 'rain_entries', 'weather_fetches', 'weather_days', 'catch_tests', 'bucket_tests', 'positions', 'zones',
  'sprinklers', 'hoses', 'taps', 'permits', 'water_rules', 'home_windows', 'invitations', 'memberships', 'yards', 'email_tokens', 'sign_in_failures', 'sessions', 'users',
];

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(UP);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`DROP TABLE IF EXISTS ${TABLES.join(', ')} CASCADE`);
}
