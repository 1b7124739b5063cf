ALTER TABLE "kept_version" ADD COLUMN "taking_back" text;--> statement-breakpoint
CREATE INDEX "kept_version_shoot" ON "kept_version" USING btree ("shoot_id","at");