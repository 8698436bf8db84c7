-- The hot state is written twice a minute, the rest of the row with every reading: apart from the row, a rewrite of the
-- rest does not copy it, and whoever looks for changed pumps does not read past it.
ALTER TABLE pump_states ALTER COLUMN hot SET STORAGE EXTERNAL, ALTER COLUMN now SET STORAGE MAIN;
--> statement-breakpoint
ALTER TABLE pump_states SET (toast_tuple_target = 512);
