-- Names as people sort them: "Pad 4" before "Pad 12".
CREATE COLLATION millrace_natural (provider = icu, locale = 'und-u-kn-true');
--> statement-breakpoint

-- Who asks: set for each transaction by the application (set_config(…, true)), empty for everyone else.
-- STABLE and without parameters, so that a rule evaluates each once a statement.

CREATE FUNCTION millrace_company() RETURNS uuid LANGUAGE sql STABLE PARALLEL SAFE
  AS $$ select nullif(current_setting('millrace.company', true), '')::uuid $$;
--> statement-breakpoint
CREATE FUNCTION millrace_user() RETURNS uuid LANGUAGE sql STABLE PARALLEL SAFE
  AS $$ select nullif(current_setting('millrace.user', true), '')::uuid $$;
--> statement-breakpoint
CREATE FUNCTION millrace_customer() RETURNS uuid LANGUAGE sql STABLE PARALLEL SAFE
  AS $$ select nullif(current_setting('millrace.customer', true), '')::uuid $$;
--> statement-breakpoint
CREATE FUNCTION millrace_role() RETURNS text LANGUAGE sql STABLE PARALLEL SAFE
  AS $$ select nullif(current_setting('millrace.role', true), '') $$;
--> statement-breakpoint
CREATE FUNCTION millrace_is_staff() RETURNS boolean LANGUAGE sql STABLE PARALLEL SAFE
  AS $$ select coalesce(millrace_role() in ('manager', 'technician'), false) $$;
--> statement-breakpoint

-- The pumps on pads that a homeowner owns now, each with the day they moved in: {"<pump id>": "<instant>"}. Rules look
-- their row up in this one value instead of asking again for every row. PL/pgSQL, because the tables come later.
CREATE FUNCTION millrace_visible_since() RETURNS jsonb LANGUAGE plpgsql STABLE AS $$
begin
  if millrace_role() is distinct from 'homeowner' then return null; end if;
  return (select jsonb_object_agg(p.id, o.starts_at) from pumps p join pad_ownerships o on o.pad_id = p.pad_id);
end $$;
--> statement-breakpoint

-- The same by the number under which readings lie.
CREATE FUNCTION millrace_visible_numbers_since() RETURNS jsonb LANGUAGE plpgsql STABLE AS $$
begin
  if millrace_role() is distinct from 'homeowner' then return null; end if;
  return (select jsonb_object_agg(p.number, o.starts_at) from pumps p join pad_ownerships o on o.pad_id = p.pad_id);
end $$;
