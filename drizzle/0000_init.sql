CREATE TABLE "account" (
	"id" text PRIMARY KEY NOT NULL,
	"account_id" text NOT NULL,
	"provider_id" text NOT NULL,
	"user_id" text NOT NULL,
	"access_token" text,
	"refresh_token" text,
	"id_token" text,
	"access_token_expires_at" timestamp with time zone,
	"refresh_token_expires_at" timestamp with time zone,
	"scope" text,
	"password" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "rate_limit" (
	"id" text PRIMARY KEY NOT NULL,
	"key" text NOT NULL,
	"count" integer NOT NULL,
	"last_request" bigint NOT NULL,
	CONSTRAINT "rate_limit_key_unique" UNIQUE("key")
);
--> statement-breakpoint
CREATE TABLE "session" (
	"id" text PRIMARY KEY NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"token" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"ip_address" text,
	"user_agent" text,
	"user_id" text NOT NULL,
	CONSTRAINT "session_token_unique" UNIQUE("token")
);
--> statement-breakpoint
CREATE TABLE "user" (
	"id" text PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"email_verified" boolean DEFAULT false NOT NULL,
	"image" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "user_email_unique" UNIQUE("email")
);
--> statement-breakpoint
CREATE TABLE "verification" (
	"id" text PRIMARY KEY NOT NULL,
	"identifier" text NOT NULL,
	"value" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "kit_item" (
	"id" uuid NOT NULL,
	"version" integer NOT NULL,
	"studio_id" uuid NOT NULL,
	"input" jsonb NOT NULL,
	"removed_at" timestamp with time zone,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "kit_item_id_version_pk" PRIMARY KEY("id","version")
);
--> statement-breakpoint
CREATE TABLE "minutes_default" (
	"studio_id" uuid PRIMARY KEY NOT NULL,
	"minutes" jsonb NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "recipe" (
	"id" uuid PRIMARY KEY NOT NULL,
	"studio_id" uuid NOT NULL,
	"name" text NOT NULL,
	"content" jsonb NOT NULL,
	"created_by" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "studio" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "studio_member" (
	"studio_id" uuid NOT NULL,
	"user_id" text NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "studio_member_studio_id_user_id_pk" PRIMARY KEY("studio_id","user_id")
);
--> statement-breakpoint
CREATE TABLE "deliverable" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"title" text NOT NULL,
	"count" integer DEFAULT 1 NOT NULL,
	"orientation" text DEFAULT 'any' NOT NULL,
	"use" text DEFAULT '' NOT NULL,
	"due_on" date
);
--> statement-breakpoint
CREATE TABLE "location" (
	"shoot_id" uuid PRIMARY KEY NOT NULL,
	"name" text DEFAULT '' NOT NULL,
	"address" text DEFAULT '' NOT NULL,
	"latitude" double precision,
	"longitude" double precision,
	"parking" text DEFAULT '' NOT NULL,
	"access" text DEFAULT '' NOT NULL
);
--> statement-breakpoint
CREATE TABLE "room" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"name" text NOT NULL,
	"width_m" double precision,
	"depth_m" double precision,
	"ceiling_m" double precision,
	"power" text DEFAULT '' NOT NULL,
	"windows" text DEFAULT '' NOT NULL,
	"note" text DEFAULT '' NOT NULL
);
--> statement-breakpoint
CREATE TABLE "shoot" (
	"id" uuid PRIMARY KEY NOT NULL,
	"studio_id" uuid NOT NULL,
	"title" text NOT NULL,
	"client" text DEFAULT '' NOT NULL,
	"idea" text DEFAULT '' NOT NULL,
	"usage" text DEFAULT '' NOT NULL,
	"date" date,
	"zone" text NOT NULL,
	"sign_off_by_ms" bigint,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "shoot_member" (
	"shoot_id" uuid NOT NULL,
	"user_id" text NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "shoot_member_shoot_id_user_id_pk" PRIMARY KEY("shoot_id","user_id")
);
--> statement-breakpoint
CREATE TABLE "audit_event" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid,
	"studio_id" uuid,
	"user_id" text,
	"what" text NOT NULL,
	"subject" text DEFAULT '' NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "invitation" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid,
	"studio_id" uuid,
	"email" text NOT NULL,
	"name" text DEFAULT '' NOT NULL,
	"role" text NOT NULL,
	"token_hash" "bytea" NOT NULL,
	"invited_by" text NOT NULL,
	"sent_at" timestamp with time zone NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"accepted_at" timestamp with time zone,
	"accepted_by" text,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "invitation_token_hash_unique" UNIQUE("token_hash"),
	CONSTRAINT "invitation_one_home" CHECK (("invitation"."shoot_id" is null) <> ("invitation"."studio_id" is null))
);
--> statement-breakpoint
CREATE TABLE "signed_link" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"sitter_id" uuid NOT NULL,
	"scope" text NOT NULL,
	"token_hash" "bytea" NOT NULL,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "signed_link_token_hash_unique" UNIQUE("token_hash")
);
--> statement-breakpoint
CREATE TABLE "blob" (
	"sha256" text PRIMARY KEY NOT NULL,
	"bytes" "bytea" NOT NULL
);
--> statement-breakpoint
CREATE TABLE "rendition" (
	"sha256" text NOT NULL,
	"long_edge_px" integer NOT NULL,
	"bytes" "bytea" NOT NULL,
	CONSTRAINT "rendition_sha256_long_edge_px_pk" PRIMARY KEY("sha256","long_edge_px")
);
--> statement-breakpoint
CREATE TABLE "upload" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"sha256" text NOT NULL,
	"mime" text NOT NULL,
	"size_bytes" integer NOT NULL,
	"width_px" integer NOT NULL,
	"height_px" integer NOT NULL,
	"palette" jsonb NOT NULL,
	"exposure" text DEFAULT '' NOT NULL,
	"exif" jsonb NOT NULL,
	"perceptual_hash" text NOT NULL,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "kept_version" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"name" text NOT NULL,
	"user_id" text NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"board_seq" bigint NOT NULL,
	"plan_seq" bigint NOT NULL
);
--> statement-breakpoint
CREATE TABLE "rt_doc" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"epoch" integer DEFAULT 1 NOT NULL,
	"schema" integer DEFAULT 1 NOT NULL,
	"head" bigint DEFAULT 0 NOT NULL,
	"snapshot_seq" bigint DEFAULT 0 NOT NULL,
	"log_rows" integer DEFAULT 0 NOT NULL,
	"log_bytes" bigint DEFAULT 0 NOT NULL,
	"state_bytes" bigint DEFAULT 0 NOT NULL,
	"frozen" text
);
--> statement-breakpoint
CREATE TABLE "rt_quarantine" (
	"id" bigserial PRIMARY KEY NOT NULL,
	"doc_id" uuid NOT NULL,
	"user_id" text,
	"reason" text NOT NULL,
	"update" "bytea" NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "rt_snapshot" (
	"doc_id" uuid NOT NULL,
	"seq" bigint NOT NULL,
	"kind" text NOT NULL,
	"state" "bytea" NOT NULL,
	"sha256" "bytea" NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "rt_snapshot_doc_id_seq_kind_pk" PRIMARY KEY("doc_id","seq","kind")
);
--> statement-breakpoint
CREATE TABLE "rt_touch" (
	"doc_id" uuid NOT NULL,
	"item" text NOT NULL,
	"user_id" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	CONSTRAINT "rt_touch_doc_id_item_user_id_pk" PRIMARY KEY("doc_id","item","user_id")
);
--> statement-breakpoint
CREATE TABLE "rt_update" (
	"doc_id" uuid NOT NULL,
	"seq" bigint NOT NULL,
	"user_id" text,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"update" "bytea" NOT NULL,
	CONSTRAINT "rt_update_doc_id_seq_pk" PRIMARY KEY("doc_id","seq")
);
--> statement-breakpoint
CREATE TABLE "sign_off" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"look_id" uuid NOT NULL,
	"answer" text NOT NULL,
	"words" text DEFAULT '' NOT NULL,
	"fingerprint" text NOT NULL,
	"frozen" jsonb NOT NULL,
	"seq" bigint NOT NULL,
	"user_id" text NOT NULL,
	"name" text NOT NULL,
	"at" timestamp with time zone NOT NULL
);
--> statement-breakpoint
CREATE TABLE "comment" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"subject" text NOT NULL,
	"subject_id" uuid NOT NULL,
	"user_id" text NOT NULL,
	"text" text NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "piece_cost" (
	"shoot_id" uuid NOT NULL,
	"piece_id" uuid NOT NULL,
	"cost_minor" bigint,
	"cost_currency" text,
	"deposit_minor" bigint,
	"deposit_currency" text,
	"size" text DEFAULT '' NOT NULL,
	CONSTRAINT "piece_cost_shoot_id_piece_id_pk" PRIMARY KEY("shoot_id","piece_id")
);
--> statement-breakpoint
CREATE TABLE "private_note" (
	"shoot_id" uuid PRIMARY KEY NOT NULL,
	"text" text DEFAULT '' NOT NULL
);
--> statement-breakpoint
CREATE TABLE "sitter_private" (
	"shoot_id" uuid NOT NULL,
	"sitter_id" uuid NOT NULL,
	"sizes" text DEFAULT '' NOT NULL,
	"contact" text DEFAULT '' NOT NULL,
	CONSTRAINT "sitter_private_shoot_id_sitter_id_pk" PRIMARY KEY("shoot_id","sitter_id")
);
--> statement-breakpoint
CREATE TABLE "call_sheet" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"content" jsonb NOT NULL,
	"issued_by" text NOT NULL,
	"issued_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "call_sheet_copy" (
	"id" uuid PRIMARY KEY NOT NULL,
	"call_sheet_id" uuid NOT NULL,
	"user_id" text,
	"sitter_id" uuid,
	"email" text NOT NULL,
	"confirmed_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "release" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"sitter_id" uuid NOT NULL,
	"text" text NOT NULL,
	"signed_name" text,
	"signed_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "budget_line" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"what" text NOT NULL,
	"planned_minor" bigint,
	"actual_minor" bigint,
	"currency" text NOT NULL
);
--> statement-breakpoint
CREATE TABLE "estimate" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"content" jsonb NOT NULL,
	"total_minor" bigint NOT NULL,
	"currency" text NOT NULL,
	"accepted_by" text,
	"accepted_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "payment" (
	"id" uuid PRIMARY KEY NOT NULL,
	"shoot_id" uuid NOT NULL,
	"amount_minor" bigint NOT NULL,
	"currency" text NOT NULL,
	"status" text NOT NULL,
	"provider_ref" text,
	"at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "mail" (
	"id" uuid PRIMARY KEY NOT NULL,
	"to" text NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"html" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"next_try_at" timestamp with time zone DEFAULT now() NOT NULL,
	"tries" integer DEFAULT 0 NOT NULL,
	"sent_at" timestamp with time zone,
	"failed" text
);
--> statement-breakpoint
ALTER TABLE "account" ADD CONSTRAINT "account_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "kit_item" ADD CONSTRAINT "kit_item_studio_id_studio_id_fk" FOREIGN KEY ("studio_id") REFERENCES "public"."studio"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "minutes_default" ADD CONSTRAINT "minutes_default_studio_id_studio_id_fk" FOREIGN KEY ("studio_id") REFERENCES "public"."studio"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recipe" ADD CONSTRAINT "recipe_studio_id_studio_id_fk" FOREIGN KEY ("studio_id") REFERENCES "public"."studio"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "studio_member" ADD CONSTRAINT "studio_member_studio_id_studio_id_fk" FOREIGN KEY ("studio_id") REFERENCES "public"."studio"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "studio_member" ADD CONSTRAINT "studio_member_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "deliverable" ADD CONSTRAINT "deliverable_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "location" ADD CONSTRAINT "location_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "room" ADD CONSTRAINT "room_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shoot" ADD CONSTRAINT "shoot_studio_id_studio_id_fk" FOREIGN KEY ("studio_id") REFERENCES "public"."studio"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shoot" ADD CONSTRAINT "shoot_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shoot_member" ADD CONSTRAINT "shoot_member_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shoot_member" ADD CONSTRAINT "shoot_member_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_studio_id_studio_id_fk" FOREIGN KEY ("studio_id") REFERENCES "public"."studio"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_invited_by_user_id_fk" FOREIGN KEY ("invited_by") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "signed_link" ADD CONSTRAINT "signed_link_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rendition" ADD CONSTRAINT "rendition_sha256_blob_sha256_fk" FOREIGN KEY ("sha256") REFERENCES "public"."blob"("sha256") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "upload" ADD CONSTRAINT "upload_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "upload" ADD CONSTRAINT "upload_sha256_blob_sha256_fk" FOREIGN KEY ("sha256") REFERENCES "public"."blob"("sha256") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "kept_version" ADD CONSTRAINT "kept_version_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rt_doc" ADD CONSTRAINT "rt_doc_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rt_quarantine" ADD CONSTRAINT "rt_quarantine_doc_id_rt_doc_id_fk" FOREIGN KEY ("doc_id") REFERENCES "public"."rt_doc"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rt_snapshot" ADD CONSTRAINT "rt_snapshot_doc_id_rt_doc_id_fk" FOREIGN KEY ("doc_id") REFERENCES "public"."rt_doc"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rt_touch" ADD CONSTRAINT "rt_touch_doc_id_rt_doc_id_fk" FOREIGN KEY ("doc_id") REFERENCES "public"."rt_doc"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rt_update" ADD CONSTRAINT "rt_update_doc_id_rt_doc_id_fk" FOREIGN KEY ("doc_id") REFERENCES "public"."rt_doc"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sign_off" ADD CONSTRAINT "sign_off_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "comment" ADD CONSTRAINT "comment_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "comment" ADD CONSTRAINT "comment_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "piece_cost" ADD CONSTRAINT "piece_cost_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "private_note" ADD CONSTRAINT "private_note_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sitter_private" ADD CONSTRAINT "sitter_private_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "call_sheet" ADD CONSTRAINT "call_sheet_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "call_sheet_copy" ADD CONSTRAINT "call_sheet_copy_call_sheet_id_call_sheet_id_fk" FOREIGN KEY ("call_sheet_id") REFERENCES "public"."call_sheet"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "release" ADD CONSTRAINT "release_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "budget_line" ADD CONSTRAINT "budget_line_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "estimate" ADD CONSTRAINT "estimate_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "payment" ADD CONSTRAINT "payment_shoot_id_shoot_id_fk" FOREIGN KEY ("shoot_id") REFERENCES "public"."shoot"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "upload_shoot" ON "upload" USING btree ("shoot_id");--> statement-breakpoint
CREATE INDEX "upload_sha256" ON "upload" USING btree ("sha256");--> statement-breakpoint
CREATE UNIQUE INDEX "rt_doc_shoot_kind" ON "rt_doc" USING btree ("shoot_id","kind");--> statement-breakpoint
CREATE INDEX "rt_quarantine_doc" ON "rt_quarantine" USING btree ("doc_id");--> statement-breakpoint
CREATE INDEX "sign_off_shoot" ON "sign_off" USING btree ("shoot_id");--> statement-breakpoint
CREATE INDEX "comment_shoot" ON "comment" USING btree ("shoot_id");--> statement-breakpoint
CREATE UNIQUE INDEX "call_sheet_number" ON "call_sheet" USING btree ("shoot_id","number");--> statement-breakpoint
CREATE INDEX "mail_due" ON "mail" USING btree ("next_try_at");