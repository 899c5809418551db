CREATE SCHEMA "auth";
--> statement-breakpoint
CREATE TABLE "audit" (
	"shop_id" text NOT NULL,
	"seq" bigint NOT NULL,
	"at" timestamp with time zone NOT NULL,
	"actor_id" text NOT NULL,
	"actor_name" text NOT NULL,
	"role" text NOT NULL,
	"request_id" text NOT NULL,
	"verb" text NOT NULL,
	"reason" text,
	"entity" text NOT NULL,
	"entity_id" text NOT NULL,
	"case_id" text,
	"action" text NOT NULL,
	"before" jsonb,
	"after" jsonb,
	"previous_hash" text NOT NULL,
	"hash" text NOT NULL,
	CONSTRAINT "audit_shop_id_seq_pk" PRIMARY KEY("shop_id","seq")
);
--> statement-breakpoint
CREATE TABLE "audit_heads" (
	"shop_id" text NOT NULL,
	"seq" bigint NOT NULL,
	"hash" text NOT NULL,
	CONSTRAINT "audit_heads_shop_id_pk" PRIMARY KEY("shop_id")
);
--> statement-breakpoint
CREATE TABLE "auth"."account" (
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
CREATE TABLE "auth"."invitation" (
	"id" text PRIMARY KEY NOT NULL,
	"organization_id" text NOT NULL,
	"email" text NOT NULL,
	"role" text,
	"status" text DEFAULT 'pending' NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"inviter_id" text NOT NULL
);
--> statement-breakpoint
CREATE TABLE "auth"."member" (
	"id" text PRIMARY KEY NOT NULL,
	"organization_id" text NOT NULL,
	"user_id" text NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "auth"."organization" (
	"id" text PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"slug" text NOT NULL,
	"logo" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"metadata" text
);
--> statement-breakpoint
CREATE TABLE "auth"."rate_limit" (
	"id" text PRIMARY KEY NOT NULL,
	"key" text NOT NULL,
	"count" integer NOT NULL,
	"last_request" bigint NOT NULL
);
--> statement-breakpoint
CREATE TABLE "auth"."session" (
	"id" text PRIMARY KEY NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"token" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"ip_address" text,
	"user_agent" text,
	"user_id" text NOT NULL,
	"active_organization_id" text
);
--> statement-breakpoint
CREATE TABLE "auth"."user" (
	"id" text PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"email_verified" boolean DEFAULT false NOT NULL,
	"image" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "auth"."verification" (
	"id" text PRIMARY KEY NOT NULL,
	"identifier" text NOT NULL,
	"value" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "authorizations" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"amount_minor" bigint NOT NULL,
	"currency" text NOT NULL,
	"given_by" text NOT NULL,
	"how" text NOT NULL,
	"contact" text,
	"words" text,
	"taken_by_id" text NOT NULL,
	"taken_by_name" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	CONSTRAINT "authorizations_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "case_codes" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"code" text NOT NULL,
	"status" text NOT NULL,
	"phase" text NOT NULL,
	"freeze_frame" jsonb,
	"version" integer DEFAULT 1 NOT NULL,
	"at" timestamp with time zone NOT NULL,
	CONSTRAINT "case_codes_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "case_notes" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"work_job_id" text,
	"kind" text NOT NULL,
	"text" text NOT NULL,
	"by_id" text NOT NULL,
	"by_name" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	CONSTRAINT "case_notes_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "cases" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"number" integer NOT NULL,
	"customer_id" text NOT NULL,
	"vehicle_id" text NOT NULL,
	"stage" text NOT NULL,
	"stage_since" timestamp with time zone NOT NULL,
	"parked_from" text,
	"parked_for" text,
	"waiting_on" text NOT NULL,
	"waiting_for" text NOT NULL,
	"complaints" text[] NOT NULL,
	"words" text NOT NULL,
	"circumstances" text[] NOT NULL,
	"history" text[] NOT NULL,
	"condition_note" text,
	"arrival" text NOT NULL,
	"odometer_in_km" integer,
	"odometer_unreadable" text,
	"odometer_out_km" integer,
	"keep_parts" boolean NOT NULL,
	"road_test_allowed" boolean NOT NULL,
	"technician_id" text,
	"promised_at" timestamp with time zone,
	"promise_moves" integer DEFAULT 0 NOT NULL,
	"ceiling_minor" bigint,
	"rates" jsonb,
	"site" jsonb NOT NULL,
	"readiness" jsonb NOT NULL,
	"after_codes_read" boolean DEFAULT false NOT NULL,
	"lead_cause" text,
	"lead_family" text,
	"lead_probability" real,
	"lead_mark" text,
	"comeback_of_id" text,
	"safety_note" text,
	"waiver" jsonb,
	"outcome" text,
	"search_text" text NOT NULL,
	"opened_at" timestamp with time zone NOT NULL,
	"closed_at" timestamp with time zone,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "cases_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "cause_marks" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"cause_id" text NOT NULL,
	"mark" text NOT NULL,
	"reason" text NOT NULL,
	"proven_by_test_id" text,
	"rank" integer,
	"probability" real,
	"location" jsonb,
	"by_id" text NOT NULL,
	"by_name" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	"withdrawn_at" timestamp with time zone,
	CONSTRAINT "cause_marks_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "files" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"kind" text NOT NULL,
	"name" text NOT NULL,
	"bytes" integer NOT NULL,
	"sha256" text,
	"content_type" text NOT NULL,
	"storage_key" text NOT NULL,
	"display_key" text,
	"thumb_key" text,
	"width" integer,
	"height" integer,
	"state" text NOT NULL,
	"reason" text,
	"caption" text,
	"for_customer" boolean DEFAULT true NOT NULL,
	"work_job_id" text,
	"by_id" text NOT NULL,
	"by_name" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	CONSTRAINT "files_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "samples" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"position" integer NOT NULL,
	"mode" text NOT NULL,
	"phase" text NOT NULL,
	"how" text,
	"values" jsonb NOT NULL,
	"taken_at" timestamp with time zone NOT NULL,
	"taken_by_id" text NOT NULL,
	"taken_by_name" text NOT NULL,
	"before_consent" boolean DEFAULT false NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "samples_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "stage_events" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"from_stage" text,
	"to_stage" text NOT NULL,
	"reason" text,
	"by_id" text NOT NULL,
	"by_name" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	CONSTRAINT "stage_events_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "test_outcomes" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"test_id" text NOT NULL,
	"outcome" text NOT NULL,
	"phase" text NOT NULL,
	"cylinder" integer,
	"bank" integer,
	"note" text,
	"by_id" text NOT NULL,
	"by_name" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	"undone_at" timestamp with time zone,
	CONSTRAINT "test_outcomes_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "labour_rates" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"name" text NOT NULL,
	"per_hour_minor" bigint NOT NULL,
	"purpose" text NOT NULL,
	"is_active" boolean DEFAULT true NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "labour_rates_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "operations" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"name" text NOT NULL,
	"hours_milli" integer NOT NULL,
	"rate_id" text NOT NULL,
	"is_active" boolean DEFAULT true NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "operations_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "parts" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"number" text NOT NULL,
	"name" text NOT NULL,
	"cost_minor" bigint NOT NULL,
	"price_minor" bigint NOT NULL,
	"condition" text NOT NULL,
	"is_active" boolean DEFAULT true NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "parts_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "set_jobs" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"name" text NOT NULL,
	"customer_title" text NOT NULL,
	"cause_id" text,
	"urgency" text NOT NULL,
	"if_waits" text NOT NULL,
	"lines" jsonb NOT NULL,
	"is_active" boolean DEFAULT true NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "set_jobs_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "approvals" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"revision_id" text NOT NULL,
	"revision_sha256" text NOT NULL,
	"how" text NOT NULL,
	"given_by" text NOT NULL,
	"contact" text,
	"words" text,
	"answers" jsonb NOT NULL,
	"keep_parts" boolean NOT NULL,
	"total_minor" bigint NOT NULL,
	"currency" text NOT NULL,
	"address" text,
	"user_agent" text,
	"taken_by_id" text NOT NULL,
	"taken_by_name" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	CONSTRAINT "approvals_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "clock_entries" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"work_job_id" text,
	"person_id" text NOT NULL,
	"person_name" text NOT NULL,
	"started_at" timestamp with time zone NOT NULL,
	"ended_at" timestamp with time zone,
	"corrected_reason" text,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "clock_entries_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "customer_links" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"kind" text NOT NULL,
	"target_id" text NOT NULL,
	"secret_hash" text NOT NULL,
	"sent_to" text,
	"expires_at" timestamp with time zone NOT NULL,
	"revoked_at" timestamp with time zone,
	"created_at" timestamp with time zone NOT NULL,
	CONSTRAINT "customer_links_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "mails" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text,
	"kind" text NOT NULL,
	"to_address" text NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"html" text NOT NULL,
	"paper_id" text,
	"created_at" timestamp with time zone NOT NULL,
	"sent_at" timestamp with time zone,
	"last_error" text,
	CONSTRAINT "mails_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "papers" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"kind" text NOT NULL,
	"number" text NOT NULL,
	"title" text NOT NULL,
	"snapshot" jsonb NOT NULL,
	"bytes" "bytea" NOT NULL,
	"sha256" text NOT NULL,
	"currency" text NOT NULL,
	"total_minor" bigint NOT NULL,
	"issued_at" timestamp with time zone NOT NULL,
	"issued_by_name" text NOT NULL,
	CONSTRAINT "papers_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "parts_used" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"work_job_id" text NOT NULL,
	"line_id" text,
	"description" text NOT NULL,
	"part_number" text,
	"quantity_milli" integer NOT NULL,
	"condition" text NOT NULL,
	"old_part" text NOT NULL,
	"status" text NOT NULL,
	"arrives_on" text,
	"by_name" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "parts_used_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "payments" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"paper_id" text NOT NULL,
	"how" text NOT NULL,
	"amount_minor" bigint NOT NULL,
	"currency" text NOT NULL,
	"reference" text,
	"taken_by_name" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	CONSTRAINT "payments_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "questions" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"revision_id" text NOT NULL,
	"from_customer" boolean NOT NULL,
	"text" text NOT NULL,
	"by_name" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	CONSTRAINT "questions_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "quote_drafts" (
	"shop_id" text NOT NULL,
	"case_id" text NOT NULL,
	"headline" text NOT NULL,
	"finding" text NOT NULL,
	"ready_at" timestamp with time zone,
	"warranty" text NOT NULL,
	"diagnosis_net_minor" bigint,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "quote_drafts_shop_id_case_id_pk" PRIMARY KEY("shop_id","case_id")
);
--> statement-breakpoint
CREATE TABLE "quote_jobs" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"position" integer NOT NULL,
	"cause_id" text,
	"title" text NOT NULL,
	"customer_title" text NOT NULL,
	"urgency" text NOT NULL,
	"if_waits" text NOT NULL,
	"depends_on_id" text,
	"is_safety" boolean DEFAULT false NOT NULL,
	"lines" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "quote_jobs_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "quote_revisions" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"number" integer NOT NULL,
	"snapshot" jsonb NOT NULL,
	"sha256" text NOT NULL,
	"currency" text NOT NULL,
	"total_minor" bigint NOT NULL,
	"sent_at" timestamp with time zone NOT NULL,
	"sent_by_id" text NOT NULL,
	"sent_by_name" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"first_opened_at" timestamp with time zone,
	"withdrawn_at" timestamp with time zone,
	"superseded_at" timestamp with time zone,
	CONSTRAINT "quote_revisions_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "work_jobs" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"case_id" text NOT NULL,
	"revision_id" text NOT NULL,
	"quote_job_id" text NOT NULL,
	"position" integer NOT NULL,
	"cause_id" text,
	"title" text NOT NULL,
	"approved_minor" bigint NOT NULL,
	"sold_minutes" integer NOT NULL,
	"lines" jsonb NOT NULL,
	"state" text NOT NULL,
	"strike_reason" text,
	"correction" text,
	"done_at" timestamp with time zone,
	"done_by_name" text,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "work_jobs_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "counters" (
	"shop_id" text NOT NULL,
	"series" text NOT NULL,
	"next" integer NOT NULL,
	CONSTRAINT "counters_shop_id_series_pk" PRIMARY KEY("shop_id","series")
);
--> statement-breakpoint
CREATE TABLE "customers" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"name" text NOT NULL,
	"email" text,
	"phone" text,
	"address" text,
	"note" text,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "customers_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "idempotency" (
	"shop_id" text NOT NULL,
	"key" text NOT NULL,
	"verb" text NOT NULL,
	"actor_id" text NOT NULL,
	"input_hash" text NOT NULL,
	"answer" jsonb,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "idempotency_shop_id_actor_id_key_pk" PRIMARY KEY("shop_id","actor_id","key")
);
--> statement-breakpoint
CREATE TABLE "people" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"role" text NOT NULL,
	"is_active" boolean DEFAULT true NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "people_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
CREATE TABLE "shops" (
	"shop_id" text NOT NULL,
	"name" text NOT NULL,
	"settings" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "shops_shop_id_pk" PRIMARY KEY("shop_id")
);
--> statement-breakpoint
CREATE TABLE "vehicles" (
	"shop_id" text NOT NULL,
	"id" text NOT NULL,
	"customer_id" text NOT NULL,
	"label" text NOT NULL,
	"plate" text,
	"vin" text,
	"model_year" integer,
	"engine" jsonb NOT NULL,
	"odometer_km" integer,
	"note" text,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "vehicles_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
ALTER TABLE "auth"."account" ADD CONSTRAINT "account_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "auth"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "auth"."invitation" ADD CONSTRAINT "invitation_organization_id_organization_id_fk" FOREIGN KEY ("organization_id") REFERENCES "auth"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "auth"."invitation" ADD CONSTRAINT "invitation_inviter_id_user_id_fk" FOREIGN KEY ("inviter_id") REFERENCES "auth"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "auth"."member" ADD CONSTRAINT "member_organization_id_organization_id_fk" FOREIGN KEY ("organization_id") REFERENCES "auth"."organization"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "auth"."member" ADD CONSTRAINT "member_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "auth"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "auth"."session" ADD CONSTRAINT "session_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "auth"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "authorizations" ADD CONSTRAINT "authorizations_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "case_codes" ADD CONSTRAINT "case_codes_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "case_notes" ADD CONSTRAINT "case_notes_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cases" ADD CONSTRAINT "cases_customer" FOREIGN KEY ("shop_id","customer_id") REFERENCES "public"."customers"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cases" ADD CONSTRAINT "cases_vehicle" FOREIGN KEY ("shop_id","vehicle_id") REFERENCES "public"."vehicles"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cases" ADD CONSTRAINT "cases_technician" FOREIGN KEY ("shop_id","technician_id") REFERENCES "public"."people"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cases" ADD CONSTRAINT "cases_comeback" FOREIGN KEY ("shop_id","comeback_of_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cause_marks" ADD CONSTRAINT "cause_marks_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "files" ADD CONSTRAINT "files_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "samples" ADD CONSTRAINT "samples_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stage_events" ADD CONSTRAINT "stage_events_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "test_outcomes" ADD CONSTRAINT "test_outcomes_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "approvals" ADD CONSTRAINT "approvals_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "clock_entries" ADD CONSTRAINT "clock_entries_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "customer_links" ADD CONSTRAINT "customer_links_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "papers" ADD CONSTRAINT "papers_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "parts_used" ADD CONSTRAINT "parts_used_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "payments" ADD CONSTRAINT "payments_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "questions" ADD CONSTRAINT "questions_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quote_drafts" ADD CONSTRAINT "quote_drafts_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quote_jobs" ADD CONSTRAINT "quote_jobs_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "quote_revisions" ADD CONSTRAINT "quote_revisions_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "work_jobs" ADD CONSTRAINT "work_jobs_case" FOREIGN KEY ("shop_id","case_id") REFERENCES "public"."cases"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "vehicles" ADD CONSTRAINT "vehicles_customer" FOREIGN KEY ("shop_id","customer_id") REFERENCES "public"."customers"("shop_id","id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "audit_at" ON "audit" USING btree ("shop_id","at");--> statement-breakpoint
CREATE INDEX "audit_of_case" ON "audit" USING btree ("shop_id","case_id","seq");--> statement-breakpoint
CREATE INDEX "audit_of_entity" ON "audit" USING btree ("shop_id","entity","entity_id","seq");--> statement-breakpoint
CREATE INDEX "account_user" ON "auth"."account" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "invitation_organization" ON "auth"."invitation" USING btree ("organization_id");--> statement-breakpoint
CREATE INDEX "invitation_email" ON "auth"."invitation" USING btree ("email");--> statement-breakpoint
CREATE UNIQUE INDEX "member_once" ON "auth"."member" USING btree ("organization_id","user_id");--> statement-breakpoint
CREATE INDEX "member_user" ON "auth"."member" USING btree ("user_id");--> statement-breakpoint
CREATE UNIQUE INDEX "organization_slug" ON "auth"."organization" USING btree ("slug");--> statement-breakpoint
CREATE UNIQUE INDEX "rate_limit_key" ON "auth"."rate_limit" USING btree ("key");--> statement-breakpoint
CREATE UNIQUE INDEX "session_token" ON "auth"."session" USING btree ("token");--> statement-breakpoint
CREATE INDEX "session_user" ON "auth"."session" USING btree ("user_id");--> statement-breakpoint
CREATE UNIQUE INDEX "user_email" ON "auth"."user" USING btree ("email");--> statement-breakpoint
CREATE INDEX "verification_identifier" ON "auth"."verification" USING btree ("identifier");--> statement-breakpoint
CREATE INDEX "authorizations_of_case" ON "authorizations" USING btree ("shop_id","case_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "case_codes_once" ON "case_codes" USING btree ("shop_id","case_id","phase","code","status");--> statement-breakpoint
CREATE INDEX "case_notes_of_case" ON "case_notes" USING btree ("shop_id","case_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "cases_number" ON "cases" USING btree ("shop_id","number");--> statement-breakpoint
CREATE INDEX "cases_open" ON "cases" USING btree ("shop_id","waiting_on","number") WHERE stage not in ('closed', 'released');--> statement-breakpoint
CREATE INDEX "cases_open_by_number" ON "cases" USING btree ("shop_id","number") WHERE stage not in ('closed', 'released');--> statement-breakpoint
CREATE INDEX "cases_stage" ON "cases" USING btree ("shop_id","stage","stage_since");--> statement-breakpoint
CREATE INDEX "cases_technician_work" ON "cases" USING btree ("shop_id","technician_id","stage");--> statement-breakpoint
CREATE INDEX "cases_promised" ON "cases" USING btree ("shop_id","promised_at");--> statement-breakpoint
CREATE INDEX "cases_of_customer" ON "cases" USING btree ("shop_id","customer_id","number");--> statement-breakpoint
CREATE INDEX "cases_of_vehicle" ON "cases" USING btree ("shop_id","vehicle_id","number");--> statement-breakpoint
CREATE INDEX "cases_of_comeback" ON "cases" USING btree ("shop_id","comeback_of_id");--> statement-breakpoint
CREATE INDEX "cause_marks_of_case" ON "cause_marks" USING btree ("shop_id","case_id","at");--> statement-breakpoint
CREATE INDEX "files_of_case" ON "files" USING btree ("shop_id","case_id","at");--> statement-breakpoint
CREATE INDEX "samples_of_case" ON "samples" USING btree ("shop_id","case_id","position");--> statement-breakpoint
CREATE INDEX "stage_events_of_case" ON "stage_events" USING btree ("shop_id","case_id","at");--> statement-breakpoint
CREATE INDEX "test_outcomes_of_case" ON "test_outcomes" USING btree ("shop_id","case_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "labour_rates_name" ON "labour_rates" USING btree ("shop_id","name");--> statement-breakpoint
CREATE UNIQUE INDEX "operations_name" ON "operations" USING btree ("shop_id","name");--> statement-breakpoint
CREATE INDEX "operations_rate" ON "operations" USING btree ("shop_id","rate_id");--> statement-breakpoint
CREATE UNIQUE INDEX "parts_number" ON "parts" USING btree ("shop_id","number");--> statement-breakpoint
CREATE INDEX "parts_name" ON "parts" USING btree ("shop_id","name");--> statement-breakpoint
CREATE UNIQUE INDEX "set_jobs_name" ON "set_jobs" USING btree ("shop_id","name");--> statement-breakpoint
CREATE INDEX "set_jobs_cause" ON "set_jobs" USING btree ("shop_id","cause_id");--> statement-breakpoint
CREATE UNIQUE INDEX "approvals_once" ON "approvals" USING btree ("shop_id","revision_id");--> statement-breakpoint
CREATE INDEX "approvals_of_case" ON "approvals" USING btree ("shop_id","case_id","at");--> statement-breakpoint
CREATE INDEX "clock_entries_of_case" ON "clock_entries" USING btree ("shop_id","case_id","started_at");--> statement-breakpoint
CREATE INDEX "clock_entries_of_person" ON "clock_entries" USING btree ("shop_id","person_id","started_at");--> statement-breakpoint
CREATE UNIQUE INDEX "customer_links_hash" ON "customer_links" USING btree ("shop_id","secret_hash");--> statement-breakpoint
CREATE INDEX "customer_links_target" ON "customer_links" USING btree ("shop_id","target_id");--> statement-breakpoint
CREATE INDEX "mails_of_case" ON "mails" USING btree ("shop_id","case_id","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "papers_number" ON "papers" USING btree ("shop_id","kind","number");--> statement-breakpoint
CREATE INDEX "papers_of_case" ON "papers" USING btree ("shop_id","case_id","issued_at");--> statement-breakpoint
CREATE INDEX "parts_used_of_job" ON "parts_used" USING btree ("shop_id","case_id","work_job_id");--> statement-breakpoint
CREATE INDEX "payments_of_paper" ON "payments" USING btree ("shop_id","paper_id","at");--> statement-breakpoint
CREATE INDEX "questions_of_case" ON "questions" USING btree ("shop_id","case_id","at");--> statement-breakpoint
CREATE INDEX "quote_jobs_of_case" ON "quote_jobs" USING btree ("shop_id","case_id","position");--> statement-breakpoint
CREATE UNIQUE INDEX "quote_revisions_number" ON "quote_revisions" USING btree ("shop_id","case_id","number");--> statement-breakpoint
CREATE UNIQUE INDEX "work_jobs_once" ON "work_jobs" USING btree ("shop_id","revision_id","quote_job_id");--> statement-breakpoint
CREATE INDEX "work_jobs_of_case" ON "work_jobs" USING btree ("shop_id","case_id","position");--> statement-breakpoint
CREATE UNIQUE INDEX "customers_by_name" ON "customers" USING btree ("shop_id","name","id");--> statement-breakpoint
CREATE UNIQUE INDEX "vehicles_by_customer" ON "vehicles" USING btree ("shop_id","customer_id","id");--> statement-breakpoint
CREATE UNIQUE INDEX "vehicles_by_plate" ON "vehicles" USING btree ("shop_id","plate","id");--> statement-breakpoint
CREATE UNIQUE INDEX "vehicles_by_vin" ON "vehicles" USING btree ("shop_id","vin","id");--> statement-breakpoint
CREATE UNIQUE INDEX "vehicles_by_label" ON "vehicles" USING btree ("shop_id","label","id");