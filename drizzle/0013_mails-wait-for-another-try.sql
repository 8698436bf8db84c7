ALTER TABLE "outbox_mails" ADD COLUMN "retry_at" timestamp with time zone;--> statement-breakpoint
DROP POLICY "outbox_mails_app_deletes" ON "outbox_mails" CASCADE;