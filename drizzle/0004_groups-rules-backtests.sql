CREATE TABLE "alarm_members" (
	"company_id" uuid NOT NULL,
	"alarm_id" uuid NOT NULL,
	"pump_id" uuid NOT NULL,
	"joined_at" timestamp with time zone NOT NULL,
	"left_at" timestamp with time zone,
	CONSTRAINT "alarm_members_pkey" PRIMARY KEY("alarm_id","pump_id")
);
--> statement-breakpoint
ALTER TABLE "alarm_members" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "area_states" (
	"company_id" uuid PRIMARY KEY NOT NULL,
	"state" jsonb NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "area_states" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "backtest_pumps" (
	"company_id" uuid NOT NULL,
	"backtest_id" uuid NOT NULL,
	"pump_id" uuid NOT NULL,
	"outcome" jsonb NOT NULL,
	CONSTRAINT "backtest_pumps_pkey" PRIMARY KEY("backtest_id","pump_id")
);
--> statement-breakpoint
ALTER TABLE "backtest_pumps" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "backtests" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"asked_by" uuid,
	"asked_at" timestamp with time zone NOT NULL,
	"state" text NOT NULL,
	"request" jsonb NOT NULL,
	"pump_count" integer NOT NULL,
	"pumps_done" integer DEFAULT 0 NOT NULL,
	"readings" integer DEFAULT 0 NOT NULL,
	"permille_of_pump" integer DEFAULT 0 NOT NULL,
	"cancel_asked_at" timestamp with time zone,
	"started_at" timestamp with time zone,
	"worked_at" timestamp with time zone,
	"ended_at" timestamp with time zone,
	"failure" text,
	CONSTRAINT "backtests_company_id_id_key" UNIQUE("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "backtests" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "rule_settings" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"model_id" uuid,
	"pump_id" uuid,
	"rules" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"changed_at" timestamp with time zone NOT NULL,
	"changed_by" uuid,
	CONSTRAINT "rule_settings_scope_key" UNIQUE NULLS NOT DISTINCT("company_id","model_id","pump_id"),
	CONSTRAINT "rule_settings_one_scope" CHECK (model_id is null or pump_id is null)
);
--> statement-breakpoint
ALTER TABLE "rule_settings" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "alarms" ALTER COLUMN "pump_id" DROP NOT NULL;--> statement-breakpoint
ALTER TABLE "alarms" ALTER COLUMN "pad_id" DROP NOT NULL;--> statement-breakpoint
ALTER TABLE "alarms" ADD COLUMN "group_key" text;--> statement-breakpoint
ALTER TABLE "alarms" ADD COLUMN "group_kind" text;--> statement-breakpoint
ALTER TABLE "alarms" ADD COLUMN "group_area" text;--> statement-breakpoint
ALTER TABLE "alarms" ADD COLUMN "covered_by" uuid;--> statement-breakpoint
ALTER TABLE "alarm_members" ADD CONSTRAINT "alarm_members_alarm_fkey" FOREIGN KEY ("company_id","alarm_id") REFERENCES "public"."alarms"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "alarm_members" ADD CONSTRAINT "alarm_members_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "area_states" ADD CONSTRAINT "area_states_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "backtest_pumps" ADD CONSTRAINT "backtest_pumps_backtest_fkey" FOREIGN KEY ("company_id","backtest_id") REFERENCES "public"."backtests"("company_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "backtest_pumps" ADD CONSTRAINT "backtest_pumps_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "backtests" ADD CONSTRAINT "backtests_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "backtests" ADD CONSTRAINT "backtests_asked_by_fkey" FOREIGN KEY ("company_id","asked_by") REFERENCES "public"."users"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rule_settings" ADD CONSTRAINT "rule_settings_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rule_settings" ADD CONSTRAINT "rule_settings_model_fkey" FOREIGN KEY ("company_id","model_id") REFERENCES "public"."motor_models"("company_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rule_settings" ADD CONSTRAINT "rule_settings_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rule_settings" ADD CONSTRAINT "rule_settings_changed_by_fkey" FOREIGN KEY ("company_id","changed_by") REFERENCES "public"."users"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "alarm_members_pump_index" ON "alarm_members" USING btree ("pump_id");--> statement-breakpoint
CREATE UNIQUE INDEX "backtests_one_at_a_time_key" ON "backtests" USING btree ("company_id") WHERE state in ('waiting', 'running');--> statement-breakpoint
CREATE INDEX "backtests_asked_index" ON "backtests" USING btree ("company_id","asked_at");--> statement-breakpoint
ALTER TABLE "alarms" ADD CONSTRAINT "alarms_covered_by_fkey" FOREIGN KEY ("company_id","covered_by") REFERENCES "public"."alarms"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "alarms_open_group_key" ON "alarms" USING btree ("company_id","group_key") WHERE state <> 'normal';--> statement-breakpoint
CREATE INDEX "alarms_covered_index" ON "alarms" USING btree ("covered_by") WHERE covered_by is not null;--> statement-breakpoint
ALTER TABLE "alarms" ADD CONSTRAINT "alarms_pump_or_group" CHECK ((pump_id is null) = (group_key is not null) and (pump_id is null) = (pad_id is null) and (pump_id is null) = (group_kind is not null));--> statement-breakpoint
CREATE POLICY "alarm_members_app_reads" ON "alarm_members" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "alarm_members_machine_works" ON "alarm_members" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "area_states_machine_works" ON "area_states" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "backtest_pumps_app_reads" ON "backtest_pumps" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "backtest_pumps_machine_works" ON "backtest_pumps" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "backtests_app_reads" ON "backtests" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "backtests_app_inserts" ON "backtests" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "backtests_app_updates" ON "backtests" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "backtests_machine_works" ON "backtests" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "rule_settings_app_reads" ON "rule_settings" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "rule_settings_app_inserts" ON "rule_settings" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "rule_settings_app_updates" ON "rule_settings" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "rule_settings_app_deletes" ON "rule_settings" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "rule_settings_machine_works" ON "rule_settings" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
GRANT SELECT ON alarm_members, rule_settings, backtests, backtest_pumps TO millrace_app;--> statement-breakpoint
GRANT INSERT, UPDATE, DELETE ON rule_settings TO millrace_app;--> statement-breakpoint
GRANT INSERT ON backtests TO millrace_app;--> statement-breakpoint
-- A person asks for a backtest and takes the question back; what came of it is the worker's to say.
GRANT UPDATE (state, cancel_asked_at, ended_at) ON backtests TO millrace_app;--> statement-breakpoint
GRANT SELECT ON rule_settings TO millrace_machine;--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON alarm_members, area_states, backtests, backtest_pumps TO millrace_machine;--> statement-breakpoint
ALTER TABLE alarm_members FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE area_states FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE rule_settings FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE backtests FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE backtest_pumps FORCE ROW LEVEL SECURITY;
