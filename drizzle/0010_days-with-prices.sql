ALTER TABLE "pump_days" ADD COLUMN "priced_by" text;--> statement-breakpoint
ALTER TABLE "pump_days" ADD COLUMN "kwh_by_period" double precision[];--> statement-breakpoint
ALTER TABLE "pump_days" ADD COLUMN "energy_micros_by_period" double precision[];--> statement-breakpoint
ALTER TABLE "pump_days" ADD COLUMN "demand_micros" double precision;