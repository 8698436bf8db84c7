CREATE SEQUENCE "public"."arrival_sequence" INCREMENT BY 1024 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1;--> statement-breakpoint
CREATE TABLE "alarm_transitions" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"alarm_id" uuid NOT NULL,
	"at" timestamp with time zone NOT NULL,
	"kind" text NOT NULL,
	"by_user_id" uuid,
	"by_name" text,
	"note" text,
	"priority" text NOT NULL,
	"cause" text NOT NULL,
	"evidence" jsonb DEFAULT '{}'::jsonb NOT NULL
);
--> statement-breakpoint
ALTER TABLE "alarm_transitions" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "alarms" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"pump_id" uuid NOT NULL,
	"pad_id" uuid NOT NULL,
	"detector" text NOT NULL,
	"alarm_class" text NOT NULL,
	"priority" text NOT NULL,
	"state" text NOT NULL,
	"cause" text NOT NULL,
	"evidence" jsonb NOT NULL,
	"from_at" timestamp with time zone NOT NULL,
	"raised_at" timestamp with time zone NOT NULL,
	"returned_at" timestamp with time zone,
	"acknowledged_at" timestamp with time zone,
	"acknowledged_by" uuid,
	"acknowledgement_note" text,
	"escalated_at" timestamp with time zone,
	"shelved_until" timestamp with time zone,
	"shelved_by" uuid,
	"shelved_reason" text,
	"suppressed" boolean DEFAULT false NOT NULL,
	"out_of_service" boolean DEFAULT false NOT NULL,
	"latched" boolean DEFAULT false NOT NULL,
	"count" integer DEFAULT 1 NOT NULL,
	"record" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"changed_in" "xid8" DEFAULT pg_current_xact_id() NOT NULL,
	CONSTRAINT "alarms_company_id_id_key" UNIQUE("company_id","id"),
	CONSTRAINT "alarms_pump_detector_from_key" UNIQUE("pump_id","detector","from_at")
);
--> statement-breakpoint
ALTER TABLE "alarms" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "audit_entries" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"at" timestamp with time zone NOT NULL,
	"actor_user_id" uuid,
	"actor_name" text,
	"action" text NOT NULL,
	"subject_kind" text NOT NULL,
	"subject_id" uuid,
	"detail" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"address" text,
	"request_id" text
);
--> statement-breakpoint
ALTER TABLE "audit_entries" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "clocks" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"pad_id" uuid NOT NULL,
	"name" text NOT NULL,
	"type" text NOT NULL,
	"circuit" text NOT NULL,
	"trippers" jsonb NOT NULL,
	"opens_early_minutes" real DEFAULT 0 NOT NULL,
	CONSTRAINT "clocks_company_id_id_key" UNIQUE("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "clocks" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "companies" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"zone" text NOT NULL,
	"phone" text,
	"mail_hours" jsonb NOT NULL,
	"rules" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "companies" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "customers" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"name" text NOT NULL,
	"phone" text,
	"email" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "customers_company_id_id_key" UNIQUE("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "customers" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "device_events" (
	"sequence" bigint DEFAULT nextval('arrival_sequence') NOT NULL,
	"company_id" uuid NOT NULL,
	"device_id" uuid NOT NULL,
	"pump_id" uuid,
	"kind" text NOT NULL,
	"received_at" timestamp with time zone NOT NULL,
	"body" jsonb NOT NULL,
	CONSTRAINT "device_events_pkey" PRIMARY KEY("sequence")
);
--> statement-breakpoint
ALTER TABLE "device_events" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "device_fittings" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"device_id" uuid NOT NULL,
	"pump_id" uuid NOT NULL,
	"starts_at" timestamp with time zone NOT NULL,
	"ends_at" timestamp with time zone,
	CONSTRAINT "device_fittings_order" CHECK (ends_at is null or ends_at > starts_at)
);
--> statement-breakpoint
ALTER TABLE "device_fittings" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "devices" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"serial" text NOT NULL,
	"secret_hash" "bytea",
	"secret_set_at" timestamp with time zone,
	"revoked_at" timestamp with time zone,
	"interval_seconds" smallint DEFAULT 10 NOT NULL,
	"firmware" text,
	"connection" uuid,
	"boot" uuid,
	"state" text DEFAULT 'never' NOT NULL,
	"heard_at" timestamp with time zone,
	"refused" integer DEFAULT 0 NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "devices_serial_key" UNIQUE("serial"),
	CONSTRAINT "devices_company_id_id_key" UNIQUE("company_id","id"),
	CONSTRAINT "devices_interval" CHECK (interval_seconds between 5 and 60)
);
--> statement-breakpoint
ALTER TABLE "devices" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "equipment" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"pad_id" uuid NOT NULL,
	"pump_id" uuid,
	"kind" text NOT NULL,
	"input_number" smallint,
	"clock_id" uuid,
	"interlock" text DEFAULT 'unknown' NOT NULL,
	"minimum_gpm" real
);
--> statement-breakpoint
ALTER TABLE "equipment" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "idempotency_keys" (
	"company_id" uuid NOT NULL,
	"user_id" uuid NOT NULL,
	"key" text NOT NULL,
	"request_hash" "bytea" NOT NULL,
	"status" smallint,
	"sealed_answer" "bytea",
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "idempotency_keys_pkey" PRIMARY KEY("user_id","key")
);
--> statement-breakpoint
ALTER TABLE "idempotency_keys" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "inputs" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"pump_id" uuid NOT NULL,
	"number" smallint NOT NULL,
	"kind" text NOT NULL,
	"drives" text,
	"clock_id" uuid,
	"wire" text,
	CONSTRAINT "inputs_pump_number_key" UNIQUE("pump_id","number"),
	CONSTRAINT "inputs_number" CHECK (number between 1 and 8)
);
--> statement-breakpoint
ALTER TABLE "inputs" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "listening_periods" (
	"id" uuid PRIMARY KEY NOT NULL,
	"started_at" timestamp with time zone NOT NULL,
	"alive_at" timestamp with time zone NOT NULL
);
--> statement-breakpoint
ALTER TABLE "listening_periods" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "mail_states" (
	"company_id" uuid NOT NULL,
	"subject_kind" text NOT NULL,
	"subject_id" uuid NOT NULL,
	"state" jsonb NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "mail_states_pkey" PRIMARY KEY("subject_kind","subject_id")
);
--> statement-breakpoint
ALTER TABLE "mail_states" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "motor_fittings" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"motor_id" uuid NOT NULL,
	"pump_id" uuid NOT NULL,
	"starts_at" timestamp with time zone NOT NULL,
	"ends_at" timestamp with time zone,
	CONSTRAINT "motor_fittings_order" CHECK (ends_at is null or ends_at > starts_at)
);
--> statement-breakpoint
ALTER TABLE "motor_fittings" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "motor_models" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"name" text NOT NULL,
	"frame" text NOT NULL,
	"total_horsepower" real NOT NULL,
	"service_factor" real NOT NULL,
	"input_count" smallint NOT NULL,
	"terminal_order" jsonb NOT NULL,
	"traits" jsonb NOT NULL,
	"nominal_volts" integer,
	CONSTRAINT "motor_models_company_id_id_key" UNIQUE("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "motor_models" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "motors" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"model_id" uuid NOT NULL,
	"serial" text NOT NULL,
	"date_code" text,
	"warranty_ends_at" timestamp with time zone,
	CONSTRAINT "motors_company_id_id_key" UNIQUE("company_id","id"),
	CONSTRAINT "motors_serial_key" UNIQUE("company_id","serial")
);
--> statement-breakpoint
ALTER TABLE "motors" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "outbox_mails" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"alarm_id" uuid,
	"transition" text NOT NULL,
	"recipient_user_id" uuid,
	"to_address" text NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"html" text NOT NULL,
	"message_id" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"due_at" timestamp with time zone NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"leased_until" timestamp with time zone,
	"sent_at" timestamp with time zone,
	"failed_at" timestamp with time zone,
	"last_error" text,
	CONSTRAINT "outbox_mails_message_id_key" UNIQUE("message_id"),
	CONSTRAINT "outbox_mails_once_key" UNIQUE("alarm_id","transition","to_address")
);
--> statement-breakpoint
ALTER TABLE "outbox_mails" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pad_ownerships" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"pad_id" uuid NOT NULL,
	"customer_id" uuid NOT NULL,
	"starts_at" timestamp with time zone NOT NULL,
	"ends_at" timestamp with time zone,
	CONSTRAINT "pad_ownerships_order" CHECK (ends_at is null or ends_at > starts_at)
);
--> statement-breakpoint
ALTER TABLE "pad_ownerships" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pads" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"name" text NOT NULL,
	"street" text NOT NULL,
	"town" text,
	"area" text,
	"zone" text NOT NULL,
	"state" text DEFAULT 'open' NOT NULL,
	"access_notes" text,
	"pool_gallons" real,
	"turnovers_per_day" real,
	"technician_id" uuid,
	"stop_weekday" smallint,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "pads_company_id_id_key" UNIQUE("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "pads" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pump_learnt" (
	"pump_id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"version" integer NOT NULL,
	"learnt" jsonb NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "pump_learnt" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pump_states" (
	"pump_id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"pump_number" integer NOT NULL,
	"epoch" integer DEFAULT 0 NOT NULL,
	"cursor" bigint DEFAULT 0 NOT NULL,
	"hot" jsonb,
	"now" jsonb,
	"high_water" timestamp with time zone,
	"heard_at" timestamp with time zone,
	"silent_since" timestamp with time zone,
	"quarantined_at" timestamp with time zone,
	"quarantine_reason" text,
	"changed_in" "xid8" DEFAULT pg_current_xact_id() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "pump_states" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pumps" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"number" integer GENERATED ALWAYS AS IDENTITY (sequence name "pumps_number_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 2147483647 START WITH 1 CACHE 1),
	"pad_id" uuid NOT NULL,
	"name" text NOT NULL,
	"purpose" text DEFAULT 'filter' NOT NULL,
	"monitored" boolean DEFAULT true NOT NULL,
	"wet_end_model_id" uuid,
	"system_k" real,
	"nominal_volts" real,
	"settings" jsonb NOT NULL,
	"settings_version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "pumps_number_key" UNIQUE("number"),
	CONSTRAINT "pumps_company_id_id_key" UNIQUE("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "pumps" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "readings" (
	"at" timestamp with time zone NOT NULL,
	"received_at" timestamp with time zone NOT NULL,
	"sequence" bigint DEFAULT nextval('arrival_sequence') NOT NULL,
	"pump_number" integer NOT NULL,
	"rpm" real NOT NULL,
	"watts" real NOT NULL,
	"volts" real,
	"drive_celsius" real,
	"ambient_celsius" real,
	"closed_inputs" smallint NOT NULL,
	"active_input" smallint NOT NULL,
	"source" smallint,
	"motor_clock" smallint,
	"flags" smallint DEFAULT 0 NOT NULL,
	"fault" text,
	CONSTRAINT "readings_pkey" PRIMARY KEY("pump_number","at")
) PARTITION BY RANGE ("at");
--> statement-breakpoint
ALTER TABLE "readings" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "refresh_tokens" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"user_id" uuid NOT NULL,
	"family_id" uuid NOT NULL,
	"signed_in_at" timestamp with time zone NOT NULL,
	"token_hash" "bytea" NOT NULL,
	"issued_at" timestamp with time zone NOT NULL,
	"used_at" timestamp with time zone,
	"expires_at" timestamp with time zone NOT NULL,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "refresh_tokens_hash_key" UNIQUE("token_hash")
);
--> statement-breakpoint
ALTER TABLE "refresh_tokens" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "refused_messages" (
	"id" bigint PRIMARY KEY GENERATED ALWAYS AS IDENTITY (sequence name "refused_messages_id_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"company_id" uuid NOT NULL,
	"device_id" uuid NOT NULL,
	"received_at" timestamp with time zone NOT NULL,
	"reason" text NOT NULL,
	"detail" text NOT NULL,
	"sample" text NOT NULL
);
--> statement-breakpoint
ALTER TABLE "refused_messages" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "runs" (
	"pump_id" uuid NOT NULL,
	"company_id" uuid NOT NULL,
	"from_at" timestamp with time zone NOT NULL,
	"to_at" timestamp with time zone,
	"covered_ms" bigint NOT NULL,
	"changed_in" "xid8" DEFAULT pg_current_xact_id() NOT NULL,
	"watt_hours" double precision NOT NULL,
	"expected_rpm" real NOT NULL,
	"mean_rpm" real NOT NULL,
	"mean_watts" real NOT NULL,
	"gallons" real,
	"closed_inputs" smallint NOT NULL,
	"active_input" smallint NOT NULL,
	"source" text NOT NULL,
	"expected_source" text NOT NULL,
	"flags" text[] DEFAULT '{}'::text[] NOT NULL,
	CONSTRAINT "runs_pkey" PRIMARY KEY("pump_id","from_at")
);
--> statement-breakpoint
ALTER TABLE "runs" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "sign_in_attempts" (
	"key" varchar(255) PRIMARY KEY NOT NULL,
	"points" integer DEFAULT 0 NOT NULL,
	"expire" bigint
);
--> statement-breakpoint
ALTER TABLE "sign_in_attempts" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "users" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"phone" text,
	"role" text NOT NULL,
	"customer_id" uuid,
	"password_hash" text NOT NULL,
	"preferences" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"disabled_at" timestamp with time zone,
	CONSTRAINT "users_company_id_id_key" UNIQUE("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "users" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "wet_end_models" (
	"id" uuid PRIMARY KEY NOT NULL,
	"company_id" uuid NOT NULL,
	"name" text NOT NULL,
	"reference_rpm" real NOT NULL,
	"points" jsonb NOT NULL,
	"standby_watts" real NOT NULL,
	CONSTRAINT "wet_end_models_company_id_id_key" UNIQUE("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "wet_end_models" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "alarm_transitions" ADD CONSTRAINT "alarm_transitions_alarm_fkey" FOREIGN KEY ("company_id","alarm_id") REFERENCES "public"."alarms"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "alarms" ADD CONSTRAINT "alarms_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "alarms" ADD CONSTRAINT "alarms_pad_fkey" FOREIGN KEY ("company_id","pad_id") REFERENCES "public"."pads"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "alarms" ADD CONSTRAINT "alarms_acknowledged_by_fkey" FOREIGN KEY ("company_id","acknowledged_by") REFERENCES "public"."users"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "alarms" ADD CONSTRAINT "alarms_shelved_by_fkey" FOREIGN KEY ("company_id","shelved_by") REFERENCES "public"."users"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "clocks" ADD CONSTRAINT "clocks_pad_fkey" FOREIGN KEY ("company_id","pad_id") REFERENCES "public"."pads"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "customers" ADD CONSTRAINT "customers_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "device_fittings" ADD CONSTRAINT "device_fittings_device_fkey" FOREIGN KEY ("company_id","device_id") REFERENCES "public"."devices"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "device_fittings" ADD CONSTRAINT "device_fittings_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "devices" ADD CONSTRAINT "devices_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "equipment" ADD CONSTRAINT "equipment_pad_fkey" FOREIGN KEY ("company_id","pad_id") REFERENCES "public"."pads"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "equipment" ADD CONSTRAINT "equipment_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "equipment" ADD CONSTRAINT "equipment_clock_fkey" FOREIGN KEY ("company_id","clock_id") REFERENCES "public"."clocks"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "inputs" ADD CONSTRAINT "inputs_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "inputs" ADD CONSTRAINT "inputs_clock_fkey" FOREIGN KEY ("company_id","clock_id") REFERENCES "public"."clocks"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "motor_fittings" ADD CONSTRAINT "motor_fittings_motor_fkey" FOREIGN KEY ("company_id","motor_id") REFERENCES "public"."motors"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "motor_fittings" ADD CONSTRAINT "motor_fittings_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "motor_models" ADD CONSTRAINT "motor_models_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "motors" ADD CONSTRAINT "motors_model_fkey" FOREIGN KEY ("company_id","model_id") REFERENCES "public"."motor_models"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "outbox_mails" ADD CONSTRAINT "outbox_mails_alarm_fkey" FOREIGN KEY ("company_id","alarm_id") REFERENCES "public"."alarms"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pad_ownerships" ADD CONSTRAINT "pad_ownerships_pad_fkey" FOREIGN KEY ("company_id","pad_id") REFERENCES "public"."pads"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pad_ownerships" ADD CONSTRAINT "pad_ownerships_customer_fkey" FOREIGN KEY ("company_id","customer_id") REFERENCES "public"."customers"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pads" ADD CONSTRAINT "pads_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pads" ADD CONSTRAINT "pads_technician_fkey" FOREIGN KEY ("company_id","technician_id") REFERENCES "public"."users"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pump_learnt" ADD CONSTRAINT "pump_learnt_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pump_states" ADD CONSTRAINT "pump_states_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pumps" ADD CONSTRAINT "pumps_pad_fkey" FOREIGN KEY ("company_id","pad_id") REFERENCES "public"."pads"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pumps" ADD CONSTRAINT "pumps_wet_end_model_fkey" FOREIGN KEY ("company_id","wet_end_model_id") REFERENCES "public"."wet_end_models"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "refresh_tokens" ADD CONSTRAINT "refresh_tokens_user_fkey" FOREIGN KEY ("company_id","user_id") REFERENCES "public"."users"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "runs" ADD CONSTRAINT "runs_pump_fkey" FOREIGN KEY ("company_id","pump_id") REFERENCES "public"."pumps"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "users" ADD CONSTRAINT "users_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "users" ADD CONSTRAINT "users_customer_fkey" FOREIGN KEY ("company_id","customer_id") REFERENCES "public"."customers"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "wet_end_models" ADD CONSTRAINT "wet_end_models_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "alarm_transitions_alarm_index" ON "alarm_transitions" USING btree ("alarm_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "alarms_open_key" ON "alarms" USING btree ("pump_id","detector") WHERE state <> 'normal';--> statement-breakpoint
CREATE INDEX "alarms_open_index" ON "alarms" USING btree ("company_id","priority") WHERE state <> 'normal';--> statement-breakpoint
CREATE INDEX "alarms_raised_index" ON "alarms" USING btree ("company_id","raised_at");--> statement-breakpoint
CREATE INDEX "alarms_changed_index" ON "alarms" USING btree ("company_id","changed_in");--> statement-breakpoint
CREATE INDEX "audit_entries_at_index" ON "audit_entries" USING btree ("company_id","at");--> statement-breakpoint
CREATE INDEX "audit_entries_subject_index" ON "audit_entries" USING btree ("subject_id");--> statement-breakpoint
CREATE INDEX "clocks_pad_index" ON "clocks" USING btree ("pad_id");--> statement-breakpoint
CREATE INDEX "customers_name_index" ON "customers" USING btree ("company_id","name");--> statement-breakpoint
CREATE INDEX "device_events_pump_index" ON "device_events" USING btree ("pump_id","sequence");--> statement-breakpoint
CREATE INDEX "device_events_device_index" ON "device_events" USING btree ("device_id","received_at");--> statement-breakpoint
CREATE INDEX "devices_company_serial_index" ON "devices" USING btree ("company_id","serial");--> statement-breakpoint
CREATE INDEX "equipment_pad_index" ON "equipment" USING btree ("pad_id");--> statement-breakpoint
CREATE INDEX "idempotency_keys_created_index" ON "idempotency_keys" USING btree ("created_at");--> statement-breakpoint
CREATE INDEX "listening_periods_alive_index" ON "listening_periods" USING btree ("alive_at");--> statement-breakpoint
CREATE INDEX "outbox_mails_due_index" ON "outbox_mails" USING btree ("due_at") WHERE sent_at is null and failed_at is null;--> statement-breakpoint
CREATE INDEX "pad_ownerships_customer_index" ON "pad_ownerships" USING btree ("customer_id");--> statement-breakpoint
CREATE INDEX "pads_technician_index" ON "pads" USING btree ("technician_id");--> statement-breakpoint
CREATE INDEX "pumps_pad_index" ON "pumps" USING btree ("pad_id");--> statement-breakpoint
CREATE INDEX "pumps_company_numbers_index" ON "pumps" USING btree ("company_id","number","pad_id","id");--> statement-breakpoint
CREATE INDEX "readings_sequence_index" ON "readings" USING brin ("sequence");--> statement-breakpoint
CREATE INDEX "refresh_tokens_family_index" ON "refresh_tokens" USING btree ("family_id");--> statement-breakpoint
CREATE INDEX "refresh_tokens_user_index" ON "refresh_tokens" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "refresh_tokens_expires_index" ON "refresh_tokens" USING btree ("expires_at");--> statement-breakpoint
CREATE INDEX "refused_messages_device_index" ON "refused_messages" USING btree ("device_id","id");--> statement-breakpoint
CREATE INDEX "runs_changed_index" ON "runs" USING btree ("company_id","changed_in");--> statement-breakpoint
CREATE UNIQUE INDEX "users_email_key" ON "users" USING btree (lower("email"));--> statement-breakpoint
CREATE INDEX "users_customer_index" ON "users" USING btree ("customer_id");--> statement-breakpoint
CREATE POLICY "alarm_transitions_app_reads" ON "alarm_transitions" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or exists (select from alarms a where a.id = alarm_id)));--> statement-breakpoint
CREATE POLICY "alarm_transitions_app_inserts" ON "alarm_transitions" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "alarm_transitions_machine_works" ON "alarm_transitions" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "alarms_app_reads" ON "alarms" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or from_at >= ((select millrace_visible_since()) ->> pump_id::text)::timestamptz));--> statement-breakpoint
CREATE POLICY "alarms_app_updates" ON "alarms" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_is_staff())) WITH CHECK (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "alarms_machine_works" ON "alarms" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "audit_entries_app_reads" ON "audit_entries" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "audit_entries_app_inserts" ON "audit_entries" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and actor_user_id = (select millrace_user()));--> statement-breakpoint
CREATE POLICY "audit_entries_machine_works" ON "audit_entries" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "clocks_app_reads" ON "clocks" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or pad_id in (select o.pad_id from pad_ownerships o)));--> statement-breakpoint
CREATE POLICY "clocks_app_inserts" ON "clocks" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "clocks_app_updates" ON "clocks" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "clocks_app_deletes" ON "clocks" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "clocks_machine_works" ON "clocks" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "companies_app_reads" ON "companies" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (id = (select millrace_company()));--> statement-breakpoint
CREATE POLICY "companies_machine_works" ON "companies" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "customers_app_reads" ON "customers" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or id = (select millrace_customer())));--> statement-breakpoint
CREATE POLICY "customers_app_inserts" ON "customers" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "customers_app_updates" ON "customers" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "customers_app_deletes" ON "customers" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "customers_machine_works" ON "customers" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "device_events_app_reads" ON "device_events" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "device_events_machine_works" ON "device_events" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "device_fittings_app_reads" ON "device_fittings" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or pump_id in (select p.id from pumps p)));--> statement-breakpoint
CREATE POLICY "device_fittings_app_inserts" ON "device_fittings" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "device_fittings_app_updates" ON "device_fittings" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "device_fittings_app_deletes" ON "device_fittings" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "device_fittings_machine_works" ON "device_fittings" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "devices_app_reads" ON "devices" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or id in (select f.device_id from device_fittings f)));--> statement-breakpoint
CREATE POLICY "devices_app_inserts" ON "devices" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "devices_app_updates" ON "devices" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "devices_app_deletes" ON "devices" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "devices_machine_works" ON "devices" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "equipment_app_reads" ON "equipment" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or pad_id in (select o.pad_id from pad_ownerships o)));--> statement-breakpoint
CREATE POLICY "equipment_app_inserts" ON "equipment" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "equipment_app_updates" ON "equipment" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "equipment_app_deletes" ON "equipment" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "equipment_machine_works" ON "equipment" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "idempotency_keys_app_reads" ON "idempotency_keys" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and user_id = (select millrace_user()));--> statement-breakpoint
CREATE POLICY "idempotency_keys_app_inserts" ON "idempotency_keys" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and user_id = (select millrace_user()));--> statement-breakpoint
CREATE POLICY "idempotency_keys_app_updates" ON "idempotency_keys" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and user_id = (select millrace_user())) WITH CHECK (company_id = (select millrace_company()) and user_id = (select millrace_user()));--> statement-breakpoint
CREATE POLICY "idempotency_keys_app_deletes" ON "idempotency_keys" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and user_id = (select millrace_user()));--> statement-breakpoint
CREATE POLICY "idempotency_keys_machine_works" ON "idempotency_keys" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "inputs_app_reads" ON "inputs" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or pump_id in (select p.id from pumps p)));--> statement-breakpoint
CREATE POLICY "inputs_app_inserts" ON "inputs" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "inputs_app_updates" ON "inputs" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "inputs_app_deletes" ON "inputs" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "inputs_machine_works" ON "inputs" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "listening_periods_machine_works" ON "listening_periods" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "mail_states_machine_works" ON "mail_states" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "motor_fittings_app_reads" ON "motor_fittings" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or pump_id in (select p.id from pumps p)));--> statement-breakpoint
CREATE POLICY "motor_fittings_app_inserts" ON "motor_fittings" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "motor_fittings_app_updates" ON "motor_fittings" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "motor_fittings_app_deletes" ON "motor_fittings" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "motor_fittings_machine_works" ON "motor_fittings" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "motor_models_app_reads" ON "motor_models" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()));--> statement-breakpoint
CREATE POLICY "motor_models_app_inserts" ON "motor_models" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "motor_models_app_updates" ON "motor_models" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "motor_models_app_deletes" ON "motor_models" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "motor_models_machine_works" ON "motor_models" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "motors_app_reads" ON "motors" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or id in (select f.motor_id from motor_fittings f)));--> statement-breakpoint
CREATE POLICY "motors_app_inserts" ON "motors" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "motors_app_updates" ON "motors" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "motors_app_deletes" ON "motors" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "motors_machine_works" ON "motors" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "outbox_mails_app_reads" ON "outbox_mails" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "outbox_mails_app_deletes" ON "outbox_mails" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_is_staff()));--> statement-breakpoint
CREATE POLICY "outbox_mails_machine_works" ON "outbox_mails" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "pad_ownerships_app_reads" ON "pad_ownerships" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or customer_id = (select millrace_customer()) and starts_at <= now() and (ends_at is null or ends_at > now())));--> statement-breakpoint
CREATE POLICY "pad_ownerships_app_inserts" ON "pad_ownerships" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "pad_ownerships_app_updates" ON "pad_ownerships" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "pad_ownerships_app_deletes" ON "pad_ownerships" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "pad_ownerships_machine_works" ON "pad_ownerships" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "pads_app_reads" ON "pads" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or id in (select o.pad_id from pad_ownerships o)));--> statement-breakpoint
CREATE POLICY "pads_app_inserts" ON "pads" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "pads_app_updates" ON "pads" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "pads_app_deletes" ON "pads" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "pads_machine_works" ON "pads" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "pump_learnt_app_reads" ON "pump_learnt" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or pump_id in (select p.id from pumps p)));--> statement-breakpoint
CREATE POLICY "pump_learnt_machine_works" ON "pump_learnt" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "pump_states_app_reads" ON "pump_states" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or heard_at >= ((select millrace_visible_since()) ->> pump_id::text)::timestamptz));--> statement-breakpoint
CREATE POLICY "pump_states_machine_works" ON "pump_states" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "pumps_app_reads" ON "pumps" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or pad_id in (select o.pad_id from pad_ownerships o)));--> statement-breakpoint
CREATE POLICY "pumps_app_inserts" ON "pumps" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "pumps_app_updates" ON "pumps" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "pumps_app_deletes" ON "pumps" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "pumps_machine_works" ON "pumps" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "readings_app_reads" ON "readings" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (((select millrace_is_staff()) and pump_number in (select p.number from pumps p))
        or at >= ((select millrace_visible_numbers_since()) ->> pump_number::text)::timestamptz);--> statement-breakpoint
