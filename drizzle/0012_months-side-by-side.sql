ALTER TABLE "pump_months" ADD COLUMN "saved_kwh" double precision GENERATED ALWAYS AS ((saved ->> 'savedKwh')::float8) STORED;--> statement-breakpoint
ALTER TABLE "pump_months" ADD COLUMN "saved_sigma_kwh" double precision GENERATED ALWAYS AS ((saved ->> 'sigmaKwh')::float8) STORED;--> statement-breakpoint
ALTER TABLE "pump_months" ADD COLUMN "saved_micros" double precision GENERATED ALWAYS AS ((saved ->> 'savedMicros')::float8) STORED;--> statement-breakpoint
ALTER TABLE "pump_months" ADD COLUMN "saved_sigma_micros" double precision GENERATED ALWAYS AS ((saved ->> 'sigmaMicros')::float8) STORED;--> statement-breakpoint
ALTER TABLE "pump_months" ADD COLUMN "line_names" text[];--> statement-breakpoint
ALTER TABLE "pump_months" ADD COLUMN "line_kwh" double precision[];--> statement-breakpoint
ALTER TABLE "pump_months" ADD COLUMN "line_micros" double precision[];--> statement-breakpoint
-- Forced row security hides the months from their owner, too.
ALTER TABLE "pump_months" NO FORCE ROW LEVEL SECURITY;--> statement-breakpoint
UPDATE "pump_months" SET
  line_names = array(SELECT line.name FROM ROWS FROM (jsonb_to_recordset(lines) AS (name text)) WITH ORDINALITY AS line(name, place) ORDER BY place),
  line_kwh = array(SELECT line.kwh FROM ROWS FROM (jsonb_to_recordset(lines) AS (kwh float8)) WITH ORDINALITY AS line(kwh, place) ORDER BY place),
  line_micros = array(SELECT line.micros FROM ROWS FROM (jsonb_to_recordset(lines) AS (micros float8)) WITH ORDINALITY AS line(micros, place) ORDER BY place);--> statement-breakpoint
ALTER TABLE "pump_months" FORCE ROW LEVEL SECURITY;
