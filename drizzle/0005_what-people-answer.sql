ALTER TABLE "alarms" ADD COLUMN "assigned_to" uuid;--> statement-breakpoint
ALTER TABLE "alarms" ADD COLUMN "done_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "alarms" ADD COLUMN "done_cause" text;--> statement-breakpoint
ALTER TABLE "alarms" ADD CONSTRAINT "alarms_assigned_to_fkey" FOREIGN KEY ("company_id","assigned_to") REFERENCES "public"."users"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "alarms_uncured_index" ON "alarms" USING btree ("done_at") WHERE done_at is not null and returned_at is null;--> statement-breakpoint
CREATE INDEX "alarms_found_index" ON "alarms" USING btree ("company_id","detector") WHERE done_cause is not null;--> statement-breakpoint
-- A person gives an alarm to somebody and works a note off.
GRANT UPDATE (assigned_to, done_at, done_cause) ON alarms TO millrace_app;
