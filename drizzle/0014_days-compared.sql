ALTER TABLE "pump_days" ADD COLUMN "compared_by" text;--> statement-breakpoint
ALTER TABLE "pump_days" ADD COLUMN "before_kwh" double precision;--> statement-breakpoint
ALTER TABLE "pump_days" ADD COLUMN "before_micros" double precision;--> statement-breakpoint
ALTER TABLE "pump_days" ADD COLUMN "after_kwh" double precision;--> statement-breakpoint
ALTER TABLE "pump_days" ADD COLUMN "after_micros" double precision;