CREATE POLICY "readings_machine_works" ON "readings" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "refresh_tokens_machine_works" ON "refresh_tokens" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "refused_messages_app_reads" ON "refused_messages" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "refused_messages_machine_works" ON "refused_messages" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "runs_app_reads" ON "runs" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or from_at >= ((select millrace_visible_since()) ->> pump_id::text)::timestamptz));--> statement-breakpoint
CREATE POLICY "runs_machine_works" ON "runs" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "sign_in_attempts_machine_works" ON "sign_in_attempts" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "users_app_reads" ON "users" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()) and ((select millrace_is_staff()) or id = (select millrace_user()) or id in (select p.technician_id from pads p)));--> statement-breakpoint
CREATE POLICY "users_app_updates" ON "users" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and id = (select millrace_user())) WITH CHECK (company_id = (select millrace_company()) and id = (select millrace_user()));--> statement-breakpoint
CREATE POLICY "users_machine_works" ON "users" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "wet_end_models_app_reads" ON "wet_end_models" AS PERMISSIVE FOR SELECT TO "millrace_app" USING (company_id = (select millrace_company()));--> statement-breakpoint
CREATE POLICY "wet_end_models_app_inserts" ON "wet_end_models" AS PERMISSIVE FOR INSERT TO "millrace_app" WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "wet_end_models_app_updates" ON "wet_end_models" AS PERMISSIVE FOR UPDATE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager') WITH CHECK (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "wet_end_models_app_deletes" ON "wet_end_models" AS PERMISSIVE FOR DELETE TO "millrace_app" USING (company_id = (select millrace_company()) and (select millrace_role()) = 'manager');--> statement-breakpoint
CREATE POLICY "wet_end_models_machine_works" ON "wet_end_models" AS PERMISSIVE FOR ALL TO "millrace_machine" USING (true) WITH CHECK (true);