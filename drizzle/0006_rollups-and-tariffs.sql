CREATE TABLE "baselines" (
	"pump_id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"stated" jsonb,
	"stated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"stated_by" uuid,
	"version" integer DEFAULT 1 NOT NULL
);
--> statement-breakpoint
ALTER TABLE "baselines" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "carbon_choices" (
	"company_id" uuid PRIMARY KEY NOT NULL,
	"region" text,
	"version" integer DEFAULT 1 NOT NULL
);
--> statement-breakpoint
ALTER TABLE "carbon_choices" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "company_days" (
	"company_id" uuid NOT NULL,
	"day" date NOT NULL,
	"pumps" integer NOT NULL,
	"watt_hours" double precision NOT NULL,
	"hour_watt_hours" double precision[] NOT NULL,
	CONSTRAINT "company_days_pkey" PRIMARY KEY("company_id","day")
);
--> statement-breakpoint
ALTER TABLE "company_days" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "program_advice" (
	"pump_id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"made_at" timestamp with time zone NOT NULL,
	"saved_micros_per_month" double precision,
	"dear_micros_per_year" double precision NOT NULL,
	"saved_share" real,
	"kind" text NOT NULL,
	"basis" jsonb NOT NULL,
	"advice" jsonb NOT NULL,
	"dear_hours" jsonb NOT NULL
);
--> statement-breakpoint
ALTER TABLE "program_advice" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pump_day_fives" (
	"pump_id" uuid NOT NULL,
	"company_id" uuid NOT NULL,
	"from_at" timestamp with time zone NOT NULL,
	"day" date NOT NULL,
	"watt_hours" real[] NOT NULL,
	"rpm_mean" real[] NOT NULL,
	"rpm_min" smallint[] NOT NULL,
	"rpm_max" smallint[] NOT NULL,
	"watts_mean" real[] NOT NULL,
	"watts_min" real[] NOT NULL,
	"watts_max" real[] NOT NULL,
	"closed_inputs" smallint[] NOT NULL,
	CONSTRAINT "pump_day_fives_pkey" PRIMARY KEY("pump_id","day")
);
--> statement-breakpoint
ALTER TABLE "pump_day_fives" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pump_day_hours" (
	"pump_id" uuid NOT NULL,
	"company_id" uuid NOT NULL,
	"from_at" timestamp with time zone NOT NULL,
	"day" date NOT NULL,
	"watt_hours" real[] NOT NULL,
	"quarter_watt_hours" real[] NOT NULL,
	"gallons" real[] NOT NULL,
	"on_ms" integer[] NOT NULL,
	"covered_ms" integer[] NOT NULL,
	"unknown_flow_ms" integer[] NOT NULL,
	"rpm_mean" real[] NOT NULL,
	"rpm_min" real[] NOT NULL,
	"rpm_max" real[] NOT NULL,
	"watts_mean" real[] NOT NULL,
	"watts_min" real[] NOT NULL,
	"watts_max" real[] NOT NULL,
	CONSTRAINT "pump_day_hours_pkey" PRIMARY KEY("pump_id","day")
);
--> statement-breakpoint
ALTER TABLE "pump_day_hours" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pump_days" (
	"pump_id" uuid NOT NULL,
	"company_id" uuid NOT NULL,
	"from_at" timestamp with time zone NOT NULL,
	"to_at" timestamp with time zone NOT NULL,
	"watt_hours" double precision NOT NULL,
	"gallons" double precision NOT NULL,
	"gallons_sigma" double precision,
	"day" date NOT NULL,
	"on_ms" integer NOT NULL,
	"covered_ms" integer NOT NULL,
	"unknown_flow_ms" integer NOT NULL,
	"readings" integer NOT NULL,
	"rpm_mean" real,
	"rpm_min" real,
	"rpm_max" real,
	"watts_mean" real,
	"watts_min" real,
	"watts_max" real,
	"source_ms" integer[] NOT NULL,
	CONSTRAINT "pump_days_pkey" PRIMARY KEY("pump_id","day")
);
--> statement-breakpoint
ALTER TABLE "pump_days" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pump_months" (
	"company_id" uuid NOT NULL,
	"month" date NOT NULL,
	"pump_id" uuid NOT NULL,
	"priced_at" timestamp with time zone NOT NULL,
	"watt_hours" double precision NOT NULL,
	"gallons" double precision NOT NULL,
	"span_ms" bigint NOT NULL,
	"covered_ms" bigint NOT NULL,
	"on_ms" bigint NOT NULL,
	"unknown_flow_ms" bigint NOT NULL,
	"cost_minor" bigint,
	"days" integer NOT NULL,
	"currency" text,
	"lines" jsonb NOT NULL,
	"saved" jsonb,
	CONSTRAINT "pump_months_pkey" PRIMARY KEY("company_id","month","pump_id")
);
--> statement-breakpoint
ALTER TABLE "pump_months" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "rollup_cursors" (
	"pump_id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"rolled_to" timestamp with time zone NOT NULL,
	"rolled_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "rollup_cursors" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "rollup_marks" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"pump_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"from_at" timestamp with time zone NOT NULL,
	"to_at" timestamp with time zone NOT NULL
);
--> statement-breakpoint
ALTER TABLE "rollup_marks" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "tariff_plans" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"pad_id" uuid,
	"own_meter" boolean DEFAULT false NOT NULL,
	"other_kwh_by_period" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "tariff_plans_company_id_id_key" UNIQUE("company_id","id"),
	CONSTRAINT "tariff_plans_pad_key" UNIQUE NULLS NOT DISTINCT("company_id","pad_id")
);
--> statement-breakpoint
ALTER TABLE "tariff_plans" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "tariff_terms" (
	"plan_id" uuid NOT NULL,
	"company_id" uuid NOT NULL,
	"tariff_id" uuid NOT NULL,
	"from_day" date NOT NULL,
	"to_day" date,
	CONSTRAINT "tariff_terms_pkey" PRIMARY KEY("plan_id","from_day"),
	CONSTRAINT "tariff_terms_order" CHECK (to_day is null or to_day > from_day)
);
--> statement-breakpoint
ALTER TABLE "tariff_terms" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "tariffs" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"name" text NOT NULL,
	"tariff" jsonb NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "tariffs_company_id_id_key" UNIQUE("company_id","id"),
	CONSTRAINT "tariffs_name_key" UNIQUE("company_id","name")
);
--> statement-breakpoint
ALTER TABLE "tariffs" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "baselines" ADD CONSTRAINT "baselines_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "baselines" ADD CONSTRAINT "baselines_stated_by_fkey" FOREIGN KEY ("company_id","stated_by") REFERENCES "public"."users"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "carbon_choices" ADD CONSTRAINT "carbon_choices_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "company_days" ADD CONSTRAINT "company_days_company_fkey" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "program_advice" ADD CONSTRAINT "program_advice_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pump_day_fives" ADD CONSTRAINT "pump_day_fives_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pump_day_hours" ADD CONSTRAINT "pump_day_hours_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pump_days" ADD CONSTRAINT "pump_days_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pump_months" ADD CONSTRAINT "pump_months_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rollup_cursors" ADD CONSTRAINT "rollup_cursors_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rollup_marks" ADD CONSTRAINT "rollup_marks_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tariff_plans" ADD CONSTRAINT "tariff_plans_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tariff_plans" ADD CONSTRAINT "tariff_plans_pad_fkey" FOREIGN KEY ("company_id","pad_id") REFERENCES "public"."pads"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tariff_terms" ADD CONSTRAINT "tariff_terms_plan_fkey" FOREIGN KEY ("company_id","plan_id") REFERENCES "public"."tariff_plans"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tariff_terms" ADD CONSTRAINT "tariff_terms_tariff_fkey" FOREIGN KEY ("company_id","tariff_id") REFERENCES "public"."tariffs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tariffs" ADD CONSTRAINT "tariffs_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "program_advice_saved_index" ON "program_advice" USING btree ("company_id","saved_micros_per_month");--> statement-breakpoint
CREATE INDEX "pump_day_fives_day_index" ON "pump_day_fives" USING btree ("day");--> statement-breakpoint
CREATE INDEX "rollup_cursors_age_index" ON "rollup_cursors" USING btree ("rolled_at");--> statement-breakpoint
CREATE INDEX "rollup_marks_pump_index" ON "rollup_marks" USING btree ("company_id","pump_id");--> statement-breakpoint
CREATE INDEX "tariff_terms_tariff_index" ON "tariff_terms" USING btree ("tariff_id");--> statement-breakpoint
CREATE POLICY "baselines_app_reads" ON "baselines" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or pump_id in (select p.id from pumps p)));--> statement-breakpoint
CREATE POLICY "baselines_app_inserts" ON "baselines" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "baselines_app_updates" ON "baselines" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_is_staff())) WITH CHECK (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "baselines_app_deletes" ON "baselines" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "baselines_machine_works" ON "baselines" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "carbon_choices_app_reads" ON "carbon_choices" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()));--> statement-breakpoint
CREATE POLICY "carbon_choices_app_inserts" ON "carbon_choices" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "carbon_choices_app_updates" ON "carbon_choices" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "carbon_choices_app_deletes" ON "carbon_choices" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "carbon_choices_machine_works" ON "carbon_choices" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "company_days_app_reads" ON "company_days" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "company_days_machine_works" ON "company_days" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "program_advice_app_reads" ON "program_advice" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "program_advice_machine_works" ON "program_advice" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "pump_day_fives_app_reads" ON "pump_day_fives" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or from_at >= ((select millrace_visible_since()) ->> pump_id::text)::timestamptz));--> statement-breakpoint
CREATE POLICY "pump_day_fives_machine_works" ON "pump_day_fives" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "pump_day_hours_app_reads" ON "pump_day_hours" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or from_at >= ((select millrace_visible_since()) ->> pump_id::text)::timestamptz));--> statement-breakpoint
CREATE POLICY "pump_day_hours_machine_works" ON "pump_day_hours" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "pump_days_app_reads" ON "pump_days" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or from_at >= ((select millrace_visible_since()) ->> pump_id::text)::timestamptz));--> statement-breakpoint
CREATE POLICY "pump_days_machine_works" ON "pump_days" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "pump_months_app_reads" ON "pump_months" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "pump_months_machine_works" ON "pump_months" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "rollup_cursors_app_reads" ON "rollup_cursors" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or pump_id in (select p.id from pumps p)));--> statement-breakpoint
CREATE POLICY "rollup_cursors_machine_works" ON "rollup_cursors" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "rollup_marks_app_reads" ON "rollup_marks" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "rollup_marks_app_inserts" ON "rollup_marks" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "rollup_marks_machine_works" ON "rollup_marks" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "tariff_plans_app_reads" ON "tariff_plans" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or (pad_id is null or pad_id in (select o.pad_id from pad_ownerships o))));--> statement-breakpoint
CREATE POLICY "tariff_plans_app_inserts" ON "tariff_plans" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "tariff_plans_app_updates" ON "tariff_plans" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "tariff_plans_app_deletes" ON "tariff_plans" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "tariff_plans_machine_works" ON "tariff_plans" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "tariff_terms_app_reads" ON "tariff_terms" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or plan_id in (select p.id from tariff_plans p)));--> statement-breakpoint
CREATE POLICY "tariff_terms_app_inserts" ON "tariff_terms" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "tariff_terms_app_updates" ON "tariff_terms" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "tariff_terms_app_deletes" ON "tariff_terms" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "tariff_terms_machine_works" ON "tariff_terms" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "tariffs_app_reads" ON "tariffs" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()));--> statement-breakpoint
CREATE POLICY "tariffs_app_inserts" ON "tariffs" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "tariffs_app_updates" ON "tariffs" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "tariffs_app_deletes" ON "tariffs" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "tariffs_machine_works" ON "tariffs" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
-- What the schema files cannot say: forced row security, grants, and room in the page for rows that grow through the day.
ALTER TABLE "pump_days" FORCE ROW LEVEL SECURITY, SET (fillfactor = 85);--> statement-breakpoint
ALTER TABLE "pump_day_hours" FORCE ROW LEVEL SECURITY, SET (fillfactor = 70);--> statement-breakpoint
ALTER TABLE "pump_day_fives" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "pump_months" FORCE ROW LEVEL SECURITY, SET (fillfactor = 70);--> statement-breakpoint
ALTER TABLE "company_days" FORCE ROW LEVEL SECURITY, SET (fillfactor = 70);--> statement-breakpoint
ALTER TABLE "rollup_cursors" FORCE ROW LEVEL SECURITY, SET (fillfactor = 70);--> statement-breakpoint
ALTER TABLE "rollup_marks" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "tariffs" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "tariff_plans" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "tariff_terms" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "baselines" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "program_advice" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "carbon_choices" FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT ON "pump_days", "pump_day_hours", "pump_day_fives", "pump_months", "company_days", "rollup_cursors", "rollup_marks", "tariffs", "tariff_plans", "tariff_terms", "baselines", "program_advice", "carbon_choices" TO millrace_app;--> statement-breakpoint
GRANT INSERT ON "rollup_marks" TO millrace_app;--> statement-breakpoint
GRANT INSERT, UPDATE, DELETE ON "tariffs", "tariff_plans", "tariff_terms", "carbon_choices" TO millrace_app;--> statement-breakpoint
GRANT INSERT, UPDATE ON "baselines" TO millrace_app;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON "pump_days", "pump_day_hours", "pump_day_fives", "pump_months", "company_days", "rollup_cursors", "rollup_marks", "tariffs", "tariff_plans", "tariff_terms", "baselines", "program_advice", "carbon_choices" TO millrace_machine;
