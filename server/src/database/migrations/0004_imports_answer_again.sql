ALTER TABLE "imports" ADD COLUMN "digest" text;--> statement-breakpoint
ALTER TABLE "imports" ADD COLUMN "report" jsonb;