-- What the schema files cannot say: one holder at a time, change marks, partitions, grants, forced row security.

CREATE EXTENSION IF NOT EXISTS btree_gist;
--> statement-breakpoint
ALTER TABLE pad_ownerships ADD CONSTRAINT pad_ownerships_one_owner
  EXCLUDE USING gist (pad_id WITH =, tstzrange(starts_at, ends_at) WITH &&);
--> statement-breakpoint
ALTER TABLE motor_fittings
  ADD CONSTRAINT motor_fittings_one_motor EXCLUDE USING gist (pump_id WITH =, tstzrange(starts_at, ends_at) WITH &&),
  ADD CONSTRAINT motor_fittings_one_pump EXCLUDE USING gist (motor_id WITH =, tstzrange(starts_at, ends_at) WITH &&);
--> statement-breakpoint
ALTER TABLE device_fittings
  ADD CONSTRAINT device_fittings_one_device EXCLUDE USING gist (pump_id WITH =, tstzrange(starts_at, ends_at) WITH &&),
  ADD CONSTRAINT device_fittings_one_pump EXCLUDE USING gist (device_id WITH =, tstzrange(starts_at, ends_at) WITH &&);
--> statement-breakpoint

-- Written with every fold: room in the page keeps an update there, and the table is vacuumed early.
ALTER TABLE pump_states SET (fillfactor = 70, autovacuum_vacuum_scale_factor = 0.05);
--> statement-breakpoint

-- Marks a changed row with its transaction, whoever changed it: `changed_in >= pg_snapshot_xmin(…)` of an earlier
-- snapshot finds everything that was not yet visible then, however late it committed.
CREATE FUNCTION millrace_mark_change() RETURNS trigger LANGUAGE plpgsql AS $$
begin
  new.changed_in := pg_current_xact_id();
  return new;
end $$;
--> statement-breakpoint
CREATE TRIGGER runs_mark_change BEFORE UPDATE ON runs FOR EACH ROW EXECUTE FUNCTION millrace_mark_change();
--> statement-breakpoint
CREATE TRIGGER alarms_mark_change BEFORE UPDATE ON alarms FOR EACH ROW EXECUTE FUNCTION millrace_mark_change();
--> statement-breakpoint
CREATE TRIGGER pump_states_mark_change BEFORE UPDATE ON pump_states FOR EACH ROW EXECUTE FUNCTION millrace_mark_change();
--> statement-breakpoint

-- Makes the partitions of the UTC days from first_day to last_day that do not exist yet and says how many it made.
-- Attached, not created in place: attaching lets readings be stored meanwhile.
CREATE FUNCTION millrace_make_reading_partitions(first_day date, last_day date) RETURNS integer
  LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp SET timezone = 'UTC' AS $$
declare
  day date;
  partition text;
  made integer := 0;
begin
  perform pg_advisory_xact_lock(hashtext('millrace reading partitions'));
  for day in select generate_series(first_day, last_day, interval '1 day')::date loop
    partition := 'readings_' || to_char(day, 'YYYYMMDD');
    continue when to_regclass(partition) is not null;
    execute format('create table %I (like readings including defaults including constraints)', partition);
    execute format('alter table %I enable row level security', partition);
    execute format('alter table %I force row level security', partition);
    execute format('alter table readings attach partition %I for values from (%L) to (%L)',
      partition, day::timestamptz, (day + 1)::timestamptz);
    made := made + 1;
  end loop;
  return made;
end $$;
--> statement-breakpoint

-- Drops the partitions of the UTC days before first_kept_day and says how many it dropped. Gives up after two seconds
-- rather than hold up what is being stored: whoever calls tries again later.
CREATE FUNCTION millrace_drop_reading_partitions(first_kept_day date) RETURNS integer
  LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp SET lock_timeout = '2s' AS $$
declare
  partition text;
  dropped integer := 0;
begin
  perform pg_advisory_xact_lock(hashtext('millrace reading partitions'));
  for partition in
    select c.relname from pg_inherits i join pg_class c on c.oid = i.inhrelid
    where i.inhparent = 'readings'::regclass and c.relname < 'readings_' || to_char(first_kept_day, 'YYYYMMDD')
    order by c.relname
  loop
    execute format('drop table %I', partition);
    dropped := dropped + 1;
  end loop;
  return dropped;
end $$;
--> statement-breakpoint
REVOKE EXECUTE ON FUNCTION millrace_make_reading_partitions(date, date), millrace_drop_reading_partitions(date) FROM PUBLIC;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION millrace_make_reading_partitions(date, date), millrace_drop_reading_partitions(date) TO millrace_machine;
--> statement-breakpoint

-- The app role: what a signed-in person may do at all; which rows is said by the policies.
GRANT SELECT ON companies, customers, pads, pad_ownerships, motor_models, wet_end_models, pumps, motors, motor_fittings,
  device_fittings, clocks, inputs, equipment, readings, device_events, refused_messages, pump_states, pump_learnt, runs,
  alarms, alarm_transitions, outbox_mails, idempotency_keys, audit_entries TO millrace_app;
--> statement-breakpoint
GRANT INSERT, UPDATE, DELETE ON customers, pads, pad_ownerships, motor_models, wet_end_models, pumps, motors,
  motor_fittings, devices, device_fittings, clocks, inputs, equipment, idempotency_keys TO millrace_app;
--> statement-breakpoint
-- No secret_hash: it is written and never read back.
GRANT SELECT (id, company_id, serial, secret_set_at, revoked_at, interval_seconds, firmware, connection, boot, state,
  heard_at, refused, version, created_at) ON devices TO millrace_app;
--> statement-breakpoint
-- No password_hash.
GRANT SELECT (id, company_id, email, name, phone, role, customer_id, preferences, created_at, disabled_at) ON users TO millrace_app;
--> statement-breakpoint
GRANT UPDATE (preferences) ON users TO millrace_app;
--> statement-breakpoint
-- A person answers an alarm; what was found about the pump stays as the fold wrote it.
GRANT UPDATE (state, acknowledged_at, acknowledged_by, acknowledgement_note, escalated_at, shelved_until, shelved_by,
  shelved_reason, suppressed, out_of_service, latched, record, version, changed_in) ON alarms TO millrace_app;
--> statement-breakpoint
GRANT INSERT ON alarm_transitions, audit_entries TO millrace_app;
--> statement-breakpoint
GRANT DELETE ON outbox_mails TO millrace_app;
--> statement-breakpoint

-- The machine role: the named list of tables for ingest, fold, jobs, credential and sign-in lookup. It commissions a
-- whole company at once (the demo, imports) and removes nothing that was commissioned.
GRANT SELECT, INSERT, UPDATE ON companies, users, devices, customers, pads, pad_ownerships, motor_models, wet_end_models, pumps, motors, motor_fittings,
  device_fittings, clocks, inputs, equipment TO millrace_machine;
--> statement-breakpoint
GRANT SELECT, INSERT ON device_events, audit_entries, alarm_transitions TO millrace_machine;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON readings, refused_messages, pump_states, pump_learnt, runs, alarms, outbox_mails,
  mail_states, refresh_tokens, idempotency_keys, sign_in_attempts, listening_periods TO millrace_machine;
--> statement-breakpoint
GRANT USAGE ON SEQUENCE arrival_sequence TO millrace_machine;
--> statement-breakpoint

-- Row security binds the owner too.
DO $$
declare
  name text;
begin
  for name in select tablename from pg_tables where schemaname = 'public' loop
    execute format('alter table %I force row level security', name);
  end loop;
end $$;